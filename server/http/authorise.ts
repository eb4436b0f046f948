import type { PolicyName } from '#contract/policies.ts';
import { accountsPolicy } from '../features/accounts/policy.ts';
import { auditPolicy } from '../features/audit/policy.ts';
import { briefsPolicy } from '../features/briefs/policy.ts';
import { methodPolicy } from '../features/method/policy.ts';
import { runsPolicy } from '../features/runs/policy.ts';
import { sitesPolicy } from '../features/sites/policy.ts';
import { stationsPolicy } from '../features/stations/policy.ts';
import { teamsPolicy } from '../features/teams/policy.ts';
import { weatherPolicy } from '../features/weather/policy.ts';
import { AppError } from './app-error.ts';
import { type Asked, anyone, type Decision, type Policy } from './policy.ts';

/** One rule for every name that an endpoint's `allow` may take. */
export const policies: Readonly<Record<PolicyName, Policy>> = {
  anyone,
  ...accountsPolicy,
  ...weatherPolicy,
  ...runsPolicy,
  ...methodPolicy,
  ...briefsPolicy,
  ...stationsPolicy,
  ...sitesPolicy,
  ...teamsPolicy,
  ...auditPolicy,
};

const refusals = {
  not_signed_in: 'Sign in first.',
  not_allowed: 'Your role in this team does not allow that. Ask a lead of the team.',
  not_found: 'There is no such thing here, or it belongs to another team.',
} satisfies Record<Exclude<Decision, 'allowed'>, string>;

/** Throws unless the policy allows it; a name without a rule allows nobody. */
export function authorise(name: PolicyName, asked: Asked): void {
  const rule = Object.hasOwn(policies, name) ? policies[name] : undefined;
  const decision = rule === undefined ? 'not_allowed' : rule(asked);
  if (decision === 'allowed') return;
  const scope = decision === 'not_allowed' && asked.actor.kind === 'token';
  throw new AppError(
    decision,
    scope ? 'This token was not made for that. Its scopes do not allow it.' : refusals[decision],
  );
}
