import type { ReactNode } from 'react';
import { useFormContext } from 'react-hook-form';
import { fieldWords } from '../../engine/brief/brief-difference.ts';
import type { BriefField } from '../../engine/brief/brief-fields.ts';
import { type DraftValues, typedNumber, valueAt } from './draft.ts';
import { useDraftScope } from './draft-context.ts';

const input = 'min-h-9 rounded-md border bg-paper px-2.5 text-body';
const edge = (wrong: boolean) => (wrong ? 'border-madder' : 'border-[#918a78]');

/** The look of a small input of the form. */
export function inputLook(wrong: boolean): string {
  return `${input} ${edge(wrong)}`;
}

export function ProblemNote({ id, children }: { id: string; children: string | undefined }) {
  if (children === undefined) return null;
  return (
    <p id={id} className="text-fine font-medium text-madder">
      {children}
    </p>
  );
}

/** What a message that stands away from a field leads to. */
export function fieldId(path: string): string {
  return `field-${path}`;
}

/** One field: its words, its value with the unit, what the preset says and where that comes from. */
export function FieldRow({ field }: { field: BriefField }) {
  const id = fieldId(field.path);
  const { problems, preset } = useDraftScope();
  const problem = problems[field.path];
  const byDefault = preset === null ? '' : `Preset: ${fieldWords(field, valueAt(preset, field.path))}. `;
  const notes = `${id}-note${problem === undefined ? '' : ` ${id}-problem`}`;
  return (
    <div className="grid gap-x-4 gap-y-1 border-t border-line py-2 sm:grid-cols-[minmax(0,1fr)_minmax(0,13rem)]">
      <div className="min-w-0">
        <label htmlFor={id} className="font-medium">
          {field.label}
        </label>
        <p id={`${id}-note`} className="text-fine text-soft">
          {byDefault}Source: {field.source}.
        </p>
      </div>
      <div className="min-w-0">
        <span className="flex flex-wrap items-center gap-x-2">
          <FieldInput field={field} id={id} notes={notes} wrong={problem !== undefined} />
          {field.unit === '' ? null : <span className="text-fine text-soft">{field.unit}</span>}
        </span>
        <ProblemNote id={`${id}-problem`}>{problem}</ProblemNote>
      </div>
    </div>
  );
}

interface FieldInputProps {
  readonly field: BriefField;
  readonly id: string;
  readonly notes: string;
  readonly wrong: boolean;
}

function FieldInput({ field, id, notes, wrong }: FieldInputProps): ReactNode {
  const { register } = useFormContext<DraftValues>();
  const shared = { id, 'aria-describedby': notes, 'aria-invalid': wrong || undefined };
  switch (field.kind) {
    case 'number':
    case 'optional':
      return (
        <input
          {...register(field.path, { setValueAs: numberOf })}
          {...shared}
          type="text"
          inputMode="decimal"
          autoComplete="off"
          placeholder={field.kind === 'optional' ? 'none' : undefined}
          className={`${inputLook(wrong)} w-24 text-right`}
        />
      );
    case 'flag':
      return <input {...register(field.path)} {...shared} type="checkbox" className="size-5 accent-indigo" />;
    case 'choice':
      return (
        <select {...register(field.path)} {...shared} className={`${inputLook(wrong)} w-full min-w-0`}>
          {Object.entries(field.words ?? {}).map(([value, words]) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </select>
      );
    case 'text':
      return (
        <input
          {...register(field.path)}
          {...shared}
          type="text"
          autoComplete="off"
          className={`${inputLook(wrong)} w-full min-w-0`}
        />
      );
  }
}

/** The form asks anew with the value that it holds already. */
export function numberOf(value: unknown): unknown {
  return typeof value === 'string' ? typedNumber(value) : value;
}
