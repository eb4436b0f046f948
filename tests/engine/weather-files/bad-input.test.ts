import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { DEW_POINT_LIMITS_C } from '#engine/weather-files/assembly/range-limits.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { damagedBytes } from '../../support/damaged-bytes.ts';
import { bytesOf, epwBytes, epwLines } from '../../support/epw-text.ts';
import { problemsOf } from '../../support/reading-problems.ts';
import { findingsOf, readMadeUp, readRefused } from '../../support/readings.ts';
import { propertySettings, samples } from '../../support/sample-size.ts';

const LONGEST_MS = 2_000;
/** Each single file has its own limit; a soak reads tens of thousands, on a machine that may be busy. */
const PATIENCE_MS = samples(600_000, 7_200_000);

describe('bad input is refused with a clear sentence and never throws', () => {
  test.each([
    ['an empty file', '', 'too-few-rows', 'empty'],
    ['blank lines', '\n \n\t\r\n', 'too-few-rows', 'empty'],
    ['a page of HTML', '<!DOCTYPE html>\n<html></html>\n', 'header', '“<!DOCTYPE html>”'],
    ['two columns', 'date,temperature\n2020-01-01,5\n', 'header', '“date,temperature”'],
    ['an EPW saved with semicolons', 'LOCATION;Field;-;\n', 'header', 'other separators'],
    ['the spreadsheet form of an EPW', 'Location Title,Latitude {N+/S-}\n', 'header', 'spreadsheet form'],
    ['only a first line', 'LOCATION', 'header', '“LOCATION”'],
    ['a header cut short', 'LOCATION,Field,-,-,-,-,33,-111,-7,300\nDESIGN CONDITIONS,0\n', 'header', 'DATA PERIODS'],
  ] as const)('%s', (_name, text, code, words) => {
    const reading = readRefused(bytesOf(text));
    expect(findingsOf(reading, code)[0]?.message).toContain(words);
    expect(problemsOf(reading)).toEqual([]);
  });

  test('a header without data is refused with the count', () => {
    const reading = readRefused(epwLines().slice(0, 8));
    expect(findingsOf(reading, 'too-few-rows')).toEqual([expect.objectContaining({ severity: 'refuse', count: 0 })]);
  });

  test('8760 lines of nothing are refused: commas alone, and missing codes alone', () => {
    const header = epwLines().slice(0, 8);
    const commas = readRefused([...header, ...Array(8760).fill(','.repeat(34))]);
    expect(findingsOf(commas, 'not-a-number')[0]).toMatchObject({ line: 9, column: 2 });
    expect(findingsOf(commas, 'not-a-number')[0]?.message).toContain('an empty field');
    const codes = readRefused({
      hour: () => ({ dryBulbC: '99.9', dewPointC: '99.9', relativeHumidityPct: 999, pressurePa: 999_999 }),
    });
    expect(findingsOf(codes, 'no-temperature')).toHaveLength(1);
  });

  test('archives are to be unpacked first, and other binary files are refused as such', () => {
    const gzip = readWeatherFile(Uint8Array.of(0x1f, 0x8b, 8, 0), 'weather.epw.gz');
    const zip = readWeatherFile(Uint8Array.of(0x50, 0x4b, 3, 4, 20, 0), 'weather.zip');
    for (const reading of [gzip, zip]) {
      expect(reading.findings).toEqual([expect.objectContaining({ code: 'binary', severity: 'refuse' })]);
      expect(reading.findings[0]?.message).toContain('Unpack it and bring what is inside');
    }
    const png = readWeatherFile(Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10, 0, 0), 'map.png');
    expect(png.findings[0]).toMatchObject({ code: 'binary', severity: 'refuse', line: 3 });
  });

  test('the companions of a weather file are named as such', () => {
    const reading = readWeatherFile(bytesOf('Statistics for somewhere\n'), 'field.stat');
    expect(reading.findings[0]?.message).toContain('Bring the .epw that stands beside it');
  });

  test('names with paths and line breaks reach no message', () => {
    const reading = readWeatherFile(bytesOf('nothing'), '../../etc/passwd\n.stat\u0000');
    expect(JSON.stringify(reading)).not.toContain('passwd');
  });

  test('one line of 20 MB, 300,000 short lines and 100,000 faulty rows end within two seconds each', {
    timeout: 60_000,
  }, () => {
    const header = `${epwLines().slice(0, 8).join('\n')}\n`;
    const files = [
      'x'.repeat(20_000_000),
      `LOCATION,${'x'.repeat(20_000_000)}`,
      `${header}${'x'.repeat(20_000_000)}`,
      `${header}${','.repeat(20_000_000)}`,
      `${header}${'a\n'.repeat(300_000)}`,
      `${header}${'1,1,1,1,0,f,b,c,d,e\n'.repeat(100_000)}`,
    ];
    for (const file of files) {
      const bytes = bytesOf(file);
      const started = process.cpuUsage().user;
      expect(problemsOf(readWeatherFile(bytes, 'large.epw'))).toEqual([]);
      expect((process.cpuUsage().user - started) / 1000).toBeLessThan(LONGEST_MS);
    }
  });
});

describe('an EPW that is damaged at random', { timeout: PATIENCE_MS }, () => {
  // January alone: read in a tenth of the time of a year, and just as easily damaged.
  const january = epwLines({ comments: ['Orléans', 'Windows'], dataPeriods: '1,1,Data,Sunday,1/1,1/31' }).slice(0, 752);
  const text = `${january.join('\n')}\n`;
  const bytes = bytesOf(text);
  const headerLength = text.indexOf('\n1991,') + 1;

  test('over a whole year and cut at any byte is read or refused', () => {
    const year = epwBytes();
    const property = fc.property(fc.integer({ min: 0, max: year.length }), (length) => {
      return problemsOf(readWeatherFile(year.subarray(0, length), 'cut.epw')).length === 0;
    });
    fc.assert(property, propertySettings(10, 1_000));
  });

  test('and cut at any byte is read or refused, and never throws', () => {
    const anywhere = fc.oneof(
      fc.integer({ min: 0, max: headerLength + 400 }),
      fc.integer({ min: bytes.length - 400, max: bytes.length }),
      fc.integer({ min: 0, max: bytes.length }),
    );
    const property = fc.property(anywhere, (length) => {
      const problems = problemsOf(readWeatherFile(bytes.subarray(0, length), 'cut.epw'));
      return problems.length === 0;
    });
    fc.assert(property, propertySettings(150, 15_000));
  });

  const change = fc.record({
    at: fc.oneof(fc.integer({ min: 0, max: headerLength }), fc.integer({ min: 0, max: bytes.length - 1 })),
    // Bytes that matter to the format, and any others.
    byte: fc.oneof(fc.constantFrom(...bytesOf('0123456789.,-+eE\n\r "/\t')), fc.integer({ min: 0, max: 255 })),
  });

  test('by changed, lost and doubled bytes is read or refused within two seconds, and no hour is beyond weather', () => {
    const property = fc.property(
      fc.array(change, { minLength: 1, maxLength: 12 }),
      fc.constantFrom('change', 'lose', 'double'),
      (changes, how) => {
        const damaged = damagedBytes(bytes, changes, how);
        const started = process.cpuUsage().user;
        const problems = problemsOf(readWeatherFile(damaged, 'damaged.epw'));
        return problems.length === 0 && (process.cpuUsage().user - started) / 1000 < LONGEST_MS;
      },
    );
    fc.assert(property, propertySettings(230, 23_000));
  });

  test('by fields exchanged for words, codes and wild numbers keeps every hour within what weather can be', () => {
    const rows = january;
    const field = fc.record({
      row: fc.integer({ min: 8, max: rows.length - 1 }),
      index: fc.integer({ min: 6, max: 9 }),
      value: fc.constantFrom(
        '99.9',
        '999',
        '-999',
        '9999',
        '99999',
        '999999',
        '0',
        '60',
        '-90',
        '61',
        '1e9',
        '-1e9',
        '',
        'NA',
        '150',
        '37',
        '120000',
      ),
    });
    const property = fc.property(fc.array(field, { minLength: 1, maxLength: 40 }), (changes) => {
      const lines = [...rows];
      for (const { index, row, value } of changes)
        lines[row] = (lines[row] ?? '').split(',').with(index, value).join(',');
      return problemsOf(readMadeUp(lines)).length === 0;
    });
    fc.assert(property, propertySettings(70, 7_000));
  });
});

test('a faultless file has no problem by the same measure', () => {
  expect(problemsOf(readWeatherFile(epwBytes(), 'plain.epw'))).toEqual([]);
  expect(DEW_POINT_LIMITS_C.high).toBe(37);
});
