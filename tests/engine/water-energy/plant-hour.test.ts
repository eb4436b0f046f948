import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import { judgeSupplyAirHour } from '#engine/hour-classes/judge-supply-air-hour.ts';
import { monthOfEachSlot } from '#engine/reduction/calendar.ts';
import { block } from '#engine/run/hour-block.ts';
import { appendHours, type HourColumns } from '#engine/run/hour-columns.ts';
import { supplyAirPlantHour } from '#engine/water-energy/air-plant-hour.ts';
import { addPlant, noPlant, plantOfYear } from '#engine/water-energy/tally-plant.ts';
import { hoursLike } from '../../support/judged-hours.ts';
import { presetBrief } from '../../support/presets.ts';
import { hourUnder } from '../hour-classes/random-hours.ts';

/** v of 0.9 m³/kg: with dT_room 5 K the airflow per kW is 0.9 / (1.006 x 5) m³/s = 178.93 L/s. */
const outdoor = { dryBulbC: 30, humidityRatio: 0.006, pressurePa: 101325, volumeM3PerKg: 0.9 };
const AIRFLOW_L_PER_S = 178.926441;

function plantOf(input: { dryBulbC?: number; humidityRatio?: number; changes?: Partial<Brief>; load?: number }) {
  const { changes, load, ...air } = input;
  const brief = presetBrief('office', changes);
  const hour = hourUnder(brief, { ...outdoor, ...air }, load);
  const judgement = judgeSupplyAirHour(hour, brief);
  return { judgement, plant: supplyAirPlantHour(hour, judgement, brief) };
}

// Every expected figure is worked out by hand from method 6 and the presets' fan figures.
describe('the plant of one hour, per kW of design load', () => {
  test('in an hour met by air: fans alone, all cooling delivered, the reference idle by its economy', () => {
    const { judgement, plant } = plantOf({ dryBulbC: 18 });
    expect(judgement.hourClass).toBe('air');
    expect(plant).toMatchObject({ evaporatedLitres: 0, makeUpLitres: 0, coolingKwh: 1 });
    expect(plant.kwh).toBeCloseTo((0.6 * AIRFLOW_L_PER_S) / 1000, 6);
    expect(plant.referenceKwh).toBeCloseTo((0.6 * AIRFLOW_L_PER_S) / 1000, 6);
    const without = plantOf({ dryBulbC: 18, changes: { reference: { cop: 3, economy: false } } }).plant;
    expect((without.referenceKwh ?? 0) - (plant.referenceKwh ?? 0)).toBeCloseTo(1 / 3, 9);
  });

  test('in a direct hour: fan 0.8, pump 0.02, water as the air gains it, a third more by bleed at 4 cycles', () => {
    const { judgement, plant } = plantOf({});
    expect(judgement.hourClass).toBe('direct');
    expect(plant.kwh).toBeCloseTo((0.8 * AIRFLOW_L_PER_S) / 1000 + 0.02, 6);
    const gained = (judgement.supply.humidityRatio ?? Number.NaN) - 0.006;
    expect(plant.evaporatedLitres).toBeCloseTo((gained / (1.006 * 5)) * 3600, 9);
    expect(plant.makeUpLitres).toBeCloseTo((plant.evaporatedLitres * 4) / 3, 9);
    expect(plant.referenceKwh).toBeCloseTo((0.6 * AIRFLOW_L_PER_S) / 1000 + 1 / 3, 6);
  });

  test('in an indirect hour: sensible heat over 2,430 kJ/kg times k, the fan rise left out', () => {
    const { judgement, plant } = plantOf({ changes: { stages: ['indirect'], limit: { kind: 'fixed', tempC: 28 } } });
    expect(judgement.hourClass).toBe('indirect');
    const riseK = (1.3 * 0.9) / 1.006;
    const fallK = 30 + riseK - 23;
    expect(plant.evaporatedLitres).toBeCloseTo(((fallK / 5) * 3600 * 1.05) / 2430, 9);
  });

  test('in a short hour: the back-up trims m_dry cp S, and the share of the load that was carried counts as cooling', () => {
    const { judgement, plant } = plantOf({ dryBulbC: 42, humidityRatio: 0.009 });
    expect(judgement.hourClass).toBe('short');
    expect(plant.coolingKwh).toBeCloseTo((26 - judgement.supply.tempC) / 5, 9);
    const trimKwh = judgement.shortfallK / 5 / 3;
    expect(plant.kwh).toBeCloseTo((1.5 * AIRFLOW_L_PER_S) / 1000 + 0.02 + trimKwh, 6);
  });

  test('in a damp hour: no water, nothing delivered, the back-up takes the whole load', () => {
    const { judgement, plant } = plantOf({ humidityRatio: 0.02 });
    expect(judgement.hourClass).toBe('damp');
    expect(plant).toMatchObject({ makeUpLitres: 0, coolingKwh: 0 });
    expect(plant.kwh).toBeCloseTo((0.6 * AIRFLOW_L_PER_S) / 1000 + 1 / 3, 6);
    expect(plant.kwh).toBeCloseTo(plant.referenceKwh ?? Number.NaN, 9);
  });

  test('beyond: outdoor air carries what it can, the back-up at most the load', () => {
    const { judgement, plant } = plantOf({ dryBulbC: 24, changes: { stages: [] } });
    expect(judgement.hourClass).toBe('beyond');
    const supplyC = 24 + (0.6 * 0.9) / 1.006;
    expect(plant.coolingKwh).toBeCloseTo((26 - supplyC) / 5, 9);
    expect(plant.kwh).toBeCloseTo((0.6 * AIRFLOW_L_PER_S) / 1000 + (supplyC - 21) / 5 / 3, 6);
    const hot = plantOf({ dryBulbC: 40, changes: { stages: [] } }).plant;
    expect(hot.coolingKwh).toBe(0);
    expect(hot.kwh).toBeCloseTo((0.6 * AIRFLOW_L_PER_S) / 1000 + 1 / 3, 6);
  });

  test('at half load: half the cooling and half the pump, the same fans', () => {
    const { judgement, plant } = plantOf({ load: 0.5 });
    expect(judgement.hourClass).toBe('direct');
    expect(plant.coolingKwh).toBe(0.5);
    expect(plant.kwh).toBeCloseTo((0.8 * AIRFLOW_L_PER_S) / 1000 + 0.01, 6);
  });
});

const COUNTED = { countsElectricity: true };

/** The plant of demand hours that come in one block. */
function tallyPlant(hours: HourColumns, counted: { countsElectricity: boolean }) {
  const sums = noPlant();
  block.count = 0;
  appendHours(block, hours);
  addPlant(monthOfEachSlot(8760));
  return plantOfYear(sums, counted);
}

describe('the plant of a year', () => {
  const hour = { evaporatedLitres: 3, makeUpLitres: 4, coolingKwh: 2, kwh: 0.5, referenceKwh: 1, backUpKw: 0.2 };

  test('adds up, and names the worst month, the peak day and the peak hour', () => {
    const { water, electricity } = tallyPlant(
      hoursLike([
        { slot: 0, plant: hour },
        { slot: 24 * 40, plant: { ...hour, backUpKw: 0.7 } },
        { slot: 24 * 40 + 1, plant: { ...hour, makeUpLitres: 5, kwh: 0.9, referenceKwh: 0.8 } },
      ]),
      COUNTED,
    );
    expect(water).toEqual({
      makeUpLitres: 13,
      evaporatedLitres: 9,
      coolingKwh: 6,
      litresPerKwh: 13 / 6,
      worstMonth: 2,
      worstMonthLitres: 9,
      peakDay: 40,
      peakDayLitres: 9,
      peakHourLitres: 5,
    });
    expect(electricity).toMatchObject({ peakKw: 0.9, referencePeakKw: 1, backUpKw: 0.7 });
    expect(electricity?.savedPct).toBeCloseTo((100 * (2.8 - 1.9)) / 2.8, 9);
  });

  test('without demand has no figure that would need a denominator', () => {
    const { water, electricity } = tallyPlant(hoursLike([]), COUNTED);
    expect(water).toMatchObject({ makeUpLitres: 0, litresPerKwh: null, worstMonth: null, peakDay: null });
    expect(electricity).toMatchObject({ kwh: 0, savedPct: null });
  });

  test('of a turbine inlet has water and no electricity', () => {
    const inlet = { ...hour, kwh: null, referenceKwh: null, backUpKw: 0 };
    const { water, electricity } = tallyPlant(hoursLike([{ slot: 3, plant: inlet }]), {
      countsElectricity: false,
    });
    expect(electricity).toBeNull();
    expect(water.makeUpLitres).toBe(4);
  });
});
