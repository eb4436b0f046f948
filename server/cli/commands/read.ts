import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import type { Finding } from '#engine/weather-files/finding.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { DeclaredStation, WeatherFileReading } from '#engine/weather-files/weather-file-reading.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { readArguments, WrongUse } from './command-arguments.ts';
import { openFile } from './open-file.ts';
import { printResult, say } from './print-result.ts';

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

function findingFigures({ code, severity, line, message }: Finding) {
  return { code, severity, line, message };
}

/** The result of one file: every key is there whatever became of it, in one order. */
export function readResult(file: string, reading: WeatherFileReading) {
  const { format, status, station, findings } = reading;
  const asks = reading.status === 'refused' ? [] : reading.asks;
  return {
    file,
    format,
    status,
    asks: asks.map(({ what, message, proposal }) => ({ what, message, proposal })),
    station: station === null ? null : stationFigures(station),
    ...(reading.status === 'refused' ? NO_YEAR : yearFigures(reduceYear(reading))),
    findings: findings.map(findingFigures),
  };
}

/** Whether a result makes the command end with 1. A file that only asks does not. */
function failsCommand({ status, findings }: WeatherFileReading, strict: boolean): boolean {
  return status === 'refused' || (strict && findings.some(({ severity }) => severity === 'doubt'));
}

/** `muslin read FILE... [--strict]`: one line per file, in the order given. */
export async function read({ args, callerDir }: CommandContext): Promise<ExitCode> {
  const { files, strict, brief } = readArguments(args);
  if (files.length === 0) throw new WrongUse('Name the weather files to read.');
  if (brief !== null) throw new WrongUse('--brief belongs to the command ledger.');
  let unreadable = false;
  let failing = false;
  for (const file of files) {
    const bytes = await openFile(file, callerDir);
    if (typeof bytes === 'string') {
      say(bytes);
      unreadable = true;
      continue;
    }
    const reading = readWeatherFile(bytes, file);
    printResult(readResult(file, reading));
    failing ||= failsCommand(reading, strict);
  }
  if (unreadable) return 3;
  return failing ? 1 : 0;
}
