import { describe, expect, test } from 'vitest';
import type { ApiOperation } from '../../../src/contract/api.ts';
import { curlLine } from '../../../src/features/api/curl-line.ts';
import { schemaRows } from '../../../src/features/api/schema-rows.ts';

const rowsOf = (schema: Record<string, unknown>) =>
  schemaRows(schema).map(({ name, type, required, limits }) => [name, type, required, limits]);

describe('a schema as rows', () => {
  test('tells every field, however deep, with its type and what may stand in it', () => {
    const schema = {
      type: 'object',
      required: ['name', 'stations'],
      properties: {
        name: { type: 'string', minLength: 1, maxLength: 120 },
        page: { type: 'integer', minimum: 1, maximum: Number.MAX_SAFE_INTEGER, default: 1 },
        kind: { type: 'string', enum: ['typical', 'actual'] },
        stations: {
          type: 'array',
          items: {
            type: 'object',
            properties: {
              id: { type: 'string', format: 'uuid' },
              score: { anyOf: [{ type: 'number' }, { type: 'null' }] },
            },
          },
        },
      },
    };
    expect(rowsOf(schema)).toEqual([
      ['name', 'text', true, '1 to 120 characters'],
      ['page', 'whole number', false, 'from 1, 1 when left out'],
      ['kind', 'one of', false, 'typical, actual'],
      ['stations', 'list of object', true, ''],
      ['stations[].id', 'id', false, ''],
      ['stations[].score', 'number or null', false, ''],
    ]);
  });

  test('tells what several shapes share once', () => {
    const shape = (kind: string, more: object) => ({
      type: 'object',
      properties: { kind: { const: kind }, id: { type: 'string' }, ...more },
    });
    const schema = { oneOf: [shape('a', {}), shape('b', { size: { type: 'number' } })] };
    expect(rowsOf(schema).map(([name, type]) => `${name} ${type}`)).toEqual([
      'kind "a"',
      'id text',
      'kind "b"',
      'size number',
    ]);
  });
});

describe('a line for a shell', () => {
  const operation: ApiOperation = {
    ...{ operationId: 'x', summary: 'X.', tags: [], responses: {} },
    parameters: [
      { name: 'teamId', in: 'path', required: true, schema: {}, example: 'example' },
      { name: 'text', in: 'query', required: true, schema: {}, example: 'a b' },
      { name: 'limit', in: 'query', required: false, schema: {} },
    ],
    'x-muslin-access': { anyone: false, roles: [], scopes: ['results:read'] },
    'x-muslin-limits': { requestsPerMinute: 1, bodyBytes: 1, seconds: 1 },
  };
  const line = (method: string, changes: Partial<ApiOperation> = {}) =>
    curlLine({
      ...{ origin: 'https://muslin.example', method, path: '/api/teams/{teamId}/things', own: { teamId: 'mine' } },
      operation: { ...operation, ...changes },
    });
  const url = "'https://muslin.example/api/teams/mine/things?text=a+b'";

  test('has the reader’s own team, the example’s query and the token’s place', () => {
    expect(line('get')).toBe(`curl -H 'Authorization: Bearer TOKEN' ${url}`);
    expect(line('post')).toBe(`curl -H 'Authorization: Bearer TOKEN' -X POST ${url}`);
  });

  test('keeps a quote in a body from ending the body', () => {
    const requestBody = { required: true, content: { 'application/json': { example: { name: "O'Brien" } } } };
    expect(line('put', { requestBody })).toBe(
      `curl -X PUT -H 'Authorization: Bearer TOKEN' -H 'Content-Type: application/json' -d '{"name":"O'\\''Brien"}' ${url}`,
    );
    const upload = { required: true, content: { 'multipart/form-data': {} } };
    expect(line('post', { requestBody: upload })).toContain("-F 'file=@year.epw'");
  });
});
