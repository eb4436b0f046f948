/** Runs vitest's suites for `npm test` and `npm run soak`, each in a temporary folder that nothing may outlive. */
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import type { CommandContext } from './command.ts';
import { endLeftProcesses } from './left-running.ts';
import { runTool, type ToolOutcome } from './run-tool.ts';
import { add, nothing, type Tally, tallyOf } from './test-tally.ts';

export const suites = ['unit', 'server', 'e2e'] as const;
export type Suite = (typeof suites)[number];

const PATIENT_MS = 3_600_000;

/** One step of a run: what it runs says its words in one piece at its end, and counts. */
export type Step = (runDir: string) => Promise<Tally>;

export interface SuiteOptions {
  readonly context: CommandContext;
  readonly env?: Readonly<Record<string, string>>;
  /** Let a test take as long as its samples need. */
  readonly patient?: boolean;
  /** Lets the lane beside it go first. */
  readonly givesWay?: boolean;
}

/** Environment of every tool: neither our caller's npm settings for colours nor a build's NODE_ENV get in. */
export function toolEnvironment(extra: Readonly<Record<string, string>>): NodeJS.ProcessEnv {
  const { NODE_ENV: _production, ...inherited } = process.env;
  return { ...inherited, ...(process.stdout.isTTY ? { FORCE_COLOR: '1' } : { NO_COLOR: '1' }), ...extra };
}

export function seconds(sinceMs: number): string {
  return `${((performance.now() - sinceMs) / 1000).toFixed(1)} s`;
}

function vitestArguments(name: Suite, reportFile: string): string[] {
  return ['run', '--project', name, '--reporter=dot', '--reporter=json', `--outputFile.json=${reportFile}`];
}

/** One suite of vitest as a step. */
export function suiteStep(name: Suite, options: SuiteOptions): Step {
  const { rootDir, signal } = options.context;
  return async (runDir) => {
    const reportFile = path.join(runDir, `${name}.json`);
    const began = performance.now();
    const outcome: ToolOutcome = await runTool({
      script: path.join(rootDir, 'node_modules/vitest/vitest.mjs'),
      args: [...vitestArguments(name, reportFile), ...(options.patient ? [`--testTimeout=${PATIENT_MS}`] : [])],
      cwd: rootDir,
      env: toolEnvironment({ ...options.env, TMPDIR: runDir }),
      signal,
      givesWay: options.givesWay ?? false,
    });
    if (signal.aborted) return nothing;
    const tally = tallyOf(outcome, reportFile);
    const words = tally.failed > 0 ? `${outcome.output.trim()}\n` : '';
    process.stdout.write(`${words}${name.padEnd(8)}${tally.passed + tally.failed} tests in ${seconds(began)}\n`);
    return tally;
  };
}

async function runLane(lane: readonly Step[], runDir: string, signal: AbortSignal): Promise<Tally> {
  let total = nothing;
  for (const step of lane) {
    if (!signal.aborted) total = add(total, await step(runDir));
  }
  return total;
}

/** Runs lanes side by side, the steps of each one after the other. All end before it answers, also when one of them throws. */
export async function runLanes(lanes: readonly (readonly Step[])[], signal: AbortSignal): Promise<Tally> {
  const runDir = mkdtempSync(path.join(os.tmpdir(), 'muslin-run-'));
  chmodSync(runDir, 0o711); // as root, the database server's own user must get through to its cluster
  let total = nothing;
  try {
    for (const ended of await Promise.allSettled(lanes.map((lane) => runLane(lane, runDir, signal)))) {
      if (ended.status === 'rejected') throw ended.reason;
      total = add(total, ended.value);
    }
  } finally {
    for (const { pid, command } of await endLeftProcesses(runDir)) {
      process.stdout.write(`Left running by the tests, and ended: process ${pid}, ${command}\n`);
      total = add(total, { passed: 0, failed: 1, skipped: 0 });
    }
    rmSync(runDir, { recursive: true, force: true });
  }
  return total;
}
