import { useFormContext } from 'react-hook-form';
import { DERATE_RULE, type UseKind } from '../../engine/brief/brief-fields.ts';
import { isRecord } from '../../engine/brief/fields.ts';
import { Button } from '../../ui/button.tsx';
import type { DraftValues } from './draft.ts';
import { useDraftScope } from './draft-context.ts';
import { Entries, presetWords, useEntries } from './entries.tsx';
import { fieldId, inputLook, numberOf } from './field-row.tsx';

/** Temperatures that only so many hours may pass, each a gate. */
export function HardLimitsField({ use }: { use: UseKind }) {
  const { preset, problems } = useDraftScope();
  const { entries, add, change, remove } = useEntries('hardLimits');
  const words = preset?.hardLimits.map(
    ({ tempC, hours, derate }) => `${hours} h over ${tempC} °C${derate === undefined ? '' : ', derated'}`,
  );
  return (
    <Entries
      path="hardLimits"
      title="Hard limits"
      count={entries.length}
      rowAt={(index) => (
        <HardLimitRow index={index} entry={entries[index]} use={use} onChange={(next) => change(index, next)} />
      )}
      problemAt={(index) =>
        ['tempC', 'hours', 'derate'].map((name) => problems[`hardLimits.${index}.${name}`]).find((each) => each)
      }
      onRemove={remove}
      add={
        <Button look="quiet" onClick={() => add({ tempC: null, hours: 0 })}>
          Add a hard limit
        </Button>
      }
    >
      Hours that may lie over a temperature, each a gate: a place that fails one is excluded. {presetWords(words)}
      Source: the preset, ours.
    </Entries>
  );
}

interface HardLimitRowProps {
  readonly index: number;
  readonly entry: unknown;
  readonly use: UseKind;
  readonly onChange: (next: unknown) => void;
}

function HardLimitRow({ index, entry, use, onChange }: HardLimitRowProps) {
  const path = `hardLimits.${index}`;
  const { derate, ...rest } = isRecord(entry) ? entry : {};
  const isDerated = typeof derate === 'string';
  return (
    <>
      at most <NumberEntry path={`${path}.hours`} label={`Hard limit ${index + 1}, hours`} /> h over
      <NumberEntry path={`${path}.tempC`} label={`Hard limit ${index + 1}, temperature in °C`} /> °C
      {use === 'hall' || isDerated ? (
        <label className="flex min-h-8 items-center gap-2">
          <input
            type="checkbox"
            className="size-5 accent-indigo"
            checked={isDerated}
            onChange={({ currentTarget }) => onChange(currentTarget.checked ? { ...rest, derate: DERATE_RULE } : rest)}
          />
          derated {DERATE_RULE}
        </label>
      ) : null}
    </>
  );
}

function NumberEntry({ path, label }: { path: string; label: string }) {
  const { register } = useFormContext<DraftValues>();
  const { problems } = useDraftScope();
  const isWrong = problems[path] !== undefined;
  return (
    <input
      {...register(path, { setValueAs: numberOf })}
      id={fieldId(path)}
      aria-label={label}
      aria-invalid={isWrong || undefined}
      type="text"
      inputMode="decimal"
      autoComplete="off"
      className={`${inputLook(isWrong)} w-20 text-right`}
    />
  );
}
