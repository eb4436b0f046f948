/**
 * A first guess at the wet bulb that one step of Newton's method can finish: the balance of `wet-surface.ts` without the term
 * c w x depends on heat and pressure alone, so it is inverted beforehand into curves "wet bulb over heat", one for every
 * 2.5 kPa, with a node every kJ/kg; the term left out is put right to first order. The curves belong to fixed pressures and not
 * to a weather year: the guess, and so the wet bulb to its last bit, depends on the state alone. Expected error of the guess:
 * 0.01 K on ordinary weather, 0.05 K at the hot end.
 */
import { newtonStepC } from './newton-step.ts';
import { DRY_AIR_KJ_PER_KG_K, type WetSurface } from './wet-surface.ts';

/** Heat, kJ/kg, of the first node and the number of nodes, 1 kJ/kg apart: -80 to 200. */
const FIRST_KJ_PER_KG = -80;
const NODES = 281;
/** Pressure, Pa, of the first curve, their distance and their number: 30 to 112.5 kPa. */
const FIRST_PA = 30_000;
const CURVE_EVERY_PA = 2500;
const CURVES = 34;

/** Newton steps per node, each begun at the node before. */
const STEPS_PER_NODE = 3;

/** The curves of one surface, each drawn when a state first needs it. */
export interface GuessCurves {
  readonly surface: WetSurface;
  /** Wet bulb, °C: curve by curve, node by node. */
  readonly wetBulbC: Float64Array;
  readonly drawn: Uint8Array;
}

export function guessCurves(surface: WetSurface): GuessCurves {
  return { surface, wetBulbC: new Float64Array(CURVES * NODES), drawn: new Uint8Array(CURVES) };
}

function drawCurve(curves: GuessCurves, curve: number): void {
  const pressurePa = FIRST_PA + curve * CURVE_EVERY_PA;
  // So cold, air holds no vapour to speak of, and heat is 1.006 x alone.
  let x = FIRST_KJ_PER_KG / DRY_AIR_KJ_PER_KG_K;
  for (let node = 0; node < NODES; node++) {
    const heat = FIRST_KJ_PER_KG + node;
    for (let step = 0; step < STEPS_PER_NODE; step++) {
      x = newtonStepC(curves.surface, x, pressurePa, DRY_AIR_KJ_PER_KG_K, heat);
    }
    curves.wetBulbC[curve * NODES + node] = x;
  }
  curves.drawn[curve] = 1;
}

/**
 * Guess at the wet bulb, °C; NaN for a state outside the curves.
 * @param heatKJPerKg right side of the balance
 * @param vapourKJPerKgK the factor c w of the term left out, kJ/(kg K)
 */
export function guessC(curves: GuessCurves, heatKJPerKg: number, vapourKJPerKgK: number, pressurePa: number): number {
  const along = heatKJPerKg - FIRST_KJ_PER_KG;
  const across = (pressurePa - FIRST_PA) / CURVE_EVERY_PA;
  if (!(along >= 0 && along < NODES - 1 && across >= 0 && across < CURVES - 1)) return Number.NaN;
  const curve = across | 0;
  if (curves.drawn[curve] === 0) drawCurve(curves, curve);
  if (curves.drawn[curve + 1] === 0) drawCurve(curves, curve + 1);
  const node = along | 0;
  const thin = curve * NODES + node;
  const dense = thin + NODES;
  const part = across - curve;
  const { wetBulbC } = curves;
  const thinC = wetBulbC[thin] ?? 0;
  const thinNextC = wetBulbC[thin + 1] ?? 0;
  const x = thinC + part * ((wetBulbC[dense] ?? 0) - thinC);
  const slope = thinNextC + part * ((wetBulbC[dense + 1] ?? 0) - thinNextC) - x;
  const withoutTerm = x + (along - node) * slope;
  return withoutTerm - vapourKJPerKgK * withoutTerm * slope;
}
