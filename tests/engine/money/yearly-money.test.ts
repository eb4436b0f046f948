import { describe, expect, test } from 'vitest';
import { yearlyMoney } from '#engine/money/yearly-money.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const electricity = { kwh: 400, referenceKwh: 900, savedPct: 55.6, peakKw: 1, referencePeakKw: 1, backUpKw: 0 };
const water = {
  makeUpLitres: 2500,
  evaporatedLitres: 1875,
  litresPerKwh: 1,
  worstMonthLitres: 0,
  worstMonth: null,
  peakDayLitres: 0,
  peakDay: null,
  peakHourLitres: 0,
  coolingKwh: 2500,
};
const prices = { currency: 'EUR', electricityPerKwh: 0.2, waterPerM3: 4 };

// 400 x 0.2 + 2.5 x 4 = 90 against 900 x 0.2 = 180.
describe('a year in money, per kW of design load', () => {
  test('costs electricity and water both ways, and its payback is capital over saving', () => {
    const { money, moneyNote } = yearlyMoney(
      { electricity, water },
      { prices: { ...prices, extraCapitalPerKw: 170, extraUpkeepPerKwYear: 5 } },
    );
    expect(moneyNote).toBeNull();
    expect(money).toMatchObject({ currency: 'EUR', plant: 95, reference: 180, saving: 85, payback: 2, notes: [] });
  });

  test('says what the brief leaves out', () => {
    const { money } = yearlyMoney({ electricity, water }, { prices });
    expect(money).toMatchObject({ plant: 90, saving: 90, payback: null });
    expect(money?.notes).toEqual([
      'upkeep left out: the brief gives none',
      'no payback: the brief gives no extra capital',
    ]);
  });

  test('is never paid back where nothing is saved, and at once where it costs no more to begin with', () => {
    const dear = yearlyMoney(
      { electricity, water },
      { prices: { ...prices, extraCapitalPerKw: -10, extraUpkeepPerKwYear: 90 } },
    );
    expect(dear.money).toMatchObject({ saving: 0, payback: 'never' });
    const cheap = yearlyMoney({ electricity, water }, { prices: { ...prices, extraCapitalPerKw: 0 } });
    expect(cheap.money?.payback).toBe('at once');
  });

  test('is not priced without prices, and names the one that is missing', () => {
    expect(yearlyMoney({ electricity, water }, {})).toEqual({
      money: null,
      moneyNote: 'not priced: the brief holds no prices',
      carbon: null,
    });
    const dry = yearlyMoney({ electricity, water }, { prices: { currency: 'EUR', electricityPerKwh: 0.2 } });
    expect(dry.moneyNote).toBe('not priced: the brief holds no price of water');
    const none = yearlyMoney({ electricity, water }, { prices: { currency: 'EUR' } });
    expect(none.moneyNote).toBe('not priced: the brief holds no price of electricity and water');
  });

  test('is not applicable where electricity is not', () => {
    const { money, moneyNote, carbon } = yearlyMoney(
      { electricity: null, water },
      { prices, grid: { kgCo2PerKwh: 0.4, source: 'a table of 2024' } },
    );
    expect([money, carbon]).toEqual([null, null]);
    expect(moneyNote).toBe('not applicable: no electricity is counted for this use');
  });

  test('emits what its electricity does, with the source of the factor and without any price', () => {
    // 1000 kWh at 0.400 kg/kWh are 400 kg (definition).
    const grid = { kgCo2PerKwh: 0.4, source: 'a table of 2024' };
    const { carbon } = yearlyMoney({ electricity: { ...electricity, referenceKwh: 1000 }, water }, { grid });
    expect(carbon).toEqual({ plantKg: 160, referenceKg: 400, savedKg: 240, source: 'a table of 2024' });
  });

  test('comes with every run, from its own figures', () => {
    const year = syntheticYear({ at: () => ({ dryBulbC: 30, humidityRatio: 0.005 }) });
    const brief = presetBrief('office', { prices: { ...prices, extraCapitalPerKw: 100 } });
    const run = judgeYear({ year, brief, zone: 'UTC', heightM: 0 });
    const { kwh = 0, referenceKwh = 0 } = run.electricity ?? {};
    expect(run.money?.saving).toBeCloseTo(0.2 * (referenceKwh - kwh) - 4 * (run.water.makeUpLitres / 1000), 9);
    expect(run.money?.payback).toBeCloseTo(100 / (run.money?.saving ?? Number.NaN), 9);
  });
});
