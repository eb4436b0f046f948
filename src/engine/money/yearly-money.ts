/** What a year costs and emits, both ways, per kW of design load (method 6): from what the brief gives and nothing else. */
import type { Brief } from '../brief/brief.ts';
import type { RunResult } from '../run/run-result.ts';
import { type Payback, simplePayback } from './simple-payback.ts';

/** A year in money, per kW of design load, in the currency of the brief. */
export interface YearlyMoney {
  readonly currency: string;
  /** Electricity, water and what the upkeep costs more than the reference's. */
  readonly plant: number;
  readonly reference: number;
  readonly saving: number;
  /** null without an extra capital in the brief. */
  readonly payback: Payback | null;
  /** What the brief leaves out of these figures, in words. */
  readonly notes: readonly string[];
}

/** Carbon dioxide of a year's electricity, kg per kW of design load. */
export interface YearlyCarbon {
  readonly plantKg: number;
  readonly referenceKg: number;
  readonly savedKg: number;
  readonly source: string;
}

export interface MoneyAnswer {
  readonly money: YearlyMoney | null;
  /** Why there is no money: "not priced: ..." or "not applicable: ..."; null with it. */
  readonly moneyNote: string | null;
  /** null without a grid factor, or where electricity is not applicable. */
  readonly carbon: YearlyCarbon | null;
}

const LITRES_PER_M3 = 1000;

/** Money and carbon of a run's parts under a brief's prices and grid factor. */
export function yearlyMoney(
  { electricity, water }: Pick<RunResult, 'electricity' | 'water'>,
  { prices, grid }: Pick<Brief, 'prices' | 'grid'>,
): MoneyAnswer {
  if (electricity === null) {
    return { money: null, moneyNote: 'not applicable: no electricity is counted for this use', carbon: null };
  }
  const { kwh, referenceKwh } = electricity;
  const carbon = grid === undefined ? null : carbonOf({ kwh, referenceKwh }, grid);
  const electricityPerKwh = prices?.electricityPerKwh;
  const waterPerM3 = prices?.waterPerM3;
  if (prices === undefined || electricityPerKwh === undefined || waterPerM3 === undefined) {
    return { money: null, moneyNote: notPriced(prices), carbon };
  }
  const upkeep = prices.extraUpkeepPerKwYear;
  const capital = prices.extraCapitalPerKw;
  const waterCost = (water.makeUpLitres / LITRES_PER_M3) * waterPerM3;
  const plant = kwh * electricityPerKwh + waterCost + (upkeep ?? 0);
  const reference = referenceKwh * electricityPerKwh;
  const saving = reference - plant;
  const payback = capital === undefined ? null : simplePayback({ extraCapital: capital, savingPerYear: saving });
  const notes = [
    ...(upkeep === undefined ? ['upkeep left out: the brief gives none'] : []),
    ...(capital === undefined ? ['no payback: the brief gives no extra capital'] : []),
  ];
  return { money: { currency: prices.currency, plant, reference, saving, payback, notes }, moneyNote: null, carbon };
}

function notPriced(prices: Brief['prices']): string {
  if (prices === undefined) return 'not priced: the brief holds no prices';
  const missing = [
    ...(prices.electricityPerKwh === undefined ? ['electricity'] : []),
    ...(prices.waterPerM3 === undefined ? ['water'] : []),
  ];
  return `not priced: the brief holds no price of ${missing.join(' and ')}`;
}

function carbonOf(
  { kwh, referenceKwh }: { kwh: number; referenceKwh: number },
  { kgCo2PerKwh, source }: NonNullable<Brief['grid']>,
): YearlyCarbon {
  const plantKg = kwh * kgCo2PerKwh;
  const referenceKg = referenceKwh * kgCo2PerKwh;
  return { plantKg, referenceKg, savedKg: referenceKg - plantKg, source };
}
