import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import yazl from 'yazl';
import { restoreBackup } from '../../../server/cli/backup/restore-backup.ts';
import { refuseNewer, verifyBackup } from '../../../server/cli/backup/verify-backup.ts';
import { type BackupSource, writeBackup } from '../../../server/cli/backup/write-backup.ts';
import { clusterFolder } from '../../../server/cli/cluster-folder.ts';
import { backup as backupCommand } from '../../../server/cli/commands/backup.ts';
import { WrongUse } from '../../../server/cli/commands/command-arguments.ts';
import { restore as restoreCommand } from '../../../server/cli/commands/restore.ts';
import { databaseServerUser } from '../../../server/cli/postgres-programs.ts';
import { readTableSums } from '../../../server/db/database-snapshot.ts';
import { dropDatabase } from '../../../server/db/restored-database.ts';
import { createFolderStore } from '../../../server/storage/folder-store.ts';
import { originalKey } from '../../../server/storage/original-store.ts';
import { readZip } from '../../../server/storage/read-zip.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { openRoad, type Road } from '../../support/open-road.ts';
import { runCommand } from '../../support/run-command.ts';
import { deskOf } from '../../support/team-desk.ts';

const SECRETS = ['a session secret for tests'] as const;
const quiet = { signal: new AbortController().signal, say: () => undefined };
const now = new Date('2026-03-01T10:00:00Z');

let folder: string;
let road: Road;
let source: BackupSource;
let file: string;
let tables: Awaited<ReturnType<typeof readTableSums>>;
let originals: readonly string[];

const originalsUnder = (dir: string): string[] =>
  readdirSync(dir, { recursive: true, encoding: 'utf8' })
    .filter((name) => /[0-9a-f]{64}$/.test(name))
    .sort();

async function seed(): Promise<void> {
  const team = await road.makeTeam('Northern offices');
  const desk = deskOf(team, await team.join('engineer'));
  const worker = await road.startWorker();
  const epw = demoEpw(0);
  const { file: uploaded } = await desk.upload(epw.name, epw.text);
  await desk.upload('notes.txt', 'this is no weather file');
  await desk.readToTheEnd(uploaded.id);
  await desk.accept(uploaded.id);
  await desk.mapWithoutPending();
  await road.countRows();
  await worker.close();
}

beforeAll(async () => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'muslin-backup-'));
  road = await openRoad();
  await seed();
  source = { ownerUrl: road.database.ownerUrl, storage: road.storage, sessionSecrets: SECRETS };
  file = path.join(folder, 'whole.backup');
  tables = await readTableSums(source.ownerUrl);
  originals = originalsUnder(road.originalsDir);
  await writeBackup(source, { file, now, ...quiet });
}, 120_000);
afterAll(async () => {
  await road.close();
  rmSync(folder, { recursive: true, force: true });
});

/** The archive with some bytes of an entry's packed content turned round. */
async function damaged(entry: string): Promise<string> {
  const bytes = readFileSync(file);
  const at = bytes.indexOf(entry) + entry.length + 40;
  for (let place = at; place < at + 4; place++) bytes.writeUInt8((bytes[place] ?? 0) ^ 0xff, place);
  const changed = path.join(folder, 'damaged.backup');
  writeFileSync(changed, bytes);
  return changed;
}

/** The archive with another content of some entries, or without them. */
async function rewritten(change: (entry: string, content: Buffer) => Buffer | null): Promise<string> {
  const archive = await readZip(file);
  const zip = new yazl.ZipFile();
  for (const entry of archive.entries) {
    const chunks: Buffer[] = [];
    for await (const chunk of await archive.open(entry)) chunks.push(chunk);
    const content = change(entry, Buffer.concat(chunks));
    if (content !== null) zip.addBuffer(content, entry);
  }
  archive.close();
  zip.end();
  const chunks: Buffer[] = [];
  for await (const chunk of zip.outputStream) chunks.push(Buffer.from(chunk));
  const changed = path.join(folder, 'rewritten.backup');
  writeFileSync(changed, Buffer.concat(chunks));
  return changed;
}

describe('a backup', () => {
  it('holds the rows of every table and every original, and says so in its manifest', async () => {
    const manifest = await verifyBackup(file, quiet);
    expect(manifest).toMatchObject({ madeAt: now.toISOString(), tables, missing: [] });
    expect(tables['public.runs']?.rows).toBeGreaterThan(0);
    expect(tables['public.audit_events']?.rows).toBeGreaterThan(0);
    expect(originals).toHaveLength(2);
    expect(Object.keys(manifest.entries).sort()).toEqual(
      ['database.dump', ...originals.map((key) => `originals/${key}`)].sort(),
    );
    expect(readFileSync(file).includes(SECRETS[0])).toBe(false);
  });

  it('brings back all of it where nothing is left, each table with the fingerprint that it had', async () => {
    const database = `restored_${process.pid}`;
    const server = inject('databaseServer');
    const home = path.join(folder, 'fresh');
    const uploadsDir = path.join(home, 'uploads');
    mkdirSync(uploadsDir, { recursive: true });
    const storage = createFolderStore(path.join(home, 'originals'));
    // One that was damaged before stands in the way, and is replaced.
    const [key = ''] = originals;
    await storage.put(key, Buffer.from('rotten'));
    const manifest = await verifyBackup(file, quiet);
    await restoreBackup({ server, database, storage, uploadsDir }, { file, manifest, ...quiet });
    const ownerUrl = new URL(source.ownerUrl);
    ownerUrl.pathname = database;
    const found = await readTableSums(ownerUrl.href);
    await dropDatabase(server, database);
    expect(found).toEqual(tables);
    expect(originalsUnder(path.join(home, 'originals'))).toEqual(originals);
    for (const each of originals)
      expect(readFileSync(path.join(road.originalsDir, each)).equals(await storage.read(each))).toBe(true);
    expect(readdirSync(uploadsDir)).toEqual([]);
  });

  it('that is interrupted leaves nothing behind', async () => {
    const before = readdirSync(folder);
    const stop = new AbortController();
    const stopping = { file: path.join(folder, 'never.backup'), now, signal: stop.signal };
    const say = (words: string) => {
      if (words.startsWith('Originals')) stop.abort(new Error('stopped'));
    };
    await expect(writeBackup(source, { ...stopping, say })).rejects.toThrow();
    expect(readdirSync(folder)).toEqual(before);
  });

  it('names an original that the store has lost, and takes everything else', async () => {
    const lost = originalKey('0'.repeat(64));
    const storage = { ...road.storage, get: (key: string) => road.storage.get(key === originals[0] ? lost : key) };
    const partial = path.join(folder, 'partial.backup');
    const manifest = await writeBackup({ ...source, storage }, { file: partial, now, ...quiet });
    expect(manifest.missing).toEqual([originals[0]]);
    expect((await verifyBackup(partial, quiet)).missing).toEqual([originals[0]]);
  });
});

describe('an archive that is not as it was written', () => {
  it.each([
    ['the database', 'database.dump'],
    ['the manifest', 'manifest.json'],
  ])('is told by the part that is damaged: %s', async (_what, entry) => {
    await expect(verifyBackup(await damaged(entry), quiet)).rejects.toThrow(entry);
  });

  it('is told where an original is another one, is missing, or one is too many', async () => {
    const entry = `originals/${originals[1]}`;
    const other = await rewritten((name, content) => (name === entry ? Buffer.from('another') : content));
    await expect(verifyBackup(other, quiet)).rejects.toThrow(`${entry} is not what the manifest says`);
    const without = await rewritten((name, content) => (name === entry ? null : content));
    await expect(verifyBackup(without, quiet)).rejects.toThrow(`${entry} is missing`);
    const forgotten = await rewritten((name, content) =>
      name === 'manifest.json' ? Buffer.from(content.toString().replaceAll(entry, `${entry}0`)) : content,
    );
    await expect(verifyBackup(forgotten, quiet)).rejects.toThrow(`${entry} is in the archive`);
  });

  it('is told when it was cut short, and when it is something else', async () => {
    const cut = path.join(folder, 'cut.backup');
    writeFileSync(cut, readFileSync(file).subarray(0, 5000));
    await expect(verifyBackup(cut, quiet)).rejects.toThrow('not a whole archive');
    await expect(verifyBackup(import.meta.filename, quiet)).rejects.toThrow('not a whole archive');
  });

  it('is left to the release that knows its migrations', async () => {
    const manifest = await verifyBackup(file, quiet);
    await refuseNewer(manifest);
    const newer = { ...manifest, migrations: [...manifest.migrations, '9999-from-tomorrow'] };
    await expect(refuseNewer(newer)).rejects.toThrow('does not know 9999-from-tomorrow');
  });

  it('whose rows are others than its manifest says replaces nothing', async () => {
    const manifest = await verifyBackup(file, quiet);
    const runs = { rows: 1, checksum: '7' };
    const wrong = { ...manifest, tables: { ...manifest.tables, 'public.runs': runs } };
    const database = `kept_${process.pid}`;
    const storage = createFolderStore(path.join(folder, 'kept'));
    const target = { server: inject('databaseServer'), database, storage, uploadsDir: folder };
    await expect(restoreBackup(target, { file, manifest: wrong, ...quiet })).rejects.toThrow('public.runs');
    const { rows } = await road.database.ownerDb.raw<{ rows: unknown[] }>(
      'select datname from pg_database where datname like ?',
      [`${database}%`],
    );
    expect(rows).toEqual([]);
  });
});

describe('muslin restore and muslin backup', () => {
  it('fill an empty home, leave a full one alone, and bring out again what was put in', async () => {
    const home = path.join(folder, 'home');
    const env = { MUSLIN_HOME: home };
    const restored = await runCommand(['muslin', 'restore', file], { env });
    try {
      expect(restored).toMatchObject({ code: 0 });
      expect(JSON.parse(restored.stdout)).toMatchObject({ originals: 2, missing: [], sameSecrets: false });
      expect(restored.stderr).toContain('whoever has a second factor needs a recovery code');
      const again = path.join(folder, 'again.backup');
      expect(await runCommand(['muslin', 'backup', again], { env })).toMatchObject({ code: 0 });
      expect((await verifyBackup(again, quiet)).tables).toEqual(tables);
      const refused = await runCommand(['muslin', 'restore', again], { env });
      expect(refused).toMatchObject({ code: 3, stdout: '' });
      expect(refused.stderr).toContain('holds a database already');
      const broken = await runCommand(['muslin', 'restore', '--over', await damaged('database.dump')], { env });
      expect(broken).toMatchObject({ code: 1, stdout: '' });
      expect(broken.stderr).toContain('database.dump');
      const twice = await runCommand(['muslin', 'backup', again], { env });
      expect(twice.stderr).toContain('is there already');
    } finally {
      await rm(clusterFolder(home, databaseServerUser()), { recursive: true, force: true });
    }
  }, 120_000);

  it.each([
    ['no file', []],
    ['two files', ['a', 'b']],
    ['an unknown option', ['a', '--fast']],
  ])('are told before anything is opened: %s', async (_what, args) => {
    const context = { args, callerDir: folder, rootDir: folder, signal: quiet.signal };
    await expect(backupCommand(context)).rejects.toThrow(WrongUse);
    await expect(restoreCommand(context)).rejects.toThrow(WrongUse);
  });
});
