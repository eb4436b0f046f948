import * as z from 'zod/mini';
import type { ApiDescription, ApiOperation } from '#contract/api.ts';
import type { Endpoint, UploadBody } from '#contract/endpoint.ts';
import { type EndpointName, endpoints } from '#contract/endpoints.ts';
import { errorWords } from '#contract/error-words.ts';
import { ErrorBody, type ErrorCode, errorStatus } from '#contract/errors.ts';
import { exampleParameters, examples } from '#contract/examples.ts';
import type { PolicyName } from '#contract/policies.ts';
import { tagOf, tags } from './api-tags.ts';
import { schemaOf } from './schema-of.ts';

export type Access = ApiOperation['x-muslin-access'];

const ABOUT =
  `Everything that the pages of Muslin do goes through this API, and nothing else does. A program brings an API token, which a
lead of the team makes, in the header Authorization: Bearer TOKEN; the token acts within its team and its scopes. Every answer
carries a request id in x-request-id, and every fault is told at once, each with its path.`.replaceAll('\n', ' ');

/**
 * The API as OpenAPI 3.1.
 * @param options.accessOf who may, asked of the very rule that guards the endpoint
 */
export function describeApi(options: { version: string; accessOf: (policy: PolicyName) => Access }): ApiDescription {
  const paths: Record<string, Record<string, ApiOperation>> = {};
  for (const name of endpointNames()) {
    const endpoint: Endpoint = endpoints[name];
    const path = endpoint.path.replace(/:(\w+)/g, '{$1}');
    const operation = operationOf(name, { endpoint, access: options.accessOf(endpoint.allow) });
    paths[path] = { ...paths[path], [endpoint.method.toLowerCase()]: operation };
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Muslin', version: options.version, description: ABOUT },
    servers: [{ url: '/', description: 'This server' }],
    tags: [...tags],
    paths,
    components: {
      schemas: { Error: schemaOf(ErrorBody, 'output') },
      securitySchemes: {
        token: { type: 'http', scheme: 'bearer', description: 'An API token of the team.' },
        session: { type: 'apiKey', in: 'cookie', name: 'muslin_session', description: 'Somebody who is signed in.' },
      },
    },
  };
}

function endpointNames(): readonly EndpointName[] {
  return Object.keys(endpoints).filter((name): name is EndpointName => Object.hasOwn(endpoints, name));
}

function operationOf(name: EndpointName, { endpoint, access }: { endpoint: Endpoint; access: Access }): ApiOperation {
  const { limits } = endpoint;
  return {
    operationId: name,
    summary: endpoint.summary,
    description: accessSentence(access),
    tags: [tagOf(endpoint.path)],
    security: securityOf(access),
    parameters: [
      ...parametersOf(endpoint.params, { place: 'path', values: exampleParameters }),
      ...parametersOf(endpoint.query, { place: 'query', values: exampleOf(name).query ?? {} }),
    ],
    ...requestOf(name, endpoint),
    responses: { ...answerOf(endpoint), ...faultsOf(endpoint, access) },
    'x-muslin-access': access,
    'x-muslin-limits': {
      requestsPerMinute: limits.perMinute,
      bodyBytes: endpoint.body.kind === 'none' ? 0 : limits.bodyBytes,
      seconds: limits.seconds,
    },
  };
}

function accessSentence({ anyone, roles, scopes }: Access): string {
  if (anyone) return 'Anybody may.';
  const people = roles.length === 0 ? 'Whoever is signed in' : `A ${roles.join(', ')} of the team`;
  return scopes.length === 0
    ? `${people} may; no token may.`
    : `${people} may, and a token with ${scopes.join(' or ')}.`;
}

function securityOf({ anyone, scopes }: Access): readonly Record<string, string[]>[] {
  if (anyone) return [];
  return [{ session: [] }, ...(scopes.length === 0 ? [] : [{ token: [...scopes] }])];
}

function exampleOf(name: EndpointName): { query?: Readonly<Record<string, unknown>>; body?: unknown } {
  return examples[name] ?? {};
}

function parametersOf(
  schema: z.ZodMiniType,
  { place, values }: { place: 'path' | 'query'; values: Readonly<Record<string, unknown>> },
): ApiOperation['parameters'] {
  const { properties = {}, required = [] } = Parameters.parse(schemaOf(schema, 'input'));
  return Object.entries(properties).map(([name, of]) => ({
    name,
    in: place,
    required: required.includes(name),
    schema: of,
    ...(values[name] === undefined ? {} : { example: values[name] }),
  }));
}

const Parameters = z.object({
  properties: z.optional(z.record(z.string(), z.record(z.string(), z.unknown()))),
  required: z.optional(z.array(z.string())),
});

function requestOf(name: EndpointName, { body }: Endpoint): Pick<ApiOperation, 'requestBody'> {
  if (body.kind === 'none') return {};
  if (body.kind === 'upload')
    return { requestBody: { required: true, content: { 'multipart/form-data': { schema: uploadSchema(body) } } } };
  const example = exampleOf(name).body;
  const media = { schema: schemaOf(body.schema, 'input'), ...(example === undefined ? {} : { example }) };
  return { requestBody: { required: true, content: { 'application/json': media } } };
}

function uploadSchema({ maxFiles, maxBytes }: UploadBody): Record<string, unknown> {
  const about = `At most ${maxBytes} bytes; what it is is found out from its content.`;
  const file = { type: 'string', contentMediaType: 'application/octet-stream', description: about };
  const files = maxFiles === 1 ? file : { type: 'array', items: file, minItems: 1, maxItems: maxFiles };
  return { type: 'object', properties: { file: files }, required: ['file'], additionalProperties: false };
}

function answerOf({ response }: Endpoint): ApiOperation['responses'] {
  switch (response.kind) {
    case 'none':
      return { '204': { description: 'Done.' } };
    case 'json':
      return {
        '200': {
          description: 'The answer.',
          content: { 'application/json': { schema: schemaOf(response.schema, 'output') } },
        },
      };
    case 'events':
      return {
        '200': {
          description: 'Server-sent events, as they happen; the data of each is JSON of this schema.',
          content: { 'text/event-stream': { schema: schemaOf(response.schema, 'output') } },
        },
      };
    case 'file': {
      const media = response.mediaType.split(';')[0] ?? response.mediaType;
      return { '200': { description: 'The bytes.', content: { [media]: {} } } };
    }
  }
}

/** The codes that may be answered, by status; those that any endpoint of the kind may answer among them. */
function faultsOf(endpoint: Endpoint, access: Access): ApiOperation['responses'] {
  const codes = [...new Set<ErrorCode>([...ofEvery, ...ofKind(endpoint, access), ...endpoint.errors])];
  const statuses = [...new Set(codes.map((code) => errorStatus[code]))].sort((a, b) => a - b);
  const responses: ApiOperation['responses'] = {};
  for (const status of statuses) {
    const some = codes.filter((code) => errorStatus[code] === status);
    const description = some.map((code) => `${code}: ${errorWords[code]}`).join('\n');
    const schema = {
      allOf: [{ $ref: '#/components/schemas/Error' }],
      properties: { code: { enum: some } },
    };
    responses[String(status)] = { description, content: { 'application/json': { schema } } };
  }
  return responses;
}

const ofEvery: readonly ErrorCode[] = [
  'invalid_input',
  'two_identities',
  'too_many_requests',
  'internal',
  'unavailable',
];

function ofKind({ method, path, body }: Endpoint, { anyone }: Access): readonly ErrorCode[] {
  return [
    ...(anyone ? [] : (['not_signed_in', 'not_allowed'] as const)),
    ...(path.includes('/:') ? (['not_found'] as const) : []),
    ...(method === 'GET' ? [] : (['cross_site'] as const)),
    ...(body.kind === 'none' ? [] : (['unreadable_body', 'too_large'] as const)),
  ];
}
