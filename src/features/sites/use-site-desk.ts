import { useCallback, useEffect, useRef, useState } from 'react';
import type { InputOf } from '../../contract/endpoint.ts';
import type { SiteRecord } from '../../contract/site-record.ts';
import type { changeSite, Site } from '../../contract/sites.ts';
import { type ApiError, isApiError } from '../../lib/api-error.ts';
import { type ProgrammeKey, useSiteActs } from './site-queries.ts';

export type SitePatch = Omit<InputOf<typeof changeSite>['body'], 'revision'>;

export interface SiteDesk {
  /** Sends a change on top of the revision that the person has seen. Throws ApiError; a conflict is kept in `conflict` as well. */
  save(patch: SitePatch): Promise<Site>;
  /** A panel with something typed in it holds on to the revision that it was begun from. */
  setTyping(panel: string, isTyping: boolean): void;
  /** What somebody else did meanwhile, with what was not stored because of it. */
  readonly conflict: { readonly error: ApiError; readonly patch: SitePatch } | null;
  /** Stores what was held back on top of what is there now. */
  saveOver(): Promise<Site>;
  forgetConflict(): void;
}

/**
 * Changes of one site from several panels of a page. While something is being typed, what others store meanwhile does not count as
 * seen; so the save is refused, the person is told, and what was typed stands.
 */
export function useSiteDesk(programme: ProgrammeKey, record: SiteRecord): SiteDesk {
  const acts = useSiteActs(programme);
  const { id, revision } = record.site;
  const seen = useRef(revision);
  const typing = useRef(new Set<string>());
  const [conflict, setConflict] = useState<SiteDesk['conflict']>(null);
  const newest = useRef(revision);
  useEffect(() => {
    newest.current = revision;
    if (typing.current.size === 0) seen.current = revision;
  }, [revision]);
  const send = async (patch: SitePatch, on: number): Promise<Site> => {
    try {
      const site = await acts.change(id, { ...patch, revision: on });
      seen.current = site.revision;
      setConflict(null);
      return site;
    } catch (error) {
      if (isApiError(error, 'conflict')) setConflict({ error, patch });
      throw error;
    }
  };
  const setTyping = useCallback((panel: string, isTyping: boolean) => {
    if (isTyping) typing.current.add(panel);
    else typing.current.delete(panel);
    if (typing.current.size === 0) seen.current = Math.max(seen.current, newest.current);
  }, []);
  return {
    conflict,
    setTyping,
    save: (patch) => send(patch, seen.current),
    saveOver: () => send(conflict?.patch ?? {}, newest.current),
    forgetConflict: () => setConflict(null),
  };
}
