import type { Brief } from '#engine/brief/brief.ts';
import { hourClasses } from '#engine/hour-classes/hour-class.ts';
import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import { type JudgeYearInput, judgeYear } from '#engine/run/judge-year.ts';
import type { RunResult } from '#engine/run/run-result.ts';
import { gradePlace } from '#engine/score/grade-place.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { presetBrief, presetNames } from '../../features/briefs/presets.ts';
import { zoneOfStation } from '../../features/stations/zone-of-station.ts';
import { measuredHours } from '../../features/weather/measured-hours.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { readArguments, WrongUse } from './command-arguments.ts';
import { openFile } from './open-file.ts';
import { printResult, say } from './print-result.ts';

/** @throws WrongUse when no preset has that name */
function namedBrief(name: string): Brief {
  if (presetNames().includes(name)) return presetBrief(name);
  throw new WrongUse(`There is no preset "${name}". The presets are ${presetNames().join(', ')}.`);
}

/** Where the year is judged: the file's own place. */
function placeOf({ station }: UsableReading): Pick<JudgeYearInput, 'zone' | 'heightM' | 'position'> | null {
  const { latitude, longitude, elevationM, utcOffsetH } = station;
  if (latitude === null || longitude === null || elevationM === null) return null;
  return {
    zone: zoneOfStation({ latitude, longitude, utcOffsetH: utcOffsetH ?? Math.round(longitude / 15) }),
    heightM: elevationM,
    position: { latitude, longitude },
  };
}

/** The station stands for itself, by this one year. */
function gradeOf(input: { reading: UsableReading; reduced: ReducedYear; result: RunResult }): string {
  const { reading, reduced, result } = input;
  const counts = result.usable && reading.kind !== 'derived';
  return gradePlace({
    distanceKm: 0,
    heightDifferenceM: 0,
    years: { actual: counts && reading.kind === 'actual' ? 1 : 0, typical: counts && reading.kind === 'typical' },
    measuredSharePct: counts ? (100 * measuredHours(reduced.year.packed.flags)) / reduced.facts.hours : null,
    flagsInformative: !reading.findings.some(({ code }) => code === 'source-flags-uniform'),
    kind: reading.kind === 'derived' ? 'derived' : 'station',
  }).grade;
}

function ledgerResult(file: string, input: { preset: string; grade: string; result: RunResult }) {
  const { methodVersion, ledger, verdict, failed, score, scoreNote, scoreExact, parts, gates } = input.result;
  return {
    file,
    brief: input.preset,
    methodVersion,
    hours: ledger.hours,
    classes: Object.fromEntries(hourClasses.map((hourClass) => [hourClass, ledger.classes[hourClass]])),
    demand: ledger.demand,
    met: ledger.met,
    verdict,
    failed,
    score,
    // An excluded place shows no score at all; its parts still say what they would have been.
    scoreExact: scoreNote === null ? scoreExact : null,
    grade: input.grade,
    parts,
    gates,
  };
}

/** `muslin ledger FILE --brief PRESET`: every hour of the file's year under the preset. */
export async function ledger({ args, callerDir }: CommandContext): Promise<ExitCode> {
  const { files, strict, brief: preset } = readArguments(args);
  const [file, ...more] = files;
  if (file === undefined || more.length > 0) throw new WrongUse('Name one weather file.');
  if (strict) throw new WrongUse('--strict belongs to the command read.');
  if (preset === null) throw new WrongUse('Name the preset: --brief office.');
  const brief = namedBrief(preset);

  const bytes = await openFile(file, callerDir);
  if (typeof bytes === 'string') {
    say(bytes);
    return 3;
  }
  const reading = readWeatherFile(bytes, file);
  if (reading.status === 'refused') {
    const reasons = reading.findings.filter(({ severity }) => severity === 'refuse');
    say([`${file} is refused:`, ...reasons.map(({ message }) => message)].join('\n'));
    return 1;
  }
  for (const { message } of reading.asks) say(`${file} asks: ${message}`);
  const place = placeOf(reading);
  if (place === null) {
    say(`${file} does not say where and how high it was recorded, so its hours cannot be judged.`);
    return 1;
  }
  const reduced = reduceYear(reading);
  const result = judgeYear({ year: reduced.year, brief, ...place });
  printResult(ledgerResult(file, { preset, grade: gradeOf({ reading, reduced, result }), result }));
  return 0;
}
