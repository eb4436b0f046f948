import { parseArgs } from 'node:util';

/** Wrong use of a command; the message says what. Ends it with code 2. */
export class WrongUse extends Error {
  override readonly name = 'WrongUse';
}

export interface CommandArguments {
  readonly files: readonly string[];
  readonly strict: boolean;
  readonly brief: string | null;
}

/** Options whose place in the command line is fixed and whose work is not built yet. */
const LATER = ['--place', '--columns'];

/**
 * Reads what follows the command's name.
 * @throws WrongUse
 */
export function readArguments(args: readonly string[]): CommandArguments {
  for (const option of LATER) {
    if (args.some((arg) => arg === option || arg.startsWith(`${option}=`))) {
      throw new WrongUse(`${option} works from the weather room on; it is not built yet.`);
    }
  }
  try {
    const { values, positionals } = parseArgs({
      args: [...args],
      options: { strict: { type: 'boolean', default: false }, brief: { type: 'string' } },
      allowPositionals: true,
    });
    return { files: positionals, strict: values.strict, brief: values.brief ?? null };
  } catch (error) {
    throw new WrongUse(error instanceof Error ? error.message : String(error));
  }
}
