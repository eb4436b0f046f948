import { useId } from 'react';
import { useController } from 'react-hook-form';
import type { AnswerDraft } from './answer-draft.ts';
import type { Question } from './answer-questions.ts';

/** One question of a file with its answers; the one that the file makes likely is marked, not chosen. */
export function QuestionField({ question }: { question: Question }) {
  const id = useId();
  const { code, title, messages, options, proposal, proposed } = question;
  const { field, fieldState } = useController<AnswerDraft, `choices.${Question['code']}`>({ name: `choices.${code}` });
  const problem = fieldState.error?.message;
  const describedBy = `${id}-question${problem ? ` ${id}-problem` : ''}`;
  return (
    <fieldset aria-describedby={describedBy} className="min-w-0">
      <legend className="mb-1 text-lead font-semibold">{title}</legend>
      <div id={`${id}-question`} className="mb-1 grid max-w-[80ch] gap-1">
        {messages.map((message) => (
          <p key={message}>{message}</p>
        ))}
        {proposal && proposed === null ? <p className="text-soft">The file suggests: {proposal}</p> : null}
      </div>
      {options.length === 0 ? (
        <div className="flex flex-wrap items-center gap-x-3">
          <label htmlFor={`${id}-number`}>Number of the period, counted from 1</label>
          <input
            {...field}
            value={field.value ?? ''}
            id={`${id}-number`}
            inputMode="numeric"
            autoComplete="off"
            aria-invalid={problem ? true : undefined}
            aria-describedby={problem ? `${id}-problem` : undefined}
            className={`min-h-9 w-20 rounded-md border bg-paper px-2.5 ${problem ? 'border-madder' : 'border-[#918a78]'}`}
          />
          {proposal ? <span className="text-fine text-soft">The file suggests: {proposal}</span> : null}
        </div>
      ) : (
        options.map(({ value, words }, index) => (
          <label key={value} className="flex min-h-9 items-start gap-2.5 border-t border-line py-1.5">
            <input
              type="radio"
              name={field.name}
              value={value}
              checked={field.value === value}
              onChange={() => field.onChange(value)}
              onBlur={field.onBlur}
              ref={index === 0 ? field.ref : undefined}
              className="mt-0.5 size-5 flex-none accent-indigo"
            />
            <span>
              {words}
              {value === proposed ? <span className="block text-fine text-soft">Likely: {proposal}</span> : null}
            </span>
          </label>
        ))
      )}
      {problem ? (
        <p id={`${id}-problem`} className="mt-0.5 text-fine font-medium text-madder">
          {problem}
        </p>
      ) : null}
    </fieldset>
  );
}
