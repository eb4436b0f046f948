import { readFile } from 'node:fs/promises';
import path from 'node:path';
import * as z from 'zod/mini';
import type { KeptHead } from '../../features/audit/verify-chain.ts';
import { type VerifiedChain, verifyTrail } from '../../features/audit/verify-trail.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { withHomeDatabase } from '../home-database.ts';
import { WrongUse } from './command-arguments.ts';
import { printResult, say } from './print-result.ts';

/** A line that an earlier `muslin audit verify` printed. */
const KeptLine = z.object({
  teamId: z.nullable(z.uuid()),
  events: z.int().check(z.gte(0)),
  hash: z.string().check(z.regex(/^[0-9a-f]{64}$/)),
});

/**
 * `muslin audit verify [KEPT]`: every chain of the audit trail from its first event to its last, one line each. With what an
 * earlier call printed, kept where nobody reaches who reaches the database, a chain that was written anew as a whole shows too.
 */
export async function audit(context: CommandContext): Promise<ExitCode> {
  const [what, keptFile, ...rest] = context.args;
  if (what !== 'verify' || rest.length > 0) throw new WrongUse('Use: muslin audit verify [KEPT.jsonl]');
  const kept = keptFile === undefined ? [] : await readKept(path.resolve(context.callerDir, keptFile));
  const brokenChains = await withHomeDatabase(context, async (db) => {
    let count = 0;
    for await (const chain of verifyTrail(db, kept)) {
      if (chain.broken !== null) count += 1;
      printResult(lineOf(chain));
    }
    return count;
  });
  if (brokenChains === 0)
    say('Every chain of the audit trail is whole. Keep these lines elsewhere to hold it to them.');
  else say(`${brokenChains} of the chains of the audit trail ${brokenChains === 1 ? 'is' : 'are'} broken.`);
  return brokenChains === 0 ? 0 : 1;
}

function lineOf({ head, broken }: VerifiedChain) {
  const { teamId, teamName, events, hash } = head;
  const chain = teamId === null ? 'outside of teams' : (teamName ?? 'a team that is gone');
  return { chain, teamId, events, hash, state: broken === null ? 'whole' : 'broken', firstBroken: broken };
}

async function readKept(file: string): Promise<readonly KeptHead[]> {
  const text = await readFile(file, 'utf8').catch(() => {
    throw new WrongUse(`${file} cannot be read.`);
  });
  return text.split('\n').flatMap((line, index) => {
    if (line.trim() === '') return [];
    const parsed = KeptLine.safeParse(jsonOf(line));
    if (!parsed.success) throw new WrongUse(`${file}, line ${index + 1}: not a line of “muslin audit verify”.`);
    return [parsed.data];
  });
}

function jsonOf(line: string): unknown {
  try {
    return JSON.parse(line);
  } catch {
    return undefined;
  }
}
