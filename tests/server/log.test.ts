import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { jsonLinesLog } from '../../server/log.ts';
import { makeTestDatabase, type TestDatabase } from '../support/test-database.ts';

const lines: string[] = [];
const log = jsonLinesLog(
  (line) => lines.push(line),
  () => new Date('2027-03-31T12:00:00Z'),
);
const lastLine = (): string => lines.at(-1) ?? '';

let database: TestDatabase;
beforeAll(async () => {
  database = await makeTestDatabase();
});
afterAll(() => database.drop());

describe('the log of the server', () => {
  test('is one JSON object a line, whatever somebody has put into a path or a name', () => {
    const path = '/api/x\r\n{"level":"error","message":"forged"}\u2028\u0000\u001b[31m';
    log.error({ path, requestId: 'a' }, 'answered 500');
    expect(lastLine().endsWith('}\n')).toBe(true);
    expect(lastLine().slice(0, -1)).not.toMatch(/\p{Cc}/u);
    expect(JSON.parse(lastLine())).toEqual({
      at: '2027-03-31T12:00:00.000Z',
      level: 'error',
      message: 'answered 500',
      path,
      requestId: 'a',
    });
  });

  test('withholds what opens an account or a store, however deep it stands', () => {
    const value = 'correct horse battery';
    const headers = { cookie: value, Authorization: value, 'x-api-token': value };
    log.error({ headers, body: { password: value, newPassword: value }, sessionSecret: value, sid: value }, 'x');
    expect(lastLine()).not.toContain(value);
    const { name, age } = JSON.parse(lastLine().replace('"x"', '"x","name":"n","age":null'));
    expect({ name, age }).toEqual({ name: 'n', age: null });
  });

  test('says of a fault of the database what it was, and nothing of the row that it refused', async () => {
    const person = { email: 'Upper@example.org', name: 'Ada', password_hash: 'the-hash-of-a-password' };
    const error = await database
      .db('people')
      .insert(person)
      .catch((thrown: unknown) => thrown);
    log.error({ error, requestId: 'b' }, 'answered 500');
    expect(JSON.stringify(error)).toContain('the-hash-of-a-password');
    expect(lastLine()).not.toContain('the-hash-of-a-password');
    expect(lastLine()).not.toContain('Upper@example.org');
    const logged = JSON.parse(lastLine());
    expect(logged.error).toMatchObject({ code: '23514', table: 'people', constraint: 'people_email_check' });
    expect(logged.error.stack).toContain('people_email_check');
  });

  test('carries the cause of an error', () => {
    log.error({ error: new Error('outer', { cause: new Error('inner') }) }, 'x');
    expect(JSON.parse(lastLine()).error).toMatchObject({ message: 'outer', cause: { message: 'inner' } });
  });
});
