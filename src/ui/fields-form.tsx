import { useMutation } from '@tanstack/react-query';
import { type FormEvent, type InputHTMLAttributes, type ReactNode, useRef, useState } from 'react';
import { errorSentence } from '../lib/api-error.ts';
import { type FormProblems, noProblems, problemsOfError, problemsOfIssues } from '../lib/form-problems.ts';
import { Button } from './button.tsx';
import { Notice } from './notice.tsx';
import { TextField } from './text-field.tsx';

export interface FormField<N extends string> {
  readonly name: N;
  readonly label: string;
  readonly type?: 'text' | 'email' | 'password' | 'date';
  readonly autoComplete?: string;
  readonly inputMode?: InputHTMLAttributes<HTMLInputElement>['inputMode'];
  readonly hint?: string;
  readonly initial?: string;
}

interface FieldsFormProps<N extends string, T> {
  readonly fields: readonly FormField<N>[];
  /** What is wrong with the values, as the contract says. */
  readonly check: (values: Readonly<Record<N, string>>) => readonly { path: readonly PropertyKey[]; message: string }[];
  readonly send: (values: Readonly<Record<N, string>>) => Promise<T>;
  readonly onDone?: (answer: T) => void;
  /** Words of the button. */
  readonly act: string;
  /** Said once it is done; the fields are then as they were at the beginning. */
  readonly done?: string;
  /** More of the form between its fields and its button. */
  readonly children?: ReactNode;
  /** Words for an error that lies in no field; null for the error's own. */
  readonly explain?: (error: unknown) => ReactNode;
}

/** A short form of lines of text: every fault at its field, the first of them in focus, what was typed kept until it is done. */
export function FieldsForm<N extends string, T>(props: FieldsFormProps<N, T>) {
  const { fields, check, send, onDone, act, done, children, explain } = props;
  const form = useRef<HTMLFormElement>(null);
  const [typed, setTyped] = useState<Partial<Record<N, string>>>({});
  const [found, setFound] = useState<FormProblems>(noProblems);
  const shownIn = (field: FormField<N>): string => typed[field.name] ?? field.initial ?? '';
  const focusFirst = (problems: FormProblems) => {
    const first = fields.find(({ name }) => problems.fields[name]);
    if (first) form.current?.querySelector<HTMLInputElement>(`[name="${first.name}"]`)?.focus();
  };
  const sending = useMutation({
    mutationFn: send,
    onSuccess: (answer) => {
      setTyped({});
      onDone?.(answer);
    },
    onError: (error) => {
      const problems = problemsOfError(error) ?? noProblems;
      setFound(problems);
      focusFirst(problems);
    },
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const values = valuesOf(fields, shownIn);
    const problems = problemsOfIssues(check(values));
    setFound(problems);
    if (Object.keys(problems.fields).length > 0 || problems.form.length > 0) return focusFirst(problems);
    sending.mutate(values);
  };
  const isLocated = fields.some(({ name }) => found.fields[name]);
  return (
    <form ref={form} noValidate onSubmit={submit} className="grid gap-4">
      {sending.isError && !isLocated ? (
        <Notice tone="wrong" live>
          {explain?.(sending.error) ?? errorSentence(sending.error)}
        </Notice>
      ) : null}
      {fields.map((field) => (
        <TextField
          key={field.name}
          name={field.name}
          label={field.label}
          type={field.type ?? 'text'}
          autoComplete={field.autoComplete ?? 'off'}
          inputMode={field.inputMode}
          {...(field.hint === undefined ? {} : { hint: field.hint })}
          value={shownIn(field)}
          onChange={(value) => {
            sending.reset();
            setTyped({ ...typed, [field.name]: value });
          }}
          problem={found.fields[field.name]}
        />
      ))}
      {children}
      <div className="flex flex-wrap items-center gap-3">
        <Button type="submit" look="primary" busy={sending.isPending}>
          {act}
        </Button>
        <span role="status">{sending.isSuccess && done ? done : ''}</span>
      </div>
    </form>
  );
}

/** Every field with its value; the compiler is shown that none is missing. */
function valuesOf<N extends string>(
  fields: readonly FormField<N>[],
  shownIn: (field: FormField<N>) => string,
): Record<N, string> {
  const values: Partial<Record<N, string>> = {};
  for (const field of fields) values[field.name] = shownIn(field);
  const hasAll = (held: Partial<Record<N, string>>): held is Record<N, string> =>
    fields.every(({ name }) => held[name] !== undefined);
  if (!hasAll(values)) throw new Error('a form lacks one of its fields');
  return values;
}
