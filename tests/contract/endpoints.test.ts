import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import type { Endpoint } from '#contract/endpoint.ts';
import { endpoints } from '#contract/endpoints.ts';
import { errorStatus } from '#contract/errors.ts';
import { policyNames } from '#contract/policies.ts';
import { policies } from '../../server/http/authorise.ts';
import { codeFiles, readSource } from '../support/source-files.ts';

const declared: [string, Endpoint][] = Object.entries(endpoints);

/** The names of an object schema's fields, in order. */
function fieldsOf(schema: Endpoint['params']): string[] {
  const definition: object = schema.def;
  if (!('shape' in definition) || typeof definition.shape !== 'object' || definition.shape === null) return [];
  return Object.keys(definition.shape);
}

/** A body that is one of several is looked at one by one. */
function alternativesOf(schema: z.ZodMiniType): readonly z.ZodMiniType[] {
  return schema instanceof z.ZodMiniDiscriminatedUnion ? schema._zod.def.options.filter(isSchema) : [schema];
}

function isSchema(option: unknown): option is z.ZodMiniType {
  return option instanceof z.ZodMiniType;
}

describe('the list of declarations', () => {
  test('holds every declaration of the contract', () => {
    const names = codeFiles('src/contract').flatMap((file) =>
      [...readSource(file).matchAll(/^export const (\w+) = endpoint\(/gm)].map((match) => match[1]),
    );
    expect(names.length).toBeGreaterThan(10);
    expect(Object.keys(endpoints).sort()).toEqual(names.sort());
  });

  test('has no two endpoints of one method and path, whatever their parameters are called', () => {
    const keys = declared.map(([, { method, path }]) => `${method} ${path.replace(/:\w+/g, ':')}`);
    expect(keys.filter((key, index) => keys.indexOf(key) !== index)).toEqual([]);
  });

  test.each(declared)('%s takes exactly the parameters that its path names', (_name, { path, params }) => {
    const named = [...path.matchAll(/:(\w+)/g)].map((match) => match[1]);
    expect(fieldsOf(params).sort()).toEqual(named.sort());
  });

  test.each(declared)(
    '%s refuses parameters, query and body that it does not name',
    (_name, { params, query, body }) => {
      const schemas = [params, query, ...(body.kind === 'json' ? [body.schema] : [])];
      for (const schema of schemas.flatMap(alternativesOf)) {
        const result = schema.safeParse({ somethingElse: 1 });
        const codes = result.success ? [] : result.error.issues.map((issue) => issue.code);
        expect(codes).toContain('unrecognized_keys');
      }
    },
  );

  test.each(declared)(
    '%s says what it does in a sentence and keeps to sane limits',
    (_name, { summary, limits, body }) => {
      expect(summary).toMatch(/^[A-Z].+\.$/);
      expect(limits.bodyBytes).toBeGreaterThan(0);
      expect(limits.perMinute).toBeGreaterThan(0);
      expect(limits.seconds).toBeGreaterThan(0);
      // The server cuts a request after 1,820 s whatever it is (server/web.ts); only an archive takes so long.
      expect(limits.seconds).toBeLessThanOrEqual(body.kind === 'upload' ? 1800 : 300);
      if (body.kind === 'upload') expect(limits.bodyBytes).toBe(body.maxBytes * body.maxFiles);
    },
  );

  test.each(declared)('%s carries a team in its path unless it is about an account or the method', (name, { path }) => {
    const ofNoTeam = ['getSession', 'signIn', 'signOut', 'setUp', 'getMethodChecks', 'getApiDescription'];
    // Links out of mails, whose key says whose they are, and the team that is being made.
    const byKey = ['askReset', 'resetPassword', 'confirmEmail', 'openInvitation', 'acceptAsNewPerson', 'makeTeam'];
    const ofTeam = /^\/api\/teams\/:teamId(\/|$)/.test(path);
    const ofAccount = /^\/api\/account(\/|$)/.test(path);
    expect(ofTeam || ofAccount || ofNoTeam.includes(name) || byKey.includes(name)).toBe(true);
  });
});

describe('policies and errors', () => {
  test('every policy has a rule, and no rule is without its policy', () => {
    expect(Object.keys(policies).sort()).toEqual([...policyNames].sort());
  });

  test('every policy is used by an endpoint', () => {
    const used = new Set(declared.map(([, { allow }]) => allow));
    expect(policyNames.filter((name) => !used.has(name))).toEqual([]);
  });

  test('every error code has a status of the 4xx or 5xx range', () => {
    const statuses = Object.values(errorStatus);
    expect(statuses.length).toBeGreaterThan(10);
    for (const status of statuses) expect(status >= 400 && status <= 599).toBe(true);
  });
});
