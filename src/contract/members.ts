import * as z from 'zod/mini';
import { Name, Role } from './accounts.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

/** A day as people write it in tables; somebody from outside is a member until it ends, in UTC. */
export const EndDate = z.iso.date('Give the last day as year-month-day, such as 2027-03-31.');

const TeamParams = z.strictObject({ teamId: z.uuid() });
const MemberParams = z.strictObject({ teamId: z.uuid(), personId: z.uuid() });
const changing = { ...ordinary, perMinute: 60 };

export const Member = z.object({
  personId: z.uuid(),
  name: z.string(),
  /** Told to leads alone. */
  email: z.nullable(z.string()),
  role: Role,
  since: z.iso.datetime(),
  /** Last day of a member from outside; null for a member of the house. */
  lastDay: z.nullable(z.string()),
  ended: z.boolean(),
});
export type Member = z.infer<typeof Member>;

export const listMembers = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/members',
  summary: 'The people of the team, by name.',
  params: TeamParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(Member) })),
  errors: [],
  allow: 'teams.view',
  limits: ordinary,
});

export const changeMember = endpoint({
  method: 'PATCH',
  path: '/api/teams/:teamId/members/:personId',
  summary: "Change a member's role, or the last day of a member from outside.",
  params: MemberParams,
  query: empty,
  body: json(z.strictObject({ role: z.optional(Role), lastDay: z.optional(z.nullable(EndDate)) })),
  response: json(Member),
  errors: ['wrong_state'],
  allow: 'teams.people',
  limits: changing,
});

export const removeMember = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/members/:personId',
  summary: 'Take a person out of the team. What the person did there stays.',
  params: MemberParams,
  query: empty,
  body: none,
  response: none,
  errors: ['wrong_state'],
  allow: 'teams.people',
  limits: changing,
});

export const endMemberSessions = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/members/:personId/sessions',
  summary: 'Sign a member of the team out everywhere.',
  params: MemberParams,
  query: empty,
  body: none,
  response: none,
  errors: [],
  allow: 'teams.people',
  limits: changing,
});

export const leaveTeam = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/membership',
  summary: 'Leave the team. The last lead cannot.',
  params: TeamParams,
  query: empty,
  body: none,
  response: none,
  errors: ['wrong_state'],
  allow: 'teams.view',
  limits: changing,
});

export const makeTeam = endpoint({
  method: 'POST',
  path: '/api/teams',
  summary: 'Make a team of which the reader is the lead.',
  params: empty,
  query: empty,
  body: json(z.strictObject({ name: Name })),
  response: json(z.object({ teamId: z.uuid() })),
  errors: [],
  allow: 'accounts.own',
  limits: { ...ordinary, perMinute: 10 },
});

export const renameTeam = endpoint({
  method: 'PATCH',
  path: '/api/teams/:teamId',
  summary: 'Rename the team.',
  params: TeamParams,
  query: empty,
  body: json(z.strictObject({ name: Name })),
  response: none,
  errors: [],
  allow: 'teams.people',
  limits: changing,
});
