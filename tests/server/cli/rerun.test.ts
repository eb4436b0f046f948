import { existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import knexPkg from 'knex';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { clusterStatus, SUPERUSER, startCluster, stopCluster } from '../../../server/cli/cluster.ts';
import { WrongUse } from '../../../server/cli/commands/command-arguments.ts';
import { rerun as rerunCommand } from '../../../server/cli/commands/rerun.ts';
import { type Home, openHome } from '../../../server/cli/home.ts';
import { takeHome } from '../../../server/cli/home-lock.ts';
import { prepareDatabase } from '../../../server/db/prepare-database.ts';
import { briefHash } from '../../../server/features/briefs/brief-hash.ts';
import { repeatRun } from '../../../server/features/runs/repeat-run.ts';
import { contentHash } from '../../../server/features/weather/content-hash.ts';
import { METHOD_VERSION } from '../../../src/engine/conventions.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { openRoad, type Road } from '../../support/open-road.ts';
import { type CommandOutcome, runCommand } from '../../support/run-command.ts';
import { deskOf } from '../../support/team-desk.ts';
import type { TestDatabase } from '../../support/test-database.ts';

const { knex } = knexPkg;

let homeDir: string;
let home: Home;
let clusterFolder: string;
let database: TestDatabase;
let run: string;

/** The database of the home's cluster, as a road wants one. */
async function startHome(): Promise<TestDatabase> {
  const { superuserPassword, ownerPassword, appPassword } = home.secrets;
  const { port, folder } = await startCluster({ homeDir: home.dir, superuserPassword, throwaway: true });
  clusterFolder = folder;
  const superuser = { name: SUPERUSER, password: superuserPassword };
  const { appUrl, ownerUrl } = await prepareDatabase({ port, superuser, ownerPassword, appPassword }, 'muslin');
  const db = knex({ client: 'pg', connection: appUrl, pool: { min: 0, max: 6 } });
  const ownerDb = knex({ client: 'pg', connection: ownerUrl, pool: { min: 0, max: 2 } });
  const drop = async () => {
    await db.destroy();
    await ownerDb.destroy();
  };
  return { db, ownerDb, databaseUrl: appUrl, ownerUrl, drop };
}

/** One accepted file, judged: the id of its run. */
async function judgeDemoFile(road: Road): Promise<string> {
  const team = await road.makeTeam('Northern offices');
  const desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  const epw = demoEpw(0);
  const { file } = await desk.upload(epw.name, epw.text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  await desk.mapWithoutPending();
  const { rows } = await road.db.raw<{ rows: { id: string }[] }>('select id from runs');
  return rows[0]?.id ?? '';
}

function rerun(...args: string[]): Promise<CommandOutcome> {
  return runCommand(['muslin', 'rerun', ...args], { env: { MUSLIN_HOME: homeDir } });
}

beforeAll(async () => {
  homeDir = mkdtempSync(path.join(os.tmpdir(), 'muslin-rerun-'));
  home = openHome(homeDir);
  database = await startHome();
  const road = await openRoad({ database: { ...database, drop: async () => undefined } });
  run = await judgeDemoFile(road);
  expect(road.log.errors).toEqual([]);
  await road.close();
}, 120_000);
afterAll(async () => {
  await stopCluster(home.dir);
  rmSync(clusterFolder, { recursive: true, force: true });
  rmSync(homeDir, { recursive: true, force: true });
});

describe('muslin rerun beside a database that runs', () => {
  it('makes a stored run again to the byte, and leaves the database running', async () => {
    const outcome = await rerun(run);
    expect(outcome).toMatchObject({ code: 0, stderr: '' });
    const answer: Record<string, unknown> = JSON.parse(outcome.stdout);
    expect(answer).toMatchObject({ run, same: true, methodVersion: METHOD_VERSION, differs: [] });
    expect(answer.repeatedHash).toBe(answer.resultHash);
    expect(answer.resultHash).toMatch(/^[0-9a-f]{64}$/);
    expect(clusterStatus(home.dir).state).toBe('running');
  });

  it.each([
    ['the record', 'runs', 'hour_classes', 'set_byte(hour_classes, 5000, 1)', ['stored result']],
    ['the height', 'runs', 'height_m', 'height_m + 10', ['key']],
    // Slot 4812, one o'clock in the afternoon of 20 July, a Friday on the calendar of typical years: over 30 °C.
    ['the weather', 'weather_years', 'dry_bulb', 'set_byte(dry_bulb, 9625, 12)', ['weather year', 'repeated result']],
    [
      'the brief',
      'brief_versions',
      'body',
      `jsonb_set(body, '{effDirect}', '0.8')`,
      ['brief version', 'repeated result'],
    ],
  ])('finds out what is not as it was: %s', async (_what, table, column, changed, differs) => {
    const { ownerDb, db } = database;
    await ownerDb.raw(`create table kept as select * from ${table}`);
    await ownerDb.raw(`update ${table} set ${column} = ${changed}`);
    const answer = await repeatRun(db, { briefHash, contentHash }, run);
    const outcome = column === 'dry_bulb' ? await rerun(run) : null;
    await ownerDb.raw(`update ${table} set ${column} = kept.${column} from kept where kept.id = ${table}.id`);
    await ownerDb.raw('drop table kept');
    expect(answer).toMatchObject({ outcome: 'repeated', differs });
    expect(await repeatRun(db, { briefHash, contentHash }, run)).toMatchObject({ outcome: 'repeated', differs: [] });
    if (outcome === null) return;
    expect(outcome.code).toBe(1);
    expect(JSON.parse(outcome.stdout)).toMatchObject({ run, same: false, differs });
    expect(outcome.stderr).toContain(`is not the same any more: ${differs.join(', ')}.`);
  });

  it('lets the operator read the mails that wait there, as muslin outbox', async () => {
    await database.ownerDb.raw(
      `insert into mails (recipient, subject, text, html, opens_account, made_at)
       values ('ada@example.org', 'Set a new password', 'the key', '<p>the key</p>', true, now())`,
    );
    const outcome = await runCommand(['muslin', 'outbox'], { env: { MUSLIN_HOME: homeDir } });
    await database.ownerDb.raw('delete from mails');
    expect(outcome).toMatchObject({ code: 0, stderr: '' });
    const printed = { to: 'ada@example.org', subject: 'Set a new password', text: 'the key', failure: null };
    expect(JSON.parse(outcome.stdout)).toMatchObject(printed);
  });

  it('verifies the audit trail as muslin audit verify, and holds it to what was kept of it', async () => {
    const verify = (...args: string[]) =>
      runCommand(['muslin', 'audit', 'verify', ...args], { env: { MUSLIN_HOME: homeDir } });
    const whole = await verify();
    expect(whole).toMatchObject({ code: 0 });
    const lines = whole.stdout
      .trim()
      .split('\n')
      .map((line) => JSON.parse(line));
    expect(lines).toMatchObject([
      { chain: 'outside of teams', state: 'whole', firstBroken: null },
      { chain: 'Northern offices', state: 'whole', firstBroken: null },
    ]);
    const kept = path.join(homeDir, 'kept.jsonl');
    writeFileSync(kept, whole.stdout);
    await database.ownerDb.raw(`update audit_events set act = 'site made' where team_id is not null and position = 1`);
    const outcome = await verify(kept);
    expect(outcome).toMatchObject({ code: 1 });
    const [, broken = ''] = outcome.stdout.trim().split('\n');
    expect(JSON.parse(broken)).toMatchObject({
      state: 'broken',
      firstBroken: { position: 1, why: 'What it says is not what was written.' },
    });
    writeFileSync(kept, '{"events": 3}');
    expect(await verify(kept)).toMatchObject({ code: 2, stderr: expect.stringContaining('line 1') });
  });

  it('leaves a run of another method to the release of that name', async () => {
    await database.ownerDb.raw(`update runs set method_version = '2020.1'`);
    const outcome = await rerun(run);
    await database.ownerDb.raw(`update runs set method_version = '${METHOD_VERSION}'`);
    expect(outcome).toMatchObject({ code: 3, stdout: '' });
    expect(outcome.stderr).toContain(`made under method 2020.1, and this release judges under ${METHOD_VERSION}`);
  });
});

describe('muslin rerun on a database that is down', () => {
  beforeAll(async () => {
    await database.drop();
    await stopCluster(home.dir);
  });

  it('starts it, and stops it again, also when there is no such run', async () => {
    expect(await rerun(run.toUpperCase())).toMatchObject({ code: 0, stderr: '' });
    expect(clusterStatus(home.dir).state).toBe('stopped');
    const unknown = await rerun('00000000-0000-4000-8000-000000000000');
    expect(unknown).toMatchObject({ code: 3, stdout: '' });
    expect(unknown.stderr).toContain('There is no run 00000000-0000-4000-8000-000000000000');
    expect(clusterStatus(home.dir).state).toBe('stopped');
    expect(existsSync(home.lockFile)).toBe(false);
  }, 90_000);

  it('does not start the database of a home on which somebody is just starting', async () => {
    const lock = takeHome({ dir: home.dir, lockFile: home.lockFile, address: 'it is just starting' });
    const outcome = await rerun(run);
    lock.giveBack();
    expect(outcome).toMatchObject({ code: 3, stdout: '' });
    expect(outcome.stderr).toContain('it is just starting');
    expect(clusterStatus(home.dir).state).toBe('stopped');
  });
});

describe('muslin rerun', () => {
  it('ends with 2 when it is used wrongly', async () => {
    expect(await rerun('7')).toMatchObject({ code: 2, stdout: '', stderr: expect.stringContaining('no id of a run') });
  });

  it.each([
    ['no run', []],
    ['two runs', ['a', 'b']],
    ['what is no id', ['7']],
    ['an unknown option', ['--all']],
  ])('is told before anything is opened: %s', async (_what, args) => {
    const context = { args, callerDir: homeDir, rootDir: homeDir, signal: new AbortController().signal };
    await expect(rerunCommand(context)).rejects.toThrow(WrongUse);
  });

  it('cannot run without a home, and makes none', async () => {
    const empty = mkdtempSync(path.join(os.tmpdir(), 'muslin-empty-'));
    const absent = path.join(empty, 'absent');
    for (const named of [empty, absent]) {
      const outcome = await runCommand(['muslin', 'rerun', run], { env: { MUSLIN_HOME: named } });
      expect(outcome).toMatchObject({ code: 3, stdout: '' });
      expect(outcome.stderr).toContain(`There is no database in ${named}`);
    }
    expect(readdirSync(empty)).toEqual([]);
    rmSync(empty, { recursive: true });
  });
});
