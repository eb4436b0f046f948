import { Role } from '#contract/accounts.ts';
import type { PolicyName } from '#contract/policies.ts';
import { tokenScopes } from '#contract/tokens.ts';
import { policies } from './authorise.ts';
import type { Access } from './describe-api.ts';
import type { Policy } from './policy.ts';
import type { Actor } from './request-context.ts';

const TEAM_ID = '00000000-0000-4000-8000-000000000001';
const PERSON_ID = '00000000-0000-4000-8000-000000000002';

/** Who may, found out by asking the rule itself, so that the description cannot say anything else. */
export function accessOf(name: PolicyName): Access {
  const rule: Policy = policies[name];
  const may = (actor: Actor): boolean => rule({ actor, params: { teamId: TEAM_ID } }) === 'allowed';
  if (may({ kind: 'signed-out' })) return { anyone: true, roles: [], scopes: [] };
  const person = {
    kind: 'person',
    personId: PERSON_ID,
    closedProgrammes: new Set<string>(),
    revisions: new Map<string, string>(),
  } as const;
  const token = { kind: 'token', tokenId: PERSON_ID, teamId: TEAM_ID, personId: PERSON_ID } as const;
  const roles = Role.options.filter((role) => may({ ...person, roles: new Map([[TEAM_ID, role]]) }));
  const isOfTeam = !may({ ...person, roles: new Map() });
  return {
    anyone: false,
    roles: isOfTeam ? roles : [],
    scopes: tokenScopes.filter((scope) => may({ ...token, scopes: [scope] })),
  };
}
