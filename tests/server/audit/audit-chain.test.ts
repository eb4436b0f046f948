import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it, test } from 'vitest';
import * as migration from '../../../migrations/0010-audit-chain.ts';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { recordAuditEvent } from '../../../server/db/record-audit-event.ts';
import type { KeptHead } from '../../../server/features/audit/verify-chain.ts';
import { verifyTrail } from '../../../server/features/audit/verify-trail.ts';
import type { AuditAct } from '../../../src/contract/audit.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

let database: TestDatabase;
let teamId: string;
let otherTeamId: string;
beforeAll(async () => {
  database = await makeTestDatabase();
});
afterAll(() => database.drop());
beforeEach(async () => {
  teamId = await makeTeam();
  otherTeamId = await makeTeam();
});

async function makeTeam(): Promise<string> {
  const [row] = await database.db('teams').insert({ name: 'Team' }, ['id']);
  return row.id;
}

interface Written {
  readonly teamId: string | null;
  readonly act?: AuditAct;
  readonly subject?: Readonly<Record<string, unknown>>;
}
const write = (...events: readonly Written[]): Promise<void> =>
  inTransaction(database.db, async (transaction) => {
    for (const { teamId, act = 'site made', subject = {} } of events)
      await recordAuditEvent(transaction, { teamId, personId: null, act, subject, requestId: null });
  });
const writeTen = async (): Promise<void> => {
  for (let i = 0; i < 10; i += 1) await write({ teamId, subject: { name: `Site ${i}`, i } });
};

const verified = async (kept: readonly KeptHead[] = []) => {
  const found = new Map<string | null, { events: number; hash: string; broken: unknown }>();
  for await (const { head, broken } of verifyTrail(database.db, kept))
    found.set(head.teamId, { events: head.events, hash: head.hash, broken });
  return found;
};
const brokenOf = async (kept?: readonly KeptHead[]) => (await verified(kept)).get(teamId)?.broken;

/** As somebody who may do everything, past the triggers: these are the owner's to switch off, as they are a superuser's. */
async function tamper(statement: string, bindings: Readonly<Record<string, unknown>> = {}): Promise<void> {
  await database.ownerDb.transaction(async (transaction) => {
    await transaction.raw('alter table audit_events disable trigger audit_events_chain');
    for (const each of statement.split(';')) await transaction.raw(each, { teamId, ...bindings });
    await transaction.raw('alter table audit_events enable trigger audit_events_chain');
  });
}

describe('the chain of the audit trail', () => {
  it('follows from event to event of a team, and is the same to whoever hashes it', async () => {
    await writeTen();
    await write({ teamId: null, act: 'signed in', subject: { email: 'ann@school.example' } });
    const odd = 'line\nbreak "quoted" \\ tab\t \u0001 \u2028 é 名 😀';
    await write({ teamId, subject: { name: odd, deep: { b: [1.5, 1e21, null, true], aa: {} }, '': '' } });
    const chains = await verified();
    expect(chains.get(teamId)).toMatchObject({ events: 11, broken: null });
    expect(chains.get(null)).toMatchObject({ broken: null });
    const rows = await database.db('audit_events').where({ team_id: teamId }).orderBy('position');
    expect(rows.map(({ position }) => Number(position))).toEqual(Array.from({ length: 11 }, (_, index) => index + 1));
    expect(rows[0].previous_hash).toBe('0'.repeat(64));
    for (const [index, row] of rows.slice(1).entries()) expect(row.previous_hash).toBe(rows[index].hash);
  });

  it('holds every event of transactions that ran side by side over two chains, and none stands in a deadlock', async () => {
    const many = Array.from({ length: 40 }, (_, index) => {
      const events = [{ teamId }, { teamId: otherTeamId }, { teamId }];
      return write(...(index % 2 === 0 ? events : events.toReversed()));
    });
    await Promise.all(many);
    const chains = await verified();
    expect(chains.get(teamId)?.broken).toBeNull();
    expect((chains.get(teamId)?.events ?? 0) + (chains.get(otherTeamId)?.events ?? 0)).toBe(120);
    expect(chains.get(otherTeamId)?.broken).toBeNull();
  });

  it('is whole to whoever verifies it while more is written', async () => {
    await write({ teamId }, { teamId: otherTeamId });
    const broken = new Map<string | null, unknown>();
    for await (const { head, broken: found } of verifyTrail(database.db)) {
      broken.set(head.teamId, found);
      // The heads are known by now; the other team's chain, which comes later, grows past the head that was seen.
      if (head.teamId === teamId) await write({ teamId: otherTeamId });
    }
    expect([broken.get(teamId), broken.get(otherTeamId)]).toEqual([null, null]);
    expect((await verified()).get(otherTeamId)).toMatchObject({ events: 2, broken: null });
  });

  it('takes nothing of an act that was taken back', async () => {
    await write({ teamId });
    const failing = inTransaction(database.db, async (transaction) => {
      const event = { teamId, personId: null, act: 'site made', subject: {}, requestId: null } as const;
      await recordAuditEvent(transaction, event);
      throw new Error('taken back');
    });
    await expect(failing).rejects.toThrow('taken back');
    await write({ teamId });
    expect((await verified()).get(teamId)).toMatchObject({ events: 2, broken: null });
  });

  it.each(['position', 'hash', 'previous_hash', 'at', 'transaction_id'])(
    'lets nobody who serves requests choose the %s of an event',
    async (column) => {
      const values = { position: 1, hash: 'a', previous_hash: 'a', at: new Date(), transaction_id: '1' };
      const insert = database.db('audit_events').insert({
        act: 'site made',
        [column]: Reflect.get(values, column),
      });
      await expect(insert).rejects.toMatchObject({ code: '42501' }); // insufficient_privilege
      await expect(database.db.raw('select chain_audit_events(0)')).rejects.toMatchObject({ code: '42501' });
      await expect(database.db.raw('update audit_chains set events = 0')).rejects.toMatchObject({ code: '42501' });
    },
  );
});

test('what stood in the trail before it was chained is chained by the migration, in the order in which it was written', async () => {
  const older = await makeTestDatabase();
  try {
    const { ownerDb } = older;
    await migration.down(ownerDb);
    const [team] = await ownerDb('teams').insert({ name: 'Older' }, ['id']);
    const events = Array.from({ length: 25 }, (_, index) => ({
      team_id: index % 5 === 0 ? null : team.id,
      act: 'site made',
      subject: JSON.stringify({ name: `Site ${index}` }),
      at: new Date(Date.UTC(2026, 0, 1, 0, 0, index)),
    }));
    await ownerDb('audit_events').insert(events);
    await migration.up(ownerDb);
    const found: unknown[] = [];
    for await (const { head, broken } of verifyTrail(older.db)) found.push([head.teamName, head.events, broken]);
    expect(found).toEqual([
      [null, 5, null],
      ['Older', 20, null],
    ]);
    await older.db('audit_events').insert({ team_id: team.id, act: 'site made' });
    const places = await older.db('audit_events').where({ team_id: team.id }).orderBy('id').pluck('position');
    expect(places.map(Number)).toEqual(Array.from({ length: 21 }, (_, index) => index + 1));
  } finally {
    await older.drop();
  }
});

describe('whoever changes the trail past the product is found out', () => {
  beforeEach(writeTen);
  const ofTeam = (position: number) => ({ position: `${position}` });

  it('by the row in which one byte was changed', async () => {
    await tamper(`update audit_events set subject = jsonb_set(subject, '{name}', '"Site 5"')
      where team_id = :teamId and position = 5`);
    expect(await brokenOf()).toMatchObject({ position: 5, why: 'What it says is not what was written.' });
  });

  it.each([
    ['the act', `act = 'site moved'`],
    ['the time', `at = at + interval '1 microsecond'`],
    ['the request', `request_id = 'another'`],
  ])('by the row in which %s was changed', async (_what, change) => {
    await tamper(`update audit_events set ${change} where team_id = :teamId and position = 7`);
    expect(await brokenOf()).toMatchObject({ position: 7 });
  });

  it.each([1, 5, 10])('by the place of row %i of ten that was removed', async (position) => {
    await tamper('delete from audit_events where team_id = :teamId and position = :position', ofTeam(position));
    const broken = await brokenOf();
    expect(broken).toMatchObject({ position: position === 10 ? 10 : position + 1 });
    expect(JSON.stringify(broken)).toContain('gone');
  });

  it('by a row that was put in without a place', async () => {
    await tamper(`insert into audit_events (team_id, act) values (:teamId, 'site made')`);
    expect(await brokenOf()).toMatchObject({ position: null, why: 'It was put in: it has no place in the chain.' });
    // An act of the product afterwards gives it none either.
    await write({ teamId });
    expect(await brokenOf()).toMatchObject({ position: null });
  });

  it('by a row that was put in between, behind the others moved up', async () => {
    await tamper('update audit_events set position = position + 100 where team_id = :teamId and position >= 5');
    await tamper('update audit_events set position = position - 99 where team_id = :teamId and position >= 100');
    await tamper(
      `insert into audit_events (team_id, act, position, previous_hash, hash)
       select team_id, act, 5, hash, repeat('a', 64) from audit_events where team_id = :teamId and position = 4`,
    );
    expect(await brokenOf()).toMatchObject({ position: 5, why: 'What it says is not what was written.' });
  });

  it('by a row that was put in behind the last, hashed as it should be', async () => {
    await tamper(`
      insert into audit_events (team_id, act, position, previous_hash, hash)
      select team_id, act, 11, hash, repeat('0', 64) from audit_events where team_id = :teamId and position = 10;
      update audit_events set hash = audit_event_hash(audit_events) where team_id = :teamId and position = 11`);
    expect(await brokenOf()).toMatchObject({ position: 11 });
  });

  it('by a head that was kept, even where the whole chain was written anew', async () => {
    const kept = (await verified()).get(teamId);
    await tamper(`
      delete from audit_events where team_id = :teamId and position = 10;
      update audit_chains set events = 9, hash = (
        select hash from audit_events where team_id = :teamId and position = 9) where team_id = :teamId`);
    expect(await brokenOf()).toBeNull();
    const head = { teamId, events: 10, hash: kept?.hash ?? '' };
    expect(await brokenOf([head])).toMatchObject({ position: 10 });
    await write({ teamId });
    expect(await brokenOf()).toBeNull();
    expect(await brokenOf([head])).toMatchObject({ position: 10 });
    const gone = { teamId: randomUUID(), events: 3, hash: 'a'.repeat(64) };
    expect((await verified([gone])).get(gone.teamId)).toMatchObject({ broken: { position: 1 } });
  });

  it('and the chains of others stay whole', async () => {
    await write({ teamId: otherTeamId });
    await tamper(`update audit_events set act = 'site moved' where team_id = :teamId`);
    expect((await verified()).get(otherTeamId)?.broken).toBeNull();
  });
});
