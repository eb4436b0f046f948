/** Workers that are killed at any moment of a batch: what they had begun is done again, and nothing is doubled or half stored. */
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { seededRandom } from '../../../data/demo/seeded-random.ts';
import { workerEnvironment } from '../../../server/cli/worker-settings.ts';
import { releaseSilentPools } from '../../../server/jobs/worker-pool-store.ts';
import type { WeatherBatch } from '../../../src/contract/weather-batches.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { jobsDueNow } from '../../support/jobs-due-now.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { startCommand } from '../../support/run-command.ts';
import { samples } from '../../support/sample-size.ts';
import { zipBytes } from '../../support/zip-bytes.ts';

const FILES = samples(6, 200);
const KILLS = samples(3, 50);
/**
 * A worker lives this long at most, or as long as it took to start: on a busy machine less would not do for one job. It dies sooner
 * when it has read its share of the files, so that the batch is not over long before the last kill.
 */
const LONGEST_LIFE_MS = 1500;
const LOOK_EVERY_MS = 10;
/** A soak's seed gives the workers the same lives again, as far as the machine goes along. */
const lives = seededRandom(process.env.SOAK_SEED ?? String(Date.now()));
const FOR_ALL_MS = 60_000 + KILLS * 20_000 + FILES * 1000;

let road: Road;
let team: RoadTeam;
let engineer: Member;
beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
});
afterAll(() => road.close());

const { station, text: epw } = demoEpw(0);
/** So much lower, the pressures do not fit. */
const TOO_LOW_M = 600;
/** Files that each read another way: to review, with a question, refused. */
function contentOf(nth: number): string {
  const own = epw.replace('COMMENTS 1,', `COMMENTS 1,Copy ${nth}. `);
  if (nth % 3 === 1) return own.replace(/(\r\n\d{4},\d+,\d+,\d+,\d+,[^,]*),[^,]*/, '$1,warm');
  const elevationM = nth % 3 === 2 ? station.elevationM - TOO_LOW_M : station.elevationM;
  return own.replace(`,${station.elevationM.toFixed(1)}\r\n`, `,${elevationM.toFixed(1)}\r\n`);
}

/** Starts a worker process and kills it a random while after its first look for work. @returns files that were not read by then */
async function killOne(killsLeft: number): Promise<number> {
  const settings = { databaseUrl: road.database.databaseUrl, originalsDir: road.originalsDir };
  const began = performance.now();
  const { child, ended } = startCommand(['worker'], { env: workerEnvironment(settings) });
  await eventually('the worker’s first look', async () => (await poolsNow()) > 0, 30_000);
  const until = performance.now() + lives.uniform() * Math.max(LONGEST_LIFE_MS, performance.now() - began);
  const unread = await filesUnread();
  const share = Math.ceil(unread / killsLeft);
  while (performance.now() < until && (await filesUnread()) > unread - share) {
    await sleep(Math.min(LOOK_EVERY_MS, Math.max(0, until - performance.now())));
  }
  child.kill('SIGKILL');
  await ended;
  await releaseSilentPools(road.db, 0);
  return await filesUnread();
}

/** Those of the batch that no worker has ended, in the archive or out of it. */
async function filesUnread(): Promise<number> {
  const { rows } = await road.db.raw<{ rows: [{ number: number }] }>(
    `select count(*)::integer as number from weather_files where status <> 'reading'`,
  );
  return FILES - rows[0].number;
}

async function poolsNow(): Promise<number> {
  const { rows } = await road.db.raw<{ rows: [{ number: number }] }>(
    'select count(*)::integer as number from worker_pools',
  );
  return rows[0].number;
}

it(
  `leave every one of ${FILES} files read exactly once after ${KILLS} kills`,
  async () => {
    const base = `/api/teams/${team.teamId}/weather-batches`;
    const batch: WeatherBatch = (await engineer.agent.post(base).send({ name: 'Killed' }).expect(200)).body;
    const names = Array.from({ length: FILES }, (_none, nth) => `file-${nth}.epw`);
    const zip = await zipBytes(Object.fromEntries(names.map((name, nth) => [name, contentOf(nth)])));
    await engineer.agent.post(`${base}/${batch.id}/archives`).attach('file', zip, 'many.zip').expect(200);

    let killsAtWork = 0;
    for (let kill = 0; kill < KILLS; kill++) {
      if ((await killOne(KILLS - kill)) > 0) killsAtWork++;
      await jobsDueNow(road.database);
    }
    // Half of them at least had something to break off.
    expect(killsAtWork).toBeGreaterThanOrEqual(Math.floor(KILLS / 2));
    await road.startWorker();
    const done = await eventually(
      'the end of the batch',
      async () => {
        await jobsDueNow(road.database);
        await releaseSilentPools(road.db, 60_000);
        const now: WeatherBatch = (await engineer.agent.get(`${base}/${batch.id}`).expect(200)).body;
        return now.ended && now;
      },
      FOR_ALL_MS,
    );
    expect(done).toMatchObject({ stopped: 0, archives: [{ status: 'opened', membersOpened: FILES, leftOut: [] }] });
    const { rows } = await road.db.raw<{
      rows: { name: string; status: string; years: number; findings: number; places: number }[];
    }>(
      `select weather_files.name, weather_files.status,
         (select count(*) from weather_years where weather_years.weather_file_id = weather_files.id)::integer as years,
         (select count(*) from findings where findings.weather_file_id = weather_files.id)::integer as findings,
         (select count(distinct findings.position) from findings
          where findings.weather_file_id = weather_files.id)::integer as places
       from weather_files order by weather_files.name`,
    );
    expect(rows.map(({ name }) => name)).toEqual(names.toSorted());
    for (const row of rows) {
      const nth = Number(/\d+/.exec(row.name)?.[0]);
      expect(row).toMatchObject({
        status: ['review', 'refused', 'asks'][nth % 3],
        years: nth % 3 === 1 ? 0 : 1,
        findings: row.places,
      });
    }
  },
  FOR_ALL_MS + 120_000,
);
