/**
 * What evaporates from a wet bulb: water or ice. ASHRAE Fundamentals 2017 ch. 1 eq. 33 (water) and eq. 35 (ice), with x the wet
 * bulb and h = 1.006 t + w (2501 + 1.86 t) the enthalpy, both become
 *
 *   L(x) Ws(x, p) + 1.006 x + c w x = h + fusion w,   L(x) = latent + latentSlope x
 *
 * whose left side rises with x, ever more steeply, so that Newton's method finds the one root from any sensible guess.
 */
export interface WetSurface {
  /** Latent heat less the heat of what evaporates, kJ/kg at 0 °C and its change per kelvin. */
  readonly latentKJPerKg: number;
  readonly latentSlopeKJPerKgK: number;
  /** Specific heat c of the water or ice, kJ/(kg K). */
  readonly surfaceKJPerKgK: number;
  /** What the heat of fusion adds per kg of vapour already in the air, kJ/kg. */
  readonly fusionKJPerKg: number;
}

export const WATER: WetSurface = {
  latentKJPerKg: 2501,
  latentSlopeKJPerKgK: -2.326,
  surfaceKJPerKgK: 4.186,
  fusionKJPerKg: 0,
};

export const ICE: WetSurface = {
  latentKJPerKg: 2830,
  latentSlopeKJPerKgK: -0.24,
  surfaceKJPerKgK: 2.1,
  fusionKJPerKg: 329,
};

/** Specific heat of dry air, kJ/(kg K), of the same chapter. */
export const DRY_AIR_KJ_PER_KG_K = 1.006;
