import * as z from 'zod/mini';
import { empty, endpoint, events, none, ordinary } from './endpoint.ts';
import { FileStatus, ReadingStep } from './weather.ts';

/** Something has changed: of a file, of the scores that depend on it, of sites and briefs, or who is in the team and as what. */
export const TeamEvent = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('weather-file'), fileId: z.uuid(), status: FileStatus, step: z.nullable(ReadingStep) }),
  z.object({ kind: z.literal('weather-batch'), batchId: z.uuid() }),
  z.object({ kind: z.literal('run'), runId: z.uuid(), stationId: z.uuid() }),
  z.object({ kind: z.literal('sites'), programmeId: z.uuid() }),
  z.object({ kind: z.literal('people') }),
  z.object({ kind: z.literal('brief'), briefId: z.uuid(), version: z.int() }),
]);
export type TeamEvent = z.infer<typeof TeamEvent>;

export const watchTeam = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/events',
  summary: 'What changes in the team, as it happens: progress of weather files, briefs and runs, sites, people.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: none,
  response: events(TeamEvent),
  errors: [],
  allow: 'weather.view',
  limits: { ...ordinary, perMinute: 120 },
});
