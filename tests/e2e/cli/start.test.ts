import { existsSync, mkdtempSync, readFileSync, rmSync, statSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { freePort } from '../../../server/cli/free-port.ts';
import { processesOf } from '../../../server/cli/left-running.ts';
import { eventually } from '../../support/eventually.ts';
import { type RunningCommand, repositoryDir, startCommand } from '../../support/run-command.ts';

const READY = 'Muslin is ready';
/** Longer than stopping takes: the web has 10 s for requests at hand, and there are none. */
const STOP_LIMIT_MS = 15_000;

/** One for all tests: whichever comes first makes its cluster, which takes longer than all else, and the others start on it. */
let home: string;
let port: number;
let started: RunningCommand[];

beforeAll(() => {
  home = mkdtempSync(path.join(os.tmpdir(), 'muslin-start-'));
});
afterAll(() => rmSync(home, { recursive: true, force: true }));
beforeEach(async () => {
  port = await freePort();
  started = [];
});
afterEach(async () => {
  for (const { child } of started) child.kill('SIGTERM');
  await nothingRuns();
});

function start(options: { through: 'npm' | 'node'; env?: Readonly<Record<string, string>> }): RunningCommand {
  const env = { MUSLIN_HOME: home, PORT: String(port), SEED: 'none', ...options.env };
  const npm = { program: 'npm', programArgs: [] };
  const command = startCommand(['start'], { env, cwd: repositoryDir, ...(options.through === 'npm' ? npm : {}) });
  started.push(command);
  return command;
}

/** Waits until no process carries the home in its command line or environment: program, worker, database server. */
async function nothingRuns(): Promise<void> {
  const until = Date.now() + STOP_LIMIT_MS;
  while (processesOf(home).length > 0 && Date.now() < until) await sleep(100);
  expect(processesOf(home)).toEqual([]);
}

describe('npm start', () => {
  it('gets ready, prints a set-up link, and leaves nothing running when npm is terminated', async () => {
    const first = start({ through: 'npm' });
    await first.until(READY);
    const health = await fetch(`http://127.0.0.1:${port}/api/health`);
    expect(health.status).toBe(200);
    expect(first.said()).toMatch(new RegExp(`http://127\\.0\\.0\\.1:${port}/set-up/[\\w-]{40,}`));
    expect(statSync(path.join(home, 'secrets.json')).mode & 0o777).toBe(0o600);
    // npm, run.mjs, its worker, and PostgreSQL with its own processes
    expect(processesOf(home).length).toBeGreaterThanOrEqual(4);

    first.child.kill('SIGTERM');
    await nothingRuns();
    expect(existsSync(path.join(home, 'running.json'))).toBe(false);
  });

  it('says where the first one runs when started again on the same home, and when the port is taken', async () => {
    const first = start({ through: 'node' });
    await first.until(READY);

    const second = await start({ through: 'node', env: { PORT: String(await freePort()) } }).ended;
    expect(second.code).toBe(3);
    expect(second.stderr).toContain(`http://127.0.0.1:${port}`);

    const otherHome = path.join(home, 'other');
    const third = await start({ through: 'node', env: { MUSLIN_HOME: otherHome } }).ended;
    expect(third.code).toBe(3);
    expect(third.stderr).toContain(`Port ${port}`);
    expect(existsSync(path.join(otherHome, 'pg'))).toBe(false);

    first.child.kill('SIGINT');
    first.child.kill('SIGINT');
    first.child.kill('SIGTERM');
    expect((await first.ended).code).toBe(0);
    await nothingRuns();
  });

  it('brings back its job worker and its database server when they are killed', async () => {
    const command = start({ through: 'node' });
    await command.until(READY);
    const workers = () => processesOf(home).filter((one) => one.command.endsWith('run.mjs worker'));
    const [first] = workers();
    const server = Number(readFileSync(path.join(home, 'pg/data/postmaster.pid'), 'utf8').split('\n')[0]);
    if (first === undefined) throw new Error('no worker runs');
    process.kill(first.pid, 'SIGKILL');
    process.kill(server, 'SIGKILL');
    await eventually('another worker', async () => workers().some(({ pid }) => pid !== first.pid));
    await eventually('health', async () => (await fetch(`http://127.0.0.1:${port}/api/health`)).ok, 30_000);
    command.child.kill('SIGTERM');
    expect((await command.ended).code).toBe(0);
  });

  it('starts again on what an earlier one left, even when everything was killed', async () => {
    const first = start({ through: 'node' });
    await first.until(READY);
    const lock: { pid: number } = JSON.parse(readFileSync(path.join(home, 'running.json'), 'utf8'));
    expect(lock.pid).toBe(first.child.pid);
    for (const { pid } of processesOf(home)) {
      try {
        process.kill(pid, 'SIGKILL');
      } catch {
        // it ended with another one
      }
    }
    await first.ended;

    const second = start({ through: 'node' });
    await second.until(READY);
    second.child.kill('SIGTERM');
    expect((await second.ended).code).toBe(0);
  });

  it('names everything that is wrong with its settings, and starts nothing', async () => {
    const newHome = path.join(home, 'new');
    const outcome = await start({ through: 'node', env: { MUSLIN_HOME: newHome, PORT: 'many', SEED: 'some' } }).ended;
    expect(outcome.code).toBe(3);
    expect(outcome.stderr).toContain('PORT="many"');
    expect(outcome.stderr).toContain('SEED="some"');
    expect(existsSync(newHome)).toBe(false);
  });
});
