import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import type { Finding } from '#engine/weather-files/finding.ts';
import { readWeatherFileParts } from '#engine/weather-files/read-weather-file-parts.ts';
import type {
  DeclaredStation,
  RefusedReading,
  WeatherFileReading,
} from '#engine/weather-files/weather-file-reading.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { readArguments, WrongUse } from './command-arguments.ts';
import { openFile } from './open-file.ts';
import { printResult, say } from './print-result.ts';
import { statedOptions } from './stated-options.ts';
import { weatherMembers } from './weather-members.ts';

/** What stands in the place of a year's figures when a file is refused. */
const NO_YEAR = {
  hours: null,
  measured: null,
  estimated: null,
  repaired: null,
  missing: null,
  assumedPressure: null,
  belowZero: null,
  meanDryBulbC: null,
  meanWetBulbC: null,
  depressionHours: null,
  maxDepressionK: null,
  design: null,
};

function yearFigures({ facts }: ReducedYear) {
  const { hours, measured, estimated, repaired, missing, assumedPressure, belowZero } = facts;
  const { meanDryBulbC, meanWetBulbC, maxDepressionK, design } = facts;
  const depressionHours = Object.fromEntries(facts.depressionHours.map((step) => [String(step.atLeastK), step.hours]));
  return {
    ...{ hours, measured, estimated, repaired, missing, assumedPressure, belowZero },
    ...{ meanDryBulbC, meanWetBulbC, depressionHours, maxDepressionK, design },
  };
}

function stationFigures({ name, latitude, longitude, elevationM, utcOffsetH }: DeclaredStation) {
  return { name, latitude, longitude, elevationM, utcOffsetH };
}

function findingFigures({ code, severity, line, lastLine, count, variable, done, message }: Finding) {
  return { code, severity, line, lastLine, count, variable, done, message };
}

/** The result of one station-year: every key is there whatever became of it, in one order. */
export function readResult(file: string, reading: WeatherFileReading) {
  const { format, status, station, findings } = reading;
  const asks = reading.status === 'refused' ? [] : reading.asks;
  const usable = reading.status !== 'refused' && reading.hours !== null;
  return {
    file,
    format,
    status,
    asks: asks.map(({ what, message, proposal }) => ({ what, message, proposal })),
    station: station === null ? null : stationFigures(station),
    ...(usable ? yearFigures(reduceYear(reading)) : NO_YEAR),
    findings: findings.map(findingFigures),
    // A file of several station-years gives a line for each; a table that waits for its mapping gives the guess to confirm.
    ...(reading.part === '' ? {} : { part: reading.part }),
    ...(reading.status === 'refused' || usable ? {} : { table: reading.table }),
  };
}

/** Whether a result makes the command end with 1. A file that only asks does not. */
function failsCommand({ status, findings }: WeatherFileReading, strict: boolean): boolean {
  return status === 'refused' || (strict && findings.some(({ severity }) => severity === 'doubt'));
}

/**
 * `muslin read FILE... [--place LAT,LON,ELEVATION_M,UTC_OFFSET_H] [--columns MAP.json] [--answers ANSWERS.json] [--strict]`: one
 * line per weather file and station-year, in the order given; archives are opened.
 */
export async function read({ args, callerDir }: CommandContext): Promise<ExitCode> {
  const stated = readArguments(args);
  if (stated.files.length === 0) throw new WrongUse('Name the weather files to read.');
  if (stated.brief !== null) throw new WrongUse('--brief belongs to the command ledger.');
  const options = await statedOptions(stated, callerDir);
  let unreadable = false;
  let failing = false;
  for (const file of stated.files) {
    const bytes = await openFile(file, callerDir);
    if (typeof bytes === 'string') {
      say(bytes);
      unreadable = true;
      continue;
    }
    for await (const { content, name } of weatherMembers(file, bytes)) {
      const readings =
        typeof content === 'string' ? [notOpened(content)] : readWeatherFileParts(content, name, options);
      for (const reading of readings) {
        printResult(readResult(name, reading));
        failing ||= failsCommand(reading, stated.strict);
      }
    }
  }
  if (unreadable) return 3;
  return failing ? 1 : 0;
}

/** An archive, or a member of one, that could not be opened is refused like a file that could not be read. */
function notOpened(message: string): RefusedReading {
  const where = { line: null, column: null, lastLine: null, count: 1, variable: null, done: null };
  return {
    status: 'refused',
    part: '',
    format: null,
    station: null,
    findings: [{ code: 'binary', severity: 'refuse', ...where, message }],
  };
}
