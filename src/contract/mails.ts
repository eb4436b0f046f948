import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

export const Mail = z.object({
  id: z.uuid(),
  recipient: z.string(),
  subject: z.string(),
  text: z.string(),
  madeAt: z.iso.datetime(),
});
export type Mail = z.infer<typeof Mail>;

export const listMails = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/mails',
  summary: 'Mails of the team that wait because this server sends none; never one that opens an account.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(Mail), sends: z.boolean() })),
  errors: [],
  allow: 'teams.people',
  limits: ordinary,
});
