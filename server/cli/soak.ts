import { randomInt } from 'node:crypto';
import type { Command } from './command.ts';
import { requirePackages } from './packages.ts';
import { runLanes, suiteStep } from './test-suites.ts';
import { closingLine } from './test-tally.ts';

const LARGEST_SEED = 2 ** 31 - 1;

/**
 * `npm run soak`: the suites of `npm test` at full counts (`tests/support/sample-size.ts`). The seed is printed; SOAK_SEED runs
 * the same samples again, SOAK_FACTOR changes how many there are.
 */
export const run: Command = async (context) => {
  await requirePackages(['postgresql'], context.signal);
  const seed = process.env.SOAK_SEED ?? String(randomInt(LARGEST_SEED));
  process.stdout.write(`seed ${seed}: SOAK_SEED=${seed} npm run soak tries the same samples again\n`);
  const env = { SOAK: '1', SOAK_SEED: seed };
  const lane = (['unit', 'server'] as const).map((name) => suiteStep(name, { context, env, patient: true }));
  const total = await runLanes([lane], context.signal);
  if (context.signal.aborted) return 1;
  process.stdout.write(`${closingLine(total)}\n`);
  return total.failed === 0 ? 0 : 1;
};
