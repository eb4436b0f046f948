import * as z from 'zod/mini';
import { ruleNames } from '../engine/weather-files/quality/quality-options.ts';
import { empty, endpoint, file, json, none, ordinary } from './endpoint.ts';
import { Reason } from './reason.ts';
import { WeatherFile } from './weather.ts';
import { AnswersBody, StatedPlaceBody, TableMappingBody } from './weather-answers.ts';

const FileParams = z.strictObject({ teamId: z.uuid(), fileId: z.uuid() });

export const RuleName = z.enum(ruleNames);

/** Everything that people have said of a file; each reading anew goes by it. */
export const FileAnswers = z.strictObject({
  place: z.exactOptional(StatedPlaceBody),
  mapping: z.exactOptional(TableMappingBody),
  answers: z.exactOptional(AnswersBody),
  /** Keeps values that the source's quality codes call suspect. */
  keepSuspect: z.exactOptional(z.boolean()),
  /** Fills gaps of 6 to 47 hours from the days before and after. */
  fillLongGaps: z.exactOptional(z.boolean()),
  /** Rules that are not held against this file; accepting it switches them off for its station. */
  rulesOff: z.exactOptional(
    z.array(z.strictObject({ rule: RuleName, reason: Reason })).check(z.maxLength(ruleNames.length)),
  ),
});
export type FileAnswers = z.infer<typeof FileAnswers>;

export const answerWeatherFile = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/weather-files/:fileId/answers',
  summary:
    'Answer what a file asks, or correct its place; it is read anew. How a table is read is remembered for tables of the same shape.',
  params: FileParams,
  query: empty,
  body: json(FileAnswers),
  response: json(WeatherFile),
  errors: ['wrong_state'],
  allow: 'weather.accept',
  limits: ordinary,
});

/** How many lines of an original are shown at once. */
export const MOST_LINES = 200;

export const getWeatherFileLines = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-files/:fileId/lines',
  summary: 'Lines of the original as they stand, for the rows that a finding concerns.',
  params: FileParams,
  query: z.strictObject({
    from: z.coerce.number().check(z.int(), z.gte(1), z.lte(100_000_000)),
    count: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(MOST_LINES)), 20),
  }),
  body: none,
  response: json(
    z.object({
      /** Long lines are cut; `cut` says so. */
      lines: z.array(z.object({ line: z.int(), text: z.string(), cut: z.boolean() })),
      /** Lines of the whole file. */
      total: z.int(),
    }),
  ),
  errors: [],
  allow: 'weather.original',
  limits: { ...ordinary, perMinute: 300 },
});

/** The media type of `getWeatherYearColumns`: the packed columns of layout 1, one after another. */
export const COLUMNS_MEDIA_TYPE = 'application/octet-stream';

export const getWeatherYearColumns = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-files/:fileId/columns',
  summary:
    'The hours of a file’s weather year as packed columns, little-endian, one after another: dry bulb int16 0.01 °C, humidity ratio uint16 2e-6, pressure uint16 2 Pa, flags uint8; missing -32768 or 65535.',
  params: FileParams,
  query: empty,
  body: none,
  response: file({ mediaType: COLUMNS_MEDIA_TYPE, attachment: false }),
  errors: [],
  allow: 'weather.view',
  limits: { ...ordinary, perMinute: 300 },
});

export const Licence = z.enum(['open', 'attribution', 'non-commercial', 'no redistribution', 'unknown']);
export type Licence = z.infer<typeof Licence>;

export const setLicence = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/weather-files/:fileId/licence',
  summary: 'Say under which licence a file may be passed on, and whom to name.',
  params: FileParams,
  query: empty,
  body: json(
    z.strictObject({
      licence: Licence,
      attribution: z.nullable(z.string().check(z.trim(), z.maxLength(500, 'Use 500 characters or fewer.'))),
    }),
  ),
  response: json(WeatherFile),
  errors: ['wrong_state'],
  allow: 'weather.accept',
  limits: ordinary,
});
