import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { standardZoneAt } from '../../features/stations/standard-zone-at.ts';
import { type CommandArguments, WrongUse } from './command-arguments.ts';
import { openFile } from './open-file.ts';

/** What a schema answers, as far as it is looked at here. */
interface Schema<T> {
  safeParse(
    value: unknown,
  ):
    | { success: true; data: T }
    | { success: false; error: { issues: readonly { message: string; path: readonly PropertyKey[] }[] } };
}

/**
 * What the command line says of its files: answers, the place, the mapping of a table, and zones by position.
 * @throws WrongUse on a file that does not hold what it should
 */
export async function statedOptions(args: CommandArguments, callerDir: string): Promise<ReadOptions> {
  const { answers, mapping } = await statedInFiles(args, callerDir);
  return {
    zoneAt: standardZoneAt,
    ...answers,
    ...(args.place === null ? {} : { place: { ...answers.place, ...args.place } }),
    ...(mapping === null ? {} : { mapping }),
  };
}

/** The schemas are a third of all modules of the command, and nearly every call goes without. */
async function statedInFiles(args: CommandArguments, callerDir: string) {
  if (args.answers === null && args.columns === null) return { answers: {}, mapping: null };
  const { StatedBody, TableMappingBody } = await import('#contract/weather-answers.ts');
  return {
    answers: args.answers === null ? {} : await openJson(args.answers, StatedBody, callerDir),
    mapping: args.columns === null ? null : await openJson(args.columns, TableMappingBody, callerDir),
  };
}

async function openJson<T>(file: string, schema: Schema<T>, callerDir: string): Promise<T> {
  const bytes = await openFile(file, callerDir);
  if (typeof bytes === 'string') throw new WrongUse(bytes);
  const parsed = schema.safeParse(jsonOf(bytes, file));
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map(({ message, path }) => `${path.join('.') || 'the whole'}: ${message}`);
  throw new WrongUse(`${file} does not hold what it should. ${faults.join(' ')}`);
}

function jsonOf(bytes: Uint8Array, file: string): unknown {
  try {
    return JSON.parse(new TextDecoder().decode(bytes));
  } catch {
    throw new WrongUse(`${file} is not JSON.`);
  }
}
