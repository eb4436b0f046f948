import type { UseKind } from '../../engine/brief/brief-fields.ts';
import { type ReportedParts, reportedParts, reportedText } from '../../engine/brief/reported.ts';
import { Button } from '../../ui/button.tsx';
import { useDraftScope } from './draft-context.ts';
import { Entries, presetWords, useEntries } from './entries.tsx';
import { fieldId, inputLook } from './field-row.tsx';

/** Hours that are counted and printed but make no class. */
export function ReportedField({ use }: { use: UseKind }) {
  const { preset, problems } = useDraftScope();
  const { entries, add, change, remove } = useEntries('reported');
  const hasRoom = use === 'room' || use === 'index';
  return (
    <Entries
      path="reported"
      title="Quantities"
      count={entries.length}
      rowAt={(index) => (
        <ReportedRow
          asked={reportedParts(String(entries[index]))}
          name={`Reported, row ${index + 1}`}
          id={fieldId(`reported.${index}`)}
          isWrong={problems[`reported.${index}`] !== undefined}
          onChange={(next) => change(index, reportedText(next))}
        />
      )}
      problemAt={(index) => problems[`reported.${index}`]}
      onRemove={remove}
      add={
        <>
          {hasRoom ? (
            <>
              <Button look="quiet" onClick={() => add(reportedText({ kind: 'thi', parts: ['68'] }))}>
                Add a temperature-humidity index
              </Button>
              <Button look="quiet" onClick={() => add(reportedText({ kind: 'deficit', parts: ['0.2', '1.4'] }))}>
                Add a vapour pressure deficit
              </Button>
            </>
          ) : null}
          <Button look="quiet" onClick={() => add('')}>
            Add another
          </Button>
        </>
      }
    >
      Demand hours counted in the air of the room and printed; they make no class and move no score. The lower humidity
      limits above are counted too. {presetWords(preset?.reported)}Source: the preset.
    </Entries>
  );
}

interface ReportedRowProps {
  readonly asked: ReportedParts;
  readonly name: string;
  readonly id: string;
  readonly isWrong: boolean;
  readonly onChange: (next: ReportedParts) => void;
}

function ReportedRow({ asked, name, id, isWrong, onChange }: ReportedRowProps) {
  const input = (
    value: string,
    shown: { label: string; id?: string; wide?: boolean },
    change: (text: string) => void,
  ) => (
    <input
      id={shown.id}
      aria-label={`${name}: ${shown.label}`}
      aria-invalid={isWrong || undefined}
      type="text"
      inputMode={shown.wide ? 'text' : 'decimal'}
      autoComplete="off"
      value={value}
      onChange={({ currentTarget }) => change(shown.wide ? currentTarget.value : pointed(currentTarget.value))}
      className={`${inputLook(isWrong)} ${shown.wide ? 'min-w-0 flex-1' : 'w-20 text-right'}`}
    />
  );
  switch (asked.kind) {
    case 'thi':
      return (
        <>
          temperature-humidity index over
          {input(asked.parts[0], { label: 'index over', id }, (text) => onChange({ kind: 'thi', parts: [text] }))}
        </>
      );
    case 'deficit': {
      const [below, above] = asked.parts;
      return (
        <>
          vapour pressure deficit below
          {input(below, { label: 'below, in kPa', id }, (text) => onChange({ kind: 'deficit', parts: [text, above] }))}
          and above
          {input(above, { label: 'above, in kPa' }, (text) => onChange({ kind: 'deficit', parts: [below, text] }))}
          kPa
        </>
      );
    }
    case 'other':
      return (
        <>
          {input(asked.parts[0], { label: 'what is to be reported', id, wide: true }, (text) =>
            onChange({ kind: 'other', parts: [text] }),
          )}
          <span className="text-fine text-soft">printed, and said not to be counted</span>
        </>
      );
  }
}

/** A comma for the point, as typed elsewhere in the form. */
function pointed(text: string): string {
  return text.trim().replace(/^(\d+),(\d+)$/, '$1.$2');
}
