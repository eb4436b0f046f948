/**
 * Any delimited table with a column of times. Without a confirmed mapping it is only guessed at: the guess, the first ten rows
 * and the questions go to a person, whose answer is the mapping.
 */
import { assembleStationYears, FEWEST_ROWS, type StationContents } from '../assembly/assemble-station-years.ts';
import { assembleYear } from '../assembly/assemble-year.ts';
import { checkPlace } from '../assembly/place-checks.ts';
import { type FindingList, whole } from '../finding-list.ts';
import { licenceLines, tellLicence } from '../licence-words.ts';
import { settlePlace } from '../place/settle-place.ts';
import type { ReadOptions } from '../read-options.ts';
import type { DecodedText } from '../text/decode-text.ts';
import type { DeclaredStation, UnmappedReading, WeatherFileReading } from '../weather-file-reading.ts';
import { mappingWords } from './guess-questions.ts';
import { guessTable } from './guess-table.ts';
import { hasHumidity, mappingFaults } from './mapping-faults.ts';
import { readPreamble } from './preamble.ts';
import { stepMinutes } from './step-minutes.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping } from './table-mapping.ts';
import { readRecords, type TableRecords } from './table-records.ts';
import { isAlone, tableRows } from './table-rows.ts';

/** Rows that come less often make no hours. */
const LONGEST_STEP_MIN = 180;
const FEWEST_STEP_SHARE = 0.5;

/** Reads a table whose layout is known. */
export function readTable(
  text: DecodedText,
  table: { readonly layout: TableLayout; readonly options: ReadOptions },
  findings: FindingList,
): readonly WeatherFileReading[] {
  const { layout, options } = table;
  const declared = readPreamble(layout.preamble, layout.delimiter);
  const { mapping } = options;
  const faults = mapping === undefined ? [] : mappingFaults(mapping, layout);
  for (const fault of faults)
    findings.add({ code: 'header', severity: 'doubt', line: layout.headerLine, message: () => fault });
  if (mapping === undefined || faults.length > 0) {
    return [
      askForMapping(
        text,
        { layout, station: settlePlace(declared, { options, inUtc: false }, findings), options },
        findings,
      ),
    ];
  }
  if (!hasHumidity(mapping)) return [refuseNoHumidity(declared, findings)];
  const station = settlePlace(declared, { options, inUtc: mapping.time.scale !== 'standard' }, findings);
  const { after, stations: records } = readRecords(text, { layout, mapping }, findings);
  const comments = licenceLines([...layout.preamble, ...after]);
  tellLicence(comments, findings);
  if (mapping.years === 'typical') return typicalYears(records, { mapping, station, comments, options }, findings);
  const stations = [...records].map(([key, ofStation]) =>
    contentsOf(ofStation, { key, mapping, station, comments, several: records.size > 1 }, findings),
  );
  return named(assembleStationYears(stations, findings, options), mapping);
}

function refuseNoHumidity(station: DeclaredStation, findings: FindingList): WeatherFileReading {
  findings.add({
    code: 'no-humidity',
    severity: 'refuse',
    message: () =>
      'No column of the table holds a dew point, a relative humidity or a wet bulb. The wet bulb needs one of them: bring a file that has it.',
  });
  return { status: 'refused', part: '', format: 'table', station, findings: findings.inOrder() };
}

function typicalYears(
  records: ReadonlyMap<string, TableRecords>,
  table: { mapping: TableMapping; station: DeclaredStation; comments: string | null; options: ReadOptions },
  findings: FindingList,
): readonly WeatherFileReading[] {
  const { comments, mapping, options, station } = table;
  const several = records.size > 1;
  const wanted = [...records].filter(([key]) => options.part === undefined || !several || key === options.part);
  const shown = wanted.length === 0 ? [...records] : wanted;
  if (shown.length === 0) shown.push(['', EMPTY]);
  const readings = shown.map(([key, ofStation]) => {
    const own = findings.copy();
    const contents = contentsOf(ofStation, { key, mapping, station, comments, several }, own);
    return assembleYear({ ...contents, part: several ? key : '', periods: [], yearFrom: 'typical' }, own, options);
  });
  return named(readings, mapping);
}

const EMPTY: TableRecords = {
  lines: [],
  minutes: [],
  dryBulbC: [],
  dewPointC: [],
  relativeHumidityPct: [],
  wetBulbC: [],
  pressurePa: [],
};

function contentsOf(
  records: TableRecords,
  table: { key: string; mapping: TableMapping; station: DeclaredStation; comments: string | null; several: boolean },
  findings: FindingList,
): StationContents {
  const { comments, key, mapping, several, station } = table;
  const { share, stepMin } = stepMinutes(records.minutes);
  if (records.lines.length >= FEWEST_ROWS) refuseStep({ stepMin, share, line: records.lines[0] ?? 0 }, findings);
  const place = { offsetMin: Math.round(60 * (station.utcOffsetH ?? 0)), elevationM: station.elevationM };
  const usable = findings.refused ? EMPTY : records;
  const { converted, rows, stepsPerHour } = tableRows(usable, { mapping, stepMin: stepMin || 60, place });
  tellLevel({ mapping, converted, station }, findings);
  return {
    format: 'table',
    key,
    station: several && key !== '' ? { ...station, name: key } : station,
    stationLine: null,
    rows,
    stepsPerHour,
    cutByUtc: mapping.time.scale === 'UTC' || mapping.time.scale === 'in stamps',
    leapYearObserved: null,
    sourceFlagsInformative: null,
    published: null,
    comments,
  };
}

function refuseStep(found: { stepMin: number; share: number; line: number }, findings: FindingList): void {
  const { line, share, stepMin } = found;
  const regular = share >= FEWEST_STEP_SHARE && (stepMin >= 60 || 60 % stepMin === 0);
  if (regular && stepMin <= LONGEST_STEP_MIN) return;
  findings.add({
    code: 'time-order',
    severity: 'refuse',
    line,
    message: () =>
      regular || stepMin > LONGEST_STEP_MIN
        ? `The rows come every ${stepMin % 60 === 0 ? `${whole(stepMin / 60)} hours` : `${whole(stepMin)} minutes`}; readings every three hours are the least from which hours can be made.`
        : 'The rows come at no regular step that divides the hour. Bring the table with a row for each hour, or for each part of it.',
  });
}

function tellLevel(
  input: { mapping: TableMapping; converted: number; station: DeclaredStation },
  findings: FindingList,
): void {
  const { converted, mapping, station } = input;
  if (mapping.pressure === null || mapping.pressure.level === 'station') return;
  const what = mapping.pressure.level === 'altimeter' ? 'the altimeter setting' : 'the pressure at sea level';
  findings.add({
    code: 'pressure-sea-level',
    severity: 'note',
    count: converted,
    message: () =>
      station.elevationM === null
        ? `The table gives ${what}, which becomes station pressure once the elevation is known.`
        : `In ${whole(converted)} rows the station pressure follows from ${what} and the elevation, ${station.elevationM} m.`,
  });
}

/** Says that the humidity came from the wet bulb, which stands in the column of relative humidity by then. */
function named(readings: readonly WeatherFileReading[], mapping: TableMapping): readonly WeatherFileReading[] {
  if (!isAlone(mapping)) return readings;
  return readings.map((reading) =>
    reading.status === 'refused' || reading.hours === null ? reading : { ...reading, humidityFrom: 'wet bulb' },
  );
}

function unknownWords(mapping: TableMapping | null): string {
  if (mapping === null) return ', of which none could be told to hold times and temperatures';
  return hasHumidity(mapping) ? '' : ', of which none could be told to hold a humidity';
}

function askForMapping(
  text: DecodedText,
  table: { layout: TableLayout; station: DeclaredStation; options: ReadOptions },
  findings: FindingList,
): UnmappedReading {
  const { layout, options, station } = table;
  const guess = guessTable(text, layout);
  const { mapping } = guess;
  findings.ask('unit-guess', {
    line: layout.headerLine,
    message: () =>
      `This is a table of ${layout.fieldCount} columns${unknownWords(mapping)}. Say what its columns hold, in which units, and what its times mean.`,
    proposal: mapping === null ? null : mappingWords(mapping),
  });
  checkPlace({ station, line: null, options }, findings);
  const needsElevation = mapping === null || mapping.pressure === null || mapping.pressure.level !== 'station';
  if (station.elevationM === null && needsElevation) {
    findings.ask('elevation-missing', {
      message: () =>
        'The table gives no elevation, and without station pressure the wet bulb needs it. Say the elevation of the station.',
      proposal: null,
    });
  }
  return {
    status: 'asks',
    part: '',
    format: 'table',
    station,
    hours: null,
    table: guess,
    findings: findings.inOrder(),
    asks: findings.asks,
    comments: licenceLines(layout.preamble),
  };
}
