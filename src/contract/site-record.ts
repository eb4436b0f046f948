import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { ProgrammeParams } from './runs.ts';
import { SiteWater } from './site-water.ts';
import { Site, SiteParams } from './sites.ts';

/** A station in the ranking for a site. */
export const StationCandidate = z.object({
  id: z.uuid(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  elevationM: z.number(),
  distanceKm: z.number(),
  heightDifferenceM: z.nullable(z.number()),
  /** distance / 100 km + |height difference| / 300 m (method 8). */
  figure: z.number(),
  actualYears: z.int(),
  typicalYears: z.int(),
  /** Of the columns distance, height difference and years (method 7.7); what was measured is told by the run. */
  grade: z.enum(['A', 'B', 'C', 'D']),
});
export type StationCandidate = z.infer<typeof StationCandidate>;

export const dutyNames = ['water safety plan', 'notification', 'noise', 'drain-down'] as const;
export const DutyName = z.enum(dutyNames);
export type DutyName = z.infer<typeof DutyName>;

export const SiteDuty = z.object({
  duty: DutyName,
  owner: z.string(),
  dueOn: z.nullable(z.iso.date()),
  doneOn: z.nullable(z.iso.date()),
  note: z.string(),
});
export type SiteDuty = z.infer<typeof SiteDuty>;

export const SiteChange = z.object({
  revision: z.int(),
  by: z.string(),
  at: z.iso.datetime(),
  fields: z.array(z.object({ field: z.string(), was: z.string(), now: z.string() })),
});
export type SiteChange = z.infer<typeof SiteChange>;

export const SiteRecord = z.object({
  site: Site,
  water: SiteWater,
  notes: z.string(),
  duties: z.array(SiteDuty),
  /** What the relief has there, m, approximate. */
  reliefM: z.nullable(z.number()),
  kmFromLand: z.number(),
  /** The best twelve, and the chosen one wherever it stands. */
  candidates: z.array(StationCandidate),
  /** Gates that the programme's briefs ask beyond those of every place. */
  askedGates: z.array(z.string()),
  madeBy: z.string(),
  madeAt: z.iso.datetime(),
  /** Newest first. */
  changes: z.array(SiteChange),
});
export type SiteRecord = z.infer<typeof SiteRecord>;

export const getSite = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/sites/:siteId',
  summary: 'One site with its ranked stations, water, duties and changes.',
  params: SiteParams,
  query: empty,
  body: none,
  response: json(SiteRecord),
  errors: [],
  allow: 'sites.view',
  limits: ordinary,
});

export const setSiteDuty = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/programmes/:programmeId/sites/:siteId/duties/:duty',
  summary: 'Say who sees to a duty at a site, by when, and whether it is done.',
  params: z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), siteId: z.uuid(), duty: DutyName }),
  query: empty,
  body: json(
    z.strictObject({
      owner: z.string().check(z.trim(), z.maxLength(120, 'Use 120 characters or fewer.')),
      dueOn: z.nullable(z.iso.date()),
      doneOn: z.nullable(z.iso.date()),
      note: z.string().check(z.trim(), z.maxLength(500, 'Use 500 characters or fewer.')),
    }),
  ),
  response: json(z.object({ duties: z.array(SiteDuty) })),
  errors: [],
  allow: 'sites.change',
  limits: ordinary,
});

/** What is known of a position before there is a site. */
export const getGround = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/ground',
  summary: 'Height, distance from land and ranked stations at a position.',
  params: ProgrammeParams,
  query: z.strictObject({
    latitude: z.coerce.number().check(z.gte(-90), z.lte(90)),
    longitude: z.coerce.number().check(z.gte(-180), z.lte(180)),
    /** The height of the relief is used without one. */
    elevationM: z.optional(z.coerce.number().check(z.gte(-500), z.lte(9000))),
  }),
  body: none,
  response: json(
    z.object({ reliefM: z.nullable(z.number()), kmFromLand: z.number(), candidates: z.array(StationCandidate) }),
  ),
  errors: [],
  allow: 'sites.view',
  limits: ordinary,
});
