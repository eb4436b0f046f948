/**
 * `ingest`: an EPW file from bytes to what is stored of it (every field checked, wet bulb, packed columns, depression hours, design
 * values, bytes), against the plain loop: papaparse to strings, then PsychroLib's humidity ratio and wet bulb from the dew point.
 */
import Papa from 'papaparse';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { bytesOf16, packedBytes } from '#engine/reduction/packed-columns.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { epwBytes } from '../../support/epw-text.ts';
import type { Bench } from '../bench.ts';
import { sideBySide } from '../side-by-side.ts';

const OUR_FILES = 4;
const PLAIN_FILES = 1;
const HEADER_LINES = 8;
const DRY_BULB = 6;
const DEW_POINT = 7;
const PRESSURE = 9;

function plainFile(bytes: Uint8Array): number {
  const { data } = Papa.parse<readonly string[]>(new TextDecoder('latin1').decode(bytes), { skipEmptyLines: true });
  let sum = 0;
  for (const row of data.slice(HEADER_LINES)) {
    const tempC = Number(row[DRY_BULB]);
    const dewC = Math.min(Number(row[DEW_POINT]), tempC);
    const pressurePa = Number(row[PRESSURE]);
    const ratio = psychrolib.GetHumRatioFromTDewPoint(dewC, pressurePa);
    sum += psychrolib.GetTWetBulbFromHumRatio(tempC, ratio, pressurePa);
  }
  return sum;
}

function storedBytes(bytes: Uint8Array): number {
  const reading = readWeatherFile(bytes, 'made-up.epw');
  if (reading.status === 'refused' || reading.hours === null) throw new Error('the made-up file was refused');
  const reduced = reduceYear(reading);
  const { dryBulb, humidityRatio, pressure, flags } = packedBytes(reduced.year.packed);
  return dryBulb.length + humidityRatio.length + pressure.length + flags.length + bytesOf16(reduced.histogram).length;
}

export const ingestBench: Bench = {
  name: 'ingest',
  about: 'an EPW file from bytes to what is stored of it, papaparse + PsychroLib / ours',
  gate: 10,
  compare: 'at least',
  run: () => {
    const bytes = epwBytes({});
    let sum = 0;
    const { plainMs, oursMs } = sideBySide({
      plain: () => {
        sum += plainFile(bytes);
      },
      plainUnits: PLAIN_FILES,
      ours: () => {
        for (let file = 0; file < OUR_FILES; file++) sum += storedBytes(bytes);
      },
      oursUnits: OUR_FILES,
    });
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(1)} ms/file`,
      ours: `${oursMs.toFixed(2)} ms/file`,
      fault: Number.isFinite(sum) ? null : 'a figure is not a number',
    };
  },
};
