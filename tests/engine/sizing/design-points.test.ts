import { describe, expect, test } from 'vitest';
import { volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { sizeAtDesignPoints } from '#engine/sizing/design-points.ts';
import { judgedAt } from '../../support/hour-at.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const year = syntheticYear({ at: () => ({ dryBulbC: 25, humidityRatio: 0.008, pressurePa: 100000 }) });
const row = { percent: 1, valueC: 38, coincidentC: 20 };
const design = { dryBulb: [row], wetBulb: [{ percent: 1, valueC: 23, coincidentC: 33 }], dewPoint: [] };
const heightM = 110;

describe('the plant at a design point', () => {
  test('is that of an hour with the design dry bulb and its mean coincident wet bulb', () => {
    const brief = presetBrief('office');
    const { points, caution } = sizeAtDesignPoints({ year, design, brief, heightM });
    const hour = judgedAt(brief, { dryBulbC: 38, wetBulbC: 20, pressurePa: 100000 });
    expect(points).toHaveLength(1);
    expect(points[0]).toMatchObject({ percent: 1, dryBulbC: 38, wetBulbC: 20 });
    expect(points[0]?.state).toMatchObject({
      hourClass: hour.hourClass,
      running: hour.running,
      supplyC: hour.supply.tempC,
      capacityKw: 1,
      backUpKw: 0,
      makeUpLitresPerH: hour.plant.makeUpLitres,
    });
    expect(caution).toBe('not for sizing: a typical year hides extremes');
  });

  test('moves design load / (cp dT_room) of air at the density of what enters', () => {
    const [point] = sizeAtDesignPoints({ year, design, brief: presetBrief('office'), heightM }).points;
    const entering = volumeM3PerKg(38, humidityRatioOnWetBulbLine(38, 20, 100000), 100000);
    expect(point?.state?.airflowLPerS).toBeCloseTo((1000 * entering) / (1.006 * 5), 9);
    const [hall] = sizeAtDesignPoints({ year, design, brief: presetBrief('hall-recommended'), heightM }).points;
    expect(hall?.state?.airflowLPerS).toBeCloseTo((1000 * entering) / (1.006 * 12), 9);
  });

  test('of a tower is the design wet bulb, with no air to supply', () => {
    const [point] = sizeAtDesignPoints({ year, design, brief: presetBrief('process-water'), heightM }).points;
    expect(point).toMatchObject({ dryBulbC: 33, wetBulbC: 23 });
    // 23 + 4 + 1.5 = 28.5 °C, 4 of 5.5 K.
    expect(point?.state?.capacityKw).toBeCloseTo(4 / 5.5, 3);
    expect(point?.state).toMatchObject({ hourClass: 'short', airflowLPerS: null });
  });

  test('under the balance temperature has no demand', () => {
    const mild = { ...design, dryBulb: [{ percent: 10, valueC: 13, coincidentC: 11 }] };
    const { points } = sizeAtDesignPoints({ year, design: mild, brief: presetBrief('office'), heightM });
    expect(points).toEqual([{ percent: 10, dryBulbC: 13, wetBulbC: 11, state: null }]);
  });

  test('of an actual year carries no caution; a year without pressure has no points', () => {
    const actual = { ...year, kind: 'actual', year: 2020 } as const;
    expect(sizeAtDesignPoints({ year: actual, design, brief: presetBrief('office'), heightM }).caution).toBeNull();
    const unknown = syntheticYear({ at: () => null });
    expect(sizeAtDesignPoints({ year: unknown, design, brief: presetBrief('office'), heightM }).points).toEqual([]);
  });

  test('has figures and nothing else under every preset', () => {
    const states = presetNames.map((name) => sizeAtDesignPoints({ year, design, brief: presetBrief(name), heightM }));
    const figures = states.flatMap(({ points }) => points.flatMap(({ state }) => Object.values(state ?? {})));
    expect(states).toHaveLength(11);
    expect(figures.filter((figure) => typeof figure === 'number' && !Number.isFinite(figure))).toEqual([]);
    expect(figures.length).toBeGreaterThan(60);
  });
});
