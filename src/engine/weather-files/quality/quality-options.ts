import type { Relief } from '../relief.ts';

/**
 * The rules that can be switched off for a station; each bears the code of the finding that it raises. `range` is the record of
 * the continent: what no weather reaches, and a dew point above the dry bulb, is never used.
 */
export const ruleNames = [
  'zero-fill',
  'other-climate',
  'range',
  'step',
  'straight-line',
  'stuck',
  'spike',
  'saw-tooth',
  'pressure-range',
  'place-zone',
  'place-sea',
  'elevation-relief',
] as const;
export type RuleName = (typeof ruleNames)[number];

/** What may be asked of the tests of a file; by default every rule applies and only short gaps are filled. */
export interface QualityOptions {
  readonly rulesOff?: readonly RuleName[];
  /** Without it the place is not held against sea and relief. */
  readonly relief?: Relief;
  /** Gap rule 2, off by default: gaps of 6 to 47 hours are filled from the days before and after. */
  readonly fillLongGaps?: boolean;
}

export function isOff(rule: RuleName, options: QualityOptions): boolean {
  return options.rulesOff?.includes(rule) ?? false;
}
