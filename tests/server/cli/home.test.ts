import { chmodSync, mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { homePath, openHome } from '../../../server/cli/home.ts';
import { takeHome } from '../../../server/cli/home-lock.ts';

let dir: string;
beforeEach(() => {
  dir = mkdtempSync(path.join(os.tmpdir(), 'muslin-home-'));
});
afterEach(() => rmSync(dir, { recursive: true, force: true }));

describe('a home', () => {
  it('keeps its secrets to its owner, the same at every start and others in every home', () => {
    const first = openHome(path.join(dir, 'a'));
    expect(statSync(path.join(first.dir, 'secrets.json')).mode & 0o777).toBe(0o600);
    expect(statSync(first.originalsDir).mode & 0o777).toBe(0o700);
    expect(openHome(first.dir).secrets).toEqual(first.secrets);
    const other = openHome(path.join(dir, 'b')).secrets;
    const all = [first.secrets, other].flatMap(({ sessionSecrets, superuserPassword, ownerPassword, appPassword }) => [
      ...sessionSecrets,
      superuserPassword,
      ownerPassword,
      appPassword,
    ]);
    expect(new Set(all).size).toBe(8);
    // 32 random bytes in base64url are 43 letters (RFC 4648, section 5)
    expect(all.map((secret) => secret.length)).toEqual(Array(8).fill(43));
  });

  it('is refused when others can read its secrets, or when they are damaged', () => {
    const secretsFile = path.join(openHome(dir).dir, 'secrets.json');
    chmodSync(secretsFile, 0o644);
    expect(() => openHome(dir)).toThrow(`chmod 600 ${secretsFile}`);
    chmodSync(secretsFile, 0o600);
    writeFileSync(secretsFile, '{"superuserPassword":"x"}');
    expect(() => openHome(dir)).toThrow('cannot be read');
  });

  it('is refused when it has a database and no secrets: new ones would not open it', () => {
    const { dir: homeDir } = openHome(dir);
    writeFileSync(path.join(homeDir, 'pg-port'), '5432\n');
    rmSync(path.join(homeDir, 'secrets.json'));
    expect(() => openHome(dir)).toThrow('secrets.json is missing');
  });

  it('is refused where a file stands in its place', () => {
    const file = path.join(dir, 'file');
    writeFileSync(file, '');
    expect(() => openHome(file)).toThrow(`MUSLIN_HOME ${file} cannot be used`);
  });

  it('is .muslin in the repository, or the folder named, counted from where the caller stands', () => {
    expect(homePath({ rootDir: '/r', callerDir: '/c', named: '' })).toBe('/r/.muslin');
    expect(homePath({ rootDir: '/r', callerDir: '/c', named: 'h' })).toBe('/c/h');
    expect(homePath({ rootDir: '/r', callerDir: '/c', named: '/h' })).toBe('/h');
  });
});

describe('the lock of a home', () => {
  it('says where the first one runs, and is free again when that one has given it back', () => {
    const lockFile = path.join(dir, 'running.json');
    const lock = takeHome({ dir, lockFile, address: 'starting' });
    expect(() => takeHome({ dir, lockFile, address: 'http://127.0.0.1:1' })).toThrow('starting');
    lock.nameAddress('http://127.0.0.1:4321');
    expect(() => takeHome({ dir, lockFile, address: 'http://127.0.0.1:1' })).toThrow('http://127.0.0.1:4321');
    lock.giveBack();
    takeHome({ dir, lockFile, address: 'http://127.0.0.1:1' }).giveBack();
    expect(readdirSync(dir)).toEqual([]);
  });

  it('is taken over from a process that is gone, also when its number belongs to another one now', () => {
    const lockFile = path.join(dir, 'running.json');
    for (const holder of [
      { pid: process.pid, began: '1', address: 'before' },
      { pid: 2 ** 22 + 1, began: '1', address: 'above the highest process number of Linux' },
    ]) {
      writeFileSync(lockFile, JSON.stringify(holder));
      const lock = takeHome({ dir, lockFile, address: 'now' });
      expect(readFileSync(lockFile, 'utf8')).toContain('"now"');
      lock.giveBack();
    }
  });

  it('is taken over when what stands there is no lock at all', () => {
    const lockFile = path.join(dir, 'running.json');
    writeFileSync(lockFile, '{"pid":');
    takeHome({ dir, lockFile, address: 'now' }).giveBack();
  });
});
