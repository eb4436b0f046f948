import * as z from 'zod/mini';
import { empty, endpoint, json } from './endpoint.ts';
import { WeatherFile } from './weather.ts';
import { ClimateDifference, HumidityRule, MonthlyChange } from './weather-change.ts';

const ParentParams = z.strictObject({ teamId: z.uuid(), fileId: z.uuid() });

/** Larger than any table of twelve lines. */
const LONGEST_TABLE = 20_000;

/** The change: twelve values typed, January first, or a table that the engine reads, every fault of it at its line. */
const Change = z.strictObject({
  humidityRule: HumidityRule,
  monthly: z.optional(z.array(MonthlyChange).check(z.length(12, 'Give twelve changes, January first.'))),
  table: z.optional(z.string().check(z.maxLength(LONGEST_TABLE, `Use ${LONGEST_TABLE} characters or fewer.`))),
});

/** Deriving takes about a tenth of a second of a processor. */
const LIMITS = { bodyBytes: 64 * 1024, perMinute: 120, seconds: 30 };

export const DerivedPreview = z.object({
  /** The twelve changes as they were read. */
  monthly: z.array(MonthlyChange),
  /** The change in a phrase. */
  words: z.string(),
  /** Hours whose humidity would have passed saturation and was held there. */
  cappedHours: z.int(),
  difference: ClimateDifference,
  /** Of the year as it would be saved. */
  contentHash: z.string(),
});
export type DerivedPreview = z.infer<typeof DerivedPreview>;

export const previewDerivedYear = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files/:fileId/derived-preview',
  summary: 'What a change of climate would make of an accepted weather year. Nothing is stored.',
  params: ParentParams,
  query: empty,
  body: json(Change),
  response: json(DerivedPreview),
  errors: ['wrong_state'],
  allow: 'weather.derive',
  limits: LIMITS,
});

export const deriveWeatherYear = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files/:fileId/derived-years',
  summary: 'Save a changed climate of an accepted weather year as a derived year beside it, judged by every brief.',
  params: ParentParams,
  query: empty,
  body: json(
    z.extend(Change, {
      name: z
        .string()
        .check(z.trim(), z.minLength(1, 'Give it a name.'), z.maxLength(80, 'Use 80 characters or fewer.')),
    }),
  ),
  response: json(WeatherFile),
  errors: ['wrong_state'],
  allow: 'weather.derive',
  limits: LIMITS,
});
