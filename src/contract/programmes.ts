import * as z from 'zod/mini';
import { Name } from './accounts.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

const TeamParams = z.strictObject({ teamId: z.uuid() });
const ProgrammeParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid() });
const changing = { ...ordinary, perMinute: 60 };
const MOST_MEMBERS = 500;

export const Programme = z.object({
  id: z.uuid(),
  name: z.string(),
  /** Open to its members and the leads alone; else to everyone in the team. */
  restricted: z.boolean(),
  memberIds: z.array(z.uuid()),
});
export type Programme = z.infer<typeof Programme>;

export const listProgrammes = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes',
  summary: 'The programmes of the team that the reader may open, by name.',
  params: TeamParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(Programme) })),
  errors: [],
  allow: 'teams.programmes.view',
  limits: ordinary,
});

export const makeProgramme = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes',
  summary: 'Make a programme; it begins with the office brief.',
  params: TeamParams,
  query: empty,
  body: json(z.strictObject({ name: Name })),
  response: json(Programme),
  errors: [],
  allow: 'teams.programmes',
  limits: changing,
});

export const renameProgramme = endpoint({
  method: 'PATCH',
  path: '/api/teams/:teamId/programmes/:programmeId',
  summary: 'Rename a programme.',
  params: ProgrammeParams,
  query: empty,
  body: json(z.strictObject({ name: Name })),
  response: json(Programme),
  errors: [],
  allow: 'teams.programmes',
  limits: changing,
});

export const setProgrammeMembers = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/programmes/:programmeId/members',
  summary: 'Open a programme to everyone in the team, or to some members and the leads alone.',
  params: ProgrammeParams,
  query: empty,
  body: json(
    z.strictObject({ restricted: z.boolean(), memberIds: z.array(z.uuid()).check(z.maxLength(MOST_MEMBERS)) }),
  ),
  response: json(Programme),
  errors: [],
  allow: 'teams.people',
  limits: changing,
});
