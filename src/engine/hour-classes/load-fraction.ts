import type { Brief } from '../brief/brief.ts';
import { MISSING_INT16 } from '../conventions.ts';
import type { PackedYear } from '../reduction/weather-year.ts';

/** The 1 % dry bulb: the value at place floor(p N), counted from 0 downwards (method 2). */
const DESIGN_SHARE = 0.01;

/**
 * phi of an hour, 0..1 (method 3.1), as a straight line between two dry bulbs; null where it is 1 all year: when the brief says
 * constant, and of halls, towers and turbines always.
 */
export interface LoadLine {
  /** t_bal, where the load begins, and t_design, where it is whole, °C; the second is the higher. */
  readonly fromC: number;
  readonly designC: number;
}

/** @param designDryBulbC the year's 1 % dry bulb, °C, asked for only by a linear load; NaN when no hour is known */
export function loadLine(
  brief: Pick<Brief, 'phi' | 'balanceTempC' | 'limit'>,
  designDryBulbC: () => number,
): LoadLine | null {
  const fromC = brief.balanceTempC;
  const { kind } = brief.limit;
  const alwaysConstant = kind === 'inlet' || kind === 'tower' || kind === 'turbine';
  if (brief.phi === 'constant' || alwaysConstant || fromC === null) return null;
  const designC = designDryBulbC();
  return designC > fromC ? { fromC, designC } : null;
}

export function loadFractionAt({ fromC, designC }: LoadLine, dryBulbC: number): number {
  return Math.min(Math.max((dryBulbC - fromC) / (designC - fromC), 0), 1);
}

const designs = new WeakMap<PackedYear, number>();

/** The year's 1 % dry bulb, °C; NaN when no dry bulb is known. Kept beside the year while that is in memory. */
export function designDryBulbC(year: PackedYear): number {
  const designC = designs.get(year) ?? findDesignC(year.dryBulb);
  designs.set(year, designC);
  return designC;
}

function findDesignC(dryBulb: Int16Array): number {
  const sorted = dryBulb.filter((packed) => packed !== MISSING_INT16).sort();
  return (sorted[sorted.length - 1 - Math.floor(DESIGN_SHARE * sorted.length)] ?? Number.NaN) / 100;
}
