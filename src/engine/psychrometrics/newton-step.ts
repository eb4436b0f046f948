import { FIRST_NODE_C, SLOPE_PER_DIFFERENCE, saturationTable } from './saturation-table.ts';
import type { WetSurface } from './wet-surface.ts';

/** Constants of this module, so that the compiler knows them: what is imported it would load at every step. */
const table = saturationTable;
const firstNodeC = FIRST_NODE_C;
const slopePerDifference = SLOPE_PER_DIFFERENCE;
/** Ratio of the molar masses of water and dry air (ASHRAE Fundamentals 2017 ch. 1 eq. 20). */
const MASS_RATIO = 0.621945;

/**
 * One step of Newton's method from a guess at the wet bulb, °C, with tabulated saturation pressure pws. The balance of
 * `wet-surface.ts` and its slope are both multiplied by (p - pws)², so that a step costs a single division:
 *
 *   balance (p - pws)² = L e pws (p - pws) + (k x - H) (p - pws)²         e = 0.621945, k = 1.006 + c w
 *   slope   (p - pws)² = L' e pws (p - pws) + L e p pws' + k (p - pws)²
 *
 * The balance is convex, so a step never ends below the root of the table. A guess 0.05 K off ends within 0.00005 K.
 * @param guessC -89.9 to 69.9 °C
 * @param sensibleKJPerKgK k, 1.006 + c w, kJ/(kg K)
 * @param heatKJPerKg H, the right side of the balance, kJ/kg
 */
export function newtonStepC(
  surface: WetSurface,
  guessC: number,
  pressurePa: number,
  sensibleKJPerKgK: number,
  heatKJPerKg: number,
): number {
  const place = (guessC - firstNodeC) * slopePerDifference;
  const node = place | 0;
  const difference = table[2 * node + 1] ?? 0;
  const saturationPa = (table[2 * node] ?? 0) + (place - node) * difference;
  const airPa = pressurePa - saturationPa;
  const latent = surface.latentKJPerKg + surface.latentSlopeKJPerKgK * guessC;
  const vapour = MASS_RATIO * saturationPa;
  const balance = airPa * (latent * vapour + (sensibleKJPerKgK * guessC - heatKJPerKg) * airPa);
  const slope =
    airPa * (surface.latentSlopeKJPerKgK * vapour + sensibleKJPerKgK * airPa) +
    latent * MASS_RATIO * slopePerDifference * difference * pressurePa;
  return guessC - balance / slope;
}
