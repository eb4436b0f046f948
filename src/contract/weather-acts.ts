import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { Reason } from './reason.ts';
import { WeatherFile } from './weather.ts';

const FileParams = z.strictObject({ teamId: z.uuid(), fileId: z.uuid() });

export const acceptWeatherFile = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files/:fileId/acceptance',
  summary: 'Accept a file that waits for review: its station appears on the map and its year is judged.',
  params: FileParams,
  query: empty,
  body: none,
  response: json(WeatherFile),
  errors: ['wrong_state'],
  allow: 'weather.accept',
  limits: ordinary,
});

export const withdrawWeatherFile = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files/:fileId/withdrawal',
  summary: 'Withdraw a file with a reason; it no longer counts, and its record stays.',
  params: FileParams,
  query: empty,
  body: json(z.strictObject({ reason: Reason })),
  response: json(WeatherFile),
  errors: ['wrong_state'],
  allow: 'weather.withdraw',
  limits: ordinary,
});

/** How many files one act may concern. */
export const MAX_FILES_PER_ACT = 500;
const fileIds = z.array(z.uuid()).check(z.minLength(1, 'Choose a file.'), z.maxLength(MAX_FILES_PER_ACT));

export const actOnWeatherFiles = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files/acts',
  summary: 'Accept, refuse, withdraw or supersede many files; each by itself, and each that could not be says why.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: json(
    z.discriminatedUnion('act', [
      z.strictObject({ act: z.literal('accept'), fileIds }),
      z.strictObject({ act: z.literal('refuse'), fileIds, reason: Reason }),
      z.strictObject({ act: z.literal('withdraw'), fileIds, reason: Reason }),
      z.strictObject({ act: z.literal('supersede'), fileIds, byFileId: z.uuid() }),
    ]),
  ),
  response: json(
    z.object({
      done: z.array(z.uuid()),
      problems: z.array(z.object({ fileId: z.uuid(), name: z.string(), message: z.string() })),
    }),
  ),
  errors: [],
  allow: 'weather.accept',
  limits: { ...ordinary, seconds: 120 },
});

export const retryWeatherFile = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files/:fileId/retry',
  summary: 'Read a file again, or judge its year again, that stopped for a fault of ours.',
  params: FileParams,
  query: empty,
  body: none,
  response: json(WeatherFile),
  errors: ['wrong_state'],
  allow: 'weather.upload',
  limits: ordinary,
});
