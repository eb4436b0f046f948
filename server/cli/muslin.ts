import type { Command, CommandContext, ExitCode } from './command.ts';
import { WrongUse } from './commands/command-arguments.ts';

const USAGE = `Use: npm run -s muslin -- COMMAND

  read FILE... [--strict]        read weather files: status, findings, depression hours, design values
  ledger FILE --brief PRESET     test every hour of a file against a preset: hour classes, verdict, score
  hours FILE --brief PRESET      the same hour by hour, as CSV: weather, class, stage, supply, room, water, reason, line
  rerun ID                       judge a stored run of MUSLIN_HOME again: the same to the byte or not
  outbox                         print the mails of MUSLIN_HOME that have not gone out, with the keys in them
  backup FILE                    database and original files of MUSLIN_HOME as one archive, while the product runs
  restore FILE [--over]          put a backup into an empty MUSLIN_HOME; with --over in the place of what is there
  audit verify [KEPT]            every hash of the audit trail anew; the first row that is not as it was written
  bench NAMES                    time the product against the plain way of doing the same

Every command that reads a file takes --place LAT,LON,ELEVATION_M,UTC_OFFSET_H for a file that does not say where it was recorded,
--columns MAP.json, the confirmed mapping of a table ("table.mapping" in what read prints of it), and --answers ANSWERS.json:
{"place": {…}, "mapping": {…}, "answers": {"pressure-sea-level": "convert", …}}, by the codes that a file asks with.

One JSON line per result on standard output, of hours a table. Exit codes: 0 done, 1 a file was refused (or is in doubt
under --strict), a run is not the same, the audit trail is not whole or an archive is damaged, 2 wrong use, 3 could not run.`;

/** Each command's module is loaded when it is asked for, so that none waits for what another needs. */
const commands: Readonly<Record<string, (context: CommandContext) => Promise<ExitCode>>> = {
  read: async (context) => (await import('./commands/read.ts')).read(context),
  ledger: async (context) => (await import('./commands/ledger.ts')).ledger(context),
  hours: async (context) => (await import('./commands/hours.ts')).hours(context),
  rerun: async (context) => (await import('./commands/rerun.ts')).rerun(context),
  outbox: async (context) => (await import('./commands/outbox.ts')).outbox(context),
  backup: async (context) => (await import('./commands/backup.ts')).backup(context),
  restore: async (context) => (await import('./commands/restore.ts')).restore(context),
  audit: async (context) => (await import('./commands/audit.ts')).audit(context),
  bench: async (context) => (await import('./commands/bench.ts')).bench(context),
};

/** The command line of the engine: `muslin COMMAND ...`. */
export const run: Command = async (context) => {
  // A reader that has seen enough closes the pipe: nothing is wrong then, and there is nobody left to tell.
  process.stdout.on('error', () => process.exit(0));
  const [name = '', ...args] = context.args;
  const command = Object.hasOwn(commands, name) ? commands[name] : undefined;
  if (command !== undefined) {
    try {
      return await command({ ...context, args });
    } catch (error) {
      if (!(error instanceof WrongUse)) throw error;
      process.stderr.write(`${error.message}\n`);
      return 2;
    }
  }
  if (name !== '' && name !== '--help' && name !== '-h') process.stderr.write(`There is no command "${name}".\n\n`);
  process.stderr.write(`${USAGE}\n`);
  return name === '--help' || name === '-h' ? 0 : 2;
};
