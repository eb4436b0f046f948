import { memberOf, type Policy } from '../../http/policy.ts';

/** The trail says of everybody what they did; those who answer for the team read it, and no token does. */
export const auditPolicy = {
  'audit.view': memberOf(['lead']),
} satisfies Record<string, Policy>;
