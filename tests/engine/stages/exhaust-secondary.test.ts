import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { indirectPath } from '#engine/stages/indirect.ts';
import { exhaustSecondary } from '#engine/stages/secondary-air.ts';
import type { WetOutdoorState } from '#engine/stages/stage-path.ts';
import { twoStageExhaustPath } from '#engine/stages/two-stage.ts';
import { judgedAt } from '../../support/hour-at.ts';
import { presetBrief } from '../../support/presets.ts';
import { propertySettings } from '../../support/sample-size.ts';
import { real } from '../hour-classes/random-hours.ts';

const plant = { ...presetBrief('office'), fanWPerLs: { ...presetBrief('office').fanWPerLs, indirect: 0, twostage: 0 } };
const room = { setC: 26, dwRoomKgKg: 0.0004 };
const PRESSURE_PA = 101325;

function outdoorAt(dryBulbC: number, wetBulb: number): WetOutdoorState {
  const humidityRatio = humidityRatioOnWetBulbLine(dryBulbC, wetBulb, PRESSURE_PA);
  const volume = volumeM3PerKg(dryBulbC, humidityRatio, PRESSURE_PA);
  return { dryBulbC, humidityRatio, pressurePa: PRESSURE_PA, wetBulbC: wetBulb, volumeM3PerKg: volume };
}

describe('room exhaust as secondary air', () => {
  test('is colder wet than hot outdoor air of the same moisture, by the wet bulb of the room', () => {
    const outdoor = outdoorAt(38, 20);
    const secondary = exhaustSecondary(outdoor, room, outdoor.humidityRatio);
    expect(secondary.wetBulbC).toBeCloseTo(wetBulbC(26, outdoor.humidityRatio + 0.0004, PRESSURE_PA), 9);
    expect(secondary.wetBulbC).toBeLessThan(20);
    const supply = indirectPath(outdoor, plant, secondary).at(1);
    expect(supply.tempC).toBeCloseTo(38 - 0.65 * (38 - secondary.wetBulbC), 9);
    expect(supply.humidityRatio).toBe(outdoor.humidityRatio);
  });

  test('never cools below the dew point of outdoor air, and cools nothing that is colder than it', () => {
    const muggy = outdoorAt(32, 31.5);
    const cold = exhaustSecondary(muggy, { setC: 22, dwRoomKgKg: 0 }, muggy.humidityRatio);
    const full = indirectPath(muggy, { ...plant, effIndirect: 1 }, cold).at(1);
    expect(full.tempC).toBeCloseTo(32 - cold.mostFallK, 9);
    expect(full.tempC).toBeGreaterThan(31);
    const cool = outdoorAt(15, 14);
    const warm = exhaustSecondary(cool, { setC: 30, dwRoomKgKg: 0.005 }, cool.humidityRatio);
    expect(warm.wetBulbC).toBeGreaterThan(15);
    expect(indirectPath(cool, plant, warm).at(1)).toMatchObject({ tempC: 15, evaporatedKgPerKg: 0 });
  });

  test('of a two-stage plant carries what its own second stage adds: supply and exhaust agree at every share', () => {
    let tried = 0;
    fc.assert(
      fc.property(real(22, 45), real(1, 20), real(0, 1), (dryBulbC, depressionK, share) => {
        const outdoor = outdoorAt(dryBulbC, dryBulbC - depressionK);
        const path = twoStageExhaustPath(outdoor, plant, room);
        const supply = path.at(share);
        const secondary = exhaustSecondary(outdoor, room, supply.humidityRatio);
        const fallK = Math.min(Math.max(0, 0.65 * (dryBulbC - secondary.wetBulbC)), secondary.mostFallK);
        const betweenC = dryBulbC - fallK;
        const between = wetBulbC(betweenC, outdoor.humidityRatio, PRESSURE_PA);
        expect(Math.abs(supply.tempC - (betweenC - share * 0.85 * (betweenC - between)))).toBeLessThan(1e-3);
        const needed = path.shareFor(supply.tempC);
        expect(path.at(needed).tempC).toBeLessThanOrEqual(supply.tempC + 1e-6);
        expect(needed).toBeLessThanOrEqual(share + 1e-6);
        tried += 1;
      }),
      propertySettings(300),
    );
    expect(tried).toBeGreaterThanOrEqual(300);
  });

  test('turns a hot hour of an office that outdoor secondary air leaves short into a met one', () => {
    const air = { dryBulbC: 43, wetBulbC: 22.5 };
    expect(judgedAt(presetBrief('office'), air)).toMatchObject({ hourClass: 'short', met: false });
    expect(judgedAt(presetBrief('office', { secondaryAir: 'exhaust' }), air)).toMatchObject({
      hourClass: 'twostage',
      met: true,
    });
  });
});
