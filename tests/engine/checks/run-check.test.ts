import { expect, test } from 'vitest';
import { comparisonChecks, runCheck, runnableChecks } from '#engine/checks/run-check.ts';
import { heldCheck } from '../../support/held-check.ts';
import { publishedChecks } from '../../support/published-values.ts';

test('every check of data/checks can be run, and nothing else is said to be one', () => {
  const ids = publishedChecks.map(({ id }) => id);
  expect(ids).toHaveLength(38);
  expect(runnableChecks.toSorted()).toEqual(ids.toSorted());
  expect(comparisonChecks.filter((id) => !ids.includes(id))).toEqual([]);
});

test('a check says what went in, what is expected, how close, what was found and how far it can be trusted', () => {
  expect(heldCheck('P06')).toEqual([
    {
      input: 'dry bulb 7 °C, relative humidity 61 %, pressure 100000 Pa',
      expected: '3.9267 °C',
      tolerance: '± 0.004',
      found: expect.stringMatching(/^3\.92\d+ °C$/),
      holds: true,
      tag: 'seen',
    },
  ]);
});

test.each(publishedChecks.map((check) => [check.id, check] as const))(
  '%s no longer holds once its expected numbers are moved',
  (id, check) => {
    const tables = { 'golden-wetbulb.csv': 'kind,pressure_pa,tdb_c,rh_or_tdp,w,twb\nrh,101325,30,0.5,0,20.5' };
    const answers = runCheck({ ...check, cases: check.cases.map(moved) }, tables);
    expect(answers.filter(({ holds }) => !holds).length, id).toBeGreaterThan(0);
  },
);

/** Tolerances stay; every other number that a case can be held to is moved well beyond them. */
function moved(each: Readonly<Record<string, unknown>>): Record<string, unknown> {
  const held =
    /^(expected|comfortC|upperC|km|stretch|derivedC|leavingC|betweenC|rankShares|bleedPerEvaporated|mostHoursAbove|mostKgPerKwh|passes)/;
  const entries = Object.entries(each).map(([name, value]) => {
    // The properties have no number of their own but their bound.
    if (name === 'tolerance' && 'states' in each) return [name, -1];
    // Still a weight.
    if (name === 'swapWeight1') return [name, 0.9];
    return [name, held.test(name) && name !== 'leavingRhPct' ? movedValue(value) : value];
  });
  return Object.fromEntries(entries);
}

function movedValue(value: unknown): unknown {
  if (typeof value === 'number') return value * 0.5 - 3;
  if (typeof value === 'boolean') return !value;
  if (Array.isArray(value)) return value.map(movedValue);
  if (typeof value === 'object' && value !== null)
    return Object.fromEntries(Object.entries(value).map(([name, inner]) => [name, movedValue(inner)]));
  return value === null ? null : 'something else';
}
