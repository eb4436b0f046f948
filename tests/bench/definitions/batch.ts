/**
 * `batch`: 500 EPW files from the store of originals to findings and weather years in PostgreSQL, by two worker processes, against the
 * plain loop that parses each with papaparse and asks PsychroLib for its wet bulbs, one after another, and stores nothing. By the
 * clock, since two processes and the database share the work; processor time of the workers and of the database stands beside it. The
 * workers' start is left out.
 */
import { readFileSync } from 'node:fs';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { receiveFromDisk } from '../../../server/builders/weather-file-steps.ts';
import { workerEnvironment } from '../../../server/cli/worker-settings.ts';
import { createFolderStore } from '../../../server/storage/folder-store.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { startCommand } from '../../support/run-command.ts';
import type { Bench, BenchFinding } from '../bench.ts';
import { familyMs, parentOf } from '../process-time.ts';
import { processorMs } from '../side-by-side.ts';
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
  /** By the clock. */
  readonly msPerFile: number;
  /** Processor time of both workers and of the database. */
  readonly workersMs: number;
  readonly databaseMs: number;
  /** Memory of the larger worker, MB, at a quarter of the files and at the end. */
  readonly memoryMB: readonly [number, number];
  readonly left: number;
}

async function readByWorkers(team: EmptyTeam, originalsDir: string): Promise<Batch> {
  const env = workerEnvironment({ databaseUrl: team.databaseUrl, originalsDir });
  const workers = Array.from({ length: WORKERS }, () => startCommand(['worker'], { env }));
  const memory = () => Math.max(...workers.map(({ child }) => residentMB(child.pid)));
  const server = await databasePid(team);
  const times = () => ({
    at: performance.now(),
    workersMs: workers.reduce((sum, { child }) => sum + familyMs(child.pid ?? 0), 0),
    databaseMs: familyMs(server),
  });
  try {
    let began: (ReturnType<typeof times> & { left: number }) | null = null;
    let early = 0;
    let left = FILES;
    const until = performance.now() + MOST_MINUTES * 60_000;
    while (left > 0 && performance.now() < until) {
      await sleep(LOOK_EVERY_MS);
      left = await unread(team);
      // Both have begun, and their code is compiled, when a tenth is done.
      if (began === null && left <= 0.9 * FILES) began = { ...times(), left };
      if (early === 0 && left <= 0.75 * FILES) early = memory();
    }
    if (began === null) throw new Error('the workers read nothing');
    const ended = times();
    const read = began.left - left;
    return {
      msPerFile: (ended.at - began.at) / read,
      workersMs: (ended.workersMs - began.workersMs) / read,
      databaseMs: (ended.databaseMs - began.databaseMs) / read,
      memoryMB: [early, memory()],
      left,
    };
  } finally {
    for (const { child, ended } of workers) {
      child.kill('SIGTERM');
      await ended;
    }
  }
}

/** The server that all connections belong to. */
async function databasePid({ db }: EmptyTeam): Promise<number> {
  const { rows } = await db.raw<{ rows: [{ pid: number }] }>('select pg_backend_pid() as pid');
  return parentOf(rows[0].pid);
}

/** By processor time, and by the clock. */
function plainMsPerFile(): { ms: number; clockMs: number } {
  const files = Array.from({ length: DISTINCT }, (_none, nth) => Buffer.from(contentOf(nth)));
  let ms = Number.POSITIVE_INFINITY;
  let clockMs = Number.POSITIVE_INFINITY;
  for (let round = 0; round < 3; round++) {
    const began = performance.now();
    const spent = processorMs(() => {
      for (let nth = 0; nth < PLAIN_FILES; nth++) plainMeanC(files[nth % DISTINCT] ?? Buffer.alloc(0));
    });
    ms = Math.min(ms, spent / PLAIN_FILES);
    clockMs = Math.min(clockMs, (performance.now() - began) / PLAIN_FILES);
  }
  return { ms, clockMs };
}

export const batchBench: Bench = {
  name: 'batch',
  about: `${FILES} EPW files into PostgreSQL by ${WORKERS} workers, papaparse + PsychroLib one after another / ours`,
  gate: 12,
  compare: 'at least',
  run: (): Promise<BenchFinding> =>
    withEmptyTeam(async (team) => {
      const originalsDir = await receiveAll(team);
      const plain = plainMsPerFile();
      const { msPerFile, workersMs, databaseMs, memoryMB, left } = await readByWorkers(team, originalsDir);
      const [early, late] = memoryMB;
      const spent = `${workersMs.toFixed(1)} ms/file in the workers + ${databaseMs.toFixed(1)} in the database, on ${WORKERS} cores`;
      const byProcessor = `${plain.ms.toFixed(1)} against ${spent}: ${(plain.ms / ((workersMs + databaseMs) / WORKERS)).toFixed(1)}`;
      return {
        ratio: plain.clockMs / msPerFile,
        plain: `${plain.clockMs.toFixed(1)} ms/file`,
        ours: `${msPerFile.toFixed(1)} ms/file; by processor time ${byProcessor}; worker ${early.toFixed(0)} then ${late.toFixed(0)} MB`,
        fault: left > 0 ? `${left} files were not read` : null,
      };
    }),
};
