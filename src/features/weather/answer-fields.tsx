import { type ReactNode, useId } from 'react';
import { useController } from 'react-hook-form';
import type { AnswerDraft } from './answer-draft.ts';

/** A field of the answers by its path, such as `mapping.dryBulb`. */
type AnswerField = `place.${keyof AnswerDraft['place']}` | `mapping.${keyof AnswerDraft['mapping']}`;

interface FieldProps {
  readonly field: AnswerField;
  readonly label: string;
  /** What the file asks about it, or what to type. */
  readonly hint?: ReactNode;
  readonly className?: string;
}

const look = (wrong: boolean) =>
  `block min-h-9 w-full min-w-0 rounded-md border bg-paper px-2.5 text-body ${wrong ? 'border-madder' : 'border-[#918a78]'}`;

/** A choice with its question and its fault. */
export function SelectField({ field, label, hint, className = '', children }: FieldProps & { children: ReactNode }) {
  const { field: held, fieldState } = useController<AnswerDraft, AnswerField>({ name: field });
  const { id, problem, notes } = useNotes(fieldState.error?.message, hint);
  return (
    <div className={`min-w-0 ${className}`}>
      <label htmlFor={id} className="block text-fine font-semibold text-soft">
        {label}
      </label>
      <select
        {...held}
        id={id}
        aria-invalid={problem ? true : undefined}
        aria-describedby={notes}
        className={look(problem !== undefined)}
      >
        {children}
      </select>
      <Notes id={id} hint={hint} problem={problem} />
    </div>
  );
}

interface TextProps extends FieldProps {
  readonly inputMode?: 'text' | 'decimal';
  readonly list?: string;
}

/** A line of text with what to type and its fault. */
export function AnswerText({ field, label, hint, className = '', inputMode, list }: TextProps) {
  const { field: held, fieldState } = useController<AnswerDraft, AnswerField>({ name: field });
  const { id, problem, notes } = useNotes(fieldState.error?.message, hint);
  return (
    <div className={`min-w-0 ${className}`}>
      <label htmlFor={id} className="block text-fine font-semibold text-soft">
        {label}
      </label>
      <input
        {...held}
        id={id}
        type="text"
        inputMode={inputMode}
        list={list}
        autoComplete="off"
        aria-invalid={problem ? true : undefined}
        aria-describedby={notes}
        className={look(problem !== undefined)}
      />
      <Notes id={id} hint={hint} problem={problem} />
    </div>
  );
}

function useNotes(problem: string | undefined, hint: ReactNode) {
  const id = useId();
  const notes = [...(hint ? [`${id}-hint`] : []), ...(problem ? [`${id}-problem`] : [])];
  return { id, problem, notes: notes.length > 0 ? notes.join(' ') : undefined };
}

function Notes({ id, hint, problem }: { id: string; hint: ReactNode; problem: string | undefined }) {
  return (
    <>
      {hint ? (
        <p id={`${id}-hint`} className="mt-0.5 text-fine text-soft">
          {hint}
        </p>
      ) : null}
      {problem ? (
        <p id={`${id}-problem`} className="mt-0.5 text-fine font-medium text-madder">
          {problem}
        </p>
      ) : null}
    </>
  );
}
