import { gunzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';
import type { UsableReading, WeatherFormat } from '#engine/weather-files/weather-file-reading.ts';
import { readTruth, truthOf } from '../../support/ground-truth.ts';
import { findingsOf } from '../../support/readings.ts';
import { realFile, sharedFolder, WITHOUT_SHARED } from '../../support/shared.ts';

/**
 * Real files of the formats beside EPW against groundtruth.csv: an independent computation hour by hour on each file as it
 * stands. Mean wet bulb within 0.05 K, hours of depression within 5 h and the hours that the findings list (left out or filled),
 * wet bulb of 0.4 % of the hours within 0.1 K.
 */
const MEAN_K = 0.05;
const HOURS = 5;
const DESIGN_K = 0.1;
const ROOT_K = 0.001;

const title = (text: string) => (sharedFolder === null ? `${text} (skipped: ${WITHOUT_SHARED})` : text);
const truth = readTruth();

const zones: Readonly<Record<string, { zone: string; utcOffsetH: number }>> = {
  '-112': { zone: 'America/Denver', utcOffsetH: -7 },
  '9': { zone: 'Europe/Berlin', utcOffsetH: 1 },
  '8': { zone: 'Europe/Rome', utcOffsetH: 1 },
  '-118': { zone: 'America/Los_Angeles', utcOffsetH: -8 },
};
const zoneAt = (_latitude: number, longitude: number) => zones[String(Math.round(longitude))] ?? null;

function bytesOf(file: string): Uint8Array {
  const bytes = realFile(file);
  return file.endsWith('.gz') ? gunzipSync(bytes) : bytes;
}

/** Each file as it is usually asked for is read once. */
const plainReadings = new Map<string, UsableReading>();

function usable(file: string, options: ReadOptions = {}): UsableReading {
  const plain = Object.keys(options).length === 0;
  const known = plain ? plainReadings.get(file) : undefined;
  if (known !== undefined) return known;
  const reading = readWeatherFile(bytesOf(file), file, { zoneAt, ...options });
  if (reading.status === 'refused' || reading.hours === null) {
    throw new Error(`${file} is not read: ${reading.findings[0]?.message}`);
  }
  if (plain) plainReadings.set(file, reading);
  return reading;
}

/** The mapping that a table guesses. */
function guessed(file: string, options: ReadOptions = {}): TableMapping {
  const reading = readWeatherFile(bytesOf(file), file, { zoneAt, ...options });
  if (reading.status === 'refused' || reading.hours !== null || reading.table.mapping === null) {
    throw new Error(`${file} guesses nothing`);
  }
  return reading.table.mapping;
}

/** Hours so near to a limit that the truth's root, a bisection to 0.001 K, decides them; files in tenths have several. */
function hoursOnTheLimit({ hours }: UsableReading, kelvin: number): number {
  let near = 0;
  for (let slot = 0; slot < hours.dryBulbC.length; slot++) {
    const [dry = 0, ratio = 0, pressure = 0] = [
      hours.dryBulbC[slot],
      hours.humidityRatio[slot],
      hours.pressurePa[slot],
    ];
    if (Number.isNaN(dry + ratio + pressure)) continue;
    if (Math.abs(dry - wetBulbC(dry, ratio, pressure) - kelvin) <= ROOT_K) near++;
  }
  return near;
}

interface Expected {
  readonly file: string;
  readonly format: WeatherFormat;
  readonly options?: () => ReadOptions;
  readonly kind: 'typical' | 'actual';
  readonly from?: 'relative humidity';
}

const files: readonly Expected[] = [
  { file: 'tmy3/sandpoint-ak-703165TY.csv', format: 'TMY3', kind: 'typical' },
  { file: 'tmy3/greensboro-nc-723170TYA.CSV', format: 'TMY3', kind: 'typical' },
  { file: 'tmy3/golden-co-724666TYA.CSV', format: 'TMY3', kind: 'typical' },
  { file: 'tmy2/miami-fl-12839.tm2', format: 'TMY2', kind: 'typical' },
  {
    file: 'isd-lite/725755-24101-2014',
    format: 'ISD-Lite',
    kind: 'actual',
    options: () => ({ place: { latitude: 41.117, longitude: -111.967, elevationM: 1459.7 } }),
  },
  {
    file: 'isd-lite/108270-99999-2009',
    format: 'ISD-Lite',
    kind: 'actual',
    options: () => ({ place: { latitude: 48.183, longitude: 9, elevationM: 920 } }),
  },
  {
    file: 'table/nsrdb-psm4-tmy-8760.csv',
    format: 'table',
    kind: 'typical',
    options: () => ({
      mapping: guessed('table/nsrdb-psm4-tmy-8760.csv'),
      place: { latitude: 40, longitude: -112, elevationM: 2080 },
    }),
  },
  {
    file: 'table/piedmont-it-pvgis-tmy-utc.csv',
    format: 'table',
    kind: 'typical',
    from: 'relative humidity',
    options: () => ({ mapping: guessed('table/piedmont-it-pvgis-tmy-utc.csv') }),
  },
];

describe.skipIf(sharedFolder === null)(title('real files of every other format'), () => {
  test.each(files)(
    '$file agrees with the independent computation, but for the hours that its findings list',
    (expected) => {
      const { file } = expected;
      const reading = usable(file, expected.options?.() ?? {});
      const { facts, design } = reduceYear(reading);
      expect(reading).toMatchObject({ format: expected.format, kind: expected.kind, status: 'review' });
      expect(reading.humidityFrom).toBe(expected.from ?? 'dew point');
      expect(truth.get(file)?.get('below_zero')?.startsWith(reading.belowZero)).toBe(true);
      // Rows of the file as it stands; filled hours come on top, missing ones are away.
      const rows = truthOf(truth, file, 'rows');
      const listed = Math.abs(facts.hours - rows) + facts.missing + facts.repaired;
      expect(Math.abs((facts.meanWetBulbC ?? 0) - truthOf(truth, file, 'WB_mean'))).toBeLessThanOrEqual(MEAN_K);
      for (const kelvin of [4, 8, 11]) {
        const hours = facts.depressionHours.find(({ atLeastK }) => atLeastK === kelvin)?.hours ?? -1;
        const difference = Math.abs(hours - truthOf(truth, file, `h_dep_ge${kelvin}`));
        expect(difference, `${kelvin} K`).toBeLessThanOrEqual(HOURS + listed + hoursOnTheLimit(reading, kelvin));
      }
      const far = Math.abs((design.wetBulb[0]?.valueC ?? 0) - truthOf(truth, file, 'WB_0.4pct'));
      expect(far).toBeLessThanOrEqual(DESIGN_K);
    },
  );

  test('sand point is by its own flags two thirds measured, at a constant pressure', () => {
    const reading = usable('tmy3/sandpoint-ak-703165TY.csv');
    // 1329 interpolated and 1590 estimated hours of 8760; 15 of them stand still and are left out.
    expect(findingsOf(reading, 'source-estimated')[0]).toMatchObject({ severity: 'note', count: 2904 });
    expect(findingsOf(reading, 'pressure-constant')).toHaveLength(1);
  });

  test('miami has 980 interpolated and 132 long-interpolated hours by its own flags', () => {
    expect(findingsOf(usable('tmy2/miami-fl-12839.tm2'), 'source-estimated')[0]).toMatchObject({ count: 1112 });
  });

  test('depressions of 5 K or more are those that the data of pvlib give: 2276 h in Miami, 77 h at Sand Point', () => {
    const atLeast5 = (file: string) =>
      reduceYear(usable(file)).facts.depressionHours.find(({ atLeastK }) => atLeastK === 5)?.hours ?? 0;
    expect(Math.abs(atLeast5('tmy2/miami-fl-12839.tm2') - 2276)).toBeLessThanOrEqual(3);
    expect(Math.abs(atLeast5('tmy3/sandpoint-ak-703165TY.csv') - 77)).toBeLessThanOrEqual(3);
  });

  test('hill air force base asks for place and elevation; its sea-level pressure is led to the station', () => {
    const file = 'isd-lite/725755-24101-2014';
    const asking = readWeatherFile(bytesOf(file), file);
    expect(asking.status === 'asks' && asking.asks.map(({ what }) => what)).toEqual([
      ...['place-missing', 'elevation-missing'],
    ]);
    const { hours } = usable(file, files[4]?.options?.() ?? {});
    const known = hours.pressurePa.reduce((sum, value) => sum + value, 0) / hours.pressurePa.length;
    expect(Math.abs(known - truthOf(truth, file, 'P_mean_Pa'))).toBeLessThan(30);
  });

  test('messstetten asks too; every third hour is then filled, a third of the year', () => {
    const file = 'isd-lite/108270-99999-2009';
    expect(readWeatherFile(bytesOf(file), file)).toMatchObject({ status: 'asks' });
    const reading = usable(file, files[5]?.options?.() ?? {});
    expect(findingsOf(reading, 'much-repaired')[0]).toMatchObject({ severity: 'doubt', count: 2889 });
  });

  test('los angeles is the same from full records and from the table of the same reports', () => {
    const records = usable('isd-full/722874-93134-2007.gz');
    const table = usable('table/global-hourly-72287493134-2007-transcribed.csv');
    expect([records.format, table.format]).toEqual(['ISD', 'Global Hourly']);
    expect(records).toMatchObject({ status: 'review', year: 2007, station: { utcOffsetH: -8, elevationM: 56 } });
    expect([...table.hours.dryBulbC]).toEqual([...records.hours.dryBulbC]);
    expect([...table.hours.humidityRatio]).toEqual([...records.hours.humidityRatio]);
    expect([...table.hours.pressurePa]).toEqual([...records.hours.pressurePa]);
    expect(findingsOf(records, 'coverage')).toEqual([]);
  });

  test('the tables ask for their mapping; the place is offered from the preamble', () => {
    const nsrdb = readWeatherFile(bytesOf('table/nsrdb-psm4-tmy-8760.csv'), 'nsrdb.csv');
    expect(nsrdb.status === 'asks' && nsrdb.asks.map(({ what }) => what)).toEqual(['unit-guess', 'place-missing']);
    expect(guessed('table/nsrdb-psm4-tmy-8760.csv')).toMatchObject({
      years: 'typical',
      dryBulb: { column: 'Temperature', unit: 'C' },
      pressure: { column: 'Pressure', unit: 'hPa', level: 'station' },
    });
    const pvgis = readWeatherFile(bytesOf('table/piedmont-it-pvgis-tmy-utc.csv'), 'pvgis.csv', { zoneAt });
    expect(pvgis.status === 'asks' && pvgis.asks.map(({ what }) => what)).toEqual(['unit-guess']);
    expect(pvgis.station).toMatchObject({ latitude: 45, longitude: 8, elevationM: 250, utcOffsetH: 1 });
    expect(guessed('table/piedmont-it-pvgis-tmy-utc.csv')).toMatchObject({
      time: { columns: { column: 'time(UTC)' }, scale: 'UTC' },
      dewPoint: null,
      relativeHumidity: { column: 'RH', unit: '%' },
      pressure: { column: 'SP', unit: 'Pa' },
    });
  });

  test.each([
    ['tmy3/golden-co-no-humidity-variant.csv', 'no-humidity', 'RHum (%)'],
    ['isd-lite/893240-99999-2015', 'too-few-rows', '1 row'],
    ['isd-full/994035-99999-2013-no-temperature.gz', 'no-temperature', '8,611 reports'],
    ['table/crn-blank-padding.txt', 'too-few-rows', '3 rows'],
  ] as const)('%s is refused: %s', (file, code, words) => {
    const reading = readWeatherFile(bytesOf(file), file, { zoneAt });
    expect(reading.status).toBe('refused');
    expect(findingsOf(reading, code)[0]).toMatchObject({ severity: 'refuse' });
    expect(findingsOf(reading, code)[0]?.message).toContain(words);
  });
});
