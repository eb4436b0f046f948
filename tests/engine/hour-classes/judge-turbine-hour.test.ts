import { describe, expect, test } from 'vitest';
import { tallyDegreeHours } from '#engine/water-energy/tally-turbine.ts';
import { judgedAt } from '../../support/hour-at.ts';
import { hoursLike } from '../../support/judged-hours.ts';
import { presetBrief } from '../../support/presets.ts';

/** Target and floor at 15 °C, effectiveness 0.9, frost lockout at 5 °C. */
const turbine = presetBrief('turbine-inlet');

// Every expected figure is worked out by hand from method 3.1, 4, 5 and 6.
describe('the inlet of a turbine', () => {
  test('is cooled to the floor and no further: direct, on the line of constant wet bulb', () => {
    const met = judgedAt(turbine, { dryBulbC: 25, wetBulbC: 12 });
    expect(met).toMatchObject({ hourClass: 'direct', met: true, running: 'direct', airMeets: false });
    expect(met.supply.tempC).toBe(15);
    expect(met.supply.share).toBeCloseTo(10 / (0.9 * 13), 3);
    expect(met.plant.coolingKwh).toBeCloseTo(10, 9);
    const gained = (met.supply.humidityRatio ?? Number.NaN) - met.hour.outdoor.humidityRatio;
    expect(met.plant.evaporatedLitres).toBeCloseTo((3600 * gained) / 1.006, 9);
  });

  test('has no electricity to speak of and no back-up', () => {
    const { plant } = judgedAt(turbine, { dryBulbC: 40, wetBulbC: 22 });
    expect(plant).toMatchObject({ kwh: null, referenceKwh: null, backUpKw: 0 });
  });

  test('is short with 1 K gained, beyond with less, and then runs no water', () => {
    const short = judgedAt(turbine, { dryBulbC: 40, wetBulbC: 22 });
    expect(short).toMatchObject({ hourClass: 'short', met: false, running: 'direct' });
    expect(short.shortfallK).toBeCloseTo(40 - 0.9 * 18 - 15, 3);
    const beyond = judgedAt(presetBrief('turbine-inlet', { cutInDepressionK: 0 }), { dryBulbC: 30, wetBulbC: 29 });
    expect(beyond).toMatchObject({ hourClass: 'beyond', running: 'air', waterC: null });
    expect(beyond.shortfallK).toBeCloseTo(30 - 0.9 - 15, 3);
    expect(beyond.plant).toMatchObject({ makeUpLitres: 0, coolingKwh: 0 });
  });

  test('is as warm as outdoors where the stage may not run', () => {
    const damp = judgedAt(turbine, { dryBulbC: 30, wetBulbC: 29 });
    expect(damp).toMatchObject({ hourClass: 'beyond', running: 'air' });
    expect(damp.shortfallK).toBe(15);
    const cold = presetBrief('turbine-inlet', { limit: { kind: 'turbine', targetC: 2, floorC: 1 } });
    expect(judgedAt(cold, { dryBulbC: 4, wetBulbC: 0.5 })).toMatchObject({
      hourClass: 'frozen',
      met: false,
      shortfallK: 2,
    });
  });

  test('runs down to a floor under its target, which alone says whether the hour is met', () => {
    const deep = presetBrief('turbine-inlet', { limit: { kind: 'turbine', targetC: 15, floorC: 10 } });
    const met = judgedAt(deep, { dryBulbC: 25, wetBulbC: 12 });
    expect(met).toMatchObject({ hourClass: 'direct', met: true });
    expect(met.supply.tempC).toBeCloseTo(25 - 0.9 * 13, 3);
    expect(judgedAt(deep, { dryBulbC: 14, wetBulbC: 13 })).toMatchObject({
      hourClass: 'air',
      met: true,
      running: 'air',
    });
    expect(judgedAt(deep, { dryBulbC: 14, wetBulbC: 9 })).toMatchObject({
      hourClass: 'direct',
      met: true,
      airMeets: true,
    });
  });

  test('gains degree hours only by what runs', () => {
    const hours = hoursLike(
      [
        judgedAt(turbine, { dryBulbC: 25, wetBulbC: 12 }),
        judgedAt(turbine, { dryBulbC: 40, wetBulbC: 22 }),
        judgedAt(turbine, { dryBulbC: 30, wetBulbC: 29 }),
      ].map((judgement) => ({ hour: judgement.hour, judgement })),
    );
    expect(tallyDegreeHours(turbine, hours)).toBeCloseTo(10 + 0.9 * 18, 3);
    expect(tallyDegreeHours(presetBrief('office'), hours)).toBeNull();
  });
});
