import type { TeamDeletion } from '#contract/team-data.ts';
import type { DeletionView } from './deletion-read-model.ts';

export function presentDeletion({ askedBy, askedAt, endsAt }: DeletionView): TeamDeletion {
  return { askedBy, askedAt: askedAt.toISOString(), endsAt: endsAt.toISOString() };
}
