/**
 * The plain way to read weather files from the command line, for the benchmark `read`: papaparse to strings, PsychroLib's humidity
 * ratio and wet bulb each hour, one line of JSON per file. Plain JavaScript, so that it starts as fast as a program can.
 */
import { readFileSync } from 'node:fs';
import Papa from 'papaparse';
import psychrolib from 'psychrolib';

const HEADER_LINES = 8;
const DRY_BULB = 6;
const DEW_POINT = 7;
const PRESSURE = 9;

psychrolib.SetUnitSystem(psychrolib.SI);
for (const file of process.argv.slice(2)) {
  const rows = Papa.parse(readFileSync(file, 'latin1'), { skipEmptyLines: true }).data.slice(HEADER_LINES);
  let sum = 0;
  for (const row of rows) {
    const tempC = Number(row[DRY_BULB]);
    const dewC = Math.min(Number(row[DEW_POINT]), tempC);
    const pressurePa = Number(row[PRESSURE]);
    const ratio = psychrolib.GetHumRatioFromTDewPoint(dewC, pressurePa);
    sum += psychrolib.GetTWetBulbFromHumRatio(tempC, ratio, pressurePa);
  }
  process.stdout.write(`${JSON.stringify({ file, meanWetBulbC: sum / rows.length })}\n`);
}
