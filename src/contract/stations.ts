import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { Reason } from './reason.ts';
import { WeatherFile, YearFacts } from './weather.ts';
import { RuleName } from './weather-reading.ts';

const TeamParams = z.strictObject({ teamId: z.uuid() });
const StationParams = z.strictObject({ teamId: z.uuid(), stationId: z.uuid() });

export const Station = z.object({
  id: z.uuid(),
  name: z.string(),
  latitude: z.number(),
  longitude: z.number(),
  elevationM: z.number(),
  utcOffsetH: z.number(),
  /** IANA name. */
  zone: z.string(),
  wmoNumber: z.nullable(z.string()),
  /** Accepted weather years. */
  years: z.int(),
  /** Files of every status. */
  files: z.int(),
});
export type Station = z.infer<typeof Station>;

export const RuleOff = z.object({ rule: RuleName, reason: z.string(), setBy: z.string(), setAt: z.iso.datetime() });
export type RuleOff = z.infer<typeof RuleOff>;

export const StationRecord = z.object({
  station: Station,
  /** Its files, newest first, with what the year of each was reduced to. */
  files: z.array(z.object({ file: WeatherFile, weatherYearId: z.nullable(z.uuid()), facts: z.nullable(YearFacts) })),
  rulesOff: z.array(RuleOff),
});
export type StationRecord = z.infer<typeof StationRecord>;

export const listStations = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/stations',
  summary: "The team's stations by name, a page at a time.",
  params: TeamParams,
  query: z.strictObject({
    text: z.optional(z.string().check(z.trim(), z.maxLength(100))),
    page: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(100_000)), 1),
    limit: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(500)), 100),
  }),
  body: none,
  response: json(z.object({ items: z.array(Station), total: z.int(), page: z.int(), pages: z.int() })),
  errors: [],
  allow: 'stations.view',
  limits: ordinary,
});

export const getStation = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/stations/:stationId',
  summary: 'One station with its years side by side and the rules that are switched off there.',
  params: StationParams,
  query: empty,
  body: none,
  response: json(StationRecord),
  errors: [],
  allow: 'stations.view',
  limits: ordinary,
});

export const moveStation = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/stations/:stationId/place',
  summary: 'Correct name, position, elevation or time zone of a station; its years are judged anew.',
  params: StationParams,
  query: empty,
  body: json(
    z.strictObject({
      name: z
        .string()
        .check(z.trim(), z.minLength(1, 'Name the station.'), z.maxLength(200, 'Use 200 characters or fewer.')),
      latitude: z.number().check(z.gte(-90, 'Give -90 to 90.'), z.lte(90, 'Give -90 to 90.')),
      longitude: z.number().check(z.gte(-180, 'Give -180 to 180.'), z.lte(180, 'Give -180 to 180.')),
      elevationM: z.number().check(z.gte(-500, 'Give -500 to 9,000 m.'), z.lte(9000, 'Give -500 to 9,000 m.')),
      zone: z.string().check(z.trim(), z.minLength(1, 'Name the time zone.'), z.maxLength(60)),
      reason: Reason,
    }),
  ),
  response: json(Station),
  errors: ['wrong_state'],
  allow: 'stations.change',
  limits: ordinary,
});

export const mergeStations = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/stations/:stationId/merge',
  summary: 'Take the files of another station into this one, as they were recorded at the same place.',
  params: StationParams,
  query: empty,
  body: json(z.strictObject({ otherStationId: z.uuid(), reason: Reason })),
  response: json(Station),
  errors: ['wrong_state'],
  allow: 'stations.change',
  limits: ordinary,
});

export const setRuleOff = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/stations/:stationId/rules/:rule',
  summary: 'Switch a rule off for the files of a station that are read from now on, with the reason.',
  params: z.strictObject({ teamId: z.uuid(), stationId: z.uuid(), rule: RuleName }),
  query: empty,
  body: json(z.strictObject({ reason: Reason })),
  response: json(z.object({ rulesOff: z.array(RuleOff) })),
  errors: ['wrong_state'],
  allow: 'stations.change',
  limits: ordinary,
});

export const setRuleOn = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/stations/:stationId/rules/:rule',
  summary: 'Let a rule hold again at a station.',
  params: z.strictObject({ teamId: z.uuid(), stationId: z.uuid(), rule: RuleName }),
  query: empty,
  body: none,
  response: json(z.object({ rulesOff: z.array(RuleOff) })),
  errors: ['wrong_state'],
  allow: 'stations.change',
  limits: ordinary,
});
