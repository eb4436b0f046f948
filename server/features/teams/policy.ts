import { memberOf, type Policy } from '../../http/policy.ts';

/** Tokens let programs in: the lead gives and takes them. */
export const teamsPolicy = {
  'teams.tokens': memberOf(['lead']),
} satisfies Record<string, Policy>;
