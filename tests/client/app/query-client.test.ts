import { describe, expect, it } from 'vitest';
import { isWorthRetrying, makeQueryClient, waitBeforeRetryMs } from '../../../src/app/query-client.ts';
import { ApiError } from '../../../src/lib/api-error.ts';
import { sessionQuery } from '../../../src/lib/session-query.ts';

const failing = (code: ConstructorParameters<typeof ApiError>[0]['code'], retryAfterS: number | null = null) =>
  new ApiError({ code, message: 'x', retryAfterS });

describe('retrying a query', () => {
  it('happens for a lost connection and a server that is away, four times', () => {
    for (const code of ['network', 'unavailable'] as const) {
      expect([0, 1, 2, 3, 4].map((failures) => isWorthRetrying(failures, failing(code)))).toEqual([
        true,
        true,
        true,
        true,
        false,
      ]);
    }
  });

  it('happens for no other answer', () => {
    for (const code of ['not_found', 'internal', 'not_signed_in', 'too_many_requests', 'unexpected_answer'] as const) {
      expect(isWorthRetrying(0, failing(code)), code).toBe(false);
    }
    expect(isWorthRetrying(0, new TypeError('x'))).toBe(false);
  });

  it('waits as long as the server asks, at most half a minute, else longer each time', () => {
    expect(waitBeforeRetryMs(0, failing('unavailable', 7))).toBe(7_000);
    expect(waitBeforeRetryMs(0, failing('unavailable', 600))).toBe(30_000);
    expect([0, 1, 2, 3].map((failures) => waitBeforeRetryMs(failures, failing('network')))).toEqual([
      1_000, 2_000, 4_000, 8_000,
    ]);
  });
});

describe('an answer 401, wherever it comes from', () => {
  const person = { id: '3f1c9a52-9a57-4a3e-8a38-0f8d3c1b2a01', name: 'A', email: 'a@example.org' };

  it('ends the session that the pages see', async () => {
    const client = makeQueryClient();
    client.setQueryData(sessionQuery.queryKey, { person, memberships: [] });
    const queryFn = () => Promise.reject(failing('not_signed_in'));
    await expect(client.fetchQuery({ queryKey: ['any'], queryFn })).rejects.toMatchObject({ code: 'not_signed_in' });
    expect(client.getQueryData(sessionQuery.queryKey)).toEqual({ person: null, memberships: [] });
    client.clear();
  });

  it('leaves the session alone when it only says that e-mail and password do not belong together', async () => {
    const client = makeQueryClient();
    client.setQueryData(sessionQuery.queryKey, { person, memberships: [] });
    const queryFn = () => Promise.reject(failing('wrong_sign_in'));
    await expect(client.fetchQuery({ queryKey: ['any'], queryFn })).rejects.toMatchObject({ code: 'wrong_sign_in' });
    expect(client.getQueryData(sessionQuery.queryKey)).toMatchObject({ person });
    client.clear();
  });
});
