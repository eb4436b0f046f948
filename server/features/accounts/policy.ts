import { type Policy, signedIn } from '../../http/policy.ts';

export const accountsPolicy = {
  'accounts.signOut': signedIn,
} satisfies Record<string, Policy>;
