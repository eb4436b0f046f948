import * as z from 'zod/mini';
import { empty, endpoint, file, none, ordinary } from './endpoint.ts';

export const exportRunHours = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/runs/:runId/hours.csv',
  summary: 'Every hour of a run as a table: its weather, what was asked, what the plant gave, its class and why.',
  params: z.strictObject({ teamId: z.uuid(), runId: z.uuid() }),
  query: empty,
  body: none,
  response: file({ mediaType: 'text/csv; charset=utf-8', attachment: true }),
  errors: ['wrong_state', 'not_allowed'],
  allow: 'runs.export',
  limits: { ...ordinary, perMinute: 60, seconds: 120 },
});

export const getRunHours = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/runs/:runId/hours',
  summary: 'The hour class of every slot of a run: one byte a slot, the position of the class in the list of classes.',
  params: z.strictObject({ teamId: z.uuid(), runId: z.uuid() }),
  query: empty,
  body: none,
  response: file({ mediaType: 'application/octet-stream', attachment: false }),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
