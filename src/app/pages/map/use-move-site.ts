import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { getMap, type ProgrammeMap } from '../../../contract/programme-map.ts';
import { mapQuery, type ProgrammeIds } from '../../../features/runs/run-queries.ts';
import { siteQuery, useSiteActs } from '../../../features/sites/site-queries.ts';
import { errorSentence, isApiError } from '../../../lib/api-error.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import type { PlaceRef, Position } from '../../../map/sheet-place.ts';
import type { MoveSite } from '../../../map/use-site-drag.ts';

export interface SiteMoving {
  /** null: the reader may not move sites, or the chosen place is none. */
  readonly move: MoveSite | null;
  /** What came of the last move. */
  readonly said: { readonly tone: 'note' | 'wrong'; readonly text: string; readonly undo: (() => void) | null } | null;
  readonly forget: () => void;
}

/** Moves the chosen site at once, and back when the server says that somebody else was quicker. */
export function useMoveSite(
  ids: ProgrammeIds,
  { map, chosen }: { map: ProgrammeMap; chosen: PlaceRef | null },
): SiteMoving {
  const { role } = useTeam();
  const client = useQueryClient();
  const acts = useSiteActs(ids);
  const siteId = chosen?.kind === 'site' ? chosen.id : null;
  const mayMove = role !== 'viewer' && siteId !== null;
  // The revision that is moved is the one that was looked at.
  const record = useQuery({ ...siteQuery({ ...ids, siteId: siteId ?? '' }), enabled: mayMove });
  const [said, setSaid] = useState<SiteMoving['said']>(null);
  const { queryKey } = mapQuery(ids);
  const put = (id: string, { latitude, longitude }: Position) =>
    client.setQueryData<ProgrammeMap>(
      queryKey,
      (held) =>
        held && {
          ...held,
          sites: held.sites.map((site) => (site.id === id ? { ...site, latitude, longitude } : site)),
        },
    );
  const send = async (id: string, to: Position, from: Position & { readonly revision: number }): Promise<void> => {
    const name = map.sites.find((site) => site.id === id)?.name ?? 'The site';
    put(id, to);
    try {
      const moved = await acts.move(id, { revision: from.revision, latitude: to.latitude, longitude: to.longitude });
      const back = { latitude: from.latitude, longitude: from.longitude };
      const undo = () => send(id, back, { ...to, revision: moved.revision });
      setSaid({ tone: 'note', text: `${name} is moved.`, undo: () => void undo() });
    } catch (error) {
      put(id, from);
      const changes = isApiError(error, 'conflict') ? error.problems.map(({ message }) => message) : [];
      setSaid({ tone: 'wrong', text: [errorSentence(error), ...changes].join(' '), undo: null });
    } finally {
      client.invalidateQueries({ queryKey: [getMap.path] });
    }
  };
  const site = record.data?.site;
  const move: MoveSite = (id, to) => {
    if (site?.id === id) void send(id, to, site);
  };
  return { move: mayMove && site?.id === siteId ? move : null, said, forget: () => setSaid(null) };
}
