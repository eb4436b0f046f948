import { Validator } from '@seriousme/openapi-schema-validator';
import { describe, expect, test } from 'vitest';
import { accessOf } from '../../../server/http/access-of.ts';
import { describeApi } from '../../../server/http/describe-api.ts';
import { ApiDescription, type ApiOperation } from '../../../src/contract/api.ts';
import type { Endpoint } from '../../../src/contract/endpoint.ts';
import { endpoints } from '../../../src/contract/endpoints.ts';
import { errorStatus } from '../../../src/contract/errors.ts';

const description = describeApi({ version: '0.0.0', accessOf });
const operations = new Map<string, ApiOperation>(
  Object.values(description.paths).flatMap((path) => Object.values(path).map((each) => [each.operationId, each])),
);
const declared: [string, Endpoint][] = Object.entries(endpoints);

function operation(name: string): ApiOperation {
  const found = operations.get(name);
  if (found === undefined) throw new Error(`${name} is not described`);
  return found;
}

describe('the description of the API', () => {
  // The schema that the OpenAPI Initiative publishes for 3.1, with draft 2020-12 for what stands in it.
  test('is valid OpenAPI 3.1 to a validator of others', async () => {
    const validator = new Validator();
    const result = await validator.validate(JSON.parse(JSON.stringify(description)));
    expect(result).toMatchObject({ valid: true });
    expect(validator.version).toBe('3.1');
    const broken = { ...description, paths: { '/x': { get: { responses: { '200': {} } } } } };
    expect(await new Validator().validate(JSON.parse(JSON.stringify(broken)))).toMatchObject({ valid: false });
  });

  test('is what the page of it reads', () => {
    expect(ApiDescription.safeParse(description).success).toBe(true);
  });

  test.each(declared)('holds %s with its path, parameters, body, answer and limits', (name, endpoint) => {
    const { method, path, body, response, limits, summary } = endpoint;
    const described = operation(name);
    expect(description.paths[path.replace(/:(\w+)/g, '{$1}')]?.[method.toLowerCase()]).toBe(described);
    expect(described.summary).toBe(summary);
    const ofPath = described.parameters.filter((parameter) => parameter.in === 'path');
    expect(ofPath.map((parameter) => parameter.name)).toEqual([...path.matchAll(/:(\w+)/g)].map(([, id]) => id));
    for (const { required } of ofPath) expect(required).toBe(true);
    const kinds = { json: 'application/json', upload: 'multipart/form-data' };
    const media = Object.keys(described.requestBody?.content ?? {});
    expect(media).toEqual(body.kind === 'none' ? [] : [kinds[body.kind]]);
    expect(Object.keys(described.responses)[0]).toBe(response.kind === 'none' ? '204' : '200');
    expect(described['x-muslin-limits']).toMatchObject({
      requestsPerMinute: limits.perMinute,
      seconds: limits.seconds,
    });
  });

  test.each(declared)('names for %s every code that it declares, by status', (name, { errors }) => {
    const { responses } = operation(name);
    for (const code of errors) expect(responses[errorStatus[code]]?.description).toContain(`${code}: `);
    for (const status of [400, 429, 500, 503]) expect(responses).toHaveProperty(String(status));
  });

  test('says who may as the rules say it', () => {
    expect(operation('getMap')['x-muslin-access']).toEqual({
      anyone: false,
      roles: ['viewer', 'planner', 'engineer', 'lead'],
      scopes: ['results:read'],
    });
    expect(operation('uploadWeatherFile')['x-muslin-access']).toMatchObject({
      roles: ['engineer', 'lead'],
      scopes: ['weather:upload'],
    });
    expect(operation('makeToken')['x-muslin-access']).toEqual({ anyone: false, roles: ['lead'], scopes: [] });
    expect(operation('getAccount')['x-muslin-access']).toEqual({ anyone: false, roles: [], scopes: [] });
    expect(operation('signIn')['x-muslin-access']).toEqual({ anyone: true, roles: [], scopes: [] });
  });

  test('says how many files an upload takes and how large each may be', () => {
    const schema = operation('uploadWeatherFiles').requestBody?.content['multipart/form-data']?.schema;
    const { maxFiles, maxBytes } = endpoints.uploadWeatherFiles.body;
    expect(schema).toMatchObject({ properties: { file: { type: 'array', maxItems: maxFiles } } });
    expect(JSON.stringify(schema)).toContain(`At most ${maxBytes} bytes`);
  });
});
