import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/**
 * The lead runs the team: people, and the tokens that let programs in. Whoever shapes briefs makes programmes for them. A program
 * that reads results finds out of which programmes there are any.
 */
export const teamsPolicy = {
  'teams.view': memberOf(everyRole),
  'teams.people': memberOf(['lead']),
  'teams.programmes.view': memberOf(everyRole, 'results:read'),
  'teams.programmes': memberOf(['planner', 'engineer', 'lead']),
  'teams.tokens': memberOf(['lead']),
} satisfies Record<string, Policy>;
