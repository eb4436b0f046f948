import type { Brief } from '#engine/brief/brief.ts';
import { readBrief } from '#engine/brief/brief-from-preset.ts';
import { AppError } from '../../http/app-error.ts';

/** The brief in a request's body. @throws AppError invalid_input with every fault at once, each at its path in the request */
export function readDraft(draft: unknown): Brief {
  const reading = readBrief(draft);
  if (reading.ok) return reading.brief;
  const { faults } = reading;
  const count = faults.length === 1 ? 'a fault' : `${faults.length} faults`;
  throw new AppError(
    'invalid_input',
    `The brief has ${count}.`,
    faults.map(({ path, message }) => ({ path: `body.body.${path.replaceAll(/\[(\d+)\]/g, '.$1')}`, message })),
  );
}
