/**
 * Formulas of others that checks compare with. No result of the product uses them: the method computes no such thing, or
 * computes it otherwise.
 */
import {
  enthalpyKJPerKg,
  humidityRatioFromRelativeHumidity,
  saturationPressurePa,
} from '../psychrometrics/moist-air.ts';

const ZERO_CELSIUS_K = 273.15;
/** Per K, of a published automatic-station manual. */
const PSYCHROMETER_PER_K = 6.62e-4;
const WATER_KJ_PER_KG_K = 4.186;
const LATENT_KJ_PER_KG = 2430;

/** Wet bulb, °C, at 101.325 kPa: explicit fit of Stull 2011, J. Appl. Meteor. Climatol. 50, 2267. @param pct relative humidity, % */
export function stullWetBulbC(tempC: number, pct: number): number {
  return (
    tempC * Math.atan(0.151977 * Math.sqrt(pct + 8.313659)) +
    Math.atan(tempC + pct) -
    Math.atan(pct - 1.676331) +
    0.00391838 * pct ** 1.5 * Math.atan(0.023101 * pct) -
    4.686035
  );
}

/** Relative humidity, %, of a depression at 101325 Pa by the psychrometer equation. */
export function psychrometerRhPct({ dryBulbC, depressionK }: { dryBulbC: number; depressionK: number }): number {
  const vapourPa = saturationPressurePa(dryBulbC - depressionK) - PSYCHROMETER_PER_K * 101_325 * depressionK;
  return (100 * vapourPa) / saturationPressurePa(dryBulbC);
}

/** F of the n-year extreme M + F s: -(sqrt(6)/pi) (0.5772 + ln(ln(n/(n - 1)))) (extreme-value distribution of Gumbel). */
export function extremeFactor(years: number): number {
  return -(Math.sqrt(6) / Math.PI) * (0.5772 + Math.log(Math.log(years / (years - 1))));
}

/** COP of a refrigerating plant as a share (grade) of Carnot's, the condenser `approachK` over outdoor air, at most `most`. */
export function carnotCop(input: {
  grade: number;
  evaporatingC: number;
  approachK: number;
  outdoorC: number;
  most: number;
}): number {
  const liftK = input.outdoorC + input.approachK - input.evaporatingC;
  const cop = (input.grade * (input.evaporatingC + ZERO_CELSIUS_K)) / liftK;
  return liftK > 0 ? Math.min(cop, input.most) : input.most;
}

/** Temperature-humidity-velocity index of broilers, Tao and Xin 2003, Transactions of the ASAE 46. */
export function broilerIndex(input: { dryBulbC: number; wetBulbC: number; airSpeedMPerS: number }): number {
  return (0.85 * input.dryBulbC + 0.15 * input.wetBulbC) * input.airSpeedMPerS ** -0.058;
}

export interface TowerUnderBalance {
  readonly waterKgPerS: number;
  readonly hotC: number;
  readonly coldC: number;
  readonly enteringC: number;
  readonly enteringRhPct: number;
  readonly leavingC: number;
  readonly pressurePa: number;
}

/** Energy and mass balance of a tower whose air leaves saturated; what evaporates is made up as warm as the cold water. */
export function towerBalance(tower: TowerUnderBalance) {
  const { pressurePa } = tower;
  const at = (dryBulbC: number, pct: number) => {
    const air = { dryBulbC, relativeHumidityPct: pct, pressurePa, belowZero: 'water' } as const;
    const humidityRatio = humidityRatioFromRelativeHumidity(air);
    return { humidityRatio, enthalpy: enthalpyKJPerKg(dryBulbC, humidityRatio) };
  };
  const entering = at(tower.enteringC, tower.enteringRhPct);
  const leaving = at(tower.leavingC, 100);
  const rejectedKw = WATER_KJ_PER_KG_K * tower.waterKgPerS * (tower.hotC - tower.coldC);
  const gained = leaving.humidityRatio - entering.humidityRatio;
  const dryAirKgPerS = rejectedKw / (leaving.enthalpy - entering.enthalpy - gained * WATER_KJ_PER_KG_K * tower.coldC);
  const makeUpKgPerS = dryAirKgPerS * gained;
  return { rejectedKw, dryAirKgPerS, makeUpKgPerS, latentShare: (makeUpKgPerS * LATENT_KJ_PER_KG) / rejectedKw };
}
