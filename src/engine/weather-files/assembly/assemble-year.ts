/**
 * From the rows of any format to the hours of one year. A format's reader settles what is peculiar to it; everything here
 * is the same for all of them, in this order: time, range, the statistical tests, consistency, pressure, humidity, gaps.
 */
import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../../conventions.ts';
import type { BelowZeroPhase } from '../../psychrometrics/moist-air.ts';
import { dayOfWeek, isLeapYear, slotOf } from '../../reduction/calendar.ts';
import { gapCalendar } from '../../reduction/gap-calendar.ts';
import { type FindingList, whole } from '../finding-list.ts';
import { checkGround } from '../quality/check-ground.ts';
import { isOff, type QualityOptions } from '../quality/quality-options.ts';
import { testHours } from '../quality/test-hours.ts';
import type { DeclaredStation, HourColumns, WeatherFileReading, WeatherFormat } from '../weather-file-reading.ts';
import { answerHumidity, answerPeriod, answerPressure } from './apply-answers.ts';
import { belowZeroPhase } from './below-zero-phase.ts';
import { tellCoverage, tellGaps, tellSourceFlags } from './coverage.ts';
import { compareDesign, type PublishedDesign } from './design-check.ts';
import { hourColumns } from './hour-columns.ts';
import { chooseHumidity, type GivenHumidity, givenHumidity, type HumiditySource } from './humidity-choice.ts';
import { limitDewPoint, limitRelativeHumidity } from './humidity-limits.ts';
import { type DeclaredPeriod, type MatchedCalendar, matchCalendar } from './match-calendar.ts';
import { checkPlace } from './place-checks.ts';
import { settlePressure } from './pressure-rule.ts';
import type { SourceRows } from './source-rows.ts';
import { type StepColumns, stepColumns } from './step-columns.ts';

/** What a reader has found in a file, before anything is tested. */
export interface FileContents {
  readonly format: WeatherFormat;
  /** Which station-year of the file; empty when it holds one. */
  readonly part: string;
  readonly station: DeclaredStation;
  /** Line on which the place stands. */
  readonly stationLine: number | null;
  readonly rows: SourceRows;
  readonly stepsPerHour: number;
  /**
   * What makes a year an actual one: real dates in its rows, or a period that starts on the weekday of its year. A `typical` one
   * never is.
   */
  readonly yearFrom: 'dates' | 'weekday' | 'typical';
  /** A year in UTC lacks up to 14 hours at one end when it is laid on local time, which is not told. */
  readonly cutByUtc: boolean;
  readonly periods: readonly DeclaredPeriod[];
  /** Whether the file says that it observes leap years; null when it does not say. */
  readonly leapYearObserved: boolean | null;
  /** Whether the source's flags vary through the file; null in formats without flags. */
  readonly sourceFlagsInformative: boolean | null;
  readonly published: PublishedDesign | null;
  readonly comments: string | null;
}

/** The zones of the world reach from UTC−12 to UTC+14. */
const UTC_EDGE_HOURS = 14;
const TOO_HOT_C = 60;
const TOO_HOT_HOURS = 24;

/** Tests, repairs and reduces to hours. Every fault found so far stands in `findings`; a refusal there refuses the file. */
export function assembleYear(
  contents: FileContents,
  findings: FindingList,
  options: QualityOptions = {},
): WeatherFileReading {
  const { answers } = findings;
  const file = answerPeriod(contents, answers);
  const { rows, station } = file;
  checkPlace({ station, line: file.stationLine, options }, findings);
  checkGround({ station, line: file.stationLine, options }, findings);
  if (rows.lines.length === 0) {
    if (!findings.refused) tellNoRows(findings);
    return refused(file, findings);
  }
  // Rows that could not be read leave holes of their own, which are not told again as missing time.
  const everyRowRead = !findings.refused;
  const year = actualYear(file, rows.lines.length);
  const calendar = matchCalendar({ ...file, sortable: year !== null }, findings);
  if (everyRowRead && file.yearFrom !== 'dates') tellRowCount(file, calendar, findings);
  tellLeapDay(file, calendar, year, findings);
  const steps = stepColumns({ rows, ...calendar });
  refuseWithoutTemperature(steps, findings);
  if (findings.refused) return refused(file, findings);

  const kindYear = actualYear(file, calendar.rowsRead);
  const typical = kindYear === null;
  answerPressure(steps, station.elevationM, answers);
  const asGiven = givenHumidity(steps);
  testHours({ steps, station, typical, options }, findings);
  settlePressure({ steps, elevationM: station.elevationM, keepFar: isOff('pressure-range', options) }, findings);
  answerHumidity(steps, answers);
  const given = answers['dew-is-wet-bulb'] === undefined ? asGiven : givenHumidity(steps);
  const humidity = settleHumidity(steps, given, findings);
  if (humidity === null || findings.refused) return refused(file, findings);

  const longGaps = options.fillLongGaps ?? false;
  const { hours, gap, longFilled, humidityPresent } = hourColumns({ steps, ...humidity, typical, longGaps });
  tellGaps({ hours, gap, longFilled, quietEdgeHours: file.cutByUtc ? UTC_EDGE_HOURS : 0 }, findings);
  tellCoverage({ hours, humidityPresent }, findings);
  if (findings.refused) return refused(file, findings);
  if (file.sourceFlagsInformative !== null) {
    tellSourceFlags({ hours, informative: file.sourceFlagsInformative }, findings);
  }
  if (file.published !== null) compareDesign(hours, file.published, findings);
  return usable(file, { ...humidity, hours, year: kindYear }, findings);
}

function refused({ format, part, station }: FileContents, findings: FindingList): WeatherFileReading {
  return { status: 'refused', part, format, station, findings: findings.inOrder() };
}

function usable(
  file: FileContents,
  read: { hours: HourColumns; source: HumiditySource; belowZero: BelowZeroPhase; year: number | null },
  findings: FindingList,
): WeatherFileReading {
  return {
    status: findings.asks.length > 0 ? 'asks' : 'review',
    part: file.part,
    format: file.format,
    station: file.station,
    kind: read.year === null ? 'typical' : 'actual',
    year: read.year,
    hours: read.hours,
    humidityFrom: findings.answers['dew-is-wet-bulb'] === 'wet bulb' ? 'wet bulb' : read.source,
    belowZero: read.belowZero,
    gaps: gapCalendar(read.hours.flags),
    findings: findings.inOrder(),
    asks: findings.asks,
    comments: file.comments,
  };
}

function settleHumidity(
  steps: StepColumns,
  given: GivenHumidity,
  findings: FindingList,
): { source: HumiditySource; belowZero: BelowZeroPhase } | null {
  limitRelativeHumidity(steps, findings);
  const belowZero = belowZeroPhase(steps, findings);
  const dewPointUnfit = limitDewPoint(steps, belowZero, findings);
  const source = chooseHumidity({ steps, given, belowZero, dewPointUnfit }, findings);
  return source === null ? null : { source, belowZero };
}

function tellNoRows(findings: FindingList): void {
  findings.add({
    code: 'too-few-rows',
    severity: 'refuse',
    count: 0,
    message: () => 'The file has 0 rows of data after its header. Bring a file with the hours of a year.',
  });
}

/** The year of a file whose rows hold one year that begins on the declared weekday; null for every other file. */
function actualYear(file: FileContents, rowsRead: number): number | null {
  const year = file.rows.years[0] ?? 0;
  if (file.yearFrom !== 'weekday') return file.yearFrom === 'dates' ? year : null;
  const period = file.periods[0];
  if (year < 1800 || year > 2200 || period?.startWeekday == null) return null;
  for (let row = 1; row < rowsRead; row++) if (file.rows.years[row] !== year) return null;
  const start = period.start ?? { month: 1, day: 1 };
  return dayOfWeek(year, start.month, start.day) === period.startWeekday ? year : null;
}

function tellRowCount(file: FileContents, calendar: MatchedCalendar, findings: FindingList): void {
  const { slotCount, stepsPerHour } = calendar;
  const period = file.periods[0];
  const days = period?.start && period.end ? daysBetween(period.start, period.end, slotCount) : null;
  const expected = (days === null ? slotCount : days * HOURS_PER_DAY) * stepsPerHour;
  if (calendar.rowsRead === expected) return;
  const declared = days === null || days * HOURS_PER_DAY === slotCount ? 'a year has' : 'the declared period has';
  findings.add({
    code: 'row-count',
    severity: 'doubt',
    count: Math.abs(expected - calendar.rowsRead),
    message: () =>
      `The file has ${whole(calendar.rowsRead)} rows; ${declared} ${whole(expected)}${stepsPerHour > 1 ? `, ${stepsPerHour} an hour` : ''}. The rows are taken as they stand.`,
  });
}

/** Days from one date to another, both counted, round the end of the year where needed. */
function daysBetween(
  start: { month: number; day: number },
  end: { month: number; day: number },
  slotCount: number,
): number | null {
  const first = slotOf({ ...start, hour: 1 }, slotCount);
  const last = slotOf({ ...end, hour: 24 }, slotCount);
  if (first === null || last === null) return null;
  return (last - first + 1 + (last < first ? slotCount : 0)) / HOURS_PER_DAY;
}

function tellLeapDay(file: FileContents, calendar: MatchedCalendar, year: number | null, findings: FindingList): void {
  const withLeapDay = calendar.slotCount === SLOTS_PER_LEAP_YEAR;
  const sentence =
    !withLeapDay && year !== null && isLeapYear(year)
      ? `${year} is a leap year, but the file has no 29 February. It is read as it stands, ${whole(SLOTS_PER_YEAR)} hours.`
      : withLeapDay && year !== null && !isLeapYear(year)
        ? `The file has a 29 February, though ${year} is not a leap year. It is read as it stands.`
        : withLeapDay && file.leapYearObserved === false
          ? 'The file has a 29 February, though its header says that leap years are not observed. It is read as it stands.'
          : !withLeapDay && file.leapYearObserved === true
            ? 'The header says that leap years are observed, but the file has no 29 February. It is read as it stands.'
            : null;
  if (sentence !== null) findings.add({ code: 'leap-day', severity: 'note', message: () => sentence });
}

/** No dry bulb at all, or one that can only be Fahrenheit. */
function refuseWithoutTemperature(steps: StepColumns, findings: FindingList): void {
  const { dryBulbC } = steps;
  let known = 0;
  let hotSteps = 0;
  for (let step = 0; step < dryBulbC.length; step++) {
    const value = dryBulbC[step] ?? Number.NaN;
    if (!Number.isNaN(value)) known++;
    if (value > TOO_HOT_C) hotSteps++;
  }
  if (known === 0) {
    findings.add({
      code: 'no-temperature',
      severity: 'refuse',
      count: steps.lines.filter((line) => line > 0).length,
      message: () =>
        'No row holds a dry bulb: every one is blank or a missing code. Bring a file with the temperatures.',
    });
    return;
  }
  const hot = hotSteps / steps.stepsPerHour;
  if (hot <= TOO_HOT_HOURS) return;
  const step = steps.dryBulbC.findIndex((value) => value > TOO_HOT_C);
  findings.add({
    code: 'unit-guess',
    severity: 'refuse',
    line: steps.lines[step] ?? null,
    count: Math.round(hot),
    message: () =>
      `The dry bulb passes 60 °C in ${whole(hot)} hours, first on line ${steps.lines[step]}. These look like degrees Fahrenheit; the format wants Celsius. Convert the file and bring it again.`,
  });
}
