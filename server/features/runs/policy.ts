import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

export const runsPolicy = {
  'runs.view': memberOf(everyRole, 'results:read'),
  'runs.export': memberOf(['planner', 'engineer', 'lead'], 'results:read'),
} satisfies Record<string, Policy>;
