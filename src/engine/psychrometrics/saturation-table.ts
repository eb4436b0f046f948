/**
 * Saturation pressure as a table, for the wet-bulb kernel and the judging of whole years. Nodes every 1/16 K, each the formula itself (ASHRAE Fundamentals 2017
 * ch. 1 eq. 5 and 6), straight lines between. The nodes are shifted so that one falls on 0.01 °C, where the formula passes from
 * ice to water: no line crosses the bend. Expected error: a line lies above the curve by at most 2 millionths of the pressure
 * (7 at -80 °C), which moves a wet bulb by less than 0.00004 K.
 */
import { floatColumn } from '../float-column.ts';
import { psychrolib } from './psychrolib-si.ts';

const saturationPressurePa = (tempC: number): number => psychrolib.GetSatVapPres(tempC);

const NODES_PER_K = 16;
const TRIPLE_POINT_C = 0.01;
const COLDEST_K_BELOW = 90;
const WARMEST_K_ABOVE = 70;

/** What this module computes with it keeps for itself and exports under another name: the compiler knows its own constants alone. */
const FIRST_C = TRIPLE_POINT_C - COLDEST_K_BELOW;
/** Temperature of the table's first node, °C. */
export const FIRST_NODE_C = FIRST_C;
const NODES = (COLDEST_K_BELOW + WARMEST_K_ABOVE) * NODES_PER_K;

/**
 * Two numbers per node, side by side so that one look-up fetches both: the pressure, Pa, and the difference to the next node's,
 * Pa, which serves as the slope too.
 */
const table = floatColumn(2 * NODES, (index) => {
  const nodeC = FIRST_C + (index >> 1) / NODES_PER_K;
  const pressurePa = saturationPressurePa(nodeC);
  return index % 2 === 0 ? pressurePa : saturationPressurePa(nodeC + 1 / NODES_PER_K) - pressurePa;
});

export const saturationTable = table;

/** Where a temperature, °C, -89.9 to 69.9, falls in the table: nodes from the first one on, with a fraction. */
function saturationPlace(tempC: number): number {
  return (tempC - FIRST_C) * NODES_PER_K;
}

/** From the difference of two nodes, Pa, to a slope, Pa/K: nodes per kelvin. */
export const SLOPE_PER_DIFFERENCE = NODES_PER_K;

const COLDEST_TABLED_C = FIRST_C;
const WARMEST_TABLED_C = TRIPLE_POINT_C + WARMEST_K_ABOVE - 1 / NODES_PER_K;

/** Saturation pressure, Pa, at a temperature, °C: from the table, outside it by the formula. */
export function tabledSaturationPa(tempC: number): number {
  if (!(tempC >= COLDEST_TABLED_C && tempC < WARMEST_TABLED_C)) return saturationPressurePa(tempC);
  const place = saturationPlace(tempC);
  const node = place | 0;
  return (table[2 * node] ?? 0) + (place - node) * (table[2 * node + 1] ?? 0);
}

/** Slope of the table at a temperature, Pa/K; outside it that of its nearest end. */
export function tabledSlopePaPerK(tempC: number): number {
  const inside = Math.min(Math.max(tempC, COLDEST_TABLED_C), WARMEST_TABLED_C - 1);
  return NODES_PER_K * (table[2 * (saturationPlace(inside) | 0) + 1] ?? 0);
}

/**
 * Pressures of the first look for a dew point: as 32-bit numbers cut after the exponent and 10 binary places, 1024 per doubling. That is
 * some six to a node, so that hardly any look has to go on to the next node, which no processor could foretell.
 */
const CUT_BITS = 13;
const asNumber = new Float32Array(1);
const asBits = new Int32Array(asNumber.buffer);
const FIRST_TABLED_PA = table[0] ?? 0;
const LAST_TABLED_PA = table[2 * NODES - 4] ?? 0;
const FIRST_LOOK = lookOf(FIRST_TABLED_PA);

function lookOf(pressurePa: number): number {
  asNumber[0] = pressurePa;
  return (asBits[0] ?? 0) >> CUT_BITS;
}

/** Node at or before each pressure of the first look. */
const firstLooks = findFirstLooks();

function findFirstLooks(): Uint16Array {
  const looks = new Uint16Array(lookOf(LAST_TABLED_PA) - FIRST_LOOK + 1);
  let node = 0;
  for (let look = 0; look < looks.length; look++) {
    asBits[0] = (FIRST_LOOK + look) << CUT_BITS;
    const pressurePa = asNumber[0] ?? 0;
    while (node < NODES - 2 && (table[2 * node + 2] ?? 0) <= pressurePa) node++;
    looks[look] = node;
  }
  return looks;
}

/**
 * Temperature, °C, at which air with this vapour pressure is saturated: the table read backwards.
 * @returns NaN outside the table (below 0.0097 Pa or above 31 kPa)
 */
export function tabledDewPointC(vapourPa: number): number {
  if (!(vapourPa >= FIRST_TABLED_PA && vapourPa < LAST_TABLED_PA)) return Number.NaN;
  let node = firstLooks[lookOf(vapourPa) - FIRST_LOOK] ?? 0;
  while ((table[2 * node + 2] ?? 0) <= vapourPa) node++;
  // The first look may round up by a node.
  while ((table[2 * node] ?? 0) > vapourPa) node--;
  const part = (vapourPa - (table[2 * node] ?? 0)) / (table[2 * node + 1] ?? 1);
  return FIRST_C + (node + part) / NODES_PER_K;
}
