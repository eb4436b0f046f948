import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';

export const FoundPlace = z.object({
  /** A station or site of the team, or a place of the gazetteer. */
  kind: z.enum(['station', 'site', 'capital', 'seat', 'place']),
  /** Of a station or site. */
  id: z.nullable(z.uuid()),
  /** Of a site. */
  programmeId: z.nullable(z.uuid()),
  name: z.string(),
  /** Of a place of the gazetteer. */
  country: z.nullable(z.string()),
  latitude: z.number(),
  longitude: z.number(),
});
export type FoundPlace = z.infer<typeof FoundPlace>;

export const findPlaces = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/places',
  summary:
    'Stations and sites of the team and places of the shipped gazetteer by name, best first; a country may follow a comma.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: z.strictObject({ text: z.string().check(z.trim(), z.minLength(1), z.maxLength(100)) }),
  body: none,
  response: json(z.object({ places: z.array(FoundPlace) })),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
