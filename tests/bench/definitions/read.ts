/**
 * `read`: `muslin read` with forty EPW files in one call against the plain loop with the same files, each as a program of its own:
 * processor time of the whole process, its start included.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { epwBytes } from '../../support/epw-text.ts';
import { runProgram } from '../../support/run-command.ts';
import type { Bench } from '../bench.ts';

const FILES = 40;
const ROUNDS = 3;
const SAME_WITHIN_K = 0.01;
const plainProgram = path.resolve(import.meta.dirname, '../plain-read.mjs');

interface Outcome {
  readonly ms: number;
  readonly meanWetBulbC: number;
}

/** Runs a program of Node's and takes the shell's word for the processor time of all that it started. */
function runForTime(args: readonly string[], cwd: string): Outcome {
  const shell = ['-c', '"$@" || exit; times', 'sh', process.execPath, ...args];
  const said = execFileSync('/bin/sh', shell, {
    cwd,
    encoding: 'utf8',
    maxBuffer: 2 ** 26,
    stdio: ['ignore', 'pipe', 'ignore'],
  });
  const lines = said.trim().split('\n');
  // The last line is of what the shell started, the one before it of the shell: user and system, "0m1.23s".
  const ms = (lines.at(-1) ?? '')
    .split(/\s+/)
    .map((time) => /^(\d+)m([\d.]+)s$/.exec(time) ?? [])
    .reduce((sum, [, minutes, seconds]) => sum + 1000 * (60 * Number(minutes) + Number(seconds)), 0);
  const results: { meanWetBulbC: number }[] = lines.slice(0, -2).map((line) => JSON.parse(line));
  if (results.length !== FILES) throw new Error(`${results.length} results for ${FILES} files`);
  return { ms, meanWetBulbC: results.reduce((sum, { meanWetBulbC }) => sum + meanWetBulbC, 0) / FILES };
}

function bestOf(args: readonly string[], cwd: string): Outcome {
  return Array.from({ length: ROUNDS }, () => runForTime(args, cwd)).reduce((a, b) => (b.ms < a.ms ? b : a));
}

export const readBench: Bench = {
  name: 'read',
  about: 'forty EPW files in one call of `muslin read`, papaparse + PsychroLib as a program / ours, start included',
  gate: 5,
  compare: 'at least',
  run: () => {
    const dir = mkdtempSync(path.join(tmpdir(), 'muslin-bench-'));
    try {
      const files = Array.from({ length: FILES }, (_none, nth) => path.join(dir, `${nth}.epw`));
      for (const file of files) writeFileSync(file, epwBytes({}));
      const plain = bestOf([plainProgram, ...files], dir);
      const ours = bestOf([runProgram, 'muslin', 'read', ...files], dir);
      const differsK = Math.abs(plain.meanWetBulbC - ours.meanWetBulbC);
      return {
        ratio: plain.ms / ours.ms,
        plain: `${(plain.ms / FILES).toFixed(1)} ms/file`,
        ours: `${(ours.ms / FILES).toFixed(1)} ms/file`,
        fault: differsK <= SAME_WITHIN_K ? null : `the mean wet bulbs differ by ${differsK} K`,
      };
    } finally {
      rmSync(dir, { recursive: true, force: true });
    }
  },
};
