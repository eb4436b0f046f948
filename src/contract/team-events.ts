import * as z from 'zod/mini';
import { empty, endpoint, events, none, ordinary } from './endpoint.ts';
import { FileStatus, ReadingStep } from './weather.ts';

/** Something about a file, or about the scores that depend on it, has changed. */
export const TeamEvent = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('weather-file'), fileId: z.uuid(), status: FileStatus, step: z.nullable(ReadingStep) }),
  z.object({ kind: z.literal('weather-batch'), batchId: z.uuid() }),
  z.object({ kind: z.literal('run'), runId: z.uuid(), stationId: z.uuid() }),
  z.object({ kind: z.literal('sites'), programmeId: z.uuid() }),
  z.object({ kind: z.literal('brief'), briefId: z.uuid(), version: z.int() }),
]);
export type TeamEvent = z.infer<typeof TeamEvent>;

export const watchTeam = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/events',
  summary: 'Progress of weather files, briefs and runs, as it happens.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: none,
  response: events(TeamEvent),
  errors: [],
  allow: 'weather.view',
  limits: { ...ordinary, perMinute: 120 },
});
