import type { BriefFault } from './brief-fault.ts';

/** Where a number may lie, with its unit for the message. */
export interface Range {
  readonly min: number;
  readonly max: number;
  /** The least value itself is not allowed. */
  readonly over?: boolean;
  readonly whole?: boolean;
  readonly unit?: string;
}

/** Long enough for a written reason, short enough to print. */
const LONGEST_TEXT = 400;

/**
 * Reads the fields of an unknown value one by one. A field that is wrong adds a fault and answers its fallback, so that
 * reading goes on and every fault is reported at once; a field that is never asked for is a fault too.
 */
export class Fields {
  readonly #record: Readonly<Record<string, unknown>>;
  readonly #path: string;
  readonly #faults: BriefFault[];
  readonly #asked = new Set<string>();

  constructor(value: unknown, path: string, faults: BriefFault[]) {
    this.#path = path;
    this.#faults = faults;
    this.#record = isRecord(value) ? value : {};
    if (!isRecord(value)) faults.push({ path: path || 'brief', message: 'a group of fields is needed here' });
  }

  /** The value of a field as it is; undefined when absent. */
  raw(name: string): unknown {
    this.#asked.add(name);
    return this.#record[name];
  }

  has(name: string): boolean {
    const value = this.raw(name);
    return value !== undefined && value !== null;
  }

  fault(name: string, message: string): void {
    this.#faults.push({ path: this.pathOf(name), message });
  }

  pathOf(name: string): string {
    return this.#path === '' ? name : `${this.#path}.${name}`;
  }

  /** A number in its range; the fallback when absent, a fault when there is none. */
  number(name: string, range: Range, fallback?: number): number {
    const value = this.raw(name);
    if (value === undefined && fallback !== undefined) return fallback;
    if (typeof value !== 'number' || !inRange(value, range)) {
      this.fault(name, `a ${describeRange(range)} is needed${isAbsent(value) ? '' : `, not ${show(value)}`}`);
      return fallback ?? range.min;
    }
    return value;
  }

  numberOrNull(name: string, range: Range): number | null {
    return this.has(name) ? this.number(name, range) : null;
  }

  text(name: string, fallback?: string): string {
    const value = this.raw(name);
    if (value === undefined && fallback !== undefined) return fallback;
    if (typeof value === 'string' && value.trim() !== '' && value.length <= LONGEST_TEXT) return value;
    this.fault(
      name,
      `a text of at most ${LONGEST_TEXT} characters is needed${isAbsent(value) ? '' : `, not ${show(value)}`}`,
    );
    return fallback ?? '';
  }

  flag(name: string, fallback: boolean): boolean {
    const value = this.raw(name);
    if (value === undefined) return fallback;
    if (typeof value !== 'boolean') this.fault(name, `true or false is needed, not ${show(value)}`);
    return value === true;
  }

  /** One of a closed list of words; the fallback is the first unless given. */
  choice<T extends string>(name: string, words: readonly [T, ...T[]], fallback: T = words[0]): T {
    const value = this.raw(name);
    if (value === undefined) return fallback;
    const word = words.find((each) => each === value);
    if (word === undefined) this.fault(name, `one of ${words.join(', ')} is needed, not ${show(value)}`);
    return word ?? fallback;
  }

  /** A list read entry by entry; an absent one is empty. */
  list<T>(name: string, read: (entry: unknown, path: string) => T): T[] {
    const value = this.raw(name);
    if (value === undefined) return [];
    if (!Array.isArray(value)) {
      this.fault(name, `a list is needed, not ${show(value)}`);
      return [];
    }
    return value.map((entry, index) => read(entry, `${this.pathOf(name)}[${index}]`));
  }

  /** The fields of a group; an absent group reads as an empty one. */
  group(name: string): Fields {
    return new Fields(this.raw(name) ?? {}, this.pathOf(name), this.#faults);
  }

  /** The fields of one entry of a list. */
  entry(value: unknown, path: string): Fields {
    return new Fields(value, path, this.#faults);
  }

  /** Faults for fields that were never asked for. */
  refuseOthers(): void {
    for (const name of Object.keys(this.#record)) {
      if (!this.#asked.has(name)) this.fault(name, 'no such field');
    }
  }
}

/** Nothing was written there: a message has nothing to repeat. */
function isAbsent(value: unknown): boolean {
  return value === undefined || value === null || value === '';
}

export function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function inRange(value: number, range: Range): boolean {
  const above = range.over ? value > range.min : value >= range.min;
  return Number.isFinite(value) && above && value <= range.max && (!range.whole || Number.isInteger(value));
}

function describeRange({ min, max, over, whole, unit }: Range): string {
  const kind = whole ? 'whole number' : 'number';
  const bounds = over ? `over ${min} and up to ${max}` : `from ${min} to ${max}`;
  return `${kind} ${bounds}${unit === undefined ? '' : ` ${unit}`}`;
}

function show(value: unknown): string {
  const text = typeof value === 'number' ? String(value) : (JSON.stringify(value) ?? String(value));
  return text.length > 40 ? `${text.slice(0, 40)}…` : text;
}
