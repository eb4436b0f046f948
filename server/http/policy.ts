import type { Role } from '#contract/accounts.ts';
import type { Actor } from './request-context.ts';

/** What a policy looks at: who asks, and the path's parameters as they came. */
export interface Asked {
  readonly actor: Actor;
  readonly params: Readonly<Record<string, string>>;
}

export type Decision = 'allowed' | 'not_signed_in' | 'not_allowed' | 'not_found';

export type Policy = (asked: Asked) => Decision;

/** No account needed. */
export const anyone: Policy = () => 'allowed';

/** Any person who is signed in, whatever the teams. */
export const signedIn: Policy = ({ actor }) => (actor.kind === 'person' ? 'allowed' : 'not_signed_in');

/**
 * A member, in one of these roles, of the team that the path names in `:teamId`. To everyone else who is signed in the team
 * does not exist, so that nobody learns which teams there are.
 */
export function memberOf(roles: readonly Role[]): Policy {
  return ({ actor, params }) => {
    if (actor.kind !== 'person') return 'not_signed_in';
    const role = actor.roles.get((params.teamId ?? '').toLowerCase());
    if (role === undefined) return 'not_found';
    return roles.includes(role) ? 'allowed' : 'not_allowed';
  };
}

export const everyRole: readonly Role[] = ['viewer', 'planner', 'engineer', 'lead'];
