import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { publishedChecks, realFileChecks } from '../support/published-values.ts';

/** The checks that are promised so far; a later one is added here together with its data and its test. */
const PROMISED = [
  ...Array.from({ length: 15 }, (_none, index) => `P${String(index + 1).padStart(2, '0')}`),
  'C01',
  'C02',
  'C03',
  'C04',
  'C05',
  'E01',
  'E02',
  'E03',
  'E04',
  'E05',
  'E06',
  'E07',
  'N01',
  'N02',
  'D01',
  'D02',
  'D03',
  'D04',
  'D05',
  'F01',
  'F02',
  'I01',
  'I02',
  'S01',
  'S02',
];

const testSources = readdirSync(new URL('./', import.meta.url))
  .filter((name) => name.endsWith('.test.ts'))
  .map((name) => readFileSync(new URL(name, import.meta.url), 'utf8'));

/** A test whose title begins with the id, or one that runs over every check of the file. */
function hasTest({ file, id }: { file: string; id: string }): boolean {
  return testSources.some(
    (source) => source.includes(`test('${id} `) || (source.includes(file) && source.includes('test.each(checks)')),
  );
}

test('every promised check has its numbers in data/checks, with a source and a tag, and a test of its name', () => {
  expect(PROMISED).toHaveLength(40);
  const checks = [...publishedChecks, ...realFileChecks];
  const ids = checks.map(({ id }) => id);
  expect(new Set(ids).size).toBe(ids.length);
  expect(PROMISED.filter((id) => !ids.includes(id))).toEqual([]);
  expect(checks.filter((check) => !hasTest(check)).map(({ id }) => id)).toEqual([]);
  for (const check of checks) {
    expect(check.source, check.id).not.toBe('');
    expect(check.cases.length, check.id).toBeGreaterThan(0);
    for (const each of check.cases) {
      expect(['seen', 'computed', 'definition', 'from memory'], check.id).toContain(each.tag);
    }
  }
});
