import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { humidityRatioFromDewPoint } from '#engine/psychrometrics/moist-air.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { readWeatherFileParts } from '#engine/weather-files/read-weather-file-parts.ts';
import type { UsableReading, WeatherFormat } from '#engine/weather-files/weather-file-reading.ts';
import { findingsOf } from '../../support/readings.ts';
import { propertySettings } from '../../support/sample-size.ts';
import {
  bytesOfRows,
  globalHourlyLines,
  globalHourlyRow,
  isdLines,
  isdLiteLines,
  isdRecord,
  tableLines,
  tmy2Lines,
  tmy3Lines,
  utcMinutes,
  WRITTEN_PLACE,
  type WrittenHour,
  writtenYear,
} from '../../support/weather-writers.ts';

const { name: _name, ...KNOWN } = WRITTEN_PLACE;
const place: ReadOptions = { place: KNOWN };

function usable(lines: readonly string[], options: ReadOptions = place, name = 'made-up'): UsableReading {
  const reading = readWeatherFile(bytesOfRows(lines), name, options);
  if (reading.status !== 'refused' && reading.hours !== null) return reading;
  throw new Error(`not read: ${reading.findings.map(({ message }) => message).join(' ')}`);
}

/** January and February: read in a sixth of the time of a year. */
const TWO_MONTHS = 59 * 24;

/** The mapping that a table guesses, confirmed as it stands. */
function confirmed(lines: readonly string[]): ReadOptions {
  const reading = readWeatherFile(bytesOfRows(lines), 'made-up.csv', place);
  if (reading.status === 'refused' || reading.hours !== null || reading.table.mapping === null)
    throw new Error('no guess');
  return { ...place, mapping: reading.table.mapping };
}

/** Largest distance of what was read from what was written: °C, kg/kg, Pa. */
function distances({ hours }: UsableReading, written: readonly WrittenHour[]) {
  const most = { dryBulbC: 0, humidityRatio: 0, pressurePa: 0, missing: 0 };
  written.forEach((hour, slot) => {
    const dryBulbC = hours.dryBulbC[slot] ?? Number.NaN;
    const pressurePa = hours.pressurePa[slot] ?? Number.NaN;
    const humidityRatio = hours.humidityRatio[slot] ?? Number.NaN;
    if (Number.isNaN(dryBulbC + pressurePa + humidityRatio)) most.missing++;
    const { dewPointC } = hour;
    const wanted = humidityRatioFromDewPoint({ dryBulbC: hour.dryBulbC, dewPointC, pressurePa, belowZero: 'water' });
    most.dryBulbC = Math.max(most.dryBulbC, Math.abs(dryBulbC - hour.dryBulbC));
    most.humidityRatio = Math.max(most.humidityRatio, Math.abs(humidityRatio - wanted));
    most.pressurePa = Math.max(most.pressurePa, Math.abs(pressurePa - hour.pressurePa));
  });
  return most;
}

const writers: readonly [WeatherFormat, (hours: readonly WrittenHour[]) => string[]][] = [
  ['TMY3', tmy3Lines],
  ['TMY2', tmy2Lines],
  ['ISD-Lite', isdLiteLines],
  ['ISD', isdLines],
  ['Global Hourly', globalHourlyLines],
  ['table', tableLines],
];

describe('a year written out and read again', { timeout: 300_000 }, () => {
  test.each(writers)('as %s is the same hour by hour, and nothing else than notes is found', (format, write) => {
    const property = fc.property(fc.integer({ min: 1, max: 1e6 }), (seed) => {
      const written = writtenYear(seed, 1989 + (seed % 3));
      const lines = write(written);
      const reading = usable(lines, format === 'table' ? confirmed(lines) : place);
      expect(reading.format).toBe(format);
      const doubts = reading.findings.filter(({ severity }) => severity !== 'note');
      expect(doubts.map(({ message }) => message)).toEqual([]);
      const most = distances(reading, written);
      expect(most.missing).toBe(0);
      // Written in tenths of a degree; sea-level pressure in tenths of a hectopascal.
      expect(most.dryBulbC).toBeLessThan(1e-9);
      expect(most.humidityRatio).toBeLessThan(1e-9);
      expect(most.pressurePa).toBeLessThan(format === 'ISD-Lite' ? 6 : 1e-6);
    });
    fc.assert(property, propertySettings(1));
  });

  test('in any order of its lines is the same where the format has real dates', () => {
    const written = writtenYear(3).slice(0, TWO_MONTHS);
    const [first = '', ...rest] = globalHourlyLines(written);
    expect(distances(usable([first, ...rest.toReversed()]), written)).toMatchObject({ missing: 0, dryBulbC: 0 });
  });

  test('of several years gives each year as a part of its own', () => {
    const written = [...writtenYear(1, 2013), ...writtenYear(2, 2014).slice(0, TWO_MONTHS)];
    const readings = readWeatherFileParts(bytesOfRows(isdLiteLines(written)), '724666-93067-2013', place);
    expect(readings.map(({ part, status }) => `${part} ${status}`)).toEqual(['2013 review', '2014 review']);
    const [, second] = readings;
    if (second === undefined || second.status === 'refused' || second.hours === null) throw new Error('no second year');
    expect(second).toMatchObject({ kind: 'actual', year: 2014 });
    expect(distances(second, written.slice(8760)).missing).toBe(0);
    expect(usable(isdLiteLines(written), { ...place, part: '2014' }).year).toBe(2014);
  });

  test('of two stations gives each station as a part of its own', () => {
    const written = writtenYear(4).slice(0, TWO_MONTHS);
    const other = written.map((hour) => globalHourlyRow(hour, { station: '99999912345' }));
    const readings = readWeatherFileParts(bytesOfRows([...globalHourlyLines(written), ...other]), 'two.csv', place);
    expect(readings.map(({ part }) => part)).toEqual(['724666-93067', '999999-12345']);
    expect(readings.map(({ station }) => station?.wmoNumber)).toEqual(['724666', null]);
  });
});

describe('files in UTC', () => {
  const written = writtenYear(5);

  test('lack up to 14 local hours at one end, which is not told', () => {
    // The year as the source cuts it: by UTC.
    const inYear = written.filter(
      (hour) => new Date(utcMinutes(hour, WRITTEN_PLACE) * 60_000).getUTCFullYear() === 2015,
    );
    expect(inYear).toHaveLength(8760 - 8);
    const reading = usable(isdLiteLines(inYear));
    expect(findingsOf(reading, 'time-gap')).toEqual([]);
    expect(findingsOf(reading, 'row-count')).toEqual([]);
    expect(distances(reading, written).missing).toBe(8);
  });

  test('are asked for place and elevation when they give none, and name their station by the file', () => {
    const reading = readWeatherFile(bytesOfRows(isdLiteLines(written)), 'data/724666-93067-2015.gz');
    expect(reading).toMatchObject({ status: 'asks', station: { name: '724666-93067', wmoNumber: '724666' } });
    if (reading.status === 'refused') throw new Error('refused');
    expect(reading.asks.map(({ what }) => what)).toEqual(['place-missing', 'elevation-missing']);
  });

  test('take the zone of their position where the caller knows it, and say so', () => {
    const zoneAt = () => ({ zone: 'America/Denver', utcOffsetH: -7 });
    const reading = usable(isdLines(written), { zoneAt });
    expect(reading).toMatchObject({ status: 'review', station: { utcOffsetH: -7, elevationM: 500 } });
    expect(findingsOf(reading, 'place-zone')[0]).toMatchObject({ severity: 'note' });
    expect(distances(reading, written).missing).toBe(0);
  });

  test('of a half-hour zone fall on the hour that contains them', () => {
    const india = { ...WRITTEN_PLACE, longitude: 80, utcOffsetH: 5 };
    const reading = usable(isdLiteLines(written, india), { place: { ...KNOWN, longitude: 80, utcOffsetH: 5.5 } });
    // 12:00 UTC is 17:30, within the hour that ends at 18:00: one slot later than at UTC+5.
    const slots = [100, 5000, 8000];
    expect(slots.map((slot) => reading.hours.dryBulbC[slot + 1])).toEqual(slots.map((slot) => written[slot]?.dryBulbC));
  });
});

describe('reports at any minute', () => {
  const written = writtenYear(6).slice(0, TWO_MONTHS);
  const at =
    (minutes: number, report: object = {}) =>
    (hour: WrittenHour) =>
      globalHourlyRow(hour, { minutes: utcMinutes(hour, WRITTEN_PLACE) + minutes, ...report });
  const warmer = (hour: WrittenHour) => ({ ...hour, dryBulbC: hour.dryBulbC + 1 });
  const read = (rows: readonly string[]) => usable([globalHourlyLines([])[0] ?? '', ...rows]).hours.dryBulbC;

  test('give each hour the nearest within half an hour', () => {
    const column = read([
      ...written.map(at(-13)),
      ...written.map(warmer).map(at(20)),
      ...written.map(warmer).map(at(-29)),
    ]);
    expect([...column.slice(0, 5)]).toEqual(written.slice(0, 5).map(({ dryBulbC }) => dryBulbC));
  });

  test('prefer the routine report to a special, and then the later', () => {
    const special = written.map(warmer).map(at(-10, { type: 'FM-16' }));
    expect(read([...special, ...written.map(at(10))])[50]).toBe(written[50]?.dryBulbC);
    expect(read([...written.map(at(10)), ...special])[50]).toBe(written[50]?.dryBulbC);
    expect(read([...written.map(at(10)), ...written.map(warmer).map(at(-10))])[50]).toBe(written[50]?.dryBulbC);
  });

  test('are dropped when they are summaries, or when their codes call them suspect or erroneous', () => {
    const summaries = written.map(warmer).map(at(0, { type: 'SOD  ' }));
    expect(read([...summaries, ...written.map(at(-7))])[50]).toBe(written[50]?.dryBulbC);
    const doubtful = written.map((hour, slot) => at(0, slot % 200 === 100 ? { code: '3' } : {})(hour));
    const reading = usable([globalHourlyLines([])[0] ?? '', ...doubtful]);
    expect(findingsOf(reading, 'source-estimated')[0]).toMatchObject({ count: 14, severity: 'note' });
    const suspect = written.map((hour, slot) => isdRecord(hour, slot === 700 ? { code: '2' } : {}));
    // The ten months that are not written are a gap as well.
    expect(findingsOf(usable(suspect), 'time-gap').map(({ count }) => count)).toEqual([1, 8760 - TWO_MONTHS]);
    expect(findingsOf(usable(suspect, { ...place, keepSuspect: true }), 'time-gap')).toHaveLength(1);
  });
});

describe('the spreadsheet form of an EPW', () => {
  const written = writtenYear(7);
  const titled = [
    'Location Title,Latitude {N+/S-},Longitude {E+/W-},TimeZone {+/- GMT},Elevation {m},Standard Pressure At Elevation {Pa}',
    'USA_CO_MADE-UP_FIELD_WMO#724666,38.5,-105.25,-7,500,95460',
    'Number of Data Periods,Number of Records per hour',
    '1,1',
    'Date,HH:MM,Datasource,Dry Bulb Temperature {C},Dew Point Temperature {C},Relative Humidity {%},Atmospheric Pressure {Pa}',
  ];

  test.each([
    ['year first', (hour: WrittenHour) => `${hour.year}/${hour.month}/${hour.day}`],
    ['day first', (hour: WrittenHour) => `${hour.day}/${hour.month}/${hour.year}`],
    ['month first', (hour: WrittenHour) => `${hour.month}/${hour.day}/${hour.year}`],
  ])('is read as the EPW that it is, dates with the %s', (_style, date) => {
    const rows = written.map((hour) => {
      const values = [hour.dryBulbC, hour.dewPointC, hour.relativeHumidityPct, hour.pressurePa];
      return `${date(hour)},${String(hour.hour).padStart(2, '0')}:00,A7A7A7A7,${values.join(',')}`;
    });
    const reading = usable([...titled, ...rows], {});
    expect(reading).toMatchObject({ format: 'EPW', kind: 'typical', status: 'review' });
    expect(reading.station).toMatchObject({
      name: 'USA CO MADE-UP FIELD WMO#724666',
      wmoNumber: '724666',
      utcOffsetH: -7,
    });
    expect(distances(reading, written)).toMatchObject({ missing: 0, dryBulbC: 0, pressurePa: 0 });
  });
});
