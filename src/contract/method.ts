import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

/** A published, computed or defined value that the engine is held against, with cases whose fields each check names. */
export const PublishedCheck = z.object({
  id: z.string(),
  what: z.string(),
  source: z.string(),
  cases: z.array(z.record(z.string(), z.unknown())),
});
export type PublishedCheck = z.infer<typeof PublishedCheck>;

export const MethodChecks = z.object({
  checks: z.array(PublishedCheck),
  /** Tables that a check names as its file, by name, as CSV. */
  tables: z.record(z.string(), z.string()),
});
export type MethodChecks = z.infer<typeof MethodChecks>;

export const getMethodChecks = endpoint({
  method: 'GET',
  path: '/api/method/checks',
  summary: 'The published values that the engine is held against, with their sources and tolerances.',
  params: empty,
  query: empty,
  body: none,
  response: json(MethodChecks),
  errors: [],
  allow: 'method.view',
  limits: { ...ordinary, perMinute: 60 },
});
