import { type ReactNode, useId } from 'react';

interface ChoiceFieldProps {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  /** The options. */
  readonly children: ReactNode;
  /** In a table the column says what it is; the label is then read out alone. */
  readonly isLabelHidden?: boolean;
  readonly isDisabled?: boolean;
}

/** One of a few, in the platform's own list. */
export function ChoiceField({ label, value, onChange, children, isLabelHidden, isDisabled }: ChoiceFieldProps) {
  const id = useId();
  return (
    <div className="relative">
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'mb-1 block text-fine font-semibold text-soft'}>
        {label}
      </label>
      <select
        id={id}
        value={value}
        disabled={isDisabled}
        onChange={({ currentTarget }) => onChange(currentTarget.value)}
        className={`block rounded-md border border-[#918a78] bg-paper px-2 ${isLabelHidden ? 'min-h-9' : 'min-h-10 w-full text-lead'}`}
      >
        {children}
      </select>
    </div>
  );
}
