/** The description of this API, made from the declarations of its endpoints, as OpenAPI 3.1. */
import * as z from 'zod/mini';
import { Role } from './accounts.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { TokenScope } from './tokens.ts';

/** JSON Schema, draft 2020-12. */
const JsonSchema = z.record(z.string(), z.unknown());
const MediaType = z.looseObject({ schema: z.optional(JsonSchema), example: z.optional(z.unknown()) });
const Content = z.record(z.string(), MediaType);

export const ApiOperation = z.looseObject({
  operationId: z.string(),
  summary: z.string(),
  tags: z.array(z.string()),
  parameters: z.array(
    z.looseObject({
      name: z.string(),
      in: z.enum(['path', 'query']),
      required: z.boolean(),
      schema: JsonSchema,
      example: z.optional(z.unknown()),
    }),
  ),
  requestBody: z.optional(z.looseObject({ required: z.boolean(), content: Content })),
  responses: z.record(z.string(), z.looseObject({ description: z.string(), content: z.optional(Content) })),
  /** Who may; nobody has to be signed in where `anyone` is true. */
  'x-muslin-access': z.object({ anyone: z.boolean(), roles: z.array(Role), scopes: z.array(TokenScope) }),
  'x-muslin-limits': z.object({ requestsPerMinute: z.int(), bodyBytes: z.int(), seconds: z.number() }),
});
export type ApiOperation = z.infer<typeof ApiOperation>;

export const ApiDescription = z.looseObject({
  openapi: z.string(),
  info: z.looseObject({ title: z.string(), version: z.string(), description: z.string() }),
  tags: z.array(z.object({ name: z.string(), description: z.string() })),
  /** By path and then by method, in lower case. */
  paths: z.record(z.string(), z.record(z.string(), ApiOperation)),
  components: z.looseObject({ schemas: z.record(z.string(), JsonSchema) }),
});
export type ApiDescription = z.infer<typeof ApiDescription>;

export const getApiDescription = endpoint({
  method: 'GET',
  path: '/api/openapi.json',
  summary: 'What this API takes and answers, as OpenAPI 3.1.',
  params: empty,
  query: empty,
  body: none,
  response: json(ApiDescription),
  errors: [],
  allow: 'anyone',
  limits: { ...ordinary, perMinute: 120 },
});
