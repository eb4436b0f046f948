import type { Problem } from '#contract/errors.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { readBrief } from '#engine/brief/brief-from-preset.ts';
import { AppError } from '../../http/app-error.ts';

/**
 * A brief out of what was sent.
 * @throws AppError invalid_input with every fault at once, each at its path in the request, such as `body.body.effDirect`
 */
export function readDraft(draft: unknown): Brief {
  const reading = readBrief(draft);
  if (reading.ok) return reading.brief;
  throw draftFaults(reading.faults);
}

export function draftFaults(faults: readonly { path: string; message: string }[]): AppError {
  const problems: Problem[] = faults.map(({ path, message }) => ({
    path: `body.body.${path.replace(/\[(\d+)\]/g, '.$1')}`,
    message: message.charAt(0).toUpperCase() + message.slice(1),
  }));
  const count = problems.length === 1 ? 'a fault' : `${problems.length} faults`;
  return new AppError('invalid_input', `The brief has ${count}. Nothing was saved.`, problems);
}
