import type { Ask, Finding, FindingCode, Severity } from './finding.ts';

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
  readonly message: () => string;
}

interface Overflow {
  readonly code: FindingCode;
  readonly severity: Severity;
  readonly line: number | null;
  lastLine: number | null;
  places: number;
  count: number;
}

/** Collects every finding and question of one file, so that all faults are told at once. */
export class FindingList {
  readonly #findings: Finding[] = [];
  readonly #asks: Ask[] = [];
  readonly #listed = new Map<string, number>();
  readonly #overflows = new Map<string, Overflow>();

  /** Adds a finding; beyond the first 100 of a code and severity only the count grows. */
  add(input: FindingInput): void {
    const line = input.line || null;
    const lastLine = input.lastLine || line;
    const key = `${input.code} ${input.severity}`;
    const listed = (this.#listed.get(key) ?? 0) + 1;
    this.#listed.set(key, listed);
    if (listed <= LISTED) {
      const { code, severity } = input;
      const column = input.column?.() ?? null;
      this.#findings.push({
        code,
        severity,
        line,
        column,
        lastLine,
        count: input.count ?? 1,
        message: input.message(),
      });
      return;
    }
    const overflow = this.#overflows.get(key);
    if (overflow === undefined) {
      const { code, severity } = input;
      this.#overflows.set(key, { code, severity, line, lastLine, places: 1, count: input.count ?? 1 });
      return;
    }
    overflow.lastLine = lastLine;
    overflow.places += 1;
    overflow.count += input.count ?? 1;
  }

  /** Adds a question that a person must answer, with the finding that raises it. */
  ask(what: Ask['what'], input: Omit<FindingInput, 'code' | 'severity'> & { proposal: string | null }): void {
    this.add({ ...input, code: what, severity: 'ask' });
    this.#asks.push({ what, message: input.message(), proposal: input.proposal });
  }

  get refused(): boolean {
    return this.#findings.some((finding) => finding.severity === 'refuse');
  }

  get asks(): readonly Ask[] {
    return this.#asks;
  }

  /** Findings in the order of the file: those of the whole file first, then by line. */
  inOrder(): readonly Finding[] {
    const rest = [...this.#overflows.values()].map((overflow) => ({
      code: overflow.code,
      severity: overflow.severity,
      line: overflow.line,
      column: null,
      lastLine: overflow.lastLine,
      count: overflow.count,
      message: restSentence(overflow),
    }));
    return [...this.#findings, ...rest].sort((a, b) => (a.line ?? 0) - (b.line ?? 0));
  }
}

function restSentence(overflow: Overflow): string {
  const places = whole(overflow.places);
  const upTo = overflow.lastLine === null ? '' : `, the last on line ${overflow.lastLine}`;
  const more = overflow.places === 1 ? 'place has the same fault' : 'places have the same fault';
  return `${places} more ${more} (${overflow.code})${upTo}.`;
}

/** A whole number as people read it: 8,760. */
export function whole(value: number): string {
  return value.toLocaleString('en-GB', { maximumFractionDigits: 0 });
}

/** "1 hour", "24 hours". */
export function hoursPhrase(hours: number): string {
  return hours === 1 ? '1 hour' : `${whole(hours)} hours`;
}

/** "Line 12" or "Lines 12 to 15". Line numbers are written as an editor shows them, without separators. */
export function linesPhrase(first: number, last: number): string {
  return last > first ? `Lines ${first} to ${last}` : `Line ${first}`;
}
