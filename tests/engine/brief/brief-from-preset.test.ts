import { describe, expect, test } from 'vitest';
import { BriefFaultsError } from '#engine/brief/brief-fault.ts';
import { briefFromPreset, readBrief } from '#engine/brief/brief-from-preset.ts';
import { presetBrief, presetNames, rawPreset } from '../../support/presets.ts';

function faultPaths(raw: unknown): string[] {
  const reading = readBrief(raw);
  return reading.ok ? [] : reading.faults.map(({ path }) => path);
}

describe('a brief from a preset', () => {
  test('every preset that ships is read without a fault', () => {
    const faults = presetNames.map((name) => [name, faultPaths(rawPreset(name))]);
    expect(faults).toHaveLength(11);
    expect(faults.filter(([, paths]) => paths?.length !== 0)).toEqual([]);
  });

  test('every field of a preset stands in its brief, under its own name', () => {
    for (const name of presetNames) {
      const { id, dates, ...fields } = rawPreset(name);
      expect(dates).toEqual([]);
      expect(presetBrief(name)).toMatchObject({ preset: id, ...fields });
    }
  });

  test('the score components, weights and anchors of the method are filled in', () => {
    const { score } = presetBrief('office');
    expect(score.map(({ weight }) => weight)).toEqual([30, 10, 10, 10, 15, 15, 10]);
    expect(score.map(({ a0, a100 }) => [a0, a100])).toEqual([
      [70, 99],
      [300, 0],
      [240, 0],
      [40, 0],
      [5, 0.5],
      [0, 60],
      [70, 99],
    ]);
  });

  test('a brief that was read is read again to the same brief', () => {
    for (const name of presetNames) {
      const brief = presetBrief(name);
      expect(briefFromPreset(JSON.parse(JSON.stringify(brief)))).toEqual(brief);
    }
  });

  test('a field left out takes the default of the method', () => {
    const brief = briefFromPreset({ id: 'plain', limit: { kind: 'fixed', tempC: 26 }, dTroomK: 5, stages: ['direct'] });
    expect(brief).toMatchObject({
      control: 'modulating',
      effDirect: 0.85,
      effIndirect: 0.65,
      cutInDepressionK: 2,
      freezeLockoutC: 2,
      balanceTempC: 14,
      cycles: 4,
      k: 1.05,
      startRoomTempC: null,
      hours: '0-24',
      tolerance: {},
    });
  });

  test('every fault is reported at once, each with its path', () => {
    const raw = {
      ...rawPreset('office'),
      effDirect: 1.2,
      cycles: 1,
      hours: '18-8',
      months: [0],
      caps: { roomRhPct: 130, dampness: 3 },
      limit: { kind: 'fixed', tempC: Number.NaN },
      fanWPerLs: { air: -1 },
      stages: ['direct', 'sprinkler'],
      score: [{ component: 'served', weight: 60, a0: 1, a100: 1 }],
      colour: 'blue',
    };
    expect(faultPaths(raw).toSorted()).toEqual(
      [
        'effDirect',
        'cycles',
        'hours',
        'months',
        'caps.roomRhPct',
        'caps.dampness',
        'limit.tempC',
        'fanWPerLs.air',
        'stages',
        'score[0].a100',
        'score',
        'colour',
      ].toSorted(),
    );
  });

  test.each([
    ['effDirect', -0.1],
    ['effIndirect', 1.01],
    ['effDewPoint', '0.6'],
    ['effExchanger', null],
    ['cutInDepressionK', -1],
    ['startRoomTempC', 99],
    ['maxOutdoorRhPct', 101],
    ['freezeLockoutC', 31],
    ['balanceTempC', -51],
    ['dwRoomKgKg', -0.001],
    ['pumpKwPerKw', 2],
    ['k', 0],
    ['cycles', 1],
    ['driftPctOfCirculation', -1],
    ['dTroomK', 0],
    ['basinHeat', 'yes'],
    ['phi', 'square'],
    ['control', 'fuzzy'],
    ['clock', 'sun'],
    ['weekdays', 'weekend'],
    ['hours', '8-25'],
    ['hours', '8-8'],
    ['months', []],
    ['months', [13]],
    ['dates', ['2026-05-01']],
    ['stages', 'direct'],
    ['stages', ['direct', 'direct']],
    ['stages', ['tower']],
    ['primaryAir', 'return'],
  ])('%s of %j is refused, named by its path', (field, value) => {
    expect(faultPaths({ ...rawPreset('office'), [field]: value })).toContain(field);
  });

  test.each([
    ['reference.cop', { reference: { cop: 0, economy: true } }],
    ['tolerance.sharePct', { tolerance: { sharePct: 101 } }],
    ['hardLimits[0].tempC', { hardLimits: [{ tempC: 20, hours: 0 }] }],
    ['lowerLimits.roomRhPct', { lowerLimits: { roomRhPct: 70 } }],
    ['limit.kind', { limit: {} }],
    ['score', { score: [{ component: 'served', weight: 90, a0: 70, a100: 99 }] }],
    ['balanceTempC', { balanceTempC: 27 }],
  ])('a contradiction at %s is refused', (path, change) => {
    expect(faultPaths({ ...rawPreset('office'), ...change })).toEqual([path]);
  });

  test.each([[null], [undefined], ['office'], [[]], [42]])('%j is no brief and says so', (raw) => {
    expect(() => briefFromPreset(raw)).toThrow(BriefFaultsError);
  });
});
