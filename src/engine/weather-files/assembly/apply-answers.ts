/** What a person has answered to a file's questions, applied before the tests meet the values again. */
import { relativeHumidityOfWetBulbPct } from '../../psychrometrics/humidity-of-wet-bulb.ts';
import { stationPressurePa } from '../../psychrometrics/pressure.ts';
import { FindingList } from '../finding-list.ts';
import type { Answers } from '../read-options.ts';
import { type DeclaredPeriod, matchCalendar } from './match-calendar.ts';
import type { SourceRows } from './source-rows.ts';
import type { StepColumns } from './step-columns.ts';

const PA_PER_HPA = 100;

/** Unit and level of the pressure column; the elevation, where it is believed, gives the standard atmosphere instead. */
export function answerPressure(steps: StepColumns, elevationM: number | null, answers: Answers): void {
  const { dryBulbC, pressurePa } = steps;
  const unit = answers['unit-guess'] === 'hectopascals' ? PA_PER_HPA : 1;
  const convert = answers['pressure-sea-level'] === 'convert' && elevationM !== null;
  if (answers['pressure-elevation'] === 'elevation' && elevationM !== null) pressurePa.fill(Number.NaN);
  if (unit === 1 && !convert) return;
  for (let step = 0; step < pressurePa.length; step++) {
    const written = (pressurePa[step] ?? Number.NaN) * unit;
    const at = { seaLevelPressurePa: written, dryBulbC: dryBulbC[step] ?? Number.NaN, elevationM: elevationM ?? 0 };
    pressurePa[step] = convert ? stationPressurePa(at) : written;
  }
}

/** A dew-point column that holds the wet bulb becomes the relative humidity over water; one that is not to be used is left out. */
export function answerHumidity(steps: StepColumns, answers: Answers): void {
  const answer = answers['dew-is-wet-bulb'];
  if (answer !== 'wet bulb' && answer !== 'relative humidity') return;
  const { dewPointC, dryBulbC, pressurePa, relativeHumidityPct } = steps;
  for (let step = 0; answer === 'wet bulb' && step < dewPointC.length; step++) {
    const [dry = Number.NaN, wet = Number.NaN, pressure = Number.NaN] = [
      dryBulbC[step],
      dewPointC[step],
      pressurePa[step],
    ];
    relativeHumidityPct[step] = relativeHumidityOfWetBulbPct(dry, wet, pressure);
  }
  dewPointC.fill(Number.NaN);
}

/** The rows of the period that a person has chosen, as if the file began with it. */
export function answerPeriod<
  File extends { rows: SourceRows; stepsPerHour: number; periods: readonly DeclaredPeriod[] },
>(file: File, answers: Answers): File {
  let chosen = file;
  for (let period = 1; period < (answers['several-periods'] ?? 1); period++) {
    const { rowsRead } = matchCalendar({ ...chosen, sortable: false }, new FindingList());
    if (rowsRead >= chosen.rows.lines.length) return chosen;
    chosen = { ...chosen, rows: rowsAfter(chosen.rows, rowsRead), periods: chosen.periods.slice(1) };
  }
  return chosen;
}

function rowsAfter(rows: SourceRows, first: number): SourceRows {
  return {
    lines: rows.lines.subarray(first),
    years: rows.years.subarray(first),
    months: rows.months.subarray(first),
    days: rows.days.subarray(first),
    hours: rows.hours.subarray(first),
    minutes: rows.minutes.subarray(first),
    dryBulbC: rows.dryBulbC.subarray(first),
    dewPointC: rows.dewPointC.subarray(first),
    relativeHumidityPct: rows.relativeHumidityPct.subarray(first),
    pressurePa: rows.pressurePa.subarray(first),
    estimated: rows.estimated.subarray(first),
  };
}
