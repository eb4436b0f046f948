import { describe, expect, test } from 'vitest';
import type { Supplied } from '#engine/hour-classes/demand-hour.ts';
import { indexOf, temperatureHumidityIndex } from '#engine/hour-classes/index-limit.ts';
import { relativeHumidityPct } from '#engine/psychrometrics/moist-air.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { judgedAt } from '../../support/hour-at.ts';
import { presetBrief } from '../../support/presets.ts';

/** THI of at most 72, 2 K and 0.5 g/kg in the house, 85 % cap; fans that heat nothing, so that states can be followed by hand. */
const NO_FANS = { air: 0, direct: 0, indirect: 0, dewpoint: 0, twostage: 0, returnAir: 0 };
const dairy = presetBrief('dairy', { fanWPerLs: NO_FANS });
const warehouse = presetBrief('warehouse', { fanWPerLs: NO_FANS });

/** The index of the room that a judged hour ends with, worked out from what is supplied. */
function roomIndex({ supply }: { supply: Pick<Supplied, 'tempC' | 'humidityRatio'> }): number {
  const tempC = supply.tempC + 2;
  const humidityRatio = (supply.humidityRatio ?? Number.NaN) + 0.0005;
  return temperatureHumidityIndex(tempC, relativeHumidityPct(tempC, humidityRatio, 101325));
}

describe('an index limit', () => {
  test('is met by outdoor air where the room that it gives is good', () => {
    const met = judgedAt(dairy, { dryBulbC: 21, wetBulbC: 12 });
    expect(met).toMatchObject({ hourClass: 'air', met: true, airMeets: true, aloneMet: ['air', 'direct'] });
    expect(roomIndex(met)).toBeLessThan(72);
  });

  test('is met by the least twentieth of wetting that is good', () => {
    const met = judgedAt(dairy, { dryBulbC: 30, wetBulbC: 17 });
    expect(met).toMatchObject({ hourClass: 'direct', met: true, running: 'direct' });
    const twentieths = met.supply.share * 20;
    expect(twentieths).toBeCloseTo(Math.round(twentieths), 9);
    expect(roomIndex(met)).toBeLessThanOrEqual(72.005);
    const drierC = 30 - (met.supply.share - 0.05) * 0.75 * 13;
    const humidityRatio = humidityRatioOnWetBulbLine(drierC, 17, 101325);
    expect(roomIndex({ supply: { tempC: drierC, humidityRatio } })).toBeGreaterThan(72.005);
    const full = judgedAt({ ...dairy, control: 'on-off' }, { dryBulbC: 30, wetBulbC: 17 });
    expect(full).toMatchObject({ hourClass: 'direct', supply: { share: 1 } });
  });

  test('is damp by the plant alone where the limit is reached outside the caps only, also by outdoor air', () => {
    const tight = { ...dairy, caps: { roomRhPct: 60 } };
    const humid = judgedAt(tight, { dryBulbC: 20.5, wetBulbC: 19.5 });
    expect(humid).toMatchObject({ hourClass: 'damp', dampBy: 'plant', met: false, running: 'air', carriedShare: 0 });
    expect(humid.shortfallK).toBe(0);
    expect(humid.plant).toMatchObject({ makeUpLitres: 0, coolingKwh: 0, backUpKw: 1 });
  });

  test('is short with at least 1 point gained: the state with the lowest index runs, S and share in points', () => {
    const short = judgedAt(dairy, { dryBulbC: 40, wetBulbC: 22 });
    expect(short).toMatchObject({ hourClass: 'short', met: false, running: 'direct' });
    const reached = roomIndex(short);
    const air = judgedAt({ ...dairy, stages: [] }, { dryBulbC: 40, wetBulbC: 22 });
    expect(air.hourClass).toBe('beyond');
    expect(short.shortfallK).toBeCloseTo(reached - 72, 9);
    expect(air.shortfallK).toBeCloseTo(roomIndex(air) - 72, 9);
    expect(short.carriedShare).toBeCloseTo((roomIndex(air) - reached) / (roomIndex(air) - 72), 9);
    expect(short.plant.backUpKw).toBeCloseTo(1 - short.carriedShare, 12);
    expect(air.carriedShare).toBe(0);
  });

  test('is never damp by outdoor moisture: hot and humid is beyond', () => {
    const humid = judgedAt(dairy, { dryBulbC: 32, wetBulbC: 31 });
    expect(humid).toMatchObject({ hourClass: 'beyond', dampBy: null, running: 'air' });
  });

  test('of shade heat weighs the wet bulb 0.7 and the dry bulb 0.3', () => {
    // 25 °C and 60 % at 101325 Pa: wet bulb 19.4 (from memory, to 0.1 K).
    const figure = indexOf({ kind: 'shade-heat', value: 26 }, { tempC: 25, humidityRatio: 0.0119, pressurePa: 101325 });
    expect(Math.abs(figure - (0.7 * 19.4 + 0.3 * 25))).toBeLessThan(0.1);
    // Saturated air has one temperature.
    const saturated = indexOf(
      { kind: 'shade-heat', value: 26 },
      { tempC: 20, humidityRatio: 0.03, pressurePa: 101325 },
    );
    expect(saturated).toBeCloseTo(20, 6);
    expect(judgedAt(warehouse, { dryBulbC: 40, wetBulbC: 19 })).toMatchObject({ hourClass: 'direct', met: true });
  });

  test('in frost is met by outdoor air alone, as frozen', () => {
    expect(judgedAt(dairy, { dryBulbC: 1, wetBulbC: 0 })).toMatchObject({ hourClass: 'frozen', met: true });
  });
});
