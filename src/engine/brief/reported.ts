/**
 * What a brief asks to have counted beside its classes, as it is written: "THI over 68", "vapour pressure deficit below 0.2 and
 * above 1.4 kPa". Any other text is kept and printed, and said not to be counted.
 */
export type Reported =
  | { readonly kind: 'thi'; readonly over: number }
  | { readonly kind: 'deficit'; readonly belowKpa: number; readonly aboveKpa: number }
  | { readonly kind: 'other'; readonly text: string };

/** The parts of such a text as they are typed, before anybody knows whether they are numbers. */
export type ReportedParts =
  | { readonly kind: 'thi'; readonly parts: readonly [over: string] }
  | { readonly kind: 'deficit'; readonly parts: readonly [below: string, above: string] }
  | { readonly kind: 'other'; readonly parts: readonly [text: string] };

const THI = /^THI over ?(.*)$/;
const DEFICIT = /^vapour pressure deficit below ?(.*?) ?and above ?(.*?) ?kPa$/;
const MOST_THI = 120;
const MOST_KPA = 20;

export function reportedParts(text: string): ReportedParts {
  const thi = THI.exec(text);
  if (thi !== null) return { kind: 'thi', parts: [thi[1] ?? ''] };
  const deficit = DEFICIT.exec(text);
  if (deficit !== null) return { kind: 'deficit', parts: [deficit[1] ?? '', deficit[2] ?? ''] };
  return { kind: 'other', parts: [text] };
}

export function reportedText({ kind, parts }: ReportedParts): string {
  if (kind === 'thi') return `THI over ${parts[0]}`;
  return kind === 'deficit' ? `vapour pressure deficit below ${parts[0]} and above ${parts[1]} kPa` : parts[0];
}

/** What the text asks for; NaN where a number is missing or none. */
export function reportedOf(text: string): Reported {
  const { kind, parts } = reportedParts(text);
  if (kind === 'thi') return { kind, over: plainNumber(parts[0]) };
  if (kind === 'deficit') return { kind, belowKpa: plainNumber(parts[0]), aboveKpa: plainNumber(parts[1]) };
  return { kind, text };
}

/** What is wrong with the text of something to report; null when nothing is. */
export function faultOfReported(text: string): string | null {
  const asked = reportedOf(text);
  if (asked.kind === 'thi' && !(asked.over <= MOST_THI)) {
    return `a number from 0 to ${MOST_THI} index points is needed, as in "THI over 68"`;
  }
  if (asked.kind !== 'deficit') return null;
  const { belowKpa, aboveKpa } = asked;
  if (!(belowKpa <= MOST_KPA && aboveKpa <= MOST_KPA)) return `two numbers from 0 to ${MOST_KPA} kPa are needed`;
  return belowKpa < aboveKpa
    ? null
    : `the lower of the two, ${belowKpa} kPa, must lie under the upper, ${aboveKpa} kPa`;
}

function plainNumber(text: string): number {
  return /^\d+(?:\.\d+)?$/.test(text) ? Number(text) : Number.NaN;
}
