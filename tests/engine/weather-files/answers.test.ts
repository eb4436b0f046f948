import { describe, expect, test } from 'vitest';
import { humidityRatioFromDewPoint, relativeHumidityOfDewPointPct } from '#engine/psychrometrics/moist-air.ts';
import { standardPressurePa } from '#engine/psychrometrics/pressure.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import {
  bytesOfLines,
  type EpwOptions,
  epwBytes,
  epwLines,
  FIRST_DATA_LINE,
  plainHour,
} from '../../support/epw-text.ts';
import { findingsOf } from '../../support/readings.ts';

const at = (slot: number) => FIRST_DATA_LINE - 1 + slot;

function read(file: EpwOptions | readonly string[], options: ReadOptions = {}): UsableReading {
  const bytes = 'length' in file ? bytesOfLines(file) : epwBytes(file);
  const reading = readWeatherFile(bytes, 'answered.epw', options);
  if (reading.status !== 'refused' && reading.hours !== null) return reading;
  throw new Error(`not read: ${reading.findings[0]?.message}`);
}

/** A file that asks one thing no longer asks when it is answered, and says what was answered. */
function answered(file: EpwOptions | readonly string[], answers: NonNullable<ReadOptions['answers']>): UsableReading {
  const [what = ''] = Object.keys(answers);
  expect(read(file).asks.map((ask) => ask.what)).toContain(what);
  const reading = read(file, { answers });
  expect(reading.asks).toEqual([]);
  expect(reading.status).toBe('review');
  return reading;
}

const slotDate = { slot: 4000, month: 6, day: 16, hour: 17 };
const plain = plainHour(slotDate);

describe('what a person has answered', () => {
  test('about the place goes before what the file says', () => {
    const place = { name: 'Elsewhere', latitude: 30, longitude: -100, elevationM: 340, utcOffsetH: -6.5 };
    const reading = read({ location: 'Field,-,-,-,-,0,0,0,0' }, { place });
    expect(reading.asks).toEqual([]);
    expect(reading.station).toMatchObject(place);
  });

  test('makes hectopascals of a column of pascals', () => {
    const reading = answered({ hour: () => ({ pressurePa: 973 }) }, { 'unit-guess': 'hectopascals' });
    expect(reading.hours.pressurePa[4000]).toBe(97_300);
  });

  test('leads sea-level pressure to the station, or keeps it', () => {
    const location = 'Field,-,-,-,-,33.45,-111.98,-7,337';
    const file = { location, hour: () => ({ pressurePa: 101_325 }) };
    const converted = answered(file, { 'pressure-sea-level': 'convert' });
    expect(Math.abs((converted.hours.pressurePa[4000] ?? 0) - standardPressurePa(337))).toBeLessThan(400);
    const kept = answered(file, { 'pressure-sea-level': 'keep' });
    expect(kept.hours.pressurePa[4000]).toBe(101_325);
    expect(findingsOf(kept, 'pressure-sea-level')[0]).toMatchObject({ severity: 'doubt', done: 'Answered: keep.' });
  });

  test('believes the pressure, or the elevation with its standard atmosphere', () => {
    const file = { location: 'Field,-,-,-,-,33.45,-111.98,-7,1337' };
    expect(answered(file, { 'pressure-elevation': 'pressure' }).hours.pressurePa[4000]).toBe(plain.pressurePa);
    const standard = answered(file, { 'pressure-elevation': 'elevation' });
    expect(standard.hours.pressurePa[4000]).toBeCloseTo(standardPressurePa(1337), 6);
    expect(findingsOf(standard, 'pressure-assumed')).toHaveLength(1);
  });

  test('reads a column of dew points as wet bulb, as it stands, or not at all', () => {
    const file: EpwOptions = {
      hour: (date) => {
        const { dewPointC, dryBulbC, pressurePa } = plainHour(date);
        const ratio = humidityRatioFromDewPoint({ dryBulbC, dewPointC, pressurePa, belowZero: 'water' });
        const rh = relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'water').toFixed(0);
        return { dewPointC: wetBulbC(dryBulbC, ratio, pressurePa).toFixed(1), relativeHumidityPct: rh };
      },
    };
    const { dewPointC, dryBulbC, pressurePa } = plain;
    const wanted = humidityRatioFromDewPoint({ dryBulbC, dewPointC, pressurePa, belowZero: 'water' });
    const asWetBulb = answered(file, { 'dew-is-wet-bulb': 'wet bulb' });
    expect(asWetBulb.humidityFrom).toBe('wet bulb');
    // The wet bulb is written in tenths of a degree, the relative humidity in whole percent.
    expect(Math.abs((asWetBulb.hours.humidityRatio[4000] ?? 0) / wanted - 1)).toBeLessThan(0.02);
    const byHumidity = answered(file, { 'dew-is-wet-bulb': 'relative humidity' });
    expect(byHumidity.humidityFrom).toBe('relative humidity');
    expect(Math.abs((byHumidity.hours.humidityRatio[4000] ?? 0) / wanted - 1)).toBeLessThan(0.05);
    const asItStands = answered(file, { 'dew-is-wet-bulb': 'dew point' });
    expect((asItStands.hours.humidityRatio[4000] ?? 0) / wanted).toBeGreaterThan(1.2);
  });

  test('chooses one of several periods', () => {
    const lines = epwLines();
    const second = lines
      .slice(FIRST_DATA_LINE - 1)
      .map((line, slot) => (slot === 4000 ? line.replace(/,0,/, ',30,') : line));
    lines[7] = 'DATA PERIODS,2,1,Past,Sunday,1/1,12/31,Future,Monday,1/1,12/31';
    const file = [...lines, ...second];
    expect(answered(file, { 'several-periods': 1 }).hours.lines[0]).toBe(FIRST_DATA_LINE);
    const later = answered(file, { 'several-periods': 2 });
    expect(later.hours.lines[0]).toBe(FIRST_DATA_LINE + 8760);
    expect(later.hours.dryBulbC[3000]).toBe(read({}).hours.dryBulbC[3000]);
  });

  test('keeps the first of two rows with one time, or moves the second copy of a day to the day that is absent', () => {
    const lines = epwLines();
    const day = (31 + 28 + 10) * 24;
    for (let slot = day; slot < day + 24; slot++) {
      lines[at(slot)] = (lines[at(slot)] ?? '').split(',').with(2, '10').join(',');
    }
    const first = answered(lines, { 'time-repeat': 'first' });
    expect(first.hours.dryBulbC[day]).toBeNaN();
    const moved = answered(lines, { 'time-repeat': 'absent day' });
    expect([...moved.hours.dryBulbC]).toEqual([...read({}).hours.dryBulbC]);
  });

  test('leaves a place as it is written, but not one that is not on Earth', () => {
    const flipped = { location: 'Field,-,-,-,-,33.45,111.98,-7,337' };
    const reading = answered(flipped, { 'place-sign': 'as written' });
    expect(reading.station.longitude).toBe(111.98);
    const nowhere = read(
      { location: 'Field,-,-,-,-,133.45,-11.98,-7,337' },
      { answers: { 'place-sign': 'as written' } },
    );
    expect(nowhere.status).toBe('asks');
  });
});
