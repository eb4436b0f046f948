import { useId } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import type { UseKind } from '../../engine/brief/brief-fields.ts';
import { monthWords, stageWords } from '../../engine/brief/field-words.ts';
import { Button } from '../../ui/button.tsx';
import type { DraftValues } from './draft.ts';
import { useDraftScope } from './draft-context.ts';
import { fieldId, ProblemNote } from './field-row.tsx';

const dirty = { shouldDirty: true } as const;
const stagesOfUse: Readonly<Record<UseKind, readonly string[]>> = {
  room: ['direct', 'indirect', 'dewpoint', 'twostage'],
  index: ['direct', 'indirect', 'dewpoint', 'twostage'],
  hall: ['indirect'],
  tower: ['tower'],
  turbine: ['direct'],
};

/** The entries of a list of the form as they stand. */
export function useListValue(path: string): readonly unknown[] {
  const value: unknown = useWatch<DraftValues>({ name: path });
  return Array.isArray(value) ? value : [];
}

/** The stages that the brief permits, in the order in which they are tried. */
export function StagesField({ use }: { use: UseKind }) {
  const id = useId();
  const { setValue } = useFormContext<DraftValues>();
  const { problems } = useDraftScope();
  const chosen = useListValue('stages').map(String);
  const rows = [...chosen, ...stagesOfUse[use].filter((stage) => !chosen.includes(stage))];
  const set = (stages: readonly string[]) => setValue('stages', stages, dirty);
  return (
    <fieldset
      id={fieldId('stages')}
      tabIndex={-1}
      className="min-w-0 border-t border-line py-2"
      aria-describedby={`${id}-problem`}
    >
      <legend className="float-left w-full font-medium">Stages, in the order in which they are tried</legend>
      <ol className="clear-both grid gap-1 pt-1">
        {rows.map((stage) => {
          const place = chosen.indexOf(stage);
          return (
            <li key={stage} className="flex min-h-8 items-center gap-3">
              <label className="flex items-center gap-2">
                <input
                  type="checkbox"
                  className="size-5 accent-indigo"
                  checked={place >= 0}
                  onChange={({ currentTarget }) =>
                    set(currentTarget.checked ? [...chosen, stage] : chosen.filter((each) => each !== stage))
                  }
                />
                {place >= 0 ? `${place + 1}. ` : ''}
                {stageWords(stage)}
              </label>
              {place > 0 ? (
                <Button look="quiet" onClick={() => set(chosen.toSpliced(place, 1).toSpliced(place - 1, 0, stage))}>
                  Try earlier
                </Button>
              ) : null}
            </li>
          );
        })}
      </ol>
      <ProblemNote id={`${id}-problem`}>{problems.stages}</ProblemNote>
    </fieldset>
  );
}

const MONTHS = Array.from({ length: 12 }, (_, index) => index + 1);

export function MonthsField() {
  const id = useId();
  const { setValue } = useFormContext<DraftValues>();
  const { problems } = useDraftScope();
  const value: unknown = useWatch<DraftValues>({ name: 'months' });
  const chosen = Array.isArray(value) ? value.map(Number) : MONTHS;
  const set = (months: readonly number[]) =>
    setValue(
      'months',
      months.length === MONTHS.length ? 'all' : MONTHS.filter((month) => months.includes(month)),
      dirty,
    );
  return (
    <fieldset
      id={fieldId('months')}
      tabIndex={-1}
      className="min-w-0 border-t border-line py-2"
      aria-describedby={`${id}-problem`}
    >
      <legend className="float-left w-full font-medium">Months</legend>
      <div className="clear-both grid grid-cols-4 gap-x-3 gap-y-1 pt-1 sm:grid-cols-6">
        {MONTHS.map((month) => (
          <label key={month} className="flex min-h-7 items-center gap-2">
            <input
              type="checkbox"
              className="size-5 accent-indigo"
              checked={chosen.includes(month)}
              onChange={({ currentTarget }) =>
                set(currentTarget.checked ? [...chosen, month] : chosen.filter((each) => each !== month))
              }
            />
            {monthWords(month)}
          </label>
        ))}
      </div>
      <ProblemNote id={`${id}-problem`}>{problems.months}</ProblemNote>
    </fieldset>
  );
}
