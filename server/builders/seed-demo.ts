import { mkdtemp, rm } from 'node:fs/promises';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { METHOD_VERSION } from '#engine/conventions.ts';

import { inTransaction } from '../db/in-transaction.ts';
import { recordAuditEvent } from '../db/record-audit-event.ts';
import type { Deps } from '../deps.ts';
import { findProgrammeBrief } from '../features/briefs/brief-read-model.ts';
import { queueSiteRuns } from '../features/runs/queue-site-runs.ts';
import { listStationYears } from '../features/runs/station-years-read-model.ts';
import { makeSite } from '../features/sites/make-site.ts';
import { findWeatherFile, type WeatherFileState } from '../features/weather/weather-file-store.ts';
import { shippedRelief } from '../tiles/relief.ts';
import { buildTeam } from './build-team.ts';
import { newDemoAccounts, writeDemoAccounts } from './demo-accounts.ts';
import { DEMO_SEEDED, findStandingDemo, lookAtDemoSites, type StandingDemo } from './demo-read-model.ts';
import { demoSites } from './demo-sites.ts';
import { acceptAs, type OwnFile, openLicenceAs, receiveFromDisk } from './weather-file-steps.ts';
import { writtenDemoFiles } from './written-demo-files.ts';

export const DEMO_TEAM = 'Veldway Schools';
const DEMO_PROGRAMME = 'School cooling';
const DEMO_BRIEF = { name: 'School offices and staff rooms', preset: 'office' };

const LOOK_EVERY_MS = 100;
/** Without any progress for this long the seed gives up; the next start goes on where it stopped. */
const PATIENCE_MS = 120_000;

export interface SeedDemo {
  readonly deps: Pick<Deps, 'db' | 'storage' | 'uploadsDir' | 'now'>;
  /** Where the sign-ins are written, readable by the owner alone. */
  readonly demoAccountsPath: string;
  /** Told in plain words how far it is. */
  readonly log: (words: string) => void;
  readonly signal?: AbortSignal;
}

/**
 * Makes the demo: a team with invented places, one account for each role, a programme with its brief, 26 invented weather
 * files that go the same road as any upload, and a dozen invented sites. A worker must be running. Done once; one that was interrupted goes on where it
 * was, and a later start adds nothing.
 * @throws Error when a file ends otherwise than accepted, or nothing moves for two minutes
 */
export async function seedDemo(seed: SeedDemo): Promise<void> {
  const { db, uploadsDir } = seed.deps;
  const demo = (await findStandingDemo(db, DEMO_TEAM)) ?? (await makeDemoTeam(seed));
  if (demo.seeded) return;
  const folder = await mkdtemp(path.join(uploadsDir, 'demo-'));
  try {
    seed.log('Demo: inventing the weather of a year at 26 stations');
    await ingest(seed, { demo, folder });
    await enterSites(seed, demo);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
  await inTransaction(db, (transaction) =>
    recordAuditEvent(transaction, {
      teamId: demo.teamId,
      personId: null,
      act: DEMO_SEEDED,
      subject: {},
      requestId: null,
    }),
  );
}

/** The accounts file is complete before the accounts are, so that no account is ever made whose password is lost. */
async function makeDemoTeam({ deps, demoAccountsPath }: SeedDemo): Promise<StandingDemo> {
  const people = newDemoAccounts();
  await writeDemoAccounts(demoAccountsPath, people);
  const team = await inTransaction(deps.db, (transaction) =>
    buildTeam(transaction, {
      name: DEMO_TEAM,
      invented: true,
      programmeName: DEMO_PROGRAMME,
      brief: DEMO_BRIEF,
      people,
    }),
  );
  const { teamId, programmeId, personIds } = team;
  return { teamId, programmeId, engineerId: personIds.engineer, plannerId: personIds.planner, seeded: false };
}

/** Receives each file as it is written; meanwhile accepts those that have been read; ends when every run is there. */
async function ingest(seed: SeedDemo, { demo, folder }: { demo: StandingDemo; folder: string }): Promise<void> {
  const { deps, signal } = seed;
  const whose = { teamId: demo.teamId, personId: demo.engineerId };
  const progress = makeProgress(seed.log);
  const receiving = startReceiving(deps, { ...whose, folder });
  try {
    let accepted = 0;
    for (;;) {
      signal?.throwIfAborted();
      for (const fileId of [...receiving.waiting]) {
        const file = await findWeatherFile(deps.db, { teamId: demo.teamId, fileId });
        if (!isAcceptable(file)) continue;
        if (file.status === 'review') {
          await openLicenceAs(deps, { ...whose, fileId });
          await acceptAs(deps, { ...whose, fileId });
        }
        receiving.waiting.delete(fileId);
        accepted += 1;
      }
      const judged = await judgedYears(deps, demo);
      progress.look({ accepted, judged: judged.done });
      if (receiving.isDone() && receiving.waiting.size === 0 && judged.left === 0) return;
      await sleep(LOOK_EVERY_MS);
    }
  } finally {
    await receiving.stop();
  }
}

/** Enters the sites that are not there yet, as a planner would, and waits until their weather is judged. */
async function enterSites({ deps: { db, now }, log, signal }: SeedDemo, demo: StandingDemo): Promise<void> {
  const { teamId, programmeId, plannerId } = demo;
  const { names } = await lookAtDemoSites(db, demo);
  const relief = shippedRelief();
  for (const site of demoSites.filter(({ name }) => !names.includes(name))) {
    const act = { teamId, programmeId, personId: plannerId, requestId: null, at: now() };
    await makeSite({ db, relief, queueSiteRuns }, { ...act, ...site });
  }
  log(`Demo: ${demoSites.length} sites entered`);
  const until = performance.now() + PATIENCE_MS;
  while ((await lookAtDemoSites(db, demo)).jobs > 0) {
    signal?.throwIfAborted();
    if (performance.now() > until) throw new Error('the demo’s sites were not judged within two minutes');
    await sleep(LOOK_EVERY_MS);
  }
}

/** Receives files while they are being written; those that came in wait in `waiting` to be accepted. */
function startReceiving(deps: SeedDemo['deps'], from: OwnFile & { readonly folder: string }) {
  const waiting = new Set<string>();
  let fault: unknown = null;
  let state: 'going' | 'stopping' | 'done' = 'going';
  const receive = async (): Promise<void> => {
    for await (const file of writtenDemoFiles(from.folder)) {
      if (state === 'stopping') return;
      waiting.add(await receiveFromDisk(deps, { ...from, file }));
    }
    state = 'done';
  };
  const ended = receive().catch((error: unknown) => {
    fault = error;
  });
  return {
    waiting,
    isDone(): boolean {
      if (fault !== null) throw fault;
      return state === 'done';
    },
    async stop(): Promise<void> {
      if (state === 'going') state = 'stopping';
      await ended;
    },
  };
}

/** @returns true when it can be accepted or is already @throws Error when it never will be */
function isAcceptable(file: WeatherFileState | null): file is WeatherFileState {
  if (file === null) throw new Error('a weather file of the demo is gone');
  if (file.failure !== null) throw new Error(`${file.name} could not be read: ${file.failure}`);
  if (file.status === 'reading') return false;
  if (file.status === 'review' || file.status === 'accepted') return true;
  throw new Error(`${file.name} of the demo ended as "${file.status}"`);
}

async function judgedYears(
  { db }: Pick<Deps, 'db'>,
  { teamId, programmeId }: StandingDemo,
): Promise<{ done: number; left: number }> {
  const brief = await findProgrammeBrief(db, { teamId, programmeId });
  if (brief === null) throw new Error('the programme of the demo has no brief');
  const years = await listStationYears(db, {
    teamId,
    briefVersionId: brief.briefVersionId,
    methodVersion: METHOD_VERSION,
  });
  const failed = years.find(({ failure }) => failure !== null);
  if (failed !== undefined) throw new Error(`${failed.stationName} could not be judged: ${failed.failure}`);
  const done = years.filter(({ run }) => run !== null).length;
  return { done, left: years.length - done };
}

/** Says how far it is every ten files, and gives up when nothing moves. */
function makeProgress(log: (words: string) => void) {
  let last = '';
  let movedAt = performance.now();
  let saidTens = 0;
  return {
    look({ accepted, judged }: { accepted: number; judged: number }): void {
      const now = `${accepted} ${judged}`;
      if (now !== last) movedAt = performance.now();
      last = now;
      if (performance.now() - movedAt > PATIENCE_MS) {
        throw new Error('the demo made no progress for two minutes; is the job worker running?');
      }
      const tens = Math.floor(judged / 10);
      if (tens > saidTens) log(`Demo: ${accepted} weather files accepted, ${judged} judged`);
      saidTens = tens;
    },
  };
}
