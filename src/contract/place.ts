import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { BriefBasis, DerivedPlaceYear, Grade, GradeColumn, OfBrief, PlaceYear, ShownRun } from './runs.ts';

const PlaceParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), stationId: z.uuid() });

/** A site as a place: the weather is its station's, moved to its height where both heights are known. */
export const SiteOfPlace = z.object({
  id: z.uuid(),
  letters: z.string(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  elevationM: z.nullable(z.number()),
  elevationSource: z.nullable(z.enum(['person', 'file', 'relief'])),
  distanceKm: z.number(),
  /** Station less site, m. */
  heightDifferenceM: z.nullable(z.number()),
  /** The weather was moved to `heightUsedM`. */
  heightAdjusted: z.boolean(),
  /** The height that the hours were judged at, m: the site's in steps of 10 m, else the station's. */
  heightUsedM: z.number(),
  /** Design load, kW: what is given per kW is to be multiplied by it. */
  loadKw: z.nullable(z.number()),
});
export type SiteOfPlace = z.infer<typeof SiteOfPlace>;

export const Place = z.object({
  /** null: the place is the station itself. */
  site: z.nullable(SiteOfPlace),
  station: z.object({
    id: z.uuid(),
    name: z.string(),
    latitude: z.number(),
    longitude: z.number(),
    elevationM: z.number(),
    zone: z.string(),
  }),
  invented: z.boolean(),
  brief: BriefBasis,
  /** The years that the figures rest on, and which of them the ledger and the year cloth show. */
  years: z.array(PlaceYear),
  /** Every year that was judged, newest file first, whether or not the figures rest on it. */
  judgedYears: z.array(z.extend(PlaceYear, { name: z.nullable(z.string()), usable: z.boolean() })),
  /** Years of other climates, newest first. */
  derived: z.array(DerivedPlaceYear),
  shown: z.nullable(ShownRun),
  grade: Grade,
  gradeColumns: z.array(GradeColumn),
});
export type Place = z.infer<typeof Place>;

export const getSitePlace = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/sites/:siteId/place',
  summary: 'One site as a place: its station’s weather at its own height, with its gates.',
  params: z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), siteId: z.uuid() }),
  query: OfBrief,
  body: none,
  response: json(Place),
  errors: ['wrong_state'],
  allow: 'runs.view',
  limits: ordinary,
});

export const getStationPlace = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/stations/:stationId',
  summary: 'One station as a place: ledger, verdict, score arithmetic, grade and basis.',
  params: PlaceParams,
  query: OfBrief,
  body: none,
  response: json(Place),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
