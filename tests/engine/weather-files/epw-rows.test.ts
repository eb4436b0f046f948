import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { bytesOf, epwLines, epwText, FIRST_DATA_LINE } from '../../support/epw-text.ts';
import { faultyFindings, findingsOf, readRefused, readUsable, remarkable } from '../../support/readings.ts';
import { propertySettings } from '../../support/sample-size.ts';

/** Place of the source flags among the fields. */
const FLAGS = 5;
/** Index in the lines of a row whose slot is given. */
const at = (slot: number) => FIRST_DATA_LINE - 1 + slot;

function withLine(slot: number, change: (line: string) => string): string[] {
  const lines = epwLines();
  lines[at(slot)] = change(lines[at(slot)] ?? '');
  return lines;
}

const withField = (slot: number, field: number, value: string) =>
  withLine(slot, (line) =>
    line
      .split(',')
      .with(field - 1, value)
      .join(','),
  );

describe('data records of an EPW', () => {
  test('a plain year is read whole: every hour measured, lines and kind right, nothing remarkable', () => {
    const reading = readUsable({});
    expect(remarkable(reading)).toEqual([]);
    expect(reading.status).toBe('review');
    expect(reading.kind).toBe('typical');
    expect(reading.hours.dryBulbC).toHaveLength(8760);
    expect(reading.hours.flags.every((flags) => flags === 0)).toBe(true);
    expect([reading.hours.lines[0], reading.hours.lines[8759]]).toEqual([9, 8768]);
  });

  test('30 fields, and 10, are enough; more than 35 are ignored and noted once', () => {
    for (const count of [30, 10]) {
      const lines = epwLines().map((line, index) => (index < 8 ? line : line.split(',').slice(0, count).join(',')));
      expect(remarkable(readUsable(lines))).toEqual([]);
    }
    const longer = epwLines().map((line, index) => (index < 8 ? line : `${line},1,2`));
    expect(findingsOf(readUsable(longer), 'field-count')).toEqual([
      expect.objectContaining({ severity: 'note', line: 9, count: 8760 }),
    ]);
  });

  test('fewer than 10 fields refuse the file with the line and the count', () => {
    const reading = readRefused(withLine(500, (line) => line.split(',').slice(0, 9).join(',')));
    expect(findingsOf(reading, 'field-count')).toEqual([
      expect.objectContaining({
        severity: 'refuse',
        line: at(500) + 1,
        message: expect.stringContaining('has 9 fields'),
      }),
    ]);
  });

  test('a row that lacks one field of the layout is left out, since its values may have moved', () => {
    const reading = readUsable(withLine(500, (line) => line.split(',').toSpliced(7, 1).join(',')));
    expect(findingsOf(reading, 'field-count')).toEqual([
      expect.objectContaining({ severity: 'doubt', line: at(500) + 1 }),
    ]);
    // Filled between its neighbours, not taken from the moved fields.
    const { dryBulbC } = reading.hours;
    expect(dryBulbC[500]).toBeCloseTo(((dryBulbC[499] ?? 0) + (dryBulbC[501] ?? 0)) / 2, 9);
  });

  test.each([
    [2, 'month'],
    [4, 'hour'],
    [7, 'dry bulb'],
    [8, 'dew point'],
    [9, 'relative humidity'],
    [10, 'pressure'],
  ])('letters in field %d (%s) are refused with line, column and the field', (field, name) => {
    const lines = withField(700, field, '1O.5');
    const reading = readRefused(lines);
    const column =
      (lines[at(700)] ?? '')
        .split(',')
        .slice(0, field - 1)
        .join(',').length + 2;
    expect(findingsOf(reading, 'not-a-number')).toEqual([
      expect.objectContaining({ severity: 'refuse', line: at(700) + 1, column }),
    ]);
    expect(findingsOf(reading, 'not-a-number')[0]?.message).toContain(
      `field ${field} (${name}), character ${column}: “1O.5”`,
    );
  });

  test('columns are counted in characters, not bytes', () => {
    const lines = withLine(3, (line) => line.replace('?9?9', 'ééé?').replace(/,9?\d\d\d\d\d,0,0/, ',zzz,0,0'));
    const [finding] = findingsOf(readRefused(lines), 'not-a-number');
    expect((lines[at(3)] ?? '').slice((finding?.column ?? 0) - 1)).toMatch(/^zzz,/);
  });

  test('every fault is told at once, of each kind the first 100 lines, the rest counted', () => {
    const lines = epwLines().map((line, index) => {
      if (index < 8) return line;
      return index % 2 === 0 ? line.replace(/^\d+,/, 'year,').split(',').with(6, 'warm').join(',') : 'short,line';
    });
    const reading = readRefused(lines);
    for (const code of ['not-a-number', 'field-count'] as const) {
      const found = findingsOf(reading, code);
      expect(found).toHaveLength(101);
      expect(found.reduce((sum, { count }) => sum + count, 0)).toBe(4380);
    }
    expect(findingsOf(reading, 'not-a-number').at(-1)?.message).toMatch(/4,280 more places/);
    expect(faultyFindings(reading)).toEqual([]);
  });

  test('a date that does not exist is refused with what would exist', () => {
    for (const [field, value, sentence] of [
      [2, '13', 'month 13 does not exist (1 to 12)'],
      [3, '32', 'day 32 of January does not exist (1 to 31)'],
      [4, '25', 'hour 25 does not exist (0 to 24)'],
      [4, '1.5', 'hour 1.5 does not exist (0 to 24)'],
    ] as const) {
      const [finding] = findingsOf(readRefused(withField(30, field, value)), 'time-order');
      expect(finding).toMatchObject({ severity: 'refuse', line: at(30) + 1 });
      expect(finding?.message).toContain(sentence);
    }
  });

  test.each([
    ['99.9', 7],
    ['999', 7],
    ['9999', 7],
    ['-99', 7],
    ['-999', 7],
    ['-9999', 7],
    ['-99.9', 7],
    ['', 7],
    ['NA', 7],
    ['NaN', 7],
    ['-', 7],
    ['99.9', 8],
    ['', 8],
    ['-9999', 8],
    ['NA', 8],
  ])('%s in field %d is missing, and the hour is filled and marked as repaired', (code, field) => {
    const reading = readUsable(withField(3000, field, code));
    expect(remarkable(reading)).toEqual(['time-gap note']);
    expect(findingsOf(reading, 'time-gap')[0]).toMatchObject({ line: at(3000) + 1, count: 1 });
    const { dryBulbC, humidityRatio, flags } = reading.hours;
    const column = field === 7 ? dryBulbC : humidityRatio;
    const middle = ((column[2999] ?? 0) + (column[3001] ?? 0)) / 2;
    expect(column[3000]).toBeCloseTo(middle, 9);
    expect(flags[3000]).toBe(field === 7 ? 2 : 2 << 2);
  });

  test('relative humidity of 999, -1 or nothing is missing, which a file with dew points does not need', () => {
    for (const code of ['999', '9999', '-1', '', 'NA']) {
      expect(remarkable(readUsable(withField(3000, 9, code)))).toEqual([]);
    }
  });

  test.each(['999999', '9999', '0', '-1', '', 'NA', '99999'])(
    'a pressure of %s is missing and takes the mean',
    (code) => {
      const reading = readUsable(withField(3000, 10, code));
      expect(remarkable(reading)).toEqual(['pressure-assumed note']);
      expect(findingsOf(reading, 'pressure-assumed')[0]).toMatchObject({ line: at(3000) + 1, count: 1 });
      const { pressurePa, flags } = reading.hours;
      expect(Math.abs((pressurePa[3000] ?? 0) - 97_300)).toBeLessThan(60);
      expect(flags[3000]).toBe(2 << 4);
    },
  );

  test('99999 is a pressure where the others lie within 1 % of it', () => {
    const reading = readUsable({
      location: 'Low Field,-,-,-,-,33.45,-111.98,-7.0,110.0',
      hour: ({ slot }) => ({ pressurePa: slot === 3000 ? 99_999 : 99_950 + (slot % 10) }),
    });
    expect(remarkable(reading)).toEqual([]);
    expect(reading.hours.pressurePa[3000]).toBe(99_999);
  });

  test('numbers may carry signs, blanks, exponents and bare points', () => {
    const lines = withField(10, 7, ' +1.25e1 ');
    lines[at(11)] = (lines[at(11)] ?? '').split(',').with(6, '.135e2').with(7, '-0').join(',');
    const { dryBulbC } = readUsable(lines).hours;
    expect([dryBulbC[10], dryBulbC[11]]).toEqual([12.5, 13.5]);
  });

  test('a row with blanks around its numbers says the same as one without, to the bit and whatever stands in it', () => {
    const decimals = (digits: number) =>
      fc
        .integer({ min: -60 * 10 ** digits, max: 60 * 10 ** digits })
        .map((whole) => (whole / 10 ** digits).toFixed(digits));
    const odd = [
      '',
      '-0',
      '-0.0',
      '007.50',
      '.5',
      '5.',
      '1e1',
      '99.9',
      '-99',
      '12345678901234567890',
      '0.1234567890123',
    ];
    const word = fc.oneof(decimals(0), decimals(1), decimals(2), decimals(7), fc.constantFrom(...odd));
    const row = fc.record({
      flags: fc.constantFrom('', 'A', '?9?9', 'B8E8É'),
      values: fc.tuple(word, word, word, word),
    });
    const property = fc.property(
      fc.array(row, { minLength: 60, maxLength: 60 }),
      fc.constantFrom('\n', '\r\n'),
      (rows, end) => {
        const lines = epwLines();
        const padded = epwLines();
        for (const [nth, { flags, values }] of rows.entries()) {
          const fields = (lines[at(100 * nth)] ?? '').split(',').toSpliced(FLAGS, 5, flags, ...values);
          lines[at(100 * nth)] = fields.join(',');
          padded[at(100 * nth)] = fields.map((field, index) => (index === FLAGS ? field : ` ${field}\t`)).join(',');
        }
        const plain = readUsable(bytesOf(lines.join(end) + end));
        const blanks = readUsable(bytesOf(padded.join(end) + end));
        expect(plain.findings).toEqual(blanks.findings);
        for (const name of ['dryBulbC', 'humidityRatio', 'pressurePa', 'flags', 'lines'] as const) {
          const [one, other] = [plain.hours[name], blanks.hours[name]];
          expect(
            one.every((value, slot) => Object.is(value, other[slot])),
            name,
          ).toBe(true);
        }
      },
    );
    fc.assert(property, propertySettings(4));
  });

  test('a last line cut short is left out and told, and the hour is told as absent', () => {
    const text = epwText();
    const reading = readUsable(bytesOf(text.slice(0, text.lastIndexOf('97') + 1)));
    expect(remarkable(reading).toSorted()).toEqual(['row-count doubt', 'time-gap note', 'truncated repair']);
    expect(findingsOf(reading, 'truncated')[0]).toMatchObject({ line: 8768 });
    expect(Number.isNaN(reading.hours.dryBulbC[8759])).toBe(true);
  });

  test('a last line without its line end but with all fields is whole', () => {
    expect(remarkable(readUsable(bytesOf(epwText().trimEnd())))).toEqual([]);
  });
});

describe('source flags', () => {
  test('that vary mark interpolated and modelled hours, a note under 40 % of the hours and a doubt from there', () => {
    const share = (limit: number) =>
      readUsable({ hour: ({ slot }) => ({ flags: slot < limit ? 'B8E8E8A7' : 'A7A7E8A7' }) });
    const few = share(1000);
    expect(findingsOf(few, 'source-estimated')[0]).toMatchObject({ severity: 'note', count: 1000 });
    expect([few.hours.flags[999], few.hours.flags[1000]]).toEqual([1 | (1 << 2), 0]);
    expect(findingsOf(share(3504), 'source-estimated')[0]).toMatchObject({ severity: 'doubt', count: 3504 });
  });

  test('that are the same in every row tell nothing, even where they say interpolated', () => {
    const reading = readUsable({ hour: () => ({ flags: 'B8B8B8B8' }) });
    expect(findingsOf(reading, 'source-flags-uniform')).toHaveLength(1);
    expect(reading.hours.flags.every((flags) => flags === 0)).toBe(true);
  });
});
