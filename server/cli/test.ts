import path from 'node:path';
import { requireClient } from './build-client.ts';
import type { Command, CommandContext } from './command.ts';
import { CouldNotRun } from './could-not-run.ts';
import { requirePackages } from './packages.ts';
import { runTool } from './run-tool.ts';
import { runLanes, type Step, type Suite, seconds, suiteStep, suites, toolEnvironment } from './test-suites.ts';
import { closingLine, nothing } from './test-tally.ts';

const checks = [
  { name: 'lint', script: 'node_modules/@biomejs/biome/bin/biome', args: ['check', '.', '--error-on-warnings'] },
  { name: 'types', script: 'node_modules/typescript/bin/tsc', args: ['-b'] },
  { name: 'unused', script: 'node_modules/knip/bin/knip.js', args: ['--no-progress'] },
] as const;

/** Lint, types and unused code count as one test each. */
function checkSteps({ rootDir, signal }: CommandContext): Step[] {
  return checks.map(({ name, script, args }) => async () => {
    const began = performance.now();
    const env = toolEnvironment({});
    const call = { script: path.join(rootDir, script), args, cwd: rootDir, env, signal, givesWay: true };
    const outcome = await runTool(call);
    const holds = outcome.code === 0;
    const words = holds || signal.aborted ? '' : `${outcome.output.trim()}\n`;
    process.stdout.write(`${words}${name.padEnd(8)}${holds ? 'in order' : 'NOT in order'} in ${seconds(began)}\n`);
    return { passed: holds ? 1 : 0, failed: holds ? 0 : 1, skipped: 0 };
  });
}

/** The browser tests need the built client; a build that fails is told as one failed test. */
function buildStep(context: CommandContext): Step {
  return async () => {
    try {
      await requireClient(context);
      return nothing;
    } catch (error) {
      if (context.signal.aborted) return nothing;
      if (!(error instanceof CouldNotRun)) throw error;
      process.stdout.write(`${error.message}\n`);
      return { ...nothing, failed: 1 };
    }
  };
}

/**
 * `npm test`: every check at sample sizes. Arguments name single suites: `npm test -- unit`. The browser suite waits more than it
 * computes: it has a lane of its own, and everything else runs beside it on what it leaves.
 */
export const run: Command = async (context) => {
  const named = suites.filter((name) => context.args.includes(name));
  if (named.length < context.args.length) {
    process.stderr.write(`Use: npm test, or npm test -- SUITE... with ${suites.join(', ')}.\n`);
    return 2;
  }
  const chosen: readonly Suite[] = named.length > 0 ? named : suites;
  await requirePackages(['postgresql', 'chromium'], context.signal);
  const browserLane = chosen.includes('e2e') ? [buildStep(context), suiteStep('e2e', { context })] : [];
  const otherSuites = chosen.filter((name) => name !== 'e2e');
  const otherLane = [
    ...(named.length > 0 ? [] : checkSteps(context)),
    ...otherSuites.map((name) => suiteStep(name, { context, givesWay: true })),
  ];
  const total = await runLanes([browserLane, otherLane], context.signal);
  if (context.signal.aborted) {
    process.stderr.write('Stopped before the end.\n');
    return 1;
  }
  process.stdout.write(`${closingLine(total)}\n`);
  return total.failed === 0 ? 0 : 1;
};
