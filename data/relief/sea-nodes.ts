import { COLUMNS, nodeAt, ROWS } from './world-grid.ts';

/** The middle of the South Atlantic. */
const START = { row: 60 * 12, column: 340 * 12 } as const;

/**
 * 1 where a node lies under the sea: below 0 m, and joined to the ocean through nodes below 0 m. What lies below 0 m without being
 * joined to it is dry land, such as the shores of the Dead Sea.
 */
export function seaNodes(heightsM: Float32Array): Uint8Array {
  const sea = new Uint8Array(heightsM.length);
  const isNew = (node: number) => sea[node] === 0 && (heightsM[node] ?? 0) < 0;
  const waiting = [nodeAt(START.row, START.column)];
  for (let node = waiting.pop(); node !== undefined; node = waiting.pop()) {
    if (!isNew(node)) continue;
    sea[node] = 1;
    const row = Math.floor(node / COLUMNS);
    const column = node % COLUMNS;
    waiting.push(nodeAt(row, column - 1), nodeAt(row, column + 1));
    if (row > 0) waiting.push(nodeAt(row - 1, column));
    if (row < ROWS - 1) waiting.push(nodeAt(row + 1, column));
  }
  return sea;
}
