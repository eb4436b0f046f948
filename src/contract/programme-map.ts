import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { BriefBasis, Grade, OfBrief, ProgrammeParams, Verdict } from './runs.ts';

export const MapStation = z.object({
  id: z.uuid(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  elevationM: z.number(),
  /** null: not judged yet, excluded, or no demand; `scoreNote` says which. */
  score: z.nullable(z.int()),
  scoreNote: z.nullable(z.string()),
  grade: Grade,
  verdict: z.nullable(Verdict),
});
export type MapStation = z.infer<typeof MapStation>;

export const ProgrammeMap = z.object({
  programme: z.object({ id: z.uuid(), name: z.string() }),
  invented: z.boolean(),
  brief: BriefBasis,
  stations: z.array(MapStation),
  /** Runs that are still being computed. */
  pending: z.int(),
});
export type ProgrammeMap = z.infer<typeof ProgrammeMap>;

export const getMap = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/map',
  summary: 'Every station of the team with its score under the programme’s brief.',
  params: ProgrammeParams,
  query: OfBrief,
  body: none,
  response: json(ProgrammeMap),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
