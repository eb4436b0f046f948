/** A published, computed or defined value that the engine is held against, as data/checks writes it. */
export type PublishedCase = Readonly<Record<string, unknown>>;

export interface PublishedCheck {
  /** Such as P05. */
  readonly id: string;
  readonly what: string;
  readonly source: string;
  readonly cases: readonly PublishedCase[];
}

/** Tables that checks name as their `file`, by name, as text. */
export type CheckTables = Readonly<Record<string, string>>;

/** One number, or one statement, held against the engine. */
export interface CheckAnswer {
  readonly input: string;
  readonly expected: string;
  readonly tolerance: string;
  /** What the engine gives. */
  readonly found: string;
  readonly holds: boolean;
  /** How far the expected value can be trusted: seen, computed, definition, from memory. */
  readonly tag: string;
}

/** @throws TypeError when the case has no such number */
export function numberOf(each: PublishedCase, name: string): number {
  const value = each[name];
  if (typeof value !== 'number') throw new TypeError(`a check has no number ${name}`);
  return value;
}

/** @throws TypeError when the case has no such list of numbers */
export function numbersOf(each: PublishedCase, name: string): readonly number[] {
  const value = each[name];
  if (!Array.isArray(value)) throw new TypeError(`a check has no list ${name}`);
  return value.map((entry: unknown) => {
    if (typeof entry !== 'number') throw new TypeError(`a check has a list ${name} that holds no numbers`);
    return entry;
  });
}

/** @throws TypeError when the case has no such text */
export function textOf(each: PublishedCase, name: string): string {
  const value = each[name];
  if (typeof value !== 'string') throw new TypeError(`a check has no text ${name}`);
  return value;
}

/** @throws TypeError when the case has no such group of fields */
export function groupOf(each: PublishedCase, name: string): PublishedCase {
  const value = each[name];
  if (typeof value !== 'object' || value === null || Array.isArray(value))
    throw new TypeError(`a check has no group ${name}`);
  return Object.fromEntries(Object.entries(value));
}
