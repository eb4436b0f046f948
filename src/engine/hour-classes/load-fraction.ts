import type { Brief } from '../brief/brief.ts';

/** The 1 % dry bulb: the value at place floor(p N), counted from 0 downwards (method 2). */
const DESIGN_SHARE = 0.01;

/**
 * phi of an hour, 0..1 (method 3.1): 1, or linear from t_bal to the year's 1 % dry bulb; halls, towers and turbines are
 * always constant.
 * @param dryBulbsC dry bulbs of the whole year, °C, any order, NaN where missing
 */
export function loadFractionOf(
  brief: Pick<Brief, 'phi' | 'balanceTempC' | 'limit'>,
  dryBulbsC: Float64Array,
): (dryBulbC: number) => number {
  const fromC = brief.balanceTempC;
  const { kind } = brief.limit;
  const alwaysConstant = kind === 'inlet' || kind === 'tower' || kind === 'turbine';
  if (brief.phi === 'constant' || alwaysConstant || fromC === null) return () => 1;
  const sorted = dryBulbsC.filter((dryBulbC) => !Number.isNaN(dryBulbC)).toSorted();
  const designC = sorted[sorted.length - 1 - Math.floor(DESIGN_SHARE * sorted.length)] ?? Number.NaN;
  if (!(designC > fromC)) return () => 1;
  return (dryBulbC) => Math.min(Math.max((dryBulbC - fromC) / (designC - fromC), 0), 1);
}
