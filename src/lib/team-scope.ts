import { createContext, useContext } from 'react';
import type { Membership } from '../contract/accounts.ts';

const TeamScope = createContext<Membership | null>(null);

/** Holds the team that the address names, for every page under it. */
export const TeamScopeProvider = TeamScope.Provider;

/** The team in view and the reader's role in it. Only for pages under a team's address. */
export function useTeam(): Membership {
  const team = useContext(TeamScope);
  if (team === null) throw new Error('useTeam is called outside a team.');
  return team;
}
