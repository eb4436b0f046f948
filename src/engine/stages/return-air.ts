import type { Brief } from '../brief/brief.ts';

/** The hall's air on its way through the exchanger, °C. */
export interface ReturnAir {
  /** t_ret = t_sup + dT_IT. */
  readonly returnC: number;
  /** t_sup: no exchanger cools further, as its bypass opens. */
  readonly supplyAimC: number;
}

/** Supply of the dry exchanger, °C: t_ret - e_x (t_ret - t), not below t_sup (method 4 and 3.1). */
export function dryReturnSupplyC(
  { returnC, supplyAimC }: ReturnAir,
  dryBulbC: number,
  brief: Pick<Brief, 'effExchanger'>,
): number {
  return Math.max(returnC - brief.effExchanger * (returnC - dryBulbC), supplyAimC);
}

/** Supply of the wet exchanger at a share x of its wetting, °C: t_ret - x e_i (t_ret - t_wb), not below t_sup. */
export function wetReturnSupplyC(
  { returnC, supplyAimC }: ReturnAir,
  wetBulbC: number,
  at: { share: number; effIndirect: number },
): number {
  return Math.max(returnC - at.share * at.effIndirect * (returnC - wetBulbC), supplyAimC);
}
