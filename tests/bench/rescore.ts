/**
 * Re-scoring of many station-years with the round trip over HTTP, as a browser sees it: `npx tsx tests/bench/rescore.ts [STATIONS [PRESET…]]`.
 * A cluster, a web server and threads of its own; clones of ten invented typical years. Times on standard error, one JSON line
 * on standard output. Nothing is asserted: what a busy machine takes proves nothing.
 */
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { availableParallelism, tmpdir } from 'node:os';
import path from 'node:path';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import knexPkg from 'knex';
import { readingKnowledge } from '../../server/builders/reading-knowledge.ts';
import { acceptAs, receiveFromDisk } from '../../server/builders/weather-file-steps.ts';
import { connect } from '../../server/db/connection.ts';
import { inTransaction } from '../../server/db/in-transaction.ts';
import { APP_LOGIN, databaseUrl, OWNER_LOGIN, prepareDatabase } from '../../server/db/prepare-database.ts';
import type { Deps } from '../../server/deps.ts';
import { makePerson } from '../../server/features/accounts/make-person.ts';
import { presetBrief } from '../../server/features/briefs/presets.ts';
import { startBrief } from '../../server/features/briefs/start-brief.ts';
import { makeTeam } from '../../server/features/teams/make-team.ts';
import { readStoredFile } from '../../server/features/weather/read-stored-file.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import { startWeb } from '../../server/web.ts';
import { demoEpw } from '../support/demo-epw.ts';
import { keepLog } from '../support/quiet-log.ts';
import { cloneStationYears } from '../support/station-years.ts';
import { startThrowawayCluster } from '../support/throwaway-cluster.ts';

const ACCOUNT = { email: 'bench@example.org', password: 'a long pass phrase for tests' };
const DATABASE = 'rescore_bench';
const CLIMATES = 6;
const WARM_ROUNDS = 3;
const [, , stationsAsked = '3000', ...presetsAsked] = process.argv;
const PRESETS = presetsAsked.length > 0 ? presetsAsked : ['office'];
const stations = Number(stationsAsked);
const say = (words: string) => process.stderr.write(`${words}\n`);

const home = await mkdtemp(path.join(tmpdir(), 'muslin-bench-'));
const cluster = await startThrowawayCluster();
await prepareDatabase(cluster.server, DATABASE);
const { port, ownerPassword, appPassword } = cluster.server;
const urlOf = (name: string, password: string) => databaseUrl({ login: { name, password }, port, database: DATABASE });
const appUrl = urlOf(APP_LOGIN, appPassword);
const db = connect({ databaseUrl: appUrl });
const ownerDb = knexPkg.knex({ client: 'pg', connection: urlOf(OWNER_LOGIN, ownerPassword) });
const deps: Deps = {
  db,
  databaseUrl: appUrl,
  now: () => new Date(),
  storage: createFolderStore(path.join(home, 'originals')),
  uploadsDir: home,
  publicUrl: 'https://muslin.example',
  sendsMail: false,
  sessionSecrets: ['a session secret for a bench'],
  trustProxy: 'loopback',
  clientDir: null,
  basemapPath: path.resolve(import.meta.dirname, '../../data/basemap/basemap.pmtiles'),
  feed: { watch: async function* () {}, close: async () => undefined },
  log: keepLog(),
};
const web = await startWeb({
  config: { home: null, host: '127.0.0.1', port: 0, seed: 'none', trustProxy: 'loopback' },
  deps,
});
try {
  await measure();
} finally {
  await web.close();
  await db.destroy();
  await ownerDb.destroy();
  await cluster.stop();
  await rm(home, { recursive: true, force: true });
}

async function fill(): Promise<{ teamId: string; programmeId: string }> {
  const personId = await makePerson(db, { ...ACCOUNT, name: 'Bench' });
  const team = await inTransaction(db, (transaction) =>
    makeTeam({ transaction, startBrief }, { name: 'Bench', leadId: personId, invented: true, programmeName: 'Bench' }),
  );
  for (let nth = 0; nth < CLIMATES; nth++) {
    const { name, text } = demoEpw(nth);
    const file = path.join(home, name);
    await writeFile(file, text);
    const from = { teamId: team.teamId, personId };
    const fileId = await receiveFromDisk(deps, { ...from, file });
    await readStoredFile({ ...deps, ...readingKnowledge() }, { teamId: team.teamId, fileId });
    await acceptAs(deps, { ...from, fileId });
  }
  await cloneStationYears(ownerDb, { teamId: team.teamId, stations: stations - CLIMATES });
  await ownerDb.raw('analyze');
  return team;
}

async function measure(): Promise<void> {
  const { teamId, programmeId } = await fill();
  const headers = { 'Content-Type': 'application/json', 'Sec-Fetch-Site': 'same-origin' };
  const signedIn = await fetch(`${web.url}/api/session`, { method: 'POST', headers, body: JSON.stringify(ACCOUNT) });
  const cookie = signedIn.headers.get('set-cookie')?.split(';')[0] ?? '';
  const delay = monitorEventLoopDelay({ resolution: 5 });

  async function ask(body: object) {
    delay.reset();
    delay.enable();
    const begun = performance.now();
    const cpuBefore = process.cpuUsage();
    const response = await fetch(`${web.url}/api/teams/${teamId}/programmes/${programmeId}/rescore`, {
      method: 'POST',
      headers: { ...headers, Cookie: cookie },
      body: JSON.stringify({ body }),
    });
    const text = await response.text();
    const answer: { totalMs: number; loadMs: number; judged: unknown[] } = JSON.parse(text);
    const roundTripMs = performance.now() - begun;
    delay.disable();
    const cpu = process.cpuUsage(cpuBefore);
    const cpuMs = (cpu.user + cpu.system) / 1000;
    if (!response.ok) throw new Error(text.slice(0, 500));
    const { totalMs, loadMs, judged } = answer;
    return {
      roundTripMs,
      totalMs,
      loadMs,
      judged: judged.length,
      megabytes: text.length / 1e6,
      stillMs: delay.max / 1e6,
      cpuMs,
    };
  }

  const rounds: Record<string, unknown>[] = [];
  const tell = (what: string, round: Awaited<ReturnType<typeof ask>>) => {
    const { judged, roundTripMs, loadMs, totalMs, stillMs, megabytes, cpuMs } = round;
    const wireMs = roundTripMs - totalMs;
    say(
      `${what.padEnd(26)} ${judged} years: round trip ${roundTripMs.toFixed(0)} ms = weather ${loadMs.toFixed(0)} + judging ${(totalMs - loadMs).toFixed(0)} + wire ${wireMs.toFixed(0)}; ` +
        `${(((totalMs - loadMs) * 1000) / judged).toFixed(0)} us a year; CPU of all threads ${((cpuMs * 1000) / judged).toFixed(0)} us a year; web stood still ${stillMs.toFixed(0)} ms at most; ${megabytes.toFixed(1)} MB`,
    );
    rounds.push({ what, ...round });
  };
  tell('office, first', await ask(presetBrief('office')));
  for (const preset of PRESETS) {
    const brief = presetBrief(preset);
    // Each a draft of its own, as a slider makes them: what was asked a moment ago is not judged again.
    for (let round = 1; round <= WARM_ROUNDS; round++)
      tell(`${preset}, ${round}`, await ask({ ...brief, effDirect: brief.effDirect - round / 100 }));
  }
  process.stdout.write(`${JSON.stringify({ stations, threads: availableParallelism(), rounds })}\n`);
}
