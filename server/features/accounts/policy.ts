import { type Policy, signedIn } from '../../http/policy.ts';

/** One's own account is one's own: no token, and no lead, comes near it. */
export const accountsPolicy = {
  'accounts.signOut': signedIn,
  'accounts.own': signedIn,
} satisfies Record<string, Policy>;
