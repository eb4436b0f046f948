/**
 * `batch`: 500 EPW files from the store of originals to findings and weather years in PostgreSQL, by two worker processes, against the
 * plain loop that parses each with papaparse and asks PsychroLib for its wet bulbs, one after another, and stores nothing. By the
 * clock, since two processes and the database share the work; the workers' start is left out.
 */
import { readFileSync } from 'node:fs';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { availableParallelism, tmpdir } from 'node:os';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { receiveFromDisk } from '../../../server/builders/weather-file-steps.ts';
import { workerEnvironment } from '../../../server/cli/worker-settings.ts';
import { createFolderStore } from '../../../server/storage/folder-store.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { startCommand } from '../../support/run-command.ts';
import type { Bench, BenchFinding } from '../bench.ts';
import { type EmptyTeam, withEmptyTeam } from '../station-year-cluster.ts';
import { plainMeanC } from './ingest.ts';

const FILES = 500;
const WORKERS = 2;
const DISTINCT = 6;
const PLAIN_FILES = 4;
const LOOK_EVERY_MS = 50;
const MOST_MINUTES = 10;

/** Files whose bytes differ, as their comment does. */
function contentOf(nth: number): string {
  return demoEpw(nth % DISTINCT).text.replace('COMMENTS 1,', `COMMENTS 1,Copy ${nth}. `);
}

async function receiveAll({ db, home, teamId, personId }: EmptyTeam): Promise<string> {
  const originalsDir = path.join(home, 'originals');
  const storage = createFolderStore(originalsDir);
  const folder = await mkdtemp(path.join(tmpdir(), 'muslin-batch-'));
  for (let nth = 0; nth < FILES; nth++) {
    const file = path.join(folder, `file-${nth}.epw`);
    await writeFile(file, contentOf(nth));
    await receiveFromDisk({ db, storage, now: () => new Date() }, { teamId, personId, file });
  }
  await rm(folder, { recursive: true, force: true });
  return originalsDir;
}

async function unread({ db, teamId }: EmptyTeam): Promise<number> {
  const { rows } = await db.raw<{ rows: [{ number: number }] }>(
    `select count(*)::integer as number from weather_files where team_id = ? and status = 'reading'`,
    [teamId],
  );
  return rows[0].number;
}

function residentMB(pid: number | undefined): number {
  const pages = Number(readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1]);
  return (pages * 4096) / 1e6;
}

interface Batch {
  readonly msPerFile: number;
  /** Memory of the larger worker, MB, at a quarter of the files and at the end. */
  readonly memoryMB: readonly [number, number];
  readonly left: number;
}

async function readByWorkers(team: EmptyTeam, originalsDir: string): Promise<Batch> {
  const env = workerEnvironment({ databaseUrl: team.databaseUrl, originalsDir });
  const workers = Array.from({ length: WORKERS }, () => startCommand(['worker'], { env }));
  const memory = () => Math.max(...workers.map(({ child }) => residentMB(child.pid)));
  try {
    let began: { at: number; left: number } | null = null;
    let early = 0;
    let left = FILES;
    const until = performance.now() + MOST_MINUTES * 60_000;
    while (left > 0 && performance.now() < until) {
      await sleep(LOOK_EVERY_MS);
      left = await unread(team);
      // Both have begun, and their code is compiled, when a tenth is done.
      if (began === null && left <= 0.9 * FILES) began = { at: performance.now(), left };
      if (early === 0 && left <= 0.75 * FILES) early = memory();
    }
    if (began === null) throw new Error('the workers read nothing');
    const msPerFile = (performance.now() - began.at) / (began.left - left);
    return { msPerFile, memoryMB: [early, memory()], left };
  } finally {
    for (const { child, ended } of workers) {
      child.kill('SIGTERM');
      await ended;
    }
  }
}

function plainMsPerFile(): number {
  const files = Array.from({ length: DISTINCT }, (_none, nth) => Buffer.from(contentOf(nth)));
  let best = Number.POSITIVE_INFINITY;
  for (let round = 0; round < 3; round++) {
    const began = performance.now();
    for (let nth = 0; nth < PLAIN_FILES; nth++) plainMeanC(files[nth % DISTINCT] ?? Buffer.alloc(0));
    best = Math.min(best, (performance.now() - began) / PLAIN_FILES);
  }
  return best;
}

export const batchBench: Bench = {
  name: 'batch',
  about: `${FILES} EPW files into PostgreSQL by ${WORKERS} workers, papaparse + PsychroLib one after another / ours`,
  gate: 12,
  compare: 'at least',
  run: (): Promise<BenchFinding> =>
    withEmptyTeam(async (team) => {
      const originalsDir = await receiveAll(team);
      const plainMs = plainMsPerFile();
      const { msPerFile, memoryMB, left } = await readByWorkers(team, originalsDir);
      const [early, late] = memoryMB;
      return {
        ratio: plainMs / msPerFile,
        plain: `${plainMs.toFixed(1)} ms/file`,
        ours: `${msPerFile.toFixed(1)} ms/file on ${availableParallelism()} cores, worker ${early.toFixed(0)} then ${late.toFixed(0)} MB`,
        fault: left > 0 ? `${left} files were not read` : null,
      };
    }),
};
