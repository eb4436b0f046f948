import type { Brief } from '../brief/brief.ts';
import type { GateAnswer } from '../run/run-result.ts';
import { type Coverage, LEAST_COVERED_PCT } from './coverage.ts';
import type { HardLimitCount } from './hard-limits.ts';
import { hardLimitName, hardLimitWords } from './verdict.ts';

/** Gates that a weather year cannot answer; a person does, per site (method 7.1). */
export const ASKED_OF_EVERY_PLACE = ['water available', 'exclusions of use', 'hygiene'];

/** Every gate of a run with its answer and a note. */
export function gatesOf(input: {
  brief: Pick<Brief, 'gates'>;
  coverage: Coverage;
  hardLimits: readonly HardLimitCount[];
}): GateAnswer[] {
  return [coverageGate(input.coverage), ...input.hardLimits.map(hardLimitGate), ...askedGates(input.brief)];
}

/** The gates that a person answers for each place, not answered. */
export function askedGates(brief: Pick<Brief, 'gates'>): readonly GateAnswer[] {
  const asked = [...ASKED_OF_EVERY_PLACE, ...brief.gates];
  return asked.map((gate) => ({ gate, answer: 'not known', note: 'to be answered for the site' }));
}

/** "excluded: ..." with the note of every gate that fails; null when none does. */
export function exclusionOf(gates: readonly GateAnswer[]): string | null {
  const failing = gates.filter(({ answer }) => answer === 'fail').map(({ note }) => note);
  return failing.length === 0 ? null : `excluded: ${failing.join('; ')}`;
}

function coverageGate({ present, scheduled, coveredPct }: Coverage): GateAnswer {
  const holds = coveredPct >= LEAST_COVERED_PCT;
  const share = `${Math.floor(coveredPct * 10) / 10} %`;
  const note = `weather for ${present} of ${scheduled} hours in schedule, ${share}`;
  return {
    gate: 'coverage',
    answer: holds ? 'pass' : 'fail',
    note: holds ? note : `${note}; at least ${LEAST_COVERED_PCT} % is needed`,
  };
}

function hardLimitGate(limit: HardLimitCount): GateAnswer {
  const holds = limit.foundHours <= limit.allowedHours;
  return {
    gate: hardLimitName(limit),
    answer: holds ? 'pass' : 'fail',
    note: `${limit.foundHours} h over ${hardLimitWords(limit)}; ${limit.allowedHours} h allowed`,
  };
}
