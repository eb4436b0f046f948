import { hourClasses } from '#engine/hour-classes/hour-class.ts';
import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import type { RunResult } from '#engine/run/run-result.ts';
import { gradePlace } from '#engine/score/grade-place.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { measuredHours } from '../../features/weather/measured-hours.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { openJudgeableFile } from './judgeable-file.ts';
import { printResult } from './print-result.ts';

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
export async function ledger(context: CommandContext): Promise<ExitCode> {
  const opened = await openJudgeableFile(context);
  if (typeof opened === 'number') return opened;
  const { file, preset, brief, reading, place } = opened;
  const reduced = reduceYear(reading);
  const result = judgeYear({ year: reduced.year, brief, ...place });
  printResult(ledgerResult(file, { preset, grade: gradeOf({ reading, reduced, result }), result }));
  return 0;
}
