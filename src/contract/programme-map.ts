import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { PlaceFigures } from './place-figures.ts';
import { BriefBasis, OfBrief, ProgrammeParams } from './runs.ts';

export const MapStation = z.extend(PlaceFigures, {
  id: z.uuid(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  elevationM: z.number(),
});
export type MapStation = z.infer<typeof MapStation>;

/** A site with the figures of its station’s weather, moved to the site’s height where both heights are known. */
export const MapSite = z.extend(PlaceFigures, {
  id: z.uuid(),
  /** Its short mark in the programme. */
  letters: z.string(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  /** null: not known. */
  elevationM: z.nullable(z.number()),
  /** The station that stands for it; null: none yet. */
  stationId: z.nullable(z.uuid()),
  distanceKm: z.nullable(z.number()),
  /** Station less site, m. */
  heightDifferenceM: z.nullable(z.number()),
  /** The weather was moved to the site’s height. */
  heightAdjusted: z.boolean(),
  /** Design load, kW. */
  loadKw: z.nullable(z.number()),
  /** Gates of the site that fail, each with its reason; with any, there is no score. */
  gatesFailed: z.array(z.string()),
  /** Gates that nobody has answered or waived. */
  gatesNotKnown: z.int(),
});
export type MapSite = z.infer<typeof MapSite>;

export const ProgrammeMap = z.object({
  programme: z.object({ id: z.uuid(), name: z.string() }),
  invented: z.boolean(),
  brief: BriefBasis,
  stations: z.array(MapStation),
  sites: z.array(MapSite),
  /** Runs that are still being computed. */
  pending: z.int(),
});
export type ProgrammeMap = z.infer<typeof ProgrammeMap>;

export const getMap = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/map',
  summary: 'Every station of the team and every site of the programme with its figures under a brief of the programme.',
  params: ProgrammeParams,
  query: OfBrief,
  body: none,
  response: json(ProgrammeMap),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
