import type { Role } from '#contract/accounts.ts';
import type { TokenScope } from '#contract/tokens.ts';
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
export const signedIn: Policy = ({ actor }) => {
  if (actor.kind === 'token') return 'not_allowed';
  return actor.kind === 'person' ? 'allowed' : 'not_signed_in';
};

/**
 * A member, in one of these roles, of the team that the path names in `:teamId`, or a token of that team with this scope. To
 * everyone else who is known the team does not exist, so that nobody learns which teams there are; nor does a programme that the
 * path names in `:programmeId` for those to whom it is closed.
 * @param scope left out, no token may
 */
export function memberOf(roles: readonly Role[], scope?: TokenScope): Policy {
  return ({ actor, params }) => {
    const teamId = (params.teamId ?? '').toLowerCase();
    if (actor.kind === 'signed-out') return 'not_signed_in';
    if (actor.kind === 'token') {
      if (actor.teamId !== teamId) return 'not_found';
      return scope !== undefined && actor.scopes.includes(scope) ? 'allowed' : 'not_allowed';
    }
    const role = actor.roles.get(teamId);
    const programmeId = (params.programmeId ?? '').toLowerCase();
    if (role === undefined || actor.closedProgrammes.has(programmeId)) return 'not_found';
    return roles.includes(role) ? 'allowed' : 'not_allowed';
  };
}

export const everyRole: readonly Role[] = ['viewer', 'planner', 'engineer', 'lead'];
