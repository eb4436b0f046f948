/** The closed list of what reading can find. A new code is added here first. */
export const findingCodes = [
  'field-count',
  'not-a-number',
  'binary',
  'encoding',
  'header',
  'truncated',
  'row-count',
  'time-order',
  'time-repeat',
  'time-gap',
  'leap-day',
  'place-zone',
  'place-sign',
  'place-missing',
  'elevation-missing',
  'no-temperature',
  'no-humidity',
  'too-few-rows',
  'several-stations',
  'several-periods',
  'range',
  'step',
  'spike',
  'stuck',
  'straight-line',
  'saw-tooth',
  'zero-fill',
  'other-climate',
  'dew-above-dry',
  'rh-over-100',
  'rh-dew-disagree',
  'dew-is-wet-bulb',
  'below-zero-phase',
  'pressure-range',
  'pressure-elevation',
  'pressure-sea-level',
  'pressure-constant',
  'pressure-assumed',
  'unit-guess',
  'source-estimated',
  'source-flags-uniform',
  'design-differs',
  'licence',
  'coverage',
  'much-repaired',
  'place-sea',
  'elevation-relief',
] as const;
export type FindingCode = (typeof findingCodes)[number];

/** From harmless to fatal: said; changed or filled by a named rule; used as it stands; a person must answer; not used. */
export const severities = ['note', 'repair', 'doubt', 'ask', 'refuse'] as const;
export type Severity = (typeof severities)[number];

/** What of an hour a finding concerns. */
export const findingVariables = [
  'dry bulb',
  'dew point',
  'relative humidity',
  'humidity',
  'pressure',
  'every value',
] as const;
export type FindingVariable = (typeof findingVariables)[number];

export interface Finding {
  readonly code: FindingCode;
  readonly severity: Severity;
  /** First line of the file that it concerns, counted from 1; null when it concerns the whole file. */
  readonly line: number | null;
  /** First column (character position counted from 1) on that line, where it is known. */
  readonly column: number | null;
  /** Last line that it concerns; equals `line` for a single line. */
  readonly lastLine: number | null;
  /** Hours or rows concerned. */
  readonly count: number;
  /** null when it concerns no one variable: a place, a header, a time. */
  readonly variable: FindingVariable | null;
  /** What was done, in a few words: "left out", "kept"; null where the message alone says it. */
  readonly done: string | null;
  /** A whole sentence: what was found, where, what was done or what would mend it. */
  readonly message: string;
}

/** A question that a person must answer before the file can be accepted. */
export interface Ask {
  readonly what: Extract<
    FindingCode,
    | 'place-missing'
    | 'place-sign'
    | 'pressure-sea-level'
    | 'dew-is-wet-bulb'
    | 'unit-guess'
    | 'several-periods'
    | 'several-stations'
    | 'pressure-elevation'
    | 'time-repeat'
    | 'elevation-missing'
  >;
  readonly message: string;
  /** The answer that the evidence favours, in words; null without one. */
  readonly proposal: string | null;
}
