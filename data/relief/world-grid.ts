/** The grid of the whole Earth, a node every 5 minutes: rows from the south pole, columns from the meridian of Greenwich eastwards. */
export const NODES_PER_DEGREE = 12;
export const ROWS = 180 * NODES_PER_DEGREE + 1;
export const COLUMNS = 360 * NODES_PER_DEGREE;

/** Number of a node; columns go round the Earth. */
export function nodeAt(row: number, column: number): number {
  return row * COLUMNS + (((column % COLUMNS) + COLUMNS) % COLUMNS);
}
