import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

export const runsPolicy = {
  'runs.view': memberOf(everyRole, 'results:read'),
} satisfies Record<string, Policy>;
