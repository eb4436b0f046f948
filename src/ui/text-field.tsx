import { type InputHTMLAttributes, type Ref, useId } from 'react';

export interface TextFieldProps extends Omit<InputHTMLAttributes<HTMLInputElement>, 'onChange' | 'value'> {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  /** What is wrong with the value and how to mend it. */
  readonly problem?: string | undefined;
  readonly hint?: string;
  readonly inputRef?: Ref<HTMLInputElement>;
}

/** A labelled line of text; its problem stands under it and is read out with it. */
export function TextField({
  label,
  value,
  onChange,
  problem,
  hint,
  inputRef,
  className = '',
  ...rest
}: TextFieldProps) {
  const id = useId();
  const notes = [hint && !problem ? `${id}-hint` : null, problem ? `${id}-problem` : null].filter(
    (note) => note !== null,
  );
  return (
    <div className={className}>
      <label htmlFor={id} className="block text-fine font-semibold text-soft mb-1">
        {label}
      </label>
      <input
        {...rest}
        id={id}
        ref={inputRef}
        value={value}
        onChange={(event) => onChange(event.currentTarget.value)}
        aria-invalid={problem ? true : undefined}
        aria-describedby={notes.length > 0 ? notes.join(' ') : undefined}
        className={`block w-full min-h-10 px-3 rounded-md bg-paper border text-lead ${
          problem ? 'border-madder' : 'border-[#918a78]'
        }`}
      />
      {hint && !problem ? (
        <p id={`${id}-hint`} className="mt-1 text-fine text-soft">
          {hint}
        </p>
      ) : null}
      {problem ? (
        <p id={`${id}-problem`} className="mt-1 text-fine font-medium text-madder">
          {problem}
        </p>
      ) : null}
    </div>
  );
}
