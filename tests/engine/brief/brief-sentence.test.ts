import { expect, test } from 'vitest';
import { briefSentence } from '#engine/brief/brief-sentence.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';

test('the office brief reads as one plain sentence', () => {
  expect(briefSentence(presetBrief('office'))).toBe(
    '26 °C room, at most 65 % relative humidity, open 08 to 18 Monday to Friday, direct, indirect and two-stage, at most 3 % of demand hours unmet',
  );
});

test('hard limits, months and a lack of caps are said', () => {
  expect(briefSentence(presetBrief('broiler', { months: [6, 7] }))).toBe(
    '29 °C room, open day and night every day in Jun, Jul, direct, at most 0.5 % of demand hours unmet, no hour over 33 °C',
  );
});

test('every preset has a sentence of its own without a field that is not known', () => {
  const sentences = presetNames.map((name) => briefSentence(presetBrief(name)));
  expect(new Set(sentences).size).toBe(11);
  expect(sentences.filter((sentence) => /undefined|null|NaN|\[object/.test(sentence))).toEqual([]);
});
