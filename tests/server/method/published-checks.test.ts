import { expect, test } from 'vitest';
import { readPublishedChecks } from '../../../server/features/method/published-checks.ts';
import { publishedChecks } from '../../support/published-values.ts';

test('the method page is given every check of data/checks, with the tables that they name', async () => {
  const { checks, tables } = await readPublishedChecks();
  const byId = <Check extends { id: string }>(list: readonly Check[]) =>
    list.toSorted((one, other) => (one.id < other.id ? -1 : 1));
  // The tests know of each check in which file it stands; the page does not.
  expect(byId(checks)).toEqual(
    byId(publishedChecks).map(({ id, what, source, cases }) => ({ id, what, source, cases })),
  );
  const named = checks.flatMap(({ cases }) => cases.flatMap(({ file }) => (typeof file === 'string' ? [file] : [])));
  expect(Object.keys(tables)).toEqual(named);
  expect(tables['golden-wetbulb.csv']?.trim().split('\n')).toHaveLength(253);
});
