import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/** The lead runs the team: people, and the tokens that let programs in. Whoever shapes briefs makes programmes for them. */
export const teamsPolicy = {
  'teams.view': memberOf(everyRole),
  'teams.people': memberOf(['lead']),
  'teams.programmes': memberOf(['planner', 'engineer', 'lead']),
  'teams.tokens': memberOf(['lead']),
} satisfies Record<string, Policy>;
