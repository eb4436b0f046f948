import { expect, test } from 'vitest';
import { cautionsOf } from '../../../server/features/runs/cautions.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import { methodDefaults } from '../../../src/features/method/method-defaults.ts';
import { cautions, classRules, methodSections } from '../../../src/features/method/method-text.ts';

test('the defaults shown are those of the method, each with where it comes from', () => {
  const rows = methodDefaults();
  const defaultOf = (label: string) => rows.find((row) => row.label === label)?.value;
  expect(rows.length).toBeGreaterThanOrEqual(15);
  expect(rows.filter(({ source }) => source === '')).toEqual([]);
  // Method 3: e_dewpoint 0.65, e_exchanger 0.65, cut-in 2 K, freeze 2 °C, k 1.05, cycles 4, latent share 0.9, drift 0.005 %.
  expect(defaultOf('Dew-point effectiveness')).toBe('0.65');
  expect(defaultOf('Dry effectiveness of the exchanger')).toBe('0.65');
  expect(defaultOf('Water starts at a depression of')).toBe('2');
  expect(defaultOf('Wet parts drained at or below')).toBe('2');
  expect(defaultOf('Water over what evaporates indirectly')).toBe('1.05');
  expect(defaultOf('Cycles of concentration')).toBe('4');
  expect(defaultOf('Share of heat that evaporates')).toBe('0.9');
  expect(defaultOf('Drift')).toBe('0.005');
});

test('the method page carries every caution that results carry', () => {
  const ofResults = cautionsOf({ kind: 'typical', zone: 'Europe/Madrid', notes: [] });
  const text = [...cautions, ...methodSections.flatMap(({ paragraphs }) => paragraphs)].join(' ');
  expect(ofResults.length).toBeGreaterThan(5);
  expect(ofResults.filter((caution) => !text.includes(caution))).toEqual([]);
});

test('every hour class has its rule', () => {
  expect(Object.keys(classRules)).toEqual([...hourClasses]);
});
