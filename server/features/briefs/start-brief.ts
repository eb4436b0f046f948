import type { Knex } from 'knex';
import { insertBrief, insertBriefVersion } from './brief-store.ts';
import { officeBrief } from './presets.ts';

/** The name under which a programme's first brief begins; it can be renamed. */
const FIRST_BRIEF = 'Office';

/** Gives a new programme its first brief, version 1, from the office preset. */
export async function startBrief(
  transaction: Knex.Transaction,
  programme: { teamId: string; programmeId: string; madeBy: string },
): Promise<void> {
  const { teamId, programmeId, madeBy } = programme;
  const briefId = await insertBrief(transaction, { teamId, programmeId, name: FIRST_BRIEF });
  await insertBriefVersion(transaction, { teamId, briefId, body: officeBrief(), madeBy });
}
