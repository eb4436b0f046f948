import { type Policy, signedIn } from '../../http/policy.ts';

export const methodPolicy = {
  'method.view': signedIn,
} satisfies Record<string, Policy>;
