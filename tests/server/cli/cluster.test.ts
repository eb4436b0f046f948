import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import pg from 'pg';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { clusterStatus, SUPERUSER, startCluster, stopCluster } from '../../../server/cli/cluster.ts';
import { databaseUrl } from '../../../server/db/prepare-database.ts';

const superuserPassword = randomBytes(18).toString('base64url');
let homeDir: string;
let folder: string;
let port: number;

beforeAll(async () => {
  homeDir = mkdtempSync(path.join(os.tmpdir(), 'muslin-cluster-'));
  ({ folder, port } = await startCluster({ homeDir, superuserPassword, throwaway: true }));
});
afterAll(async () => {
  await stopCluster(homeDir);
  rmSync(folder, { recursive: true, force: true });
  rmSync(homeDir, { recursive: true, force: true });
});

async function ask(statement: string, password = superuserPassword): Promise<unknown> {
  const login = { name: SUPERUSER, password };
  const client = new pg.Client({ connectionString: databaseUrl({ login, port, database: 'postgres' }) });
  await client.connect();
  try {
    const { rows } = await client.query({ text: statement, rowMode: 'array' });
    return rows[0]?.[0];
  } finally {
    await client.end();
  }
}

function serverPid(): number {
  return Number(readFileSync(path.join(folder, 'data', 'postmaster.pid'), 'utf8').split('\n')[0]);
}

it('listens on loopback alone, on the port that the home keeps, and keeps no password file', async () => {
  expect(await ask('show listen_addresses')).toBe('127.0.0.1');
  expect(await ask('show unix_socket_directories')).toBe('');
  expect(Number(readFileSync(path.join(homeDir, 'pg-port'), 'utf8'))).toBe(port);
  expect(clusterStatus(homeDir)).toEqual({ state: 'running', port });
  expect(existsSync(path.join(folder, 'password.once'))).toBe(false);
  expect(statSync(folder).mode & 0o077).toBe(0);
});

it('lets nobody in without the password', async () => {
  await expect(ask('select 1', 'a guess')).rejects.toMatchObject({
    code: '28P01', // invalid_password, PostgreSQL documentation, appendix A
  });
});

it('is left as it is by a second start', async () => {
  const before = serverPid();
  expect(await startCluster({ homeDir, superuserPassword })).toEqual({ port, folder, startedNow: false });
  expect(serverPid()).toBe(before);
});

it('stops, stops again without complaint, and starts again with what was stored', async () => {
  await ask('create table kept as select 42 as answer');
  await stopCluster(homeDir);
  await stopCluster(homeDir);
  expect(clusterStatus(homeDir)).toEqual({ state: 'stopped' });
  ({ port } = await startCluster({ homeDir, superuserPassword, throwaway: true }));
  expect(await ask('select answer from kept')).toBe(42);
});

describe.skipIf(process.getuid?.() !== 0)("a home that the server's user cannot reach", () => {
  let closed: string;
  let inner: string;
  let folders: string[];
  beforeEach(() => {
    closed = mkdtempSync(path.join(os.tmpdir(), 'muslin-closed-')); // mode 0700
    inner = path.join(closed, 'home');
    mkdirSync(inner);
    folders = [];
  });
  afterEach(async () => {
    await stopCluster(inner);
    folders.push(readFileSync(path.join(inner, 'cluster'), 'utf8').trim());
    for (const one of [...folders, closed]) rmSync(one, { recursive: true, force: true });
  });

  it('has its cluster outside, finds it again, and leaves it to no other home at the same path', async () => {
    const cluster = await startCluster({ homeDir: inner, superuserPassword, throwaway: true });
    folders.push(cluster.folder);
    expect(cluster.folder).toMatch(/^\/var\/lib\/muslin\/[0-9a-f]{16}-[0-9a-f]{8}$/);
    expect(statSync(cluster.folder).mode & 0o077).toBe(0);
    expect(clusterStatus(inner)).toEqual({ state: 'running', port: cluster.port });
    await stopCluster(inner);

    rmSync(inner, { recursive: true });
    mkdirSync(inner);
    expect(clusterStatus(inner)).toEqual({ state: 'stopped' });
    expect(readFileSync(path.join(inner, 'cluster'), 'utf8').trim()).not.toBe(cluster.folder);
  });

  it('is refused, not begun anew, when its cluster stands inside', () => {
    mkdirSync(path.join(inner, 'pg'));
    expect(() => clusterStatus(inner)).toThrow('can no longer be reached');
    rmSync(path.join(inner, 'pg'), { recursive: true });
  });
});

it('starts again after its server was killed', async () => {
  process.kill(serverPid(), 'SIGKILL');
  expect((await startCluster({ homeDir, superuserPassword, throwaway: true })).startedNow).toBe(true);
  port = Number(readFileSync(path.join(homeDir, 'pg-port'), 'utf8'));
  expect(await ask('select 1')).toBe(1);
});
