import { afterAll, beforeAll, expect, test } from 'vitest';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { makePerson } from '../../../server/features/accounts/make-person.ts';
import { startBrief } from '../../../server/features/briefs/start-brief.ts';
import { makeTeam } from '../../../server/features/teams/make-team.ts';
import { insertBatch } from '../../../server/features/weather/batch-store.ts';
import { tellFinishedImports } from '../../../server/features/weather/tell-finished-imports.ts';
import { mailsTo } from '../../support/mail-box.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

const at = new Date('2026-03-01T10:00:00Z');
const later = (seconds: number) => new Date(at.getTime() + seconds * 1000);
let database: TestDatabase;

beforeAll(async () => {
  database = await makeTestDatabase();
});
afterAll(() => database.drop());

test('whoever brought a batch is told once, when nothing of it is left to read and nothing more comes', async () => {
  const { db, ownerDb } = database;
  const email = 'engineer@example.org';
  const personId = await makePerson(db, { email, name: 'An engineer', password: 'a long pass phrase for tests' });
  const { teamId, batchId } = await inTransaction(db, async (transaction) => {
    const team = { name: 'Team', leadId: personId, invented: true, programmeName: 'Programme' };
    const made = await makeTeam({ transaction, startBrief }, team);
    return { ...made, batchId: await insertBatch(transaction, { teamId: made.teamId, name: 'March', personId, at }) };
  });
  const tell = (when: Date) => tellFinishedImports({ db, publicUrl: 'https://muslin.example' }, when);
  const told = async () => (await mailsTo(database, email)).map(({ subject }) => subject);
  await tell(later(600));
  expect(await told()).toEqual([]);
  await ownerDb.raw(
    `insert into weather_files (team_id, batch_id, name, bytes, fingerprint, storage_key, status, uploaded_by, uploaded_at)
     values (:teamId, :batchId, 'a.epw', 1, repeat('a', 64), 'a', 'review', :personId, :at),
            (:teamId, :batchId, 'b.epw', 1, repeat('b', 64), 'b', 'reading', :personId, :at)`,
    { teamId, batchId, personId, at },
  );
  await tell(later(600));
  expect(await told()).toEqual([]);
  await ownerDb.raw(`update weather_files set status = 'refused' where name = 'b.epw'`);
  await tell(later(30));
  expect(await told()).toEqual([]);
  await Promise.all([tell(later(90)), tell(later(90))]);
  await tell(later(600));
  expect(await told()).toEqual(['The import “March” has been read']);
  const { rows } = await ownerDb.raw('select kind, path from notices where person_id = ?', [personId]);
  expect(rows).toEqual([{ kind: 'import finished', path: `/teams/${teamId}/weather?batch=${batchId}` }]);
});
