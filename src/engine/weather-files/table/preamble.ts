/** What the lines above a table say: place, zone and name, written as `key: value`, or as a line of titles over a line of values. */
import { unknownStation } from '../place/settle-place.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';
import { plainName } from './guess-columns.ts';

const METRES_PER_FOOT = 0.3048;
const LIMITS = { latitude: 90, longitude: 180, lowestM: -500, highestM: 9_000, westH: -12, eastH: 14 } as const;
const KEY_AND_VALUE = /^\W*([\p{L}][^:=,;\t]{1,60}?)\s*[:=,;\t]\s*(.+?)[\s,;]*$/u;
const NUMBER = /^[^\d+\-.]{0,4}([+-]?\d+(?:\.\d+)?)/;

type Said = Map<
  'latitude' | 'longitude' | 'elevation' | 'zone' | 'name',
  { readonly key: string; readonly value: string }
>;

const KEYS = [
  ['latitude', /^lat(itude)?( |$)/],
  ['longitude', /^(lon|long|longitude)( |$)/],
  ['elevation', /^(elev(ation)?|altitude|alt|height)( |$)/],
  ['zone', /^(time ?zone|tz|utc offset|gmt offset|local time zone)( |$)/],
  ['name', /^(station( name)?|site( name)?|location( name| title)?|name|city)$/],
] as const;

/** The place that a preamble gives; everything is null without one. */
export function readPreamble(lines: readonly string[], delimiter: string): DeclaredStation {
  const said: Said = new Map();
  for (const line of lines) {
    const found = KEY_AND_VALUE.exec(line);
    if (found !== null) take(said, found[1] ?? '', found[2] ?? '');
  }
  for (let at = 0; at + 1 < lines.length; at++) takeTitled(said, [lines[at] ?? '', lines[at + 1] ?? ''], delimiter);
  const number = (key: 'latitude' | 'longitude' | 'elevation' | 'zone', low: number, high: number) => {
    const value = Number(NUMBER.exec(said.get(key)?.value ?? '')?.[1] ?? Number.NaN);
    const scaled = key === 'elevation' && isInFeet(said) ? value * METRES_PER_FOOT : value;
    return scaled >= low && scaled <= high ? scaled : null;
  };
  const name = (said.get('name')?.value ?? '').replace(/\p{C}/gu, '').replaceAll('"', '').trim().slice(0, 200);
  return {
    ...unknownStation(...(/\p{L}/u.test(name) ? [name] : [])),
    latitude: number('latitude', -LIMITS.latitude, LIMITS.latitude),
    longitude: number('longitude', -LIMITS.longitude, LIMITS.longitude),
    elevationM: number('elevation', LIMITS.lowestM, LIMITS.highestM),
    utcOffsetH: number('zone', LIMITS.westH, LIMITS.eastH),
  };
}

function take(said: Said, key: string, value: string): void {
  const plain = plainName(key);
  for (const [what, pattern] of KEYS) if (pattern.test(plain) && !said.has(what)) said.set(what, { key, value });
}

/** Titles in one line, their values in the next. */
function takeTitled(said: Said, [titles, values]: readonly [string, string], delimiter: string): void {
  const keys = titles.split(delimiter);
  const plain = keys.map(plainName);
  if (keys.length < 3 || !plain.includes('latitude') || !plain.includes('longitude')) return;
  said.clear();
  values.split(delimiter).forEach((value, index) => {
    take(said, keys[index] ?? '', value.trim());
  });
}

function isInFeet(said: Said): boolean {
  const elevation = said.get('elevation');
  return /\b(ft|feet)\b/i.test(`${elevation?.key} ${elevation?.value}`);
}
