import type { TeamExport } from '#contract/team-data.ts';
import type { ExportView } from './export-read-model.ts';

export function presentExport(view: ExportView): TeamExport {
  const { id, state, askedBy, askedAt, parts, partsDone, bytes, expiresAt } = view;
  return {
    id,
    state,
    askedBy,
    askedAt: askedAt.toISOString(),
    share: parts === null ? null : Math.min(1, partsDone / parts),
    bytes,
    expiresAt: expiresAt?.toISOString() ?? null,
  };
}
