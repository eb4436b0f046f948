import { useId } from 'react';
import { type SiteColumn, siteColumns } from '../../engine/sites/site-columns.ts';
import type { TableFile } from './read-table-file.ts';
import type { ColumnMapping } from './table-draft.ts';

const labels: Readonly<Record<SiteColumn, string>> = {
  name: 'Name',
  position: 'Position in one column',
  latitude: 'Latitude',
  longitude: 'Longitude',
  elevation: 'Elevation, m',
  'elevation source': 'Source of the elevation',
  load: 'Design load, kW',
  station: 'Chosen station',
  reason: 'Reason for the station',
  notes: 'Notes',
};

interface ColumnMappingFormProps {
  readonly table: TableFile;
  readonly mapping: ColumnMapping;
  readonly onMapping: (mapping: ColumnMapping) => void;
}

/** Which column of the table is what: guessed from the heads, for the person to confirm. */
export function ColumnMappingForm({ table, mapping, onMapping }: ColumnMappingFormProps) {
  return (
    <fieldset className="grid grid-cols-2 gap-x-4 gap-y-3 md:grid-cols-4">
      <legend className="mb-2 font-semibold">Columns, guessed from their heads</legend>
      {siteColumns.map((column) => (
        <ColumnChoice
          key={column}
          label={labels[column]}
          table={table}
          at={mapping[column]}
          onAt={(at) => {
            const { [column]: _was, ...rest } = mapping;
            onMapping(at === undefined ? rest : { ...rest, [column]: at });
          }}
        />
      ))}
    </fieldset>
  );
}

interface ColumnChoiceProps {
  readonly label: string;
  readonly table: TableFile;
  readonly at: number | undefined;
  readonly onAt: (at: number | undefined) => void;
}

function ColumnChoice({ label, table, at, onAt }: ColumnChoiceProps) {
  const id = useId();
  const sample = at === undefined ? '' : (table.rows.find(({ cells }) => cells[at]?.trim())?.cells[at] ?? '');
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="block text-fine font-semibold text-soft">
        {label}
      </label>
      <select
        id={id}
        value={at ?? ''}
        onChange={({ currentTarget }) => onAt(currentTarget.value === '' ? undefined : Number(currentTarget.value))}
        className="min-h-9 w-full rounded-md border border-[#918a78] bg-paper px-2.5 text-body"
      >
        <option value="">Not in the table</option>
        {table.heads.map((head, index) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: heads may repeat, and their order never changes.
          <option key={index} value={index}>
            {head === '' ? `Column ${index + 1}` : head}
          </option>
        ))}
      </select>
      <p className="truncate text-fine text-soft" dir="auto">
        {sample === '' ? '' : `Such as ${sample}`}
      </p>
    </div>
  );
}
