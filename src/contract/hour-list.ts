import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { HourClass } from './runs.ts';

const NumberOrNull = z.nullable(z.number());

/** One hour of a run; null: not known, or without meaning for such an hour. */
export const ListedHour = z.object({
  /** 0 first. */
  slot: z.int(),
  /** When the hour ends, as `2029-07-14T13:00`: in the slots' standard time, and in civil time. */
  standardEnd: z.string(),
  civilEnd: z.string(),
  dryBulbC: NumberOrNull,
  wetBulbC: NumberOrNull,
  relativeHumidityPct: NumberOrNull,
  pressurePa: NumberOrNull,
  hourClass: HourClass,
  met: z.nullable(z.boolean()),
  stage: z.nullable(z.string()),
  /** Share of full wetting, 0..1. */
  share: NumberOrNull,
  supplyC: NumberOrNull,
  roomC: NumberOrNull,
  roomRhPct: NumberOrNull,
  /** °C, or points of an index. */
  limit: NumberOrNull,
  roomIndex: NumberOrNull,
  shortfall: NumberOrNull,
  /** Per kW of design load. */
  waterLitres: NumberOrNull,
  kwh: NumberOrNull,
  reason: z.string(),
  /** Line of the weather file; null where no line holds the hour, and where the original is not there to be read. */
  line: z.nullable(z.int()),
});
export type ListedHour = z.infer<typeof ListedHour>;

export const HourList = z.object({
  items: z.array(ListedHour),
  total: z.int(),
  page: z.int(),
  pages: z.int(),
  limitUnit: z.enum(['°C', 'points']),
  weatherFileId: z.uuid(),
  fileName: z.string(),
  /** The weather was moved to the height of a site: the lines hold it as it was measured. */
  adjusted: z.boolean(),
});
export type HourList = z.infer<typeof HourList>;

const MOST_DAYS = 366;

export const listRunHours = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/runs/:runId/hour-list',
  summary:
    'Hours of a run one by one: those of a class, month, hour of day or day, with their weather, reason and line of the file.',
  params: z.strictObject({ teamId: z.uuid(), runId: z.uuid() }),
  query: z.strictObject({
    hourClass: z.optional(HourClass),
    met: z.optional(z.enum(['yes', 'no'])),
    month: z.optional(z.coerce.number().check(z.int(), z.gte(1), z.lte(12))),
    /** Hour of day by its end, standard time: 1 to 24. */
    hour: z.optional(z.coerce.number().check(z.int(), z.gte(1), z.lte(24))),
    /** Day of the year, 1 first. */
    day: z.optional(z.coerce.number().check(z.int(), z.gte(1), z.lte(MOST_DAYS))),
    page: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(MOST_DAYS * 24)), 1),
    limit: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(200)), 50),
  }),
  body: none,
  response: json(HourList),
  errors: ['wrong_state'],
  allow: 'runs.view',
  limits: { ...ordinary, perMinute: 240, seconds: 60 },
});
