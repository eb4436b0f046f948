/**
 * A first guess at the wet bulb that one step of Newton's method can finish: the balance of `wet-surface.ts` without the term
 * c w x depends on heat and pressure alone, so it is inverted beforehand into curves "wet bulb over heat", one for every
 * 2.5 kPa, with a node every kJ/kg; the term left out is put right to first order. The curves belong to fixed pressures and not
 * to a weather year: the guess, and so the wet bulb to its last bit, depends on the state alone. Expected error of the guess:
 * 0.01 K on ordinary weather, 0.05 K at the hot end.
 */
import { floatColumn } from '../float-column.ts';
import { newtonStepC } from './newton-step.ts';
import { DRY_AIR_KJ_PER_KG_K, ICE, WATER, type WetSurface } from './wet-surface.ts';

/** Heat, kJ/kg, of the first node and the number of nodes, 1 kJ/kg apart: -80 to 200. */
const FIRST_KJ_PER_KG = -80;
const NODES = 281;
const LAST_NODE = NODES - 1;
/** Pressure, Pa, of the first curve, their distance and their number: 30 to 112.5 kPa. */
const FIRST_PA = 30_000;
const CURVE_EVERY_PA = 2500;
const CURVES = 34;
const LAST_CURVE = CURVES - 1;

/** Newton steps per node, each begun at the node before. */
const STEPS_PER_NODE = 3;

/** A surface and the place of its first curve among the nodes of all. */
export interface GuessedSurface extends WetSurface {
  readonly firstNode: number;
}

export const GUESSED_WATER: GuessedSurface = { ...WATER, firstNode: 0 };
export const GUESSED_ICE: GuessedSurface = { ...ICE, firstNode: CURVES * NODES };

/**
 * Two numbers per node, side by side so that one look fetches both: the wet bulb, °C, and the difference to the next curve's at
 * the same heat, K. Surface by surface, curve by curve, node by node; NaN until a state first needs the curve.
 */
const nodes = new Float64Array(2 * 2 * CURVES * NODES).fill(Number.NaN);

/** Wet bulbs, °C, of the nodes of one curve. */
function curveC(surface: WetSurface, curve: number): Float64Array {
  const pressurePa = FIRST_PA + curve * CURVE_EVERY_PA;
  // So cold, air holds no vapour to speak of, and heat is 1.006 x alone.
  let x = FIRST_KJ_PER_KG / DRY_AIR_KJ_PER_KG_K;
  return floatColumn(NODES, (node) => {
    for (let step = 0; step < STEPS_PER_NODE; step++) {
      x = newtonStepC(surface, x, pressurePa, DRY_AIR_KJ_PER_KG_K, FIRST_KJ_PER_KG + node);
    }
    return x;
  });
}

/**
 * Draws the curve that a state needs.
 * @returns false when the state lies outside all curves, or the curve was there
 */
export function drawCurve(surface: GuessedSurface, heatKJPerKg: number, pressurePa: number): boolean {
  const curve = Math.floor((pressurePa - FIRST_PA) / CURVE_EVERY_PA);
  const node = Math.floor(heatKJPerKg - FIRST_KJ_PER_KG);
  if (!(node >= 0 && node < LAST_NODE && curve >= 0 && curve < LAST_CURVE)) return false;
  const first = 2 * (surface.firstNode + curve * NODES);
  if (!Number.isNaN(nodes[first])) return false;
  const thinC = curveC(surface, curve);
  const denseC = curveC(surface, curve + 1);
  for (const [at, wetC] of thinC.entries()) {
    nodes[first + 2 * at] = wetC;
    nodes[first + 2 * at + 1] = (denseC[at] ?? 0) - wetC;
  }
  return true;
}

/**
 * Guess at the wet bulb, °C; NaN for a state outside the curves, and until its curve is drawn.
 * @param heatKJPerKg right side of the balance
 * @param vapourKJPerKgK the factor c w of the term left out, kJ/(kg K)
 */
export function guessC(
  surface: GuessedSurface,
  heatKJPerKg: number,
  vapourKJPerKgK: number,
  pressurePa: number,
): number {
  const along = heatKJPerKg - FIRST_KJ_PER_KG;
  const across = (pressurePa - FIRST_PA) / CURVE_EVERY_PA;
  if (!(along >= 0 && along < LAST_NODE && across >= 0 && across < LAST_CURVE)) return Number.NaN;
  const curve = across | 0;
  const node = along | 0;
  const part = across - curve;
  const at = 2 * (surface.firstNode + curve * NODES + node);
  const table = nodes;
  const x = (table[at] ?? 0) + part * (table[at + 1] ?? 0);
  const slope = (table[at + 2] ?? 0) + part * (table[at + 3] ?? 0) - x;
  const withoutTerm = x + (along - node) * slope;
  return withoutTerm - vapourKJPerKgK * withoutTerm * slope;
}
