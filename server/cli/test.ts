import path from 'node:path';
import { requireClient } from './build-client.ts';
import type { Command, CommandContext } from './command.ts';
import { CouldNotRun } from './could-not-run.ts';
import { requirePackages } from './packages.ts';
import { runTool } from './run-tool.ts';
import { runSuites, type Suite, seconds, suites, toolEnvironment } from './test-suites.ts';
import { add, closingLine, nothing, type Tally } from './test-tally.ts';

const checks = [
  { name: 'lint', script: 'node_modules/@biomejs/biome/bin/biome', args: ['check', '.', '--error-on-warnings'] },
  { name: 'types', script: 'node_modules/typescript/bin/tsc', args: ['-b'] },
  { name: 'unused', script: 'node_modules/knip/bin/knip.js', args: ['--no-progress'] },
] as const;

/** Lint, types and unused code count as one test each. */
async function runChecks({ rootDir, signal }: CommandContext): Promise<Tally> {
  let total = nothing;
  for (const { name, script, args } of checks) {
    if (signal.aborted) break;
    const began = performance.now();
    const env = toolEnvironment({});
    const outcome = await runTool({ script: path.join(rootDir, script), args, cwd: rootDir, env, signal });
    const holds = outcome.code === 0;
    if (!holds && !signal.aborted) process.stdout.write(`${outcome.output.trim()}\n`);
    process.stdout.write(`${name.padEnd(8)}${holds ? 'in order' : 'NOT in order'} in ${seconds(began)}\n`);
    total = add(total, { passed: holds ? 1 : 0, failed: holds ? 0 : 1, skipped: 0 });
  }
  return total;
}

/** The browser tests need the built client; a build that fails is told as one failed test. */
async function buildForBrowser(context: CommandContext): Promise<Tally> {
  if (context.signal.aborted) return nothing;
  try {
    await requireClient(context);
    return nothing;
  } catch (error) {
    if (context.signal.aborted) return nothing;
    if (!(error instanceof CouldNotRun)) throw error;
    process.stdout.write(`${error.message}\n`);
    return { ...nothing, failed: 1 };
  }
}

/** `npm test`: every check at sample sizes. Arguments name single suites: `npm test -- unit`. */
export const run: Command = async (context) => {
  const named = suites.filter((name) => context.args.includes(name));
  if (named.length < context.args.length) {
    process.stderr.write(`Use: npm test, or npm test -- SUITE... with ${suites.join(', ')}.\n`);
    return 2;
  }
  const chosen: readonly Suite[] = named.length > 0 ? named : suites;
  await requirePackages(['postgresql', 'chromium'], context.signal);
  const checked = named.length > 0 ? nothing : await runChecks(context);
  const built = chosen.includes('e2e') ? await buildForBrowser(context) : nothing;
  const tested = await runSuites({ context, names: chosen, env: {}, patient: false });
  if (context.signal.aborted) {
    process.stderr.write('Stopped before the end.\n');
    return 1;
  }
  const total = add(add(checked, built), tested);
  process.stdout.write(`${closingLine(total)}\n`);
  return total.failed === 0 ? 0 : 1;
};
