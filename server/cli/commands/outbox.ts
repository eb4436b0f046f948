import { listOutbox } from '../../mail/mail-store.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { withHomeDatabase } from '../home-database.ts';
import { WrongUse } from './command-arguments.ts';
import { printResult, say } from './print-result.ts';

/** `muslin outbox`: every mail that has not gone out, those that open an account among them, for whoever runs the server. */
export async function outbox(context: CommandContext): Promise<ExitCode> {
  if (context.args.length > 0) throw new WrongUse('Nothing follows muslin outbox.');
  const mails = await withHomeDatabase(context, listOutbox);
  for (const { at, recipient, subject, text, failure } of mails)
    printResult({ at: at.toISOString(), to: recipient, subject, text, failure });
  if (mails.length === 0) say('No mail waits.');
  return 0;
}
