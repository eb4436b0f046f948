/** Years until an extra capital is earned back, or why there is no such number. */
export type Payback = number | 'never' | 'at once';

/**
 * Simple payback, years: extra capital / saving of a year, without interest (method 6). "never" when nothing is saved,
 * whatever the capital; else "at once" when the plant costs no more than the reference.
 */
export function simplePayback(input: { extraCapital: number; savingPerYear: number }): Payback {
  const { extraCapital, savingPerYear } = input;
  if (savingPerYear <= 0) return 'never';
  return extraCapital <= 0 ? 'at once' : extraCapital / savingPerYear;
}
