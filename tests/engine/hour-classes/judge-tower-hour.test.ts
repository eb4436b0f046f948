import { describe, expect, test } from 'vitest';
import { judgedAt } from '../../support/hour-at.ts';
import { presetBrief } from '../../support/presets.ts';

/** Water at 27 °C, range 5.5 K, approach 4 K, exchanger 1.5 K: a wet bulb of 21.5 °C is what it needs. */
const tower = presetBrief('process-water');
/** kg/h that circulate per kW: 3600 / (4.186 x 5.5). */
const CIRCULATION_KG_PER_H = 156.3652;

// Every expected figure is worked out by hand from method 3.1, 4 and 6.
describe('process water', () => {
  test('is cold enough up to a wet bulb of 21.5 °C, and the basin stands under the exchanger', () => {
    const met = judgedAt(tower, { dryBulbC: 35, wetBulbC: 21.49 });
    expect(met).toMatchObject({ hourClass: 'direct', met: true, running: 'tower', carriedShare: 1 });
    expect(met.supply.tempC).toBe(27);
    expect(met.waterC).toBe(25.5);
    expect(judgedAt(tower, { dryBulbC: 35, wetBulbC: 21.52 }).hourClass).toBe('short');
    const onOff = judgedAt(presetBrief('process-water', { control: 'on-off' }), { dryBulbC: 25, wetBulbC: 15 });
    expect(onOff.supply.tempC).toBeCloseTo(20.5, 3);
  });

  test('takes 0.9 of its heat as vapour, a third more by bleed, and drift of what circulates', () => {
    const { plant } = judgedAt(tower, { dryBulbC: 25, wetBulbC: 15 });
    const evaporated = (3600 * 0.9) / 2430;
    expect(plant.evaporatedLitres).toBeCloseTo(evaporated, 9);
    expect(plant.makeUpLitres).toBeCloseTo((evaporated * 4) / 3 + 0.00005 * CIRCULATION_KG_PER_H, 6);
    expect(plant).toMatchObject({ coolingKwh: 1, kwh: 0.025, backUpKw: 0 });
    expect(plant.referenceKwh).toBeCloseTo(1 / 3, 12);
  });

  test('is short below its return of 32.5 °C: a share of the load, the whole drift, the rest by the back-up', () => {
    const short = judgedAt(tower, { dryBulbC: 35, wetBulbC: 24.5 });
    expect(short).toMatchObject({ hourClass: 'short', met: false, running: 'tower' });
    expect(short.supply.tempC).toBeCloseTo(30, 3);
    expect(short.shortfallK).toBeCloseTo(3, 3);
    expect(short.carriedShare).toBeCloseTo(2.5 / 5.5, 3);
    expect(short.plant.coolingKwh).toBeCloseTo(2.5 / 5.5, 3);
    expect(short.plant.kwh).toBeCloseTo(0.025 + 3 / 5.5 / 3, 3);
    const drift = short.plant.makeUpLitres - (short.plant.evaporatedLitres * 4) / 3;
    expect(drift).toBeCloseTo(0.00005 * CIRCULATION_KG_PER_H, 6);
  });

  test('is beyond where the tower would warm it: the tower stands, the back-up takes the whole load', () => {
    const beyond = judgedAt(tower, { dryBulbC: 35, wetBulbC: 28 });
    expect(beyond).toMatchObject({ hourClass: 'beyond', running: null, waterC: null, carriedShare: 0 });
    expect(beyond.supply.tempC).toBe(32.5);
    expect(beyond.shortfallK).toBeCloseTo(6.5, 3);
    expect(beyond.plant).toMatchObject({ makeUpLitres: 0, coolingKwh: 0, backUpKw: 1 });
    expect(beyond.plant.kwh).toBeCloseTo(1 / 3, 12);
  });

  test('in frost runs on with a heated basin, else stands with the range as its shortfall', () => {
    const heated = judgedAt(tower, { dryBulbC: 1, wetBulbC: 0.5 });
    expect(heated).toMatchObject({ hourClass: 'frozen', met: true, running: 'tower', shortfallK: 0 });
    expect(heated.plant.evaporatedLitres).toBeGreaterThan(1);
    expect(heated.plant.kwh).toBe(0.025);
    const drained = judgedAt(presetBrief('process-water', { basinHeat: false }), { dryBulbC: 1, wetBulbC: 0.5 });
    expect(drained).toMatchObject({ hourClass: 'frozen', met: false, running: null, shortfallK: 5.5 });
    expect(drained.plant).toMatchObject({ makeUpLitres: 0, coolingKwh: 0 });
  });

  test('knows neither cut-in nor outdoor humidity: saturated air at 21 °C serves', () => {
    const bound = presetBrief('process-water', { cutInDepressionK: 10, maxOutdoorRhPct: 20, startRoomTempC: 50 });
    expect(judgedAt(bound, { dryBulbC: 21, wetBulbC: 21 }).hourClass).toBe('direct');
  });
});
