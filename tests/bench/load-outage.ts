/**
 * PostgreSQL crashes under load and comes back: `npx tsx tests/bench/load-outage.ts [seconds]`, 20 unless given. Forty people read the map
 * and ten enter sites, without rest. Meanwhile every answer is to be 503 with Retry-After; afterwards all is as before, without a restart of
 * the server; and every site whose entry was answered with success is in the database.
 */
import { type ChildProcess, fork } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { clusterStatus, SUPERUSER, startCluster, stopCluster } from '../../server/cli/cluster.ts';
import { signInAll } from './load-sign-in.ts';
import { makeTeamUnderLoad } from './load-team.ts';
import { withTeamIn } from './station-year-cluster.ts';

const READERS = 40;
const WRITERS = 10;
const CALM_MS = 5_000;
/** The tries of the server and of its pool take this long to notice that the database is there again. */
const RECOVERY_MS = 15_000;
const [secondsText = '20'] = process.argv.slice(2);
const downMs = Number(secondsText) * 1000;

type Phase = 'before' | 'away' | 'recovering' | 'after';
let phase: Phase = 'before';
const counts: Record<Phase, Map<string, number>> = {
  before: new Map(),
  away: new Map(),
  recovering: new Map(),
  after: new Map(),
};
const stored: string[] = [];
let longestMs = 0;
let stopping = false;

const homeDir = mkdtempSync(path.join(os.tmpdir(), 'muslin-outage-'));
const superuser = { name: SUPERUSER, password: 'a password of the outage alone' };
const options = { homeDir, superuserPassword: superuser.password };
const { port, folder } = await startCluster(options);
try {
  const server = {
    port,
    superuser,
    ownerPassword: 'the password of the owner',
    appPassword: 'the password of the app',
  };
  await withTeamIn(server, homeDir, async (team) => {
    const size = { stations: 26, sites: 200, people: READERS + WRITERS };
    const made = await makeTeamUnderLoad(team, size);
    // Connections of ours would meet the crash as well.
    await team.db.destroy();
    const child = fork(path.join(import.meta.dirname, 'load-server.ts'), [team.databaseUrl, homeDir], {
      execArgv: ['--import', 'tsx'],
    });
    try {
      await crashUnder(child, made);
    } finally {
      child.disconnect();
      await once(child, 'exit');
    }
    const { rows } = await team.ownerDb.raw<{ rows: { name: string }[] }>(
      'select name from sites where name = any(?)',
      [stored],
    );
    report(new Set(rows.map(({ name }) => name)));
  });
} finally {
  await stopCluster(homeDir);
  rmSync(folder, { recursive: true, force: true });
  rmSync(homeDir, { recursive: true, force: true });
}

async function crashUnder(child: ChildProcess, team: Awaited<ReturnType<typeof makeTeamUnderLoad>>): Promise<void> {
  const [ports]: { product: number }[] = await once(child, 'message', { signal: gone(child) });
  const product = `http://127.0.0.1:${ports?.product ?? 0}`;
  const cookies = await signInAll(product, team.emails);
  const programme = `${product}/api/teams/${team.teamId}/programmes/${team.programmeId}`;
  const everybody = cookies.map((cookie, index) =>
    index < READERS ? reader(`${programme}/map`, cookie) : writer(`${programme}/sites`, { cookie, index }),
  );
  await sleep(CALM_MS);
  process.kill(Number(readFileSync(path.join(folder, 'data', 'postmaster.pid'), 'utf8').split('\n')[0]), 'SIGQUIT');
  while (clusterStatus(homeDir).state === 'running') await sleep(20);
  phase = 'away';
  await sleep(downMs);
  phase = 'recovering';
  await startCluster(options);
  await sleep(RECOVERY_MS);
  phase = 'after';
  await sleep(CALM_MS);
  stopping = true;
  await Promise.all(everybody);
}

async function reader(url: string, cookie: string): Promise<void> {
  while (!stopping) await ask(url, { headers: { cookie } });
}

async function writer(url: string, { cookie, index }: { cookie: string; index: number }): Promise<void> {
  const headers = { cookie, 'content-type': 'application/json', 'sec-fetch-site': 'same-origin' };
  for (let nth = 1; !stopping; nth++) {
    const name = `Entered ${index} ${nth}`;
    const body = JSON.stringify({ name, latitude: -25, longitude: 25 });
    if ((await ask(url, { method: 'POST', headers, body })) === 200) stored.push(name);
  }
}

async function ask(url: string, init: RequestInit): Promise<number> {
  const asked = performance.now();
  const begun = phase;
  const answer = await fetch(url, init);
  await answer.arrayBuffer();
  longestMs = Math.max(longestMs, performance.now() - asked);
  const told = answer.status === 503 && answer.headers.has('retry-after') ? '503 with Retry-After' : `${answer.status}`;
  // An answer that crosses into another phase says nothing of either.
  if (begun === phase) counts[phase].set(told, (counts[phase].get(told) ?? 0) + 1);
  // Whoever is told to come back later does, though much sooner than told.
  if (answer.status === 503) await sleep(100);
  return answer.status;
}

function report(found: ReadonlySet<string>): void {
  for (const [name, answers] of Object.entries(counts))
    print(`${name}: ${[...answers].map(([told, count]) => `${count} x ${told}`).join(', ') || 'no answers'}`);
  const lost = stored.filter((name) => !found.has(name));
  print(
    `${stored.length} sites were answered as entered, ${lost.length} of them are not there; longest answer ${longestMs.toFixed(0)} ms`,
  );
  const only = (answers: ReadonlyMap<string, number>, told: string) => answers.size === 1 && answers.has(told);
  const well = only(counts.away, '503 with Retry-After') && only(counts.after, '200') && lost.length === 0;
  if (!well) process.exitCode = 1;
  print(well ? 'as it should be' : 'NOT as it should be');
}

/** Aborts when the server has died, which would never say anything. */
function gone(child: ChildProcess): AbortSignal {
  const stop = new AbortController();
  child.once('exit', () => stop.abort());
  return stop.signal;
}

function print(line: string): void {
  process.stdout.write(`${line}\n`);
}
