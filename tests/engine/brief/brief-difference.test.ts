import { describe, expect, test } from 'vitest';
import type { Brief } from '../../../src/engine/brief/brief.ts';
import { briefDifference } from '../../../src/engine/brief/brief-difference.ts';
import { fieldsOfLimit } from '../../../src/engine/brief/brief-fields.ts';
import { canonicalJson } from '../../../src/engine/brief/canonical-json.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';

const office = presetBrief('office');

describe('the difference of two briefs', () => {
  test('is empty for equal bodies, whatever the order of their fields', () => {
    const turned: Brief = JSON.parse(canonicalJson(office));
    expect(briefDifference(office, turned)).toEqual([]);
  });

  test('is never empty between two presets, and never says an empty or a raw value', () => {
    let pairs = 0;
    for (const one of presetNames) {
      for (const other of presetNames) {
        const changes = briefDifference(presetBrief(one), presetBrief(other));
        expect(changes.length > 0, `${one}, ${other}`).toBe(one !== other);
        for (const change of changes) {
          for (const words of [change.label, change.before, change.after]) {
            expect(words, change.path).not.toMatch(/^$|undefined|null|NaN|\[object/);
          }
          expect(change.before, change.path).not.toBe(change.after);
        }
        pairs += 1;
      }
    }
    expect(pairs).toBe(121);
  });

  test('names fields, lists and components in words with units, in the order of a brief', () => {
    const after: Brief = {
      ...office,
      limit: { kind: 'adaptive', model: 'en16798-ii', ceilingC: 30 },
      caps: { roomRhPct: 70 },
      effDirect: 0.75,
      months: [5, 6, 7],
      hardLimits: [{ tempC: 32, hours: 0 }],
      prices: { currency: 'EUR', waterPerM3: 2 },
      reference: { cop: 3, economy: false },
      score: office.score.map((part) => (part.component === 'water' ? { ...part, a0: 8 } : part)),
    };
    expect(briefDifference(office, after).map(({ label, before, after: now }) => [label, before, now])).toEqual([
      ['What is limited', 'a fixed room temperature', 'an adaptive room temperature'],
      ['Room temperature', '26 °C', 'none'],
      ['Adaptive model', 'none', 'EN 16798-1, category II'],
      ['Ceiling over the adaptive limit', 'none', '30 °C'],
      ['Room humidity, at most', '65 % RH', '70 % RH'],
      ['Direct effectiveness', '0.85', '0.75'],
      ['Outdoor air serves it too', 'yes', 'no'],
      ['Currency', 'none', 'EUR'],
      ['Water', 'none', '2 per m³'],
      ['Months', 'all', 'May, Jun, Jul'],
      ['Hard limits', 'none', '0 h over 32 °C'],
      ['Score, make-up water, L per kWh', 'weight 15, 0 at 5, 100 at 0.5', 'weight 15, 0 at 8, 100 at 0.5'],
    ]);
  });
});

describe('the table of fields', () => {
  test('names for every preset only fields that a brief of its limit has, once each', () => {
    for (const id of presetNames) {
      const brief = presetBrief(id);
      const paths = fieldsOfLimit(brief.limit).map(({ path }) => path);
      expect(new Set(paths).size, id).toBe(paths.length);
      for (const path of paths.filter((each) => each.startsWith('limit.') && each !== 'limit.derate')) {
        expect(Object.keys(brief.limit), `${id} ${path}`).toContain(path.slice('limit.'.length));
      }
    }
  });
});
