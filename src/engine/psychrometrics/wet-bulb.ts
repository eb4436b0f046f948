/**
 * Thermodynamic wet bulb: the one module that everything calls, for a single state and for a whole year.
 *
 * The equations are those of ASHRAE Fundamentals 2017 ch. 1 (eq. 33 over water, eq. 35 over ice) in the common form of
 * `wet-surface.ts`; a guess from curves drawn beforehand (`wet-bulb-guess.ts`) and one step of Newton's method on tabulated
 * saturation pressure (`newton-step.ts`) solve them. Expected error against the exact root: 0.0001 K, a fifth of that of
 * PsychroLib's bisection. States outside the tables (a heat below -80 or over 200 kJ/kg, a pressure outside 30 to 112.5 kPa)
 * are found by bisection.
 *
 * Near 0 °C both an ice and a water wet bulb can satisfy the equations, and PsychroLib returns either. One rule of ours: the
 * water root whenever h >= 2501 Ws(0 °C, p), else the ice root.
 *
 * One rule for single value and column: `wetBulbOfState` alone computes, from the state alone, so both are the same to the bit.
 */
import { bisectedWetBulbC } from './bisected-wet-bulb.ts';
import { saturationPressurePa } from './moist-air.ts';
import { newtonStepC } from './newton-step.ts';
import { drawCurve, GUESSED_ICE, GUESSED_WATER, type GuessedSurface, guessC } from './wet-bulb-guess.ts';

/** ASHRAE Fundamentals 2017 ch. 1 eq. 30. */
const DRY_AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const LATENT_HEAT_KJ_PER_KG = 2501;
/** 2501 times the humidity ratio of saturated air at 0 °C is this over (p - 611 Pa). */
const SATURATION_AT_ZERO_PA = saturationPressurePa(0);
const HEAT_AT_ZERO = LATENT_HEAT_KJ_PER_KG * 0.621945 * SATURATION_AT_ZERO_PA;
/** PsychroLib's floor for a humidity ratio. */
const DRIEST_HUMIDITY_RATIO = 1e-7;
/** The error of the tables: closer to the dry bulb than this is saturated air, whose wet bulb is its dry bulb. */
const SATURATED_WITHIN_K = 5e-5;

/** Further from 0 °C than this, guess and root lie on one side of the bend in saturation pressure. */
const BEND_WITHIN_K = 0.05;

/** Constants of this module, so that the compiler knows them: what is imported it would load at every state. */
const overWater = GUESSED_WATER;
const overIce = GUESSED_ICE;

/**
 * Thermodynamic wet bulb, °C, of a state; never above the dry bulb.
 * @param dryBulbC dry bulb, °C, -100 to 200
 * @param humidityRatio kg/kg; a ratio over saturation is taken as saturated
 * @param pressurePa station pressure, Pa
 * @throws RangeError when an input is not a finite number
 */
export function wetBulbC(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  if (!Number.isFinite(dryBulbC + humidityRatio + pressurePa)) {
    throw new RangeError(
      `wet bulb of a state that is not known: ${dryBulbC} °C, ${humidityRatio} kg/kg, ${pressurePa} Pa`,
    );
  }
  return wetBulbOfState(dryBulbC, humidityRatio, pressurePa);
}

/**
 * Thermodynamic wet bulb, °C, of every slot, NaN where one of the three columns is NaN: `wetBulbC` of each, to the bit.
 * @param dryBulbC °C, one value per slot
 * @param humidityRatio kg/kg, one value per slot
 * @param pressurePa Pa, one value per slot
 * @param into takes the result, when a column of the same length is at hand
 */
export function wetBulbColumn(
  dryBulbC: Float64Array,
  humidityRatio: Float64Array,
  pressurePa: Float64Array,
  into: Float64Array = new Float64Array(dryBulbC.length),
): Float64Array {
  for (let slot = 0; slot < into.length; slot++) {
    const dryBulb = dryBulbC[slot] ?? Number.NaN;
    const ratio = humidityRatio[slot] ?? Number.NaN;
    const pressure = pressurePa[slot] ?? Number.NaN;
    into[slot] = Number.isNaN(dryBulb + ratio + pressure) ? Number.NaN : wetBulbOfState(dryBulb, ratio, pressure);
  }
  return into;
}

/** Kept short: V8 compiles this, the guess and the step into the loop over a year only while they are few instructions in all. */
function wetBulbOfState(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  const ratio = Math.max(humidityRatio, DRIEST_HUMIDITY_RATIO);
  const enthalpy = DRY_AIR_KJ_PER_KG_K * dryBulbC + ratio * (LATENT_HEAT_KJ_PER_KG + VAPOUR_KJ_PER_KG_K * dryBulbC);
  const water = enthalpy * (pressurePa - SATURATION_AT_ZERO_PA) >= HEAT_AT_ZERO;
  const surface = water ? overWater : overIce;
  const heatKJPerKg = enthalpy + surface.fusionKJPerKg * ratio;
  const vapourKJPerKgK = surface.surfaceKJPerKgK * ratio;
  const guess = guessC(surface, heatKJPerKg, vapourKJPerKgK, pressurePa);
  const root =
    Math.abs(guess) > BEND_WITHIN_K
      ? newtonStepC(surface, guess, pressurePa, DRY_AIR_KJ_PER_KG_K + vapourKJPerKgK, heatKJPerKg)
      : rareRootC({ surface, guess, dryBulbC, humidityRatio: ratio, pressurePa, heatKJPerKg });
  // Over water no root lies below 0 °C, over ice none above.
  const clear = root > 0 === water ? root : 0;
  return clear < dryBulbC - SATURATED_WITHIN_K ? clear : dryBulbC;
}

/** The root when the guess lies by the bend in saturation pressure, or there is none: NaN. */
function rareRootC(state: {
  surface: GuessedSurface;
  guess: number;
  dryBulbC: number;
  humidityRatio: number;
  pressurePa: number;
  heatKJPerKg: number;
}): number {
  const { surface, dryBulbC, humidityRatio, pressurePa, heatKJPerKg } = state;
  const vapourKJPerKgK = surface.surfaceKJPerKgK * humidityRatio;
  let x = state.guess;
  if (Number.isNaN(x) && drawCurve(surface, heatKJPerKg, pressurePa)) {
    x = guessC(surface, heatKJPerKg, vapourKJPerKgK, pressurePa);
  }
  if (Number.isNaN(x)) {
    const highC = surface === overWater ? dryBulbC : Math.min(dryBulbC, 0);
    return bisectedWetBulbC({ surface, highC, humidityRatio, pressurePa, heatKJPerKg });
  }
  // So close to 0.01 °C the first step may take the slope of the other side of the bend from ice to water: a second mends it.
  const steps = Math.abs(x) > BEND_WITHIN_K ? 1 : 2;
  for (let step = 0; step < steps; step++) {
    x = newtonStepC(surface, x, pressurePa, DRY_AIR_KJ_PER_KG_K + vapourKJPerKgK, heatKJPerKg);
  }
  return x;
}
