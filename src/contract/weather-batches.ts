import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary, upload } from './endpoint.ts';
import { MAX_FILE_BYTES, WeatherFile } from './weather.ts';

const TeamParams = z.strictObject({ teamId: z.uuid() });
const BatchParams = z.strictObject({ teamId: z.uuid(), batchId: z.uuid() });

/** A batch that is paused reads no further file until it goes on; one that was cancelled never does. */
export const BatchState = z.enum(['running', 'paused', 'cancelled']);
export type BatchState = z.infer<typeof BatchState>;

export const ArchiveStatus = z.enum(['waiting', 'opening', 'opened', 'refused', 'cancelled']);
export type ArchiveStatus = z.infer<typeof ArchiveStatus>;

/** A zip of weather files; what it holds becomes weather files of the same batch. */
export const WeatherArchive = z.object({
  id: z.uuid(),
  name: z.string(),
  bytes: z.int(),
  status: ArchiveStatus,
  /** Why it was refused; null otherwise. */
  problem: z.nullable(z.string()),
  /** Why opening stopped for a fault of ours; null otherwise. */
  failure: z.nullable(z.string()),
  /** Files that it lists; null before it was looked into. */
  members: z.nullable(z.int()),
  membersOpened: z.int(),
  leftOut: z.array(z.object({ path: z.string(), why: z.string() })),
});
export type WeatherArchive = z.infer<typeof WeatherArchive>;

const StatusCounts = z.object({
  reading: z.int(),
  asks: z.int(),
  review: z.int(),
  accepted: z.int(),
  refused: z.int(),
  withdrawn: z.int(),
  superseded: z.int(),
});

/** Weather files that were brought together: a drop of many, or an archive. */
export const WeatherBatch = z.object({
  id: z.uuid(),
  name: z.string(),
  state: BatchState,
  madeBy: z.string(),
  madeAt: z.iso.datetime(),
  archives: z.array(WeatherArchive),
  files: StatusCounts,
  /** Files and archives that stopped for a fault of ours. */
  stopped: z.int(),
  /** Nothing of it waits or is worked on any more. */
  ended: z.boolean(),
});
export type WeatherBatch = z.infer<typeof WeatherBatch>;

export const listWeatherBatches = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-batches',
  summary: 'The latest batches of weather files with their progress, newest first.',
  params: TeamParams,
  query: z.strictObject({ limit: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(100)), 10) }),
  body: none,
  response: json(z.object({ items: z.array(WeatherBatch) })),
  errors: [],
  allow: 'weather.view',
  limits: ordinary,
});

export const getWeatherBatch = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-batches/:batchId',
  summary: 'One batch of weather files with its progress.',
  params: BatchParams,
  query: empty,
  body: none,
  response: json(WeatherBatch),
  errors: [],
  allow: 'weather.view',
  limits: ordinary,
});

export const startWeatherBatch = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-batches',
  summary: 'Begin a batch: files and archives that are uploaded into it are shown, paused and cancelled together.',
  params: TeamParams,
  query: empty,
  body: json(
    z.strictObject({
      name: z
        .string()
        .check(z.trim(), z.minLength(1, 'Name the batch.'), z.maxLength(200, 'Use 200 characters or fewer.')),
    }),
  ),
  response: json(WeatherBatch),
  errors: [],
  allow: 'weather.upload',
  limits: ordinary,
});

export const changeWeatherBatch = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/weather-batches/:batchId/state',
  summary: 'Pause a batch, let it go on, or cancel what of it has not been read.',
  params: BatchParams,
  query: empty,
  body: json(z.strictObject({ state: BatchState })),
  response: json(WeatherBatch),
  errors: ['wrong_state'],
  allow: 'weather.upload',
  limits: ordinary,
});

/** How many plain files one request may bring. */
export const MAX_FILES_AT_ONCE = 20;

export const uploadWeatherFiles = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-batches/:batchId/files',
  summary: 'Upload several hourly weather files into a batch; each answers as a single upload does.',
  params: BatchParams,
  query: empty,
  body: upload({ maxFiles: MAX_FILES_AT_ONCE, maxBytes: MAX_FILE_BYTES }),
  response: json(z.object({ files: z.array(z.object({ file: WeatherFile, known: z.boolean() })) })),
  errors: ['too_large', 'unreadable_body', 'wrong_state'],
  allow: 'weather.upload',
  limits: { bodyBytes: MAX_FILES_AT_ONCE * MAX_FILE_BYTES, perMinute: 60, seconds: 900 },
});

/** Largest archive that is taken, as it is sent. */
export const MAX_ARCHIVE_BYTES = 1024 * 1024 * 1024;

export const uploadWeatherArchive = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-batches/:batchId/archives',
  summary: 'Upload a zip of weather files into a batch; it is opened in the background.',
  params: BatchParams,
  query: empty,
  body: upload({ maxFiles: 1, maxBytes: MAX_ARCHIVE_BYTES }),
  response: json(z.object({ archive: WeatherArchive })),
  errors: ['too_large', 'unreadable_body', 'unsupported_format', 'wrong_state'],
  allow: 'weather.upload',
  limits: { bodyBytes: MAX_ARCHIVE_BYTES, perMinute: 60, seconds: 1800 },
});

export const retryWeatherArchive = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-archives/:archiveId/retry',
  summary: 'Open an archive again whose opening stopped for a fault of ours.',
  params: z.strictObject({ teamId: z.uuid(), archiveId: z.uuid() }),
  query: empty,
  body: none,
  response: json(WeatherArchive),
  errors: ['wrong_state'],
  allow: 'weather.upload',
  limits: ordinary,
});
