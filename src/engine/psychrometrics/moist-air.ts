/**
 * Properties of moist air, ASHRAE Fundamentals 2017 ch. 1, perfect-gas relations, through PsychroLib.
 * Good from -100 to 200 °C; under 0.7 % from real gas at 101.325 kPa between -50 and 50 °C (that chapter, after Kuehn 1998).
 */
import { psychrolib } from './psychrolib-si.ts';
import { rememberedPressures } from './remembered-pressures.ts';
import { tabledDewPointC } from './saturation-table.ts';

/** What a humidity below 0 °C stands for: saturation over liquid water or over ice. */
export type BelowZeroPhase = 'water' | 'ice';

const ZERO_CELSIUS_K = 273.15;
/** Dry air and vapour, kJ/(kg K), and latent heat at 0 °C, kJ/kg: ASHRAE Fundamentals 2017 ch. 1 eq. 30. */
const DRY_AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const LATENT_HEAT_KJ_PER_KG = 2501;
/** Ratio of the molar masses of water and dry air (eq. 20). */
const MASS_RATIO = 0.621945;
/** Factor of the humidity ratio in the volume (eq. 26). */
const VOLUME_FACTOR = 1.607858;
/** Gas constant of dry air, J/(kg K) (eq. 1). */
const DRY_AIR_J_PER_KG_K = 287.042;
/** Dry bulb and dew point further apart than this have pressures in the same order, whatever the rounding of the formulas. */
const CLEAR_K = 0.001;
/** PsychroLib's floor. */
const DRIEST_HUMIDITY_RATIO = 1e-7;

/**
 * Saturation pressure, Pa, at a temperature, °C: over ice to 0.01 °C, over water above (eq. 5 and 6).
 * @throws Error outside -100 to 200 °C
 */
export const saturationPressurePa = rememberedPressures((tempC) => psychrolib.GetSatVapPres(tempC));

/** Saturation pressure, Pa, over liquid water at any temperature, °C, supercooled too (eq. 6 continued below 0 °C). */
export const saturationPressureOverWaterPa = rememberedPressures((tempC) => {
  const k = tempC + ZERO_CELSIUS_K;
  return Math.exp(
    -5.8002206e3 / k +
      1.3914993 -
      4.8640239e-2 * k +
      4.1764768e-5 * k ** 2 -
      1.4452093e-8 * k ** 3 +
      6.5459673 * Math.log(k),
  );
});

/** Saturation pressure, Pa, in the phase that a file's humidity stands for below 0 °C. */
export function saturationPressureInPhasePa(tempC: number, belowZero: BelowZeroPhase): number {
  return belowZero === 'water' && tempC < 0 ? saturationPressureOverWaterPa(tempC) : saturationPressurePa(tempC);
}

/** Humidity ratio, kg/kg, of saturated air (over ice below 0 °C; eq. 36). */
export function saturationHumidityRatio(tempC: number, pressurePa: number): number {
  return humidityRatioOfVapour(saturationPressurePa(tempC), pressurePa);
}

/** Humidity ratio, kg/kg, of air whose vapour has a pressure, Pa (eq. 20), with PsychroLib's floor and its order of steps. */
function humidityRatioOfVapour(vapourPa: number, pressurePa: number): number {
  return Math.max((MASS_RATIO * vapourPa) / (pressurePa - vapourPa), DRIEST_HUMIDITY_RATIO);
}

/**
 * Humidity ratio, kg/kg, from a dew point, capped at saturation of the dry bulb.
 * @param input.belowZero what a dew point below 0 °C stands for in this file
 */
export function humidityRatioFromDewPoint(input: {
  dryBulbC: number;
  dewPointC: number;
  pressurePa: number;
  belowZero: BelowZeroPhase;
}): number {
  const vapourPa = saturationPressureInPhasePa(input.dewPointC, input.belowZero);
  const humidityRatio = humidityRatioOfVapour(vapourPa, input.pressurePa);
  return Math.min(humidityRatio, saturationHumidityRatio(input.dryBulbC, input.pressurePa));
}

/**
 * Humidity ratios, kg/kg, of columns: `humidityRatioFromDewPoint` of each slot, to the bit, NaN where a value is missing. Where the
 * dew point lies clearly below the dry bulb the cap of saturation cannot hold, and it is not asked for.
 */
export function humidityRatioColumn(columns: {
  dryBulbC: Float64Array;
  dewPointC: Float64Array;
  pressurePa: Float64Array;
  belowZero: BelowZeroPhase;
}): Float64Array {
  const { belowZero, dewPointC: dewPoints, dryBulbC: dryBulbs, pressurePa: pressures } = columns;
  const ratios = new Float64Array(dryBulbs.length);
  // Over water below 0 °C the vapour of a dew point may pass saturation over ice.
  const clearFromC = belowZero === 'ice' ? Number.NEGATIVE_INFINITY : 0;
  for (let slot = 0; slot < ratios.length; slot++) {
    const dryBulb = dryBulbs[slot] ?? Number.NaN;
    const dewPoint = dewPoints[slot] ?? Number.NaN;
    const pressure = pressures[slot] ?? Number.NaN;
    if (dewPoint >= clearFromC && dryBulb - dewPoint > CLEAR_K && pressure > 0) {
      ratios[slot] = humidityRatioOfVapour(saturationPressurePa(dewPoint), pressure);
    } else if (Number.isNaN(dryBulb + dewPoint + pressure)) ratios[slot] = Number.NaN;
    else {
      ratios[slot] = humidityRatioFromDewPoint({
        dryBulbC: dryBulb,
        dewPointC: dewPoint,
        pressurePa: pressure,
        belowZero,
      });
    }
  }
  return ratios;
}

/**
 * Humidity ratio, kg/kg, from a relative humidity, %, capped at saturation of the dry bulb.
 * @param input.belowZero what a relative humidity below 0 °C stands for in this file
 */
export function humidityRatioFromRelativeHumidity(input: {
  dryBulbC: number;
  relativeHumidityPct: number;
  pressurePa: number;
  belowZero: BelowZeroPhase;
}): number {
  const vapourPa = (input.relativeHumidityPct / 100) * saturationPressureInPhasePa(input.dryBulbC, input.belowZero);
  const humidityRatio = humidityRatioOfVapour(vapourPa, input.pressurePa);
  return Math.min(humidityRatio, saturationHumidityRatio(input.dryBulbC, input.pressurePa));
}

/** Relative humidity, % (over ice below 0 °C), of a state; may pass 100 when the state is supersaturated. */
export function relativeHumidityPct(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  return 100 * (vapourPressurePa(humidityRatio, pressurePa) / saturationPressurePa(dryBulbC));
}

/** Relative humidity, %, that a dew point means at a dry bulb, both saturation pressures in one phase. */
export function relativeHumidityOfDewPointPct(dryBulbC: number, dewPointC: number, belowZero: BelowZeroPhase): number {
  return (100 * saturationPressureInPhasePa(dewPointC, belowZero)) / saturationPressureInPhasePa(dryBulbC, belowZero);
}

/** Pressure of the vapour in air, Pa (eq. 20), with PsychroLib's floor for a humidity ratio. */
export function vapourPressurePa(humidityRatio: number, pressurePa: number): number {
  const ratio = Math.max(humidityRatio, DRIEST_HUMIDITY_RATIO);
  return (pressurePa * ratio) / (MASS_RATIO + ratio);
}

/**
 * Dew point, °C (frost point below 0 °C), of a state; at most the dry bulb. From tabulated saturation pressure, good to
 * 0.0001 K; outside the table PsychroLib's, good to 0.001 K.
 */
export function dewPointC(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  const tabledC = tabledDewPointC(vapourPressurePa(humidityRatio, pressurePa));
  if (!Number.isNaN(tabledC)) return Math.min(tabledC, dryBulbC);
  return psychrolib.GetTDewPointFromHumRatio(dryBulbC, humidityRatio, pressurePa);
}

/** Enthalpy, kJ per kg of dry air, 0 for dry air at 0 °C (eq. 30). */
export function enthalpyKJPerKg(dryBulbC: number, humidityRatio: number): number {
  return DRY_AIR_KJ_PER_KG_K * dryBulbC + humidityRatio * (LATENT_HEAT_KJ_PER_KG + VAPOUR_KJ_PER_KG_K * dryBulbC);
}

/** Volume, m³ per kg of dry air (eq. 26). */
export function volumeM3PerKg(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  const ratio = Math.max(humidityRatio, DRIEST_HUMIDITY_RATIO);
  return (DRY_AIR_J_PER_KG_K * (dryBulbC + ZERO_CELSIUS_K) * (1 + VOLUME_FACTOR * ratio)) / pressurePa;
}
