import { expect, test } from 'vitest';
import { readPublishedChecks } from '../../../server/features/method/published-checks.ts';
import { publishedChecks } from '../../support/published-values.ts';

test('the method page is given every check of data/checks, with the tables that they name', async () => {
  const { checks, tables } = await readPublishedChecks();
  const byId = (list: readonly { id: string }[]) => list.toSorted((one, other) => (one.id < other.id ? -1 : 1));
  expect(byId(checks)).toEqual(byId(publishedChecks));
  const named = checks.flatMap(({ cases }) => cases.flatMap(({ file }) => (typeof file === 'string' ? [file] : [])));
  expect(Object.keys(tables)).toEqual(named);
  expect(tables['golden-wetbulb.csv']?.trim().split('\n')).toHaveLength(253);
});
