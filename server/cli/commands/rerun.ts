import { parseArgs } from 'node:util';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { briefHash } from '../../features/briefs/brief-hash.ts';
import { repeatRun } from '../../features/runs/repeat-run.ts';
import { contentHash } from '../../features/weather/content-hash.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { CouldNotRun } from '../could-not-run.ts';
import { withHomeDatabase } from '../home-database.ts';
import { WrongUse } from './command-arguments.ts';
import { printResult, say } from './print-result.ts';

const RUN_ID = /^[0-9a-f]{8}-([0-9a-f]{4}-){3}[0-9a-f]{12}$/i;

/** `muslin rerun ID`: judges a stored run again and says whether it is the same to the byte. */
export async function rerun(context: CommandContext): Promise<ExitCode> {
  const run = readRunId(context.args);
  const answer = await withHomeDatabase(context, (db) => repeatRun(db, { briefHash, contentHash }, run)).catch(
    sayWhyNot,
  );
  if (answer.outcome === 'no such run') throw new CouldNotRun(`There is no run ${run} in this database.`);
  if (answer.outcome === 'another method') {
    throw new CouldNotRun(
      `Run ${run} was made under method ${answer.methodVersion}, and this release judges under ${METHOD_VERSION}. Only the release of that name can make it again; its record stands.`,
    );
  }
  const { methodVersion, keyHash, resultHash, repeatedHash, differs } = answer;
  const same = differs.length === 0;
  printResult({ run, same, methodVersion, keyHash, resultHash, repeatedHash, differs });
  if (same) return 0;
  say(`Run ${run} is not the same any more: ${differs.join(', ')}.`);
  return 1;
}

function readRunId(args: readonly string[]): string {
  const [run, ...more] = positionalsOf(args);
  if (run === undefined || more.length > 0) throw new WrongUse('Name one run by its id: muslin rerun ID.');
  if (!RUN_ID.test(run))
    throw new WrongUse(`"${run}" is no id of a run: 32 hexadecimal digits in five groups are wanted.`);
  return run.toLowerCase();
}

function positionalsOf(args: readonly string[]): readonly string[] {
  try {
    return parseArgs({ args: [...args], options: {}, allowPositionals: true }).positionals;
  } catch (error) {
    throw new WrongUse(error instanceof Error ? error.message : String(error));
  }
}

function sayWhyNot(error: unknown): never {
  if (error instanceof CouldNotRun || !(error instanceof Error)) throw error;
  throw new CouldNotRun(`The run could not be made again: ${error.message}`);
}
