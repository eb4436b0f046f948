import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { readWeatherFileParts } from '#engine/weather-files/read-weather-file-parts.ts';
import { damagedBytes } from '../../support/damaged-bytes.ts';
import { problemsOf } from '../../support/reading-problems.ts';
import { propertySettings, samples } from '../../support/sample-size.ts';
import {
  bytesOfRows,
  globalHourlyLines,
  isdLines,
  isdLiteLines,
  tableLines,
  tmy2Lines,
  tmy3Lines,
  WRITTEN_PLACE,
  writtenYear,
} from '../../support/weather-writers.ts';

const LONGEST_MS = 2_000;
/** Each single file has its own limit; a soak reads tens of thousands, on a machine that may be busy. */
const PATIENCE_MS = samples(600_000, 7_200_000);
const { name: _name, ...KNOWN } = WRITTEN_PLACE;
const placed: ReadOptions = { place: KNOWN, zoneAt: () => ({ zone: 'America/Denver', utcOffsetH: -7 }) };
/** January alone: read in a tenth of the time of a year, and just as easily damaged. */
const january = writtenYear(1).slice(0, 31 * 24);

/** The table's own guess, confirmed. */
function confirmed(lines: readonly string[]): ReadOptions {
  const reading = readWeatherFile(bytesOfRows(lines), 'january.csv', placed);
  if (reading.status === 'refused' || reading.hours !== null || reading.table.mapping === null)
    throw new Error('no guess');
  return { ...placed, mapping: reading.table.mapping };
}

const files: readonly [string, readonly string[], ReadOptions][] = [
  ['TMY3', tmy3Lines(january), placed],
  ['TMY2', tmy2Lines(january), placed],
  ['ISD-Lite', isdLiteLines(january), placed],
  ['full ISD', isdLines(january), placed],
  ['Global Hourly', globalHourlyLines(january), placed],
  ['a table that nobody has confirmed', tableLines(january, ';'), {}],
  ['a confirmed table', tableLines(january), confirmed(tableLines(january))],
];

/** All that is wrong with any part of what was read, and whether it took too long. */
function problemsIn(bytes: Uint8Array, options: ReadOptions): readonly string[] {
  const started = process.cpuUsage().user;
  const readings = readWeatherFileParts(bytes, 'damaged', options);
  const ms = (process.cpuUsage().user - started) / 1000;
  const problems = readings.flatMap((reading) => problemsOf(reading));
  return [...problems, ...(ms < LONGEST_MS ? [] : [`${ms} ms`]), ...(readings.length > 0 ? [] : ['no reading'])];
}

describe('a file of another format that is damaged at random', { timeout: PATIENCE_MS }, () => {
  test.each(files)('%s, undamaged, has no problem by the same measure', (_format, lines, options) => {
    expect(problemsIn(bytesOfRows(lines), options)).toEqual([]);
  });

  test.each(files)(
    '%s by changed, lost and doubled bytes is read, asked about or refused, and never throws',
    (_format, lines, options) => {
      const bytes = bytesOfRows(lines);
      const change = fc.record({
        at: fc.oneof(fc.integer({ min: 0, max: 600 }), fc.integer({ min: 0, max: bytes.length - 1 })),
        byte: fc.oneof(
          fc.constantFrom(...new TextEncoder().encode('0123456789.,;:-+eE\n\r "/\t')),
          fc.integer({ min: 0, max: 255 }),
        ),
      });
      const property = fc.property(
        fc.array(change, { minLength: 1, maxLength: 12 }),
        fc.constantFrom('change', 'lose', 'double'),
        (changes, how) => problemsIn(damagedBytes(bytes, changes, how), options).length === 0,
      );
      fc.assert(property, propertySettings(40, 4_000));
    },
  );

  test.each(files)('%s cut at any byte is read, asked about or refused', (_format, lines, options) => {
    const bytes = bytesOfRows(lines);
    const property = fc.property(fc.integer({ min: 0, max: bytes.length }), (length) => {
      return problemsIn(bytes.subarray(0, length), options).length === 0;
    });
    fc.assert(property, propertySettings(10, 1_000));
  });

  test('any bytes at all, after any beginning that a reader looks for, are read, asked about or refused', () => {
    const beginning = fc.constantFrom('', ...files.map(([, lines]) => lines.slice(0, 3).join('\n')));
    const property = fc.property(beginning, fc.uint8Array({ maxLength: 600 }), fc.string(), (head, tail, words) => {
      const text = new TextEncoder().encode(`${head}\n${words}\n`);
      const bytes = new Uint8Array(text.length + tail.length);
      bytes.set(text);
      bytes.set(tail, text.length);
      return problemsIn(bytes, placed).length === 0;
    });
    fc.assert(property, propertySettings(200, 20_000));
  });

  test('of 20,000 faulty rows, of one station a row or of years without end ends within two seconds', () => {
    const many = (row: (index: number) => string) => Array.from({ length: 20_000 }, (_none, index) => row(index));
    const [header = ''] = globalHourlyLines([]);
    const lines: readonly (readonly string[])[] = [
      [
        header,
        ...many(
          (index) => `"${index}","2015-01-01T00:00:00","4","1","1","1","x","FM-15","+0100,1","+0050,1","10100,1",""`,
        ),
      ],
      [header, ...many(() => '"1","never"')],
      many((index) => `${1800 + (index % 400)} 01 01 01   100    50 10000 -9999 -9999 -9999 -9999 -9999`),
      ['Time,temp,dew,press', ...many((index) => `${1800 + (index % 400)}-01-01 00:00,1,1,1`)],
      ['Time,temp,dew,press', ...many(() => 'a,b,c,d')],
      [','.repeat(100_000), ','.repeat(100_000)],
    ];
    for (const rows of lines) expect(problemsIn(bytesOfRows(rows), placed)).toEqual([]);
  });
});
