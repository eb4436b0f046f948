import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/**
 * The lead runs the team: people, the tokens that let programs in, and what becomes of all that the team has. Whoever shapes briefs
 * makes programmes for them. A program that reads results finds out of which programmes there are any.
 */
export const teamsPolicy = {
  'teams.view': memberOf(everyRole),
  'teams.people': memberOf(['lead']),
  'teams.programmes.view': memberOf(everyRole, 'results:read'),
  'teams.programmes': memberOf(['planner', 'engineer', 'lead']),
  'teams.tokens': memberOf(['lead']),
  'teams.data': memberOf(['lead']),
} satisfies Record<string, Policy>;
