import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { PlaceFigures } from './place-figures.ts';
import { Reason } from './reason.ts';
import { GateAnswer, ProgrammeParams } from './runs.ts';
import { SiteWater } from './site-water.ts';

export const SiteParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), siteId: z.uuid() });

/** Who gave the height: `relief` is the approximate default. */
export const ElevationSource = z.enum(['person', 'file', 'relief']);
export type ElevationSource = z.infer<typeof ElevationSource>;

/** What about a site asks for a look: far or different in height as grade D has it (method 7.7), and faults of its place. */
export const siteFlags = ['far', 'height', 'no station', 'station without years', 'sea', 'relief'] as const;
export const SiteFlag = z.enum(siteFlags);
export type SiteFlag = z.infer<typeof SiteFlag>;

/** The station that stands for a site: chosen by a person, else the default of the method. */
export const SiteStation = z.object({
  id: z.uuid(),
  name: z.string(),
  chosen: z.boolean(),
  reason: z.nullable(z.string()),
  distanceKm: z.number(),
  /** Station less site, m; null while the site's height is not known. */
  heightDifferenceM: z.nullable(z.number()),
});
export type SiteStation = z.infer<typeof SiteStation>;

export const Site = z.object({
  id: z.uuid(),
  letters: z.string(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  elevationM: z.nullable(z.number()),
  elevationSource: z.nullable(ElevationSource),
  designLoadKw: z.nullable(z.number()),
  /** null when the team has no station with an accepted year. */
  station: z.nullable(SiteStation),
  flags: z.array(SiteFlag),
  /** Far or different in height by default, and nobody has chosen yet. */
  toSettle: z.boolean(),
  gates: z.array(GateAnswer),
  importId: z.nullable(z.uuid()),
  revision: z.int(),
});
export type Site = z.infer<typeof Site>;

const Name = z
  .string()
  .check(z.trim(), z.minLength(1, 'Name the site.'), z.maxLength(200, 'Use 200 characters or fewer.'));
const Latitude = z.number().check(z.gte(-90, 'Give -90 to 90 degrees.'), z.lte(90, 'Give -90 to 90 degrees.'));
const Longitude = z.number().check(z.gte(-180, 'Give -180 to 180 degrees.'), z.lte(180, 'Give -180 to 180 degrees.'));
const ElevationM = z.number().check(z.gte(-500, 'Give -500 to 9,000 m.'), z.lte(9000, 'Give -500 to 9,000 m.'));
const DesignLoadKw = z.number().check(z.gt(0, 'Give more than 0 kW.'), z.lte(1_000_000, 'Give at most 1,000,000 kW.'));
const Notes = z.string().check(z.maxLength(5000, 'Use 5,000 characters or fewer.'));
const Revision = z.int().check(z.gte(1));

const Gates = z
  .array(
    z.strictObject({
      gate: z.string().check(z.trim(), z.minLength(1), z.maxLength(120)),
      answer: z.enum(['pass', 'fail', 'not known']),
      note: z.string().check(z.trim(), z.maxLength(500, 'Use 500 characters or fewer.')),
    }),
  )
  .check(
    z.maxLength(40),
    z.refine((gates) => new Set(gates.map(({ gate }) => gate)).size === gates.length, 'Answer each gate once.'),
    z.refine(
      (gates) => gates.every(({ answer, note }) => answer !== 'fail' || note !== ''),
      'Say of every gate that fails why: the note is printed in place of the score.',
    ),
  );

const facts = {
  name: Name,
  latitude: Latitude,
  longitude: Longitude,
  /** null takes the height of the relief, marked approximate. */
  elevationM: z.nullable(ElevationM),
  designLoadKw: z.nullable(DesignLoadKw),
  notes: Notes,
};

/** A station chosen by a person, or null for the default of the method. */
const ChosenStation = z.nullable(z.strictObject({ id: z.uuid(), reason: z.nullable(Reason) }));

export const siteSorts = [
  ...(['letters', 'name', 'load', 'station', 'distance', 'height', 'flags'] as const),
  // By what the sites come to under a brief: these look at every run of it.
  ...(['score', 'grade', 'verdict', 'water', 'saved'] as const),
] as const;
export const SiteSort = z.enum(siteSorts);
export type SiteSort = z.infer<typeof SiteSort>;
/** Narrowings of the table: a flag, or those that still wait for a person. */
export const SiteFilter = z.enum(['to settle', 'chosen', ...siteFlags]);
export type SiteFilter = z.infer<typeof SiteFilter>;

export const FilterCounts = z.record(SiteFilter, z.int());

/** A site in the table with its figures under a brief of the programme; null while there is no brief. */
export const ListedSite = z.extend(Site, { figures: z.nullable(PlaceFigures) });
export type ListedSite = z.infer<typeof ListedSite>;

export const SitePage = z.object({
  items: z.array(ListedSite),
  total: z.int(),
  page: z.int(),
  pages: z.int(),
  /** Of the whole programme, whatever the filter. */
  counts: z.object({ all: z.int(), filters: FilterCounts }),
});
export type SitePage = z.infer<typeof SitePage>;

export const listSites = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/sites',
  summary: 'The programme’s sites, filtered and sorted, a page at a time.',
  params: ProgrammeParams,
  query: z.strictObject({
    text: z.optional(z.string().check(z.trim(), z.maxLength(100))),
    /** Whose figures are shown and sorted by; left out: the brief that was saved last. */
    brief: z.optional(z.uuid()),
    filter: z.optional(SiteFilter),
    stationId: z.optional(z.uuid()),
    importId: z.optional(z.uuid()),
    sort: z._default(SiteSort, 'letters'),
    order: z._default(z.enum(['asc', 'desc']), 'asc'),
    page: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(100_000)), 1),
    limit: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(200)), 50),
  }),
  body: none,
  response: json(SitePage),
  errors: [],
  allow: 'sites.view',
  limits: ordinary,
});

export const makeSite = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/sites',
  summary: 'Make a site; it gets the next letters of the programme.',
  params: ProgrammeParams,
  query: empty,
  body: json(
    z.strictObject({
      ...facts,
      elevationM: z._default(facts.elevationM, null),
      designLoadKw: z._default(facts.designLoadKw, null),
      notes: z._default(Notes, ''),
    }),
  ),
  response: json(Site),
  errors: [],
  allow: 'sites.change',
  limits: ordinary,
});

export const changeSite = endpoint({
  method: 'PATCH',
  path: '/api/teams/:teamId/programmes/:programmeId/sites/:siteId',
  summary: 'Change what is sent of a site, provided that nobody has changed it since the revision that was looked at.',
  params: SiteParams,
  query: empty,
  body: json(
    z.strictObject({
      revision: Revision,
      name: z.optional(facts.name),
      latitude: z.optional(facts.latitude),
      longitude: z.optional(facts.longitude),
      elevationM: z.optional(facts.elevationM),
      designLoadKw: z.optional(facts.designLoadKw),
      notes: z.optional(facts.notes),
      station: z.optional(ChosenStation),
      gates: z.optional(Gates),
      water: z.optional(SiteWater),
    }),
  ),
  response: json(Site),
  errors: ['conflict', 'wrong_state'],
  allow: 'sites.change',
  limits: ordinary,
});

export const moveSite = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/programmes/:programmeId/sites/:siteId/position',
  summary: 'Move a site, provided that nobody has changed it meanwhile; a height of the relief is read anew.',
  params: SiteParams,
  query: empty,
  body: json(z.strictObject({ revision: Revision, latitude: Latitude, longitude: Longitude })),
  response: json(Site),
  errors: ['conflict'],
  allow: 'sites.change',
  limits: ordinary,
});

export const removeSites = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/sites/removal',
  summary: 'Remove sites, with the reason; their letters are not given again.',
  params: ProgrammeParams,
  query: empty,
  body: json(
    z.strictObject({
      siteIds: z.array(z.uuid()).check(z.minLength(1, 'Choose a site.'), z.maxLength(500, 'Choose 500 at most.')),
      reason: Reason,
    }),
  ),
  response: json(z.object({ removed: z.int() })),
  errors: [],
  allow: 'sites.change',
  limits: ordinary,
});
