import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/** Planners shape briefs; everyone in the team, and every program that reads results, may read them and look at what a change would do. */
export const briefsPolicy = {
  'briefs.view': memberOf(everyRole, 'results:read'),
  'briefs.change': memberOf(['planner', 'engineer', 'lead']),
} satisfies Record<string, Policy>;
