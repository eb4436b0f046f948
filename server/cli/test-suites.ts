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

export interface SuitesOptions {
  readonly context: CommandContext;
  readonly names: readonly Suite[];
  readonly env: Readonly<Record<string, string>>;
  /** Let a test take as long as its samples need. */
  readonly patient: boolean;
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

async function runSuite(name: Suite, runDir: string, options: SuitesOptions): Promise<Tally> {
  const { rootDir, signal } = options.context;
  const reportFile = path.join(runDir, `${name}.json`);
  const began = performance.now();
  const outcome: ToolOutcome = await runTool({
    script: path.join(rootDir, 'node_modules/vitest/vitest.mjs'),
    args: [...vitestArguments(name, reportFile), ...(options.patient ? [`--testTimeout=${PATIENT_MS}`] : [])],
    cwd: rootDir,
    env: toolEnvironment({ ...options.env, TMPDIR: runDir }),
    signal,
  });
  if (signal.aborted) return nothing;
  const tally = tallyOf(outcome, reportFile);
  if (tally.failed > 0) process.stdout.write(`${outcome.output.trim()}\n`);
  process.stdout.write(`${name.padEnd(8)}${tally.passed + tally.failed} tests in ${seconds(began)}\n`);
  return tally;
}

/** Runs the suites one after the other: two at once would share the cores and time each other out. */
export async function runSuites(options: SuitesOptions): Promise<Tally> {
  const runDir = mkdtempSync(path.join(os.tmpdir(), 'muslin-run-'));
  chmodSync(runDir, 0o711); // as root, the database server's own user must get through to its cluster
  let total = nothing;
  try {
    for (const name of options.names) {
      if (!options.context.signal.aborted) total = add(total, await runSuite(name, runDir, options));
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
