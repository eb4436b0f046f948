import { createContext, useContext } from 'react';
import type { BriefBody } from '../../contract/brief-body.ts';
import type { DraftProblems } from './draft.ts';

interface DraftScope {
  readonly problems: DraftProblems;
  /** What the preset says, for the defaults; null while it is fetched. */
  readonly preset: BriefBody | null;
}

const Scope = createContext<DraftScope | null>(null);

export const DraftScopeProvider = Scope.Provider;

/** What every field of the form goes by beside its own value. */
export function useDraftScope(): DraftScope {
  const scope = useContext(Scope);
  if (scope === null) throw new Error('useDraftScope is called outside a brief form.');
  return scope;
}
