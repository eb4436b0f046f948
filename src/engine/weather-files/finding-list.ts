import type { Ask, Finding, FindingCode, FindingVariable, Severity } from './finding.ts';
import type { Answers } from './read-options.ts';

/** Of one fault this many lines are listed; the rest are counted. */
const LISTED = 100;

/** Where and what; `message` is only built for findings that are listed. */
export interface FindingInput {
  readonly code: FindingCode;
  readonly severity: Severity;
  readonly line?: number | null;
  /** Character position on the line, counted from 1; only asked for when the finding is listed. */
  readonly column?: () => number;
  readonly lastLine?: number | null;
  readonly count?: number;
  readonly variable?: FindingVariable;
  readonly done?: string;
  readonly message: () => string;
}

/** A finding that a person must answer. */
interface Question extends Omit<FindingInput, 'code' | 'severity'> {
  readonly proposal: string | null;
  /** Asked whatever has been answered: what stands in the file is impossible. */
  readonly asAlways?: boolean;
}

/** What there is of one code and severity: how many are listed, and what came after them. */
interface Tally {
  readonly code: FindingCode;
  readonly severity: Severity;
  listed: number;
  /** Places beyond the listed ones, their hours or rows, and where the first and the last stand. */
  places: number;
  count: number;
  line: number | null;
  lastLine: number | null;
}

/** Collects every finding and question of one file, so that all faults are told at once. */
export class FindingList {
  /** What a person has answered already: such a question is told as a doubt. */
  readonly answers: Answers;
  readonly #findings: Finding[] = [];
  readonly #asks: Ask[] = [];
  readonly #tallies = new Map<FindingCode, Tally[]>();

  constructor(answers: Answers = {}) {
    this.answers = answers;
  }

  /** Adds a finding; beyond the first 100 of a code and severity only the count grows. */
  add(input: FindingInput): void {
    const tally = this.#tallyOf(input.code, input.severity);
    const line = input.line || null;
    const lastLine = input.lastLine || line;
    if (tally.listed < LISTED) {
      tally.listed++;
      const { code, severity } = input;
      const column = input.column?.() ?? null;
      this.#findings.push({
        code,
        severity,
        line,
        column,
        lastLine,
        count: input.count ?? 1,
        variable: input.variable ?? null,
        done: input.done ?? null,
        message: input.message(),
      });
      return;
    }
    if (tally.places === 0) tally.line = line;
    tally.places++;
    tally.count += input.count ?? 1;
    tally.lastLine = lastLine;
  }

  #tallyOf(code: FindingCode, severity: Severity): Tally {
    const ofCode = this.#tallies.get(code) ?? [];
    for (const tally of ofCode) if (tally.severity === severity) return tally;
    const tally = { code, severity, listed: 0, places: 0, count: 0, line: null, lastLine: null };
    this.#tallies.set(code, [...ofCode, tally]);
    return tally;
  }

  /** Adds a question that a person must answer, with the finding that raises it. */
  ask(what: Ask['what'], input: Question): void {
    const answer = Object.entries(this.answers).find(([code]) => code === what)?.[1];
    if (answer !== undefined && !input.asAlways) {
      this.add({ ...input, code: what, severity: 'doubt', done: `Answered: ${answer}.` });
      return;
    }
    this.add({ ...input, code: what, severity: 'ask' });
    this.#asks.push({ what, message: input.message(), proposal: input.proposal });
  }

  /** A list that begins with all that has been found so far: what concerns a whole file stands with each of its parts. */
  copy(): FindingList {
    const copy = new FindingList(this.answers);
    copy.#findings.push(...this.#findings);
    copy.#asks.push(...this.#asks);
    for (const [code, tallies] of this.#tallies) {
      copy.#tallies.set(
        code,
        tallies.map((tally) => ({ ...tally })),
      );
    }
    return copy;
  }

  get refused(): boolean {
    return this.#findings.some((finding) => finding.severity === 'refuse');
  }

  get asks(): readonly Ask[] {
    return this.#asks;
  }

  /** Findings in the order of the file: those of the whole file first, then by line. */
  inOrder(): readonly Finding[] {
    const rest = [...this.#tallies.values()]
      .flat()
      .filter(({ places }) => places > 0)
      .map((tally) => ({
        code: tally.code,
        severity: tally.severity,
        line: tally.line,
        column: null,
        lastLine: tally.lastLine,
        count: tally.count,
        variable: null,
        done: null,
        message: restSentence(tally),
      }));
    return [...this.#findings, ...rest].sort((a, b) => (a.line ?? 0) - (b.line ?? 0));
  }
}

function restSentence(tally: Tally): string {
  const upTo = tally.lastLine === null ? '' : `, the last on line ${tally.lastLine}`;
  const more = tally.places === 1 ? 'place has the same fault' : 'places have the same fault';
  return `${whole(tally.places)} more ${more} (${tally.code})${upTo}.`;
}

const wholeFormat = new Intl.NumberFormat('en-GB', { maximumFractionDigits: 0 });

/** A whole number as people read it: 8,760. */
export function whole(value: number): string {
  return wholeFormat.format(value);
}

/** "12 %", and "under 1 %" for what would round to nothing. */
export function wholeShare(pct: number): string {
  return pct < 0.5 ? 'under 1 %' : `${whole(pct)} %`;
}

/** "1 hour", "24 hours". */
export function hoursPhrase(hours: number): string {
  return hours === 1 ? '1 hour' : `${whole(hours)} hours`;
}

/** "Line 12" or "Lines 12 to 15". Line numbers are written as an editor shows them, without separators. */
export function linesPhrase(first: number, last: number): string {
  return last > first ? `Lines ${first} to ${last}` : `Line ${first}`;
}
