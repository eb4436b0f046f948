/** How a case becomes an answer: what went in, what is expected, what was found, in words with units. */
import type { CheckAnswer, PublishedCase } from './published-check.ts';

/** Endings of names that say a unit. The longer ones first: `PerS` before `S`. */
const UNITS: readonly (readonly [string, string])[] = [
  ['GPerKg', 'g/kg'],
  ['KgPerS', 'kg/s'],
  ['KgPerKwh', 'kg/kWh'],
  ['KJPerKg', 'kJ/kg'],
  ['M3PerKg', 'm³/kg'],
  ['MPerS', 'm/s'],
  ['Psi', 'psi'],
  ['Pct', '%'],
  ['Pa', 'Pa'],
  ['C', '°C'],
  ['K', 'K'],
  ['F', '°F'],
  ['M', 'm'],
];
/** What a case says of the answer, not of what goes in. */
const NOT_INPUT = /^(expected|tolerance|relativeTolerance|sumTolerance|tag$|quantity$)/;

/** `dryBulbC` as "dry bulb", with its unit. */
function wordsOf(name: string): { words: string; unit: string } {
  const found = UNITS.find(([ending]) => name.endsWith(ending) && name.length > ending.length);
  const [ending = '', unit = ''] = found ?? [];
  const words = name
    .slice(0, name.length - ending.length)
    .replaceAll(/([a-z])([A-Z0-9])/g, '$1 $2')
    .toLowerCase();
  return { words, unit: unit === '' ? '' : ` ${unit}` };
}

/** The fields of a case that go in: "dry bulb 40 °C, pressure 101325 Pa". */
export function inputOf(each: PublishedCase, leaveOut: readonly string[] = []): string {
  return Object.entries(each)
    .filter(([name]) => !NOT_INPUT.test(name) && !leaveOut.includes(name))
    .map(([name, value]) => `${wordsOf(name).words} ${written(value)}${wordsOf(name).unit}`)
    .join(', ');
}

function written(value: unknown): string {
  if (Array.isArray(value)) return value.map(written).join(', ');
  if (typeof value === 'object' && value !== null) {
    return Object.entries(value)
      .map(([name, inner]) => `${wordsOf(name).words} ${written(inner)}`)
      .join(' ');
  }
  return String(value);
}

/** As many digits as tell a value from its neighbours within any tolerance used. */
export function printed(value: number): string {
  return Number.isInteger(value) ? String(value) : String(Number(value.toPrecision(7)));
}

interface Measured {
  readonly input: string;
  readonly expected: number;
  readonly found: number;
  readonly tag: string;
  /** Unit of expected and found, such as "°C". */
  readonly unit?: string;
}

/** Held within an absolute tolerance, in the unit of the value. */
export function within(measured: Measured, tolerance: number): CheckAnswer {
  return answer(measured, {
    tolerance: `± ${tolerance}`,
    holds: Math.abs(measured.found - measured.expected) <= tolerance,
  });
}

/** Held within a share of the value expected. */
export function withinShare(measured: Measured, share: number): CheckAnswer {
  return answer(measured, {
    tolerance: `± ${Number((100 * share).toPrecision(6))} %`,
    holds: Math.abs(measured.found / measured.expected - 1) <= share,
  });
}

function answer(measured: Measured, { tolerance, holds }: { tolerance: string; holds: boolean }): CheckAnswer {
  const { input, expected, found, tag } = measured;
  const unit = measured.unit === undefined ? '' : ` ${measured.unit}`;
  return { input, expected: `${expected}${unit}`, tolerance, found: `${printed(found)}${unit}`, holds, tag };
}

/** Something that must be so, with no tolerance. */
export function exactly(said: { input: string; expected: string; found: string; tag: string }): CheckAnswer {
  return { ...said, tolerance: 'exact', holds: said.found === said.expected };
}
