import { useFormContext } from 'react-hook-form';
import { Button } from '../../ui/button.tsx';
import type { DraftValues } from './draft.ts';
import { useDraftScope } from './draft-context.ts';
import { Entries, presetWords, useEntries } from './entries.tsx';
import { fieldId, inputLook } from './field-row.tsx';

/** What a person answers for each site beside what every place is asked. */
export function GatesField() {
  const { preset, problems } = useDraftScope();
  const { entries, add, remove } = useEntries('gates');
  return (
    <Entries
      path="gates"
      title="Site questions of this use"
      count={entries.length}
      rowAt={(index) => <GateEntry path={`gates.${index}`} label={`Site question ${index + 1}`} />}
      problemAt={(index) => problems[`gates.${index}`]}
      onRemove={remove}
      add={
        <Button look="quiet" onClick={() => add('')}>
          Add a site question
        </Button>
      }
    >
      Every place is asked for water, exclusions of use and hygiene, and its weather has to cover the schedule. What
      this use is asked besides stands here; a person answers it for each site, outside the score.{' '}
      {presetWords(preset?.gates)}
      Source: the preset, ours.
    </Entries>
  );
}

function GateEntry({ path, label }: { path: string; label: string }) {
  const { register } = useFormContext<DraftValues>();
  const { problems } = useDraftScope();
  const isWrong = problems[path] !== undefined;
  return (
    <input
      {...register(path)}
      id={fieldId(path)}
      aria-label={label}
      aria-invalid={isWrong || undefined}
      type="text"
      autoComplete="off"
      className={`${inputLook(isWrong)} min-w-0 flex-1`}
    />
  );
}
