import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';

/** Depressions are counted in whole kelvin; the last count holds this and more. */
const HIGHEST_DEPRESSION_K = 63;
const MONTHS = /^(1[0-2]|[1-9])(,(1[0-2]|[1-9]))*$/;

export const StationDepression = z.object({
  stationId: z.uuid(),
  /**
   * Hours at or over the depression, as read: the median over 5 or more actual years, else of the typical year, else of the latest
   * actual one. null without a measured year.
   */
  hours: z.nullable(z.number()),
  /** Hours of the same months whose depression is known: what `hours` is out of. */
  knownHours: z.nullable(z.number()),
  /** Years that the figure rests on. */
  years: z.int(),
});
export type StationDepression = z.infer<typeof StationDepression>;

export const getDepressionMap = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/depression-hours',
  summary: 'Hours of every station with at least so much wet-bulb depression within some months.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: z.strictObject({
    /** Whole kelvin. */
    atLeastK: z.coerce.number().check(z.int(), z.minimum(0), z.maximum(HIGHEST_DEPRESSION_K)),
    /** Month numbers with commas, such as `6,7,8`; left out: the year. */
    months: z.optional(z.string().check(z.regex(MONTHS, 'Month numbers from 1 to 12, with commas.'))),
  }),
  body: none,
  response: json(z.object({ atLeastK: z.int(), months: z.array(z.int()), stations: z.array(StationDepression) })),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
