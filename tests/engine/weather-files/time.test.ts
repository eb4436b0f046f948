import { describe, expect, test } from 'vitest';
import { epwLines, epwRow, FIRST_DATA_LINE } from '../../support/epw-text.ts';
import { findingsOf, readRefused, readUsable, remarkable } from '../../support/readings.ts';

const at = (slot: number) => FIRST_DATA_LINE - 1 + slot;
/** One year throughout that begins on the declared weekday: 2017 began on a Sunday. */
const ACTUAL = { hour: () => ({ year: 2017 }) };

describe('the calendar of an EPW', () => {
  test('months of several years are a typical year; one year that begins on the declared weekday is an actual one', () => {
    expect(readUsable({})).toMatchObject({ kind: 'typical', year: null });
    expect(readUsable(ACTUAL)).toMatchObject({ kind: 'actual', year: 2017 });
    // 2018 began on a Monday: the weekday does not agree, so the year is only a label.
    expect(readUsable({ hour: () => ({ year: 2018 }) })).toMatchObject({ kind: 'typical', year: null });
    expect(readUsable({ ...ACTUAL, dataPeriods: '1,1,Data,,1/1,12/31' })).toMatchObject({ kind: 'typical' });
    expect(readUsable({ hour: () => ({ year: 'TMY' }) })).toMatchObject({ kind: 'typical' });
  });

  test('8784 rows with 29 February are a leap year whatever the header says, which is noted where they disagree', () => {
    const agreed = readUsable({ slots: 8784, leapYearObserved: 'Yes' });
    expect(agreed.hours.dryBulbC).toHaveLength(8784);
    expect(remarkable(agreed)).toEqual([]);
    expect(remarkable(readUsable({ slots: 8784, leapYearObserved: 'No' }))).toEqual(['leap-day note']);
    expect(remarkable(readUsable({ leapYearObserved: 'Yes' }))).toEqual(['leap-day note']);
  });

  test('a leap year without 29 February is read as it stands, with a note', () => {
    // 2012 began on a Sunday.
    const reading = readUsable({ hour: () => ({ year: 2012 }) });
    expect(reading).toMatchObject({ kind: 'actual', year: 2012, status: 'review' });
    expect(reading.hours.dryBulbC).toHaveLength(8760);
    expect(findingsOf(reading, 'leap-day')[0]?.message).toContain(
      '2012 is a leap year, but the file has no 29 February',
    );
  });

  test('hours numbered 0 to 23 are shifted by one, with a note', () => {
    const plain = readUsable({});
    const lines = epwLines().map((line, index) => {
      const fields = line.split(',');
      return index < 8 ? line : fields.with(3, String(Number(fields[3]) - 1)).join(',');
    });
    const reading = readUsable(lines);
    expect(remarkable(reading)).toEqual(['time-order note']);
    expect([...reading.hours.dryBulbC]).toEqual([...plain.hours.dryBulbC]);
  });

  test('absent hours are told with the line before them; 5 are filled, 6 stay missing', () => {
    const lines = epwLines();
    lines.splice(at(4006), 6);
    lines.splice(at(1000), 5);
    const reading = readUsable(lines);
    expect(findingsOf(reading, 'time-gap')).toEqual([
      expect.objectContaining({
        severity: 'note',
        line: at(1000),
        count: 5,
        message: expect.stringContaining('filled'),
      }),
      expect.objectContaining({
        severity: 'note',
        line: at(4006) - 5,
        count: 6,
        message: expect.stringContaining('stay missing'),
      }),
    ]);
    expect(findingsOf(reading, 'row-count')[0]).toMatchObject({ severity: 'doubt', count: 11 });
    const missing = reading.hours.dryBulbC.reduce((sum, value) => sum + (Number.isNaN(value) ? 1 : 0), 0);
    expect(missing).toBe(6);
  });

  test('a repeated hour with equal values is dropped with a doubt, with other values it is asked about and the first kept', () => {
    const equal = epwLines();
    equal.splice(at(51), 0, equal[at(50)] ?? '');
    const same = readUsable(equal);
    expect(findingsOf(same, 'time-repeat')).toEqual([
      expect.objectContaining({ severity: 'doubt', line: at(50) + 2, count: 1 }),
    ]);
    expect(same.status).toBe('review');
    const other = epwLines();
    other.splice(at(51), 0, epwRow({ slot: 50, month: 1, day: 3, hour: 3 }, { dryBulbC: 33.3 }));
    const asked = readUsable(other);
    expect(asked.status).toBe('asks');
    expect(asked.asks).toEqual([expect.objectContaining({ what: 'time-repeat', proposal: 'Keep the first.' })]);
    expect(asked.hours.dryBulbC[50]).not.toBe(33.3);
  });

  test('a day that stands twice while another is absent proposes that its date is wrong', () => {
    const lines = epwLines();
    // 11 March carries the date of 10 March.
    const day = (31 + 28 + 10) * 24;
    for (let slot = day; slot < day + 24; slot++) {
      lines[at(slot)] = (lines[at(slot)] ?? '').split(',').with(2, '10').join(',');
    }
    const reading = readUsable(lines);
    expect(reading.asks).toEqual([
      expect.objectContaining({
        what: 'time-repeat',
        proposal: 'The second copy is 11 March, which is absent: its date is wrong.',
      }),
    ]);
    expect(findingsOf(reading, 'time-repeat')).toEqual([
      expect.objectContaining({ line: at(day) + 1, lastLine: at(day) + 24, count: 24 }),
    ]);
  });

  test('rows out of order are sorted within one real year and refused in a typical one, with the line', () => {
    const swap = (lines: string[]) => {
      [lines[at(200)], lines[at(201)]] = [lines[at(201)] ?? '', lines[at(200)] ?? ''];
      return lines;
    };
    const sorted = readUsable(swap(epwLines(ACTUAL)));
    expect(findingsOf(sorted, 'time-order')[0]).toMatchObject({ severity: 'repair', line: at(201) + 1, count: 1 });
    expect([...sorted.hours.dryBulbC]).toEqual([...readUsable(ACTUAL).hours.dryBulbC]);
    const refused = readRefused(swap(epwLines()));
    expect(findingsOf(refused, 'time-order')[0]).toMatchObject({ severity: 'refuse', line: at(201) + 1 });
  });

  test('a year from July to June is laid on the calendar', () => {
    const lines = epwLines();
    const july = 181 * 24;
    const turned = [...lines.slice(0, 8), ...lines.slice(at(july)), ...lines.slice(8, at(july))];
    turned[7] = 'DATA PERIODS,1,1,Data,Sunday,7/1,6/30';
    const reading = readUsable(turned);
    expect(remarkable(reading)).toEqual([]);
    expect([...reading.hours.dryBulbC]).toEqual([...readUsable({}).hours.dryBulbC]);
  });

  test('several periods or years are never joined unasked: the first is read and a person is asked', () => {
    const lines = epwLines(ACTUAL);
    const second = lines.slice(8).map((line) => line.replace(/^2017,/, '2018,'));
    const undeclared = readUsable([...lines, ...second]);
    expect(undeclared.asks).toEqual([expect.objectContaining({ what: 'several-periods' })]);
    expect(undeclared).toMatchObject({ status: 'asks', kind: 'actual', year: 2017 });
    expect(findingsOf(undeclared, 'several-periods')[0]).toMatchObject({ line: 8769, count: 8760 });
    const declared = [...lines];
    declared[7] = 'DATA PERIODS,2,1,Past,Sunday,1/1,12/31,Future,Monday,1/1,12/31';
    expect(readUsable([...declared, ...second]).asks[0]).toMatchObject({
      what: 'several-periods',
      proposal: 'Read the first, Past.',
    });
  });

  test('periods of parts of a year that follow one another are kept apart too', () => {
    const lines = epwLines(ACTUAL);
    lines[7] = 'DATA PERIODS,2,1,Spring,Sunday,1/1,6/30,Autumn,Saturday,7/1,12/31';
    const reading = readUsable(lines);
    expect(reading.asks[0]?.what).toBe('several-periods');
    expect(Number.isNaN(reading.hours.dryBulbC[8759])).toBe(true);
    expect(Number.isNaN(reading.hours.dryBulbC[4343])).toBe(false);
  });

  test('five years declared and a handful of rows: the rows are believed, and too few are refused with the count', () => {
    const reading = readRefused(epwLines({ dataPeriods: '1,1,Data,Sunday,1/1/2010,12/31/2014' }).slice(0, 20));
    expect(findingsOf(reading, 'too-few-rows')[0]).toMatchObject({ severity: 'refuse', count: 12 });
  });

  test('one whole month is read, and the months that do not count are named', () => {
    const reading = readUsable(epwLines({ dataPeriods: '1,1,Data,Sunday,1/1,1/31' }).slice(0, 8 + 31 * 24));
    expect(findingsOf(reading, 'coverage')[0]).toMatchObject({ severity: 'doubt' });
    expect(findingsOf(reading, 'coverage')[0]?.message).toMatch(/11 months .* February \(0 %\)/);
    expect(findingsOf(reading, 'row-count')).toEqual([]);
  });
});

describe('several records an hour', () => {
  test('become one hour whose depression is the mean of the depressions, dry bulb the mean', () => {
    const quarter = [-3, -1, 1, 3];
    let record = 0;
    const lines = epwLines({ recordsPerHour: 4 }).map((line, index) => {
      if (index < 8) return line;
      const fields = line.split(',');
      const dryBulbC = (Number(fields[6]) + (quarter[record++ % 4] ?? 0)).toFixed(1);
      return fields.with(6, dryBulbC).with(8, '').join(',');
    });
    const hourly = readUsable({});
    const reading = readUsable(lines);
    expect(remarkable(reading)).toEqual([]);
    expect(reading.hours.dryBulbC).toHaveLength(8760);
    expect(reading.hours.lines[1]).toBe(13);
    for (const slot of [0, 4000, 8759]) {
      expect(reading.hours.dryBulbC[slot]).toBeCloseTo(hourly.hours.dryBulbC[slot] ?? 0, 6);
      // Same dew point, dry bulbs spread by 3 K either way: the mean depression is that of the mean to a few hundredths.
      expect(reading.hours.humidityRatio[slot]).toBeCloseTo(hourly.hours.humidityRatio[slot] ?? 0, 4);
    }
  });

  test('an hour counts with three of its four records and not with two', () => {
    const lines = epwLines({ recordsPerHour: 4 });
    lines.splice(8 + 4 * 100, 1);
    lines.splice(8 + 4 * 200 - 1, 2);
    const reading = readUsable(lines);
    expect(findingsOf(reading, 'time-gap')).toEqual([expect.objectContaining({ count: 1 })]);
    expect(findingsOf(reading, 'row-count')[0]).toMatchObject({ count: 3 });
  });

  test('that are declared but not there are told, and the rows are believed', () => {
    const reading = readUsable({ dataPeriods: '1,4,Data,Sunday,1/1,12/31' });
    expect(remarkable(reading)).toEqual(['row-count doubt']);
    expect(reading.hours.dryBulbC.every((value) => !Number.isNaN(value))).toBe(true);
  });
});
