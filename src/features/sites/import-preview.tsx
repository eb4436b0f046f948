import { useDeferredValue, useMemo, useState } from 'react';
import { MOST_SITE_ROWS } from '../../contract/site-imports.ts';
import { guessSiteColumns } from '../../engine/sites/site-columns.ts';
import { number, plural, position } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { ColumnMappingForm } from './column-mapping.tsx';
import { FaultTable } from './fault-table.tsx';
import type { TableFile } from './read-table-file.ts';
import { type ColumnMapping, mappingProblem, type RowOfTable, readTable } from './table-draft.ts';

const PREVIEWED = 6;

interface ImportPreviewProps {
  readonly table: TableFile;
  readonly onSend: (rows: readonly RowOfTable[]) => void;
  readonly onOther: () => void;
}

/** The table as it is read, with every fault by line and column, before anything is sent. */
export function ImportPreview({ table, onSend, onOther }: ImportPreviewProps) {
  const [mapping, setMapping] = useState<ColumnMapping>(() => guessSiteColumns(table.heads));
  const [leavesOut, setLeavesOut] = useState(false);
  // Fifty thousand rows take a moment: the choice shows at once, the reading follows.
  const read = useDeferredValue(mapping);
  const lacks = mappingProblem(read);
  const reading = useMemo(() => (mappingProblem(read) === null ? readTable(table, read) : null), [table, read]);
  const isTooLong = table.rows.length > MOST_SITE_ROWS;
  const faulty = reading === null ? 0 : table.rows.length - reading.good;
  const canSend = reading !== null && !isTooLong && (faulty === 0 || leavesOut) && reading.good > 0;
  return (
    <div className="grid grid-cols-[minmax(0,1fr)] gap-6">
      <p>
        <span className="font-medium break-all">{table.name}</span>: {plural(table.rows.length, 'row')}.{' '}
        <Button look="quiet" onClick={onOther}>
          Choose another file
        </Button>
      </p>
      <ColumnMappingForm table={table} mapping={mapping} onMapping={setMapping} />
      {lacks === null ? null : (
        <Notice tone="attention" title="Not all columns are known">
          {lacks}
        </Notice>
      )}
      {isTooLong ? (
        <Notice tone="wrong" title="Too many rows">
          A table may have {number(MOST_SITE_ROWS)} rows. Divide it, and import its parts.
        </Notice>
      ) : null}
      {reading === null ? null : (
        <>
          <PreviewTable rows={reading.rows} />
          {reading.faults.length === 0 ? null : (
            <section aria-labelledby="faults">
              <h2 id="faults" className="mb-1 text-name">
                {plural(reading.faults.length, 'fault')} in {plural(faulty, 'row')}
              </h2>
              <p className="mb-2 max-w-[70ch] text-soft">
                Mend them in the file and choose it again, or leave these rows out.
              </p>
              <FaultTable what="Faults" count={reading.faults.length} told={reading.faults} />
              <label className="mt-3 flex items-center gap-2">
                <input
                  type="checkbox"
                  className="size-5 accent-indigo"
                  checked={leavesOut}
                  onChange={({ currentTarget }) => setLeavesOut(currentTarget.checked)}
                />
                Leave the {plural(faulty, 'row')} with faults out
              </label>
            </section>
          )}
          <div className="flex flex-wrap items-center gap-3">
            <Button
              look="primary"
              disabled={!canSend}
              onClick={() => onSend(reading.rows.filter(({ site }) => site !== null))}
            >
              Check {plural(reading.good, 'row')} with the server
            </Button>
            <p role="status" className="text-fine text-soft">
              {reading.doubles > 0
                ? `${plural(reading.doubles, 'row doubles', 'rows double')} another of the table by name or place; you decide after the check.`
                : 'Nothing becomes a site yet.'}
            </p>
          </div>
        </>
      )}
    </div>
  );
}

function PreviewTable({ rows }: { rows: readonly RowOfTable[] }) {
  return (
    <ScrollInside label="First rows as read, scrolls sideways">
      <table className="ruled min-w-[40rem]">
        <caption className="mb-1 text-left font-semibold">The first rows, read by these columns</caption>
        <thead>
          <tr>
            <th scope="col" className="w-14">
              Line
            </th>
            <th scope="col">Name</th>
            <th scope="col">Position</th>
            <th scope="col" className="figure">
              Elevation, m
            </th>
            <th scope="col" className="figure">
              Load, kW
            </th>
            <th scope="col" className="pl-4">
              Station
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.slice(0, PREVIEWED).map(({ line, cells, site }) => (
            <tr key={line}>
              <td>{number(line)}</td>
              {site === null ? (
                <td colSpan={5} className="text-madder" dir="auto">
                  {cells.name === undefined || cells.name === '' ? 'This row' : cells.name} has faults, listed below.
                </td>
              ) : (
                <>
                  <td dir="auto">{site.name}</td>
                  <td>{position(site)}</td>
                  <td className="figure">{site.elevationM === null ? 'of the relief' : number(site.elevationM)}</td>
                  <td className="figure">{site.designLoadKw === null ? '–' : number(site.designLoadKw)}</td>
                  <td className="pl-4">{site.stationName ?? 'the default'}</td>
                </>
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </ScrollInside>
  );
}
