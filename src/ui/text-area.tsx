import { useId } from 'react';

interface TextAreaProps {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly problem?: string | undefined;
  readonly rows?: number;
  readonly className?: string;
}

/** A labelled text of several lines; its problem stands under it and is read out with it. */
export function TextArea({ label, value, onChange, problem, rows = 4, className = '' }: TextAreaProps) {
  const id = useId();
  return (
    <div className={className}>
      <label htmlFor={id} className="mb-1 block text-fine font-semibold text-soft">
        {label}
      </label>
      <textarea
        id={id}
        rows={rows}
        dir="auto"
        value={value}
        onChange={({ currentTarget }) => onChange(currentTarget.value)}
        aria-invalid={problem ? true : undefined}
        aria-describedby={problem ? `${id}-problem` : undefined}
        className={`block w-full rounded-md border bg-paper px-3 py-2 text-body ${problem ? 'border-madder' : 'border-[#918a78]'}`}
      />
      {problem ? (
        <p id={`${id}-problem`} className="mt-1 text-fine font-medium text-madder">
          {problem}
        </p>
      ) : null}
    </div>
  );
}
