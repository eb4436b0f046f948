import type { ButtonHTMLAttributes } from 'react';

export type ButtonLook = 'primary' | 'plain' | 'quiet';

const base =
  'inline-flex items-center justify-center gap-2 rounded-md text-body font-semibold whitespace-nowrap select-none ' +
  'disabled:opacity-55 disabled:cursor-default no-underline transition-colors duration-100';

const looks: Readonly<Record<ButtonLook, string>> = {
  primary: 'min-h-9 px-3.5 bg-indigo text-paper hover:bg-[#264a82] active:bg-ink',
  plain: 'min-h-9 px-3.5 border border-[#b9af9b] text-indigo hover:border-indigo hover:bg-paper active:bg-shade',
  quiet:
    'min-h-8 px-1 text-indigo font-medium underline decoration-indigo/40 underline-offset-4 hover:decoration-indigo',
};

/** The look of a button, for links that act as one. */
export function buttonLook(look: ButtonLook): string {
  return `${base} ${looks[look]}`;
}

export interface ButtonProps extends ButtonHTMLAttributes<HTMLButtonElement> {
  readonly look?: ButtonLook;
  /** At work: the button stays where it is and cannot be pressed again. */
  readonly busy?: boolean;
}

export function Button({ look = 'plain', busy = false, className = '', type = 'button', ...rest }: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      aria-busy={busy || undefined}
      disabled={busy || rest.disabled}
      className={`${buttonLook(look)} ${className}`}
    />
  );
}
