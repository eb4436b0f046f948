import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { readBrief } from '#engine/brief/brief-from-preset.ts';
import { towerBalance } from '#engine/checks/comparison-formulas.ts';
import { judgeTowerHour } from '#engine/hour-classes/judge-tower-hour.ts';
import { volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { directPath } from '#engine/stages/direct.ts';
import type { WetOutdoorState } from '#engine/stages/stage-path.ts';
import { supplyAirPlantHour } from '#engine/water-energy/air-plant-hour.ts';
import { towerPlantHour } from '#engine/water-energy/tower-plant-hour.ts';
import { heldCheck } from '../support/held-check.ts';
import { presetBrief, rawPreset } from '../support/presets.ts';
import { casesOf } from '../support/published-values.ts';

/** Numbers, sources and tags stand in data/checks/evaporative-cooling.json. */

function airAt(input: { dryBulbC: number; wetBulbC: number; pressurePa: number }): WetOutdoorState {
  const humidityRatio = humidityRatioOnWetBulbLine(input.dryBulbC, input.wetBulbC, input.pressurePa);
  return { ...input, humidityRatio, volumeM3PerKg: volumeM3PerKg(input.dryBulbC, humidityRatio, input.pressurePa) };
}

describe('evaporative cooling against published values', () => {
  test('E01 95 °F at 20 % cools to its wet bulb at the lowest, and reaches 80 % on the way', () => {
    expect(heldCheck('E01')).toHaveLength(2);
  });

  test('E02 a direct stage leaves air on the line of constant wet bulb', () => {
    expect(heldCheck('E02')).toHaveLength(3);
  });

  test('E03 two stages pass the wet bulb of the entering air', () => {
    expect(heldCheck('E03')).toHaveLength(10);
  });

  test('E04 a dew-point stage moves towards the dew point at constant humidity', () => {
    expect(heldCheck('E04')).toHaveLength(6);
  });

  test('E05 a tower’s air and water balance, and the engine’s water from the heat that leaves as vapour', () => {
    const answers = heldCheck('E05');
    expect(answers).toHaveLength(2);
    const [tower] = casesOf('E05', {
      waterKgPerS: z.number(),
      hotC: z.number(),
      coldC: z.number(),
      enteringC: z.number(),
      enteringRhPct: z.number(),
      leavingC: z.number(),
      pressurePa: z.number(),
    });
    if (tower === undefined) throw new Error('E05 has no case');
    const found = towerBalance(tower);
    const brief = presetBrief('process-water', { towerLatentShare: found.latentShare, driftPctOfCirculation: 0 });
    const outdoor = airAt({ dryBulbC: 20, wetBulbC: 15, pressurePa: 101325 });
    const hour = { outdoor, setC: 27, supplyAimC: 27, loadFraction: 1 };
    const perKw = towerPlantHour(hour, judgeTowerHour(hour, brief), brief);
    expect((perKw.evaporatedLitres / 3600) * found.rejectedKw).toBeCloseTo(found.makeUpKgPerS, 6);
    expect(perKw.coolingKwh).toBe(1);
  });

  test('E06 a direct stage evaporates 1.44 to 1.50 kg per kWh of sensible cooling', () => {
    const [answer] = heldCheck('E06');
    expect(answer?.input).toContain('160 states');
  });

  test('E07 bleed follows the cycles of concentration, and one cycle is refused', () => {
    expect(heldCheck('E07')).toHaveLength(4);
    const cases = casesOf('E07', { cycles: z.number(), bleedPerEvaporated: z.nullable(z.number()) });
    const outdoor = airAt({ dryBulbC: 35, wetBulbC: 20, pressurePa: 101325 });
    for (const { cycles, bleedPerEvaporated } of cases) {
      if (bleedPerEvaporated === null) {
        const reading = readBrief({ ...rawPreset('office'), cycles });
        expect(reading.ok ? [] : reading.faults.map(({ path }) => path)).toEqual(['cycles']);
        continue;
      }
      const brief = presetBrief('office', { cycles });
      const supply = directPath(outdoor, brief).at(1);
      const plant = supplyAirPlantHour(
        { outdoor, setC: 26, supplyAimC: 21, loadFraction: 1 },
        {
          hourClass: 'direct',
          met: true,
          dampBy: null,
          shortfallK: 0,
          uncappedShortfallK: 0,
          airMeets: false,
          airSupplyC: 35,
          running: 'direct',
          supply,
          carriedShare: 1,
          waterC: outdoor.wetBulbC,
          aloneMet: ['direct'],
        },
        brief,
      );
      const bleedLitres = plant.makeUpLitres - plant.evaporatedLitres;
      expect(bleedLitres / plant.evaporatedLitres).toBeCloseTo(bleedPerEvaporated, 12);
    }
    expect(cases).toHaveLength(4);
  });
});
