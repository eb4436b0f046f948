/**
 * Saturation pressure as a table, for the wet-bulb kernel. Nodes every 1/16 K, each the formula itself (ASHRAE Fundamentals 2017
 * ch. 1 eq. 5 and 6), straight lines between. The nodes are shifted so that one falls on 0.01 °C, where the formula passes from
 * ice to water: no line crosses the bend. Expected error: a line lies above the curve by at most 2 millionths of the pressure
 * (7 at -80 °C), which moves a wet bulb by less than 0.00004 K.
 */
import { floatColumn } from '../float-column.ts';
import { saturationPressurePa } from './moist-air.ts';

const NODES_PER_K = 16;
const TRIPLE_POINT_C = 0.01;
const COLDEST_K_BELOW = 90;
const WARMEST_K_ABOVE = 70;

/** Temperature of the table's first node and the number of nodes per kelvin, for `saturationPlace`. */
const FIRST_NODE_C = TRIPLE_POINT_C - COLDEST_K_BELOW;
const NODES = (COLDEST_K_BELOW + WARMEST_K_ABOVE) * NODES_PER_K;

/**
 * Two numbers per node, side by side so that one look-up fetches both: the pressure, Pa, and the difference to the next node's,
 * Pa, which serves as the slope too.
 */
export const saturationTable = floatColumn(2 * NODES, (index) => {
  const nodeC = FIRST_NODE_C + (index >> 1) / NODES_PER_K;
  const pressurePa = saturationPressurePa(nodeC);
  return index % 2 === 0 ? pressurePa : saturationPressurePa(nodeC + 1 / NODES_PER_K) - pressurePa;
});

/** Where a temperature, °C, -89.9 to 69.9, falls in the table: nodes from the first one on, with a fraction. */
export function saturationPlace(tempC: number): number {
  return (tempC - FIRST_NODE_C) * NODES_PER_K;
}

/** From the difference of two nodes, Pa, to a slope, Pa/K. */
export const SLOPE_PER_DIFFERENCE = NODES_PER_K;
