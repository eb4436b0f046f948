import * as z from 'zod/mini';
import { TypedPassword } from './accounts.ts';
import { empty, endpoint, file, json, none, ordinary } from './endpoint.ts';

/** An export is kept this long, then removed; another can be asked for at any time. */
export const EXPORT_DAYS = 7;
/** Between asking for the deletion of a team and its end. */
export const DELETION_DAYS = 14;

const TeamParams = z.strictObject({ teamId: z.uuid() });

export const TeamExport = z.object({
  id: z.uuid(),
  /** `over`: its time has passed and it was removed. */
  state: z.enum(['making', 'ready', 'failed', 'over']),
  askedBy: z.string(),
  askedAt: z.iso.datetime(),
  /** 0 to 1; null until it is known how much there is. */
  share: z.nullable(z.number()),
  bytes: z.nullable(z.int()),
  /** Until when it can be downloaded. */
  expiresAt: z.nullable(z.iso.datetime()),
});
export type TeamExport = z.infer<typeof TeamExport>;

export const TeamDeletion = z.object({
  askedBy: z.string(),
  askedAt: z.iso.datetime(),
  endsAt: z.iso.datetime(),
});
export type TeamDeletion = z.infer<typeof TeamDeletion>;

export const listExports = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/exports',
  summary: 'The last ten exports of the team, newest first, with how far one that is being made is.',
  params: TeamParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(TeamExport) })),
  errors: [],
  allow: 'teams.data',
  limits: ordinary,
});

export const askExport = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/exports',
  summary: 'Ask for everything that the team has here as one archive. One that is being made already is answered.',
  params: TeamParams,
  query: empty,
  body: none,
  response: json(TeamExport),
  errors: [],
  allow: 'teams.data',
  limits: { ...ordinary, perMinute: 10 },
});

export const getExport = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/exports/:exportId/archive',
  summary: 'The archive of an export that is ready, until its time is over.',
  params: z.strictObject({ teamId: z.uuid(), exportId: z.uuid() }),
  query: empty,
  body: none,
  response: file({ mediaType: 'application/zip', attachment: true }),
  errors: ['wrong_state', 'link_not_valid'],
  allow: 'teams.data',
  limits: { ...ordinary, perMinute: 20, seconds: 300 },
});

export const getDeletion = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/deletion',
  summary: 'Whether the team is to be deleted, who asked for it, and when that will be.',
  params: TeamParams,
  query: empty,
  body: none,
  response: json(z.object({ waiting: z.nullable(TeamDeletion) })),
  errors: [],
  allow: 'teams.data',
  limits: ordinary,
});

export const askDeletion = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/deletion',
  summary: `Ask for the deletion of the team and all that it has, with one's password and the team's name. It happens ${DELETION_DAYS} days later.`,
  params: TeamParams,
  query: empty,
  body: json(
    z.strictObject({
      name: z.string().check(z.trim(), z.minLength(1, 'Type the name of the team.'), z.maxLength(120)),
      password: TypedPassword,
    }),
  ),
  response: json(TeamDeletion),
  errors: ['wrong_state'],
  allow: 'teams.data',
  limits: { ...ordinary, perMinute: 10 },
});

export const stopDeletion = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/deletion',
  summary: 'Stop a deletion that waits: the team stays as it is.',
  params: TeamParams,
  query: empty,
  body: none,
  response: none,
  errors: ['wrong_state'],
  allow: 'teams.data',
  limits: { ...ordinary, perMinute: 60 },
});
