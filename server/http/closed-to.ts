import type { Actor } from './request-context.ts';

/** The programmes that are closed to whoever asks, for what is named without its programme: the rule of the path cannot see it. */
export function closedTo(actor: Actor): readonly string[] {
  return actor.kind === 'person' ? [...actor.closedProgrammes] : [];
}
