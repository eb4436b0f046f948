import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/** Planners keep the sites; everyone in the team may read them. */
export const sitesPolicy = {
  'sites.view': memberOf(everyRole, 'results:read'),
  'sites.export': memberOf(['planner', 'engineer', 'lead'], 'results:read'),
  'sites.change': memberOf(['planner', 'engineer', 'lead']),
} satisfies Record<string, Policy>;
