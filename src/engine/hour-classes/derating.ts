/** Thermal guidelines for data halls lower their limits by 1 K per 300 m above 900 m (method 3.1, after practice P4, P5). */
const DERATE_FROM_M = 900;
const DERATE_M_PER_K = 300;

/** Kelvin that a derated limit is lowered at a height, m; continuous. */
export function deratingK(heightM: number): number {
  return Math.max(0, heightM - DERATE_FROM_M) / DERATE_M_PER_K;
}

/** A limit at a height, m: lowered where it says that it is derated, else as it stands, °C. */
export function deratedC(limit: { readonly tempC: number; readonly derate?: string }, heightM: number): number {
  return limit.derate === undefined ? limit.tempC : limit.tempC - deratingK(heightM);
}
