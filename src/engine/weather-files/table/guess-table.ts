/** From a layout to a whole guess: what the columns hold, in which units, what the times mean, with the first ten rows. */
import type { DecodedText } from '../text/decode-text.ts';
import { separatedText } from '../text/separated-fields.ts';
import { type CivilTime, civilMinutes } from '../time/civil-minutes.ts';
import { type GuessedPlaces, guessColumns } from './guess-columns.ts';
import { questionsAbout } from './guess-questions.ts';
import { type GuessedTime, guessTime } from './guess-time.ts';
import {
  humidityUnitOfValues,
  humidityUnitOfWords,
  pressureUnitOfValues,
  pressureUnitOfWords,
  sortedKnown,
  temperatureUnitOfValues,
  temperatureUnitOfWords,
} from './guess-units.ts';
import { timeReader } from './row-time.ts';
import { sampleRows } from './sample-rows.ts';
import { shapeKey } from './shape-key.ts';
import { stepMinutes } from './step-minutes.ts';
import type { TableGuess } from './table-guess.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping, TemperatureUnit, TimeScale } from './table-mapping.ts';
import { isRow, scanTable } from './table-scan.ts';

/** The first rows, and after them one in so many: a whole year decides between day and month. */
const FIRST_ROWS = 200;
const ONE_IN = 37;
const MOST_SAMPLED = 4_000;
const SHOWN_CELLS = 3;

export function guessTable(text: DecodedText, layout: TableLayout): TableGuess {
  const cells = sampledCells(text, layout);
  const names = layout.names;
  const time = guessTime(names.map((name, index) => ({ name, cells: cells.map((row) => row[index] ?? '') })));
  const places = guessColumns(names);
  const walk = time === null ? null : walkTimes(text, layout, time);
  const mapping = time === null || places.dryBulb < 0 ? null : guessMapping({ layout, cells, time, places, walk });
  return {
    shapeKey: shapeKey(layout),
    mapping,
    questions: questionsAbout({ layout, mapping, orderIsSure: time?.orderIsSure ?? null }),
    columns: names.map((name, index) => ({
      name,
      unit: layout.units[index] ?? '',
      cells: cells.slice(0, SHOWN_CELLS).map((row) => row[index] ?? ''),
    })),
    sample: mapping === null ? [] : sampleRows(text, layout, mapping),
    stepMin: walk?.stepMin ?? null,
  };
}

function sampledCells(text: DecodedText, layout: TableLayout): readonly (readonly string[])[] {
  const sampled: string[][] = [];
  let rows = 0;
  scanTable(text, layout, (cursor, fields) => {
    if (!isRow(cursor, fields, layout)) return;
    if ((rows < FIRST_ROWS || rows % ONE_IN === 0) && sampled.length < MOST_SAMPLED) {
      sampled.push(layout.names.map((_name, index) => separatedText(cursor, fields, index, 60).trim()));
    }
    rows++;
  });
  return sampled;
}

interface TimeWalk {
  readonly stepMin: number | null;
  readonly years: TableMapping['years'];
  readonly scale: TimeScale;
}

/** One pass over the times: their step, whether years are real, whether clocks were changed. */
function walkTimes(text: DecodedText, layout: TableLayout, { columns }: GuessedTime): TimeWalk {
  const read = timeReader(columns, layout);
  const minutes: number[] = [];
  const times: CivilTime[] = [];
  let withOffset = 0;
  scanTable(text, layout, (cursor, fields) => {
    const stamp = isRow(cursor, fields, layout) ? read(cursor, fields) : null;
    if (stamp === null) return;
    if (stamp.offsetMin !== null) withOffset++;
    minutes.push(civilMinutes(stamp.time));
    times.push(stamp.time);
  });
  const { share, stepMin } = stepMinutes(minutes);
  return {
    stepMin: share > 0 ? stepMin : null,
    years: isTypical(times) || (columns.form === 'parts' && columns.year === null) ? 'typical' : 'actual',
    scale: withOffset > 0 ? 'in stamps' : changesClocks(minutes, stepMin) ? 'clock' : scaleOfNames(columns, layout),
  };
}

/** Months of several years that follow each other as in one calendar. */
function isTypical(times: readonly CivilTime[]): boolean {
  let years = 0;
  for (let row = 1; row < times.length; row++) {
    const [before, now] = [times[row - 1], times[row]];
    if (before === undefined || now === undefined) continue;
    if (now.month < before.month) return false;
    if (now.year !== before.year) years++;
  }
  return years > 0;
}

/** One hour absent and one repeated in a year of hours: daylight saving that nobody announced. */
function changesClocks(minutes: readonly number[], stepMin: number): boolean {
  let absent = 0;
  let repeated = 0;
  for (let row = 1; row < minutes.length; row++) {
    const difference = (minutes[row] ?? 0) - (minutes[row - 1] ?? 0);
    if (difference === stepMin + 60) absent++;
    else if (difference === stepMin - 60) repeated++;
  }
  return absent > 0 && absent === repeated && absent <= 1 + minutes.length / (180 * (1440 / Math.max(1, stepMin)));
}

function scaleOfNames(columns: GuessedTime['columns'], layout: TableLayout): TimeScale {
  const words = [...('column' in columns ? [columns.column] : []), ...('time' in columns ? [columns.time] : [])];
  // A line about the zone names UTC to count from it.
  const above = layout.preamble.filter((line) => !/zone|offset/i.test(line));
  const said = [...words, ...above].some((word) => /\b(utc|gmt|zulu)\b/i.test(word.replaceAll('_', ' ')));
  return said ? 'UTC' : 'standard';
}

function guessMapping(from: {
  readonly layout: TableLayout;
  readonly cells: readonly (readonly string[])[];
  readonly time: GuessedTime;
  readonly places: GuessedPlaces;
  readonly walk: TimeWalk | null;
}): TableMapping {
  const { cells, layout, places, time, walk } = from;
  const name = (index: number) => layout.names[index] ?? '';
  const words = (index: number) =>
    `${layout.units[index] ?? ''} ${name(index)}`.replaceAll('_', ' ').replace(/[[\](){}]/g, ' ');
  const values = (index: number) => sortedKnown(cells.map((row) => numberOf(row[index] ?? '')));
  const unitOf = (index: number): TemperatureUnit =>
    temperatureUnitOfWords(words(index)) ?? temperatureUnitOfValues(values(index)).unit;
  const dryUnit = unitOf(places.dryBulb);
  const withUnit = (index: number) =>
    index < 0 ? null : { column: name(index), unit: temperatureUnitOfWords(words(index)) ?? dryUnit };
  const { relativeHumidity: rh, pressure } = places;
  const pressureUnit =
    pressure < 0
      ? null
      : (pressureUnitOfWords(words(pressure)) ?? pressureUnitOfValues(values(pressure), dryUnit === 'F')?.unit);
  return {
    time: { columns: time.columns, scale: walk?.scale ?? 'standard', zone: null, mark: 'reading' },
    years: walk?.years ?? 'actual',
    dryBulb: { column: name(places.dryBulb), unit: dryUnit },
    dewPoint: withUnit(places.dewPoint),
    relativeHumidity:
      rh < 0
        ? null
        : { column: name(rh), unit: humidityUnitOfWords(words(rh)) ?? humidityUnitOfValues(values(rh)).unit },
    wetBulb: withUnit(places.wetBulb),
    pressure: pressureUnit == null ? null : { column: name(pressure), unit: pressureUnit, level: places.pressureLevel },
    station: severalIn(cells, places.station) ? name(places.station) : null,
  };
}

function numberOf(cell: string): number {
  return cell === '' ? Number.NaN : Number(cell.replace(/^([+-]?\d+),(\d+)$/, '$1.$2'));
}

function severalIn(cells: readonly (readonly string[])[], index: number): boolean {
  return index >= 0 && new Set(cells.map((row) => row[index])).size > 1;
}
