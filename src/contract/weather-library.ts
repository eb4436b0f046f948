import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { FileStatus, WeatherFile } from './weather.ts';

/** What the library can be narrowed to: a status, or files that stopped for a fault of ours. */
export const LibraryStatus = z.enum([...FileStatus.options, 'stopped']);
export type LibraryStatus = z.infer<typeof LibraryStatus>;

export const LibrarySort = z.enum(['uploaded', 'name', 'station', 'complete']);
export type LibrarySort = z.infer<typeof LibrarySort>;

export const LibraryQuery = z.strictObject({
  status: z.optional(LibraryStatus),
  /** Part of the file's or the station's name, or of its WMO number. */
  text: z.optional(z.string().check(z.trim(), z.maxLength(100))),
  format: z.optional(z.string().check(z.maxLength(40))),
  kind: z.optional(z.enum(['typical', 'actual', 'derived'])),
  batchId: z.optional(z.uuid()),
  stationId: z.optional(z.uuid()),
  sort: z._default(LibrarySort, 'uploaded'),
  order: z._default(z.enum(['asc', 'desc']), 'desc'),
  page: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(100_000)), 1),
  limit: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(200)), 100),
});

export const listWeatherFiles = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-files',
  summary: "The team's weather files, filtered, sorted, a page at a time; by default newest first.",
  params: z.strictObject({ teamId: z.uuid() }),
  query: LibraryQuery,
  body: none,
  response: json(
    z.object({
      items: z.array(WeatherFile),
      /** Files that the filter leaves. */
      total: z.int(),
      page: z.int(),
      pages: z.int(),
      /** Files of the whole team by status, and how many stopped. */
      counts: z.record(LibraryStatus, z.int()),
      /** Formats that occur in the team. */
      formats: z.array(z.string()),
    }),
  ),
  errors: [],
  allow: 'weather.view',
  limits: ordinary,
});
