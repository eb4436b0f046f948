/**
 * `ingest`: an EPW file from bytes to what is stored of it (every field checked, wet bulb, packed columns, depression hours, design
 * values, bytes), against the plain loop: papaparse to strings, then PsychroLib's humidity ratio and wet bulb from the dew point.
 * `growth-read`: how the time to read grows with the number of files.
 */
import Papa from 'papaparse';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { bytesOf16, packedBytes } from '#engine/reduction/packed-columns.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { epwBytes, plainHour } from '../../support/epw-text.ts';
import type { Bench } from '../bench.ts';
import { growthExponent, processorMs, sideBySide } from '../side-by-side.ts';

const OUR_FILES = 20;
const PLAIN_FILES = 1;
const HEADER_LINES = 8;
const DRY_BULB = 6;
const DEW_POINT = 7;
const PRESSURE = 9;
/** Both sides must find the same weather: the packed steps and PsychroLib's tolerance move a mean by a thousandth of a kelvin. */
const SAME_WITHIN_K = 0.01;

/** Mean wet bulb, °C, as the plain loop finds it. */
export function plainMeanC(bytes: Uint8Array): number {
  const { data } = Papa.parse<readonly string[]>(new TextDecoder('latin1').decode(bytes), { skipEmptyLines: true });
  const rows = data.slice(HEADER_LINES);
  let sum = 0;
  for (const row of rows) {
    const tempC = Number(row[DRY_BULB]);
    const dewC = Math.min(Number(row[DEW_POINT]), tempC);
    const pressurePa = Number(row[PRESSURE]);
    const ratio = psychrolib.GetHumRatioFromTDewPoint(dewC, pressurePa);
    sum += psychrolib.GetTWetBulbFromHumRatio(tempC, ratio, pressurePa);
  }
  return sum / rows.length;
}

/** The same from ours, which makes all that is stored on the way. */
function storedMeanC(bytes: Uint8Array): number {
  const reading = readWeatherFile(bytes, 'made-up.epw');
  if (reading.status === 'refused' || reading.hours === null) throw new Error('the made-up file was refused');
  const { facts, histogram, year } = reduceYear(reading);
  const { dryBulb, humidityRatio, pressure, flags } = packedBytes(year.packed);
  const stored = [dryBulb, humidityRatio, pressure, flags, bytesOf16(histogram)];
  return stored.every(({ length }) => length > 0) ? (facts.meanWetBulbC ?? Number.NaN) : Number.NaN;
}

export const ingestBench: Bench = {
  name: 'ingest',
  about: 'an EPW file from bytes to what is stored of it, papaparse + PsychroLib / ours',
  gate: 10,
  compare: 'at least',
  run: () => {
    const bytes = epwBytes({});
    let plainC = Number.NaN;
    let oursC = Number.NaN;
    const { plainMs, oursMs } = sideBySide({
      plain: () => {
        plainC = plainMeanC(bytes);
      },
      plainUnits: PLAIN_FILES,
      ours: () => {
        for (let file = 0; file < OUR_FILES; file++) oursC = storedMeanC(bytes);
      },
      oursUnits: OUR_FILES,
    });
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(1)} ms/file`,
      ours: `${oursMs.toFixed(2)} ms/file`,
      fault:
        Math.abs(plainC - oursC) <= SAME_WITHIN_K
          ? null
          : `the mean wet bulb is ${plainC} °C there and ${oursC} °C here`,
    };
  },
};

const GROWTH_FILES = [10, 20, 40, 80, 160];
const GROWTH_ROUNDS = 3;
/** With weather of their own, in turn: making more would take longer than reading them. */
const DIFFERENT_FILES = 10;

export const growthReadBench: Bench = {
  name: 'growth-read',
  about: 'exponent of the time to read 10 to 160 EPW files',
  gate: 1.1,
  compare: 'at most',
  run: () => {
    const different = Array.from({ length: DIFFERENT_FILES }, (_none, nth) => warmerBy(nth));
    const files = Array.from({ length: Math.max(...GROWTH_FILES) }, (_none, nth) => different[nth % DIFFERENT_FILES]);
    const read = (count: number) => {
      for (const bytes of files.slice(0, count)) if (bytes !== undefined) storedMeanC(bytes);
    };
    read(DIFFERENT_FILES);
    const best = GROWTH_FILES.map(() => Number.POSITIVE_INFINITY);
    for (let round = 0; round < GROWTH_ROUNDS; round++) {
      for (const [place, size] of GROWTH_FILES.entries()) {
        const ms = processorMs(() => read(size));
        best[place] = Math.min(best[place] ?? ms, ms);
      }
    }
    const points = GROWTH_FILES.map((size, place) => ({ size, ms: best[place] ?? 0 }));
    return {
      ratio: growthExponent(points),
      plain: points.map(({ size }) => size).join(' / '),
      ours: `${points.map(({ ms }) => ms.toFixed(0)).join(' / ')} ms`,
      fault: null,
    };
  },
};

function warmerBy(kelvin: number): Uint8Array {
  return epwBytes({ hour: (date) => ({ dryBulbC: Math.round(10 * (plainHour(date).dryBulbC + kelvin)) / 10 }) });
}
