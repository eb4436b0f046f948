import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { readBrief } from '#engine/brief/brief-from-preset.ts';
import { judgeTowerHour } from '#engine/hour-classes/judge-tower-hour.ts';
import {
  dewPointC,
  enthalpyKJPerKg,
  humidityRatioFromRelativeHumidity,
  relativeHumidityPct,
  volumeM3PerKg,
} from '#engine/psychrometrics/moist-air.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { dewPointPath } from '#engine/stages/dew-point.ts';
import { directPath } from '#engine/stages/direct.ts';
import { indirectPath } from '#engine/stages/indirect.ts';
import { outdoorSecondary } from '#engine/stages/secondary-air.ts';
import type { StagePath, WetOutdoorState } from '#engine/stages/stage-path.ts';
import { twoStagePath } from '#engine/stages/two-stage.ts';
import { supplyAirPlantHour } from '#engine/water-energy/air-plant-hour.ts';
import { towerPlantHour } from '#engine/water-energy/tower-plant-hour.ts';
import { presetBrief, rawPreset } from '../support/presets.ts';

/** Values of data/checks/evaporative-cooling.json; source and tag stand there beside each number. */
const file = z
  .object({ checks: z.array(z.object({ id: z.string(), cases: z.array(z.record(z.string(), z.unknown())) })) })
  .parse(JSON.parse(readFileSync(new URL('../../data/checks/evaporative-cooling.json', import.meta.url), 'utf8')));

function casesOf<Shape extends z.core.$ZodLooseShape>(id: string, shape: Shape) {
  const check = file.checks.find((each) => each.id === id);
  if (check === undefined) throw new Error(`no check ${id}`);
  return check.cases.map((each) => z.object(shape).parse(each));
}

const state = { dryBulbC: z.number(), wetBulbC: z.number(), pressurePa: z.number() };
const NO_FANS = { air: 0, direct: 0, indirect: 0, dewpoint: 0, twostage: 0, returnAir: 0 };

function airAt(input: { dryBulbC: number; wetBulbC: number; pressurePa: number }): WetOutdoorState {
  const humidityRatio = humidityRatioOnWetBulbLine(input.dryBulbC, input.wetBulbC, input.pressurePa);
  return { ...input, humidityRatio, volumeM3PerKg: volumeM3PerKg(input.dryBulbC, humidityRatio, input.pressurePa) };
}

function celsius(fahrenheit: number): number {
  return (fahrenheit - 32) / 1.8;
}

function fahrenheit(tempC: number): number {
  return tempC * 1.8 + 32;
}

/** The least share of wetting, to 1e-6, at which the leaving air is at least this humid. */
function shareForHumidity(path: StagePath, input: { pct: number; pressurePa: number }): number {
  let drier = 0;
  let damper = 1;
  while (damper - drier > 1e-6) {
    const middle = (drier + damper) / 2;
    const { tempC, humidityRatio } = path.at(middle);
    if (relativeHumidityPct(tempC, humidityRatio, input.pressurePa) < input.pct) drier = middle;
    else damper = middle;
  }
  return damper;
}

interface Tower {
  readonly waterKgPerS: number;
  readonly hotC: number;
  readonly coldC: number;
  readonly enteringC: number;
  readonly enteringRhPct: number;
  readonly leavingC: number;
  readonly pressurePa: number;
}

/** Energy and mass balance of a tower whose air leaves saturated; what evaporates is made up as warm as the cold water. */
function towerBalance(tower: Tower) {
  const at = (dryBulbC: number, relativePct: number) => {
    const { pressurePa } = tower;
    const state = { dryBulbC, relativeHumidityPct: relativePct, pressurePa, belowZero: 'water' } as const;
    const humidityRatio = humidityRatioFromRelativeHumidity(state);
    return { humidityRatio, enthalpy: enthalpyKJPerKg(dryBulbC, humidityRatio) };
  };
  const entering = at(tower.enteringC, tower.enteringRhPct);
  const leaving = at(tower.leavingC, 100);
  const rejectedKw = 4.186 * tower.waterKgPerS * (tower.hotC - tower.coldC);
  const gained = leaving.humidityRatio - entering.humidityRatio;
  const dryAirKgPerS = rejectedKw / (leaving.enthalpy - entering.enthalpy - gained * 4.186 * tower.coldC);
  const makeUpKgPerS = dryAirKgPerS * gained;
  return { rejectedKw, dryAirKgPerS, makeUpKgPerS, latentShare: (makeUpKgPerS * 2430) / rejectedKw };
}

describe('evaporative cooling against published values', () => {
  test('E01 95 °F at 20 % cools to its wet bulb at the lowest, and reaches 80 % on the way', () => {
    const cases = casesOf('E01', {
      quantity: z.enum(['wetBulbF', 'leavingF']),
      dryBulbF: z.number(),
      relativeHumidityPct: z.number(),
      pressurePsi: z.number(),
      leavingRhPct: z.optional(z.number()),
      expected: z.number(),
      tolerance: z.number(),
    });
    for (const { quantity, leavingRhPct = 100, expected, tolerance, ...given } of cases) {
      const dryBulbC = celsius(given.dryBulbF);
      const pressurePa = given.pressurePsi * 6894.757;
      const humidityRatio = humidityRatioFromRelativeHumidity({
        dryBulbC,
        relativeHumidityPct: given.relativeHumidityPct,
        pressurePa,
        belowZero: 'water',
      });
      const outdoor = airAt({ dryBulbC, wetBulbC: wetBulbC(dryBulbC, humidityRatio, pressurePa), pressurePa });
      const path = directPath(outdoor, { fanWPerLs: NO_FANS, effDirect: 1 });
      const leaving = path.at(shareForHumidity(path, { pct: leavingRhPct, pressurePa }));
      const found = quantity === 'wetBulbF' ? fahrenheit(outdoor.wetBulbC) : fahrenheit(leaving.tempC);
      expect(Math.abs(found - expected), `${quantity} ${found}`).toBeLessThanOrEqual(tolerance);
    }
    expect(cases).toHaveLength(2);
  });

  test('E02 a direct stage leaves air on the line of constant wet bulb', () => {
    const cases = casesOf('E02', {
      ...state,
      quantity: z.enum(['leavingC', 'leavingGPerKg', 'leavingRhPct']),
      effDirect: z.number(),
      expected: z.number(),
      tolerance: z.number(),
    });
    for (const { quantity, effDirect, expected, tolerance, ...outdoor } of cases) {
      const { tempC, humidityRatio } = directPath(airAt(outdoor), { fanWPerLs: NO_FANS, effDirect }).at(1);
      const found = {
        leavingC: tempC,
        leavingGPerKg: humidityRatio * 1000,
        leavingRhPct: relativeHumidityPct(tempC, humidityRatio, outdoor.pressurePa),
      };
      expect(Math.abs(found[quantity] - expected), `${quantity} ${found[quantity]}`).toBeLessThanOrEqual(tolerance);
    }
    expect(cases).toHaveLength(3);
  });

  test('E03 two stages pass the wet bulb of the entering air', () => {
    const cases = casesOf('E03', {
      ...state,
      effIndirect: z.number(),
      effDirect: z.number(),
      betweenC: z.number(),
      betweenWetBulbC: z.number(),
      leavingC: z.number(),
      overall: z.number(),
      tolerance: z.number(),
    });
    for (const { effIndirect, effDirect, tolerance, dryBulbC, wetBulbC: entering, pressurePa, ...expected } of cases) {
      const outdoor = airAt({ dryBulbC, wetBulbC: entering, pressurePa });
      const plant = { fanWPerLs: NO_FANS, effIndirect, effDirect, k: 1 };
      const between = indirectPath(outdoor, plant, outdoorSecondary(outdoor)).at(1);
      const leaving = twoStagePath(outdoor, plant, outdoorSecondary(outdoor)).at(1);
      const found = {
        betweenC: between.tempC,
        betweenWetBulbC: wetBulbC(between.tempC, between.humidityRatio, pressurePa),
        leavingC: leaving.tempC,
        overall: (dryBulbC - leaving.tempC) / (dryBulbC - entering),
      };
      for (const name of ['betweenC', 'betweenWetBulbC', 'leavingC', 'overall'] as const) {
        expect(Math.abs(found[name] - expected[name]), `${name} ${found[name]}`).toBeLessThanOrEqual(tolerance);
      }
      expect(between.humidityRatio).toBe(outdoor.humidityRatio);
    }
    expect(cases).toHaveLength(2);
  });

  test('E04 a dew-point stage moves towards the dew point at constant humidity', () => {
    const cases = casesOf('E04', { ...state, effDewPoint: z.number(), leavingC: z.number(), tolerance: z.number() });
    for (const { effDewPoint, leavingC, tolerance, ...given } of cases) {
      const outdoor = airAt(given);
      const leaving = dewPointPath(outdoor, { fanWPerLs: NO_FANS, effDewPoint, k: 1 }).at(1);
      expect(Math.abs(leaving.tempC - leavingC), `${leaving.tempC}`).toBeLessThanOrEqual(tolerance);
      expect(leaving.humidityRatio).toBe(outdoor.humidityRatio);
      expect(leaving.tempC).toBeGreaterThan(dewPointC(outdoor.dryBulbC, outdoor.humidityRatio, outdoor.pressurePa));
    }
    expect(cases).toHaveLength(2);
  });

  test('E05 a tower’s air and water balance, and the engine’s water from the heat that leaves as vapour', () => {
    const cases = casesOf('E05', {
      quantity: z.enum(['dryAirKgPerS', 'makeUpKgPerS']),
      waterKgPerS: z.number(),
      hotC: z.number(),
      coldC: z.number(),
      enteringC: z.number(),
      enteringRhPct: z.number(),
      leavingC: z.number(),
      pressurePa: z.number(),
      expected: z.number(),
      tolerancePct: z.number(),
    });
    for (const { quantity, expected, tolerancePct, ...tower } of cases) {
      const found = towerBalance(tower);
      const apartPct = 100 * Math.abs(found[quantity] / expected - 1);
      expect(apartPct, `${quantity} ${found[quantity]}`).toBeLessThanOrEqual(tolerancePct);
      const brief = presetBrief('process-water', { towerLatentShare: found.latentShare, driftPctOfCirculation: 0 });
      const hour = {
        outdoor: airAt({ dryBulbC: 20, wetBulbC: 15, pressurePa: 101325 }),
        setC: 27,
        supplyAimC: 27,
        loadFraction: 1,
      };
      const perKw = towerPlantHour(hour, judgeTowerHour(hour, brief), brief);
      expect((perKw.evaporatedLitres / 3600) * found.rejectedKw).toBeCloseTo(found.makeUpKgPerS, 6);
      expect(perKw.coolingKwh).toBe(1);
    }
    expect(cases).toHaveLength(2);
  });

  test('E06 a direct stage evaporates 1.44 to 1.50 kg per kWh of sensible cooling', () => {
    const numbers = z.array(z.number());
    const [range] = casesOf('E06', {
      dryBulbsC: numbers,
      relativeHumiditiesPct: numbers,
      pressuresPa: numbers,
      effDirect: z.number(),
      leastKgPerKwh: z.number(),
      mostKgPerKwh: z.number(),
    });
    if (range === undefined) throw new Error('E06 has no case');
    let states = 0;
    for (const dryBulbC of range.dryBulbsC) {
      for (const pct of range.relativeHumiditiesPct) {
        for (const pressurePa of range.pressuresPa) {
          const humidityRatio = humidityRatioFromRelativeHumidity({
            dryBulbC,
            relativeHumidityPct: pct,
            pressurePa,
            belowZero: 'water',
          });
          const outdoor = airAt({ dryBulbC, wetBulbC: wetBulbC(dryBulbC, humidityRatio, pressurePa), pressurePa });
          const leaving = directPath(outdoor, { fanWPerLs: NO_FANS, effDirect: range.effDirect }).at(1);
          const sensibleKwh = ((1.006 + 1.86 * humidityRatio) * (dryBulbC - leaving.tempC)) / 3600;
          const kgPerKwh = leaving.evaporatedKgPerKg / sensibleKwh;
          expect(kgPerKwh, `${dryBulbC} °C ${pct} % ${pressurePa} Pa`).toBeGreaterThanOrEqual(range.leastKgPerKwh);
          expect(kgPerKwh, `${dryBulbC} °C ${pct} % ${pressurePa} Pa`).toBeLessThanOrEqual(range.mostKgPerKwh);
          states += 1;
        }
      }
    }
    expect(states).toBe(160);
  });

  test('E07 bleed follows the cycles of concentration, and one cycle is refused', () => {
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
