import { nearestList, offer, reachOf } from './nearest-list.ts';
import { keep, MOST_STATIONS, type Neighbours } from './nearest-stations.ts';

/** Cells of the hash grid hold about so many stations. */
const STATIONS_PER_CELL = 2;

interface HashGrid {
  readonly side: number;
  readonly perAxis: number;
  /** Stations by cell, in their own order; those of a cell stand from its start to the next one's. */
  readonly order: Int32Array;
  readonly starts: Map<number, readonly [start: number, end: number]>;
  readonly cells: Int32Array;
}

/**
 * The nearest other stations of every station, exactly those that looking at all of them gives. Stations lie in the cells of a grid
 * in space; shells of cells are looked through from each station outwards until none farther out can hold a nearer one.
 * @param stations unit vectors, x, y, z in turn; of equally near ones the lesser number comes first
 * @throws RangeError beyond 65,535 stations
 */
export function nearestOthers(stations: Float64Array, each: number): Neighbours {
  const count = stations.length / 3;
  if (count > MOST_STATIONS) throw new RangeError(`a surface rests on at most ${MOST_STATIONS} stations`);
  const most = Math.max(0, Math.min(each, count - 1));
  const found = {
    points: count,
    each: most,
    stations: new Uint16Array(count * most),
    km: new Float32Array(count * most),
  };
  if (most === 0) return found;
  const grid = hashGrid(stations);
  const list = nearestList(most);
  for (let station = 0; station < count; station++) {
    list.count = 0;
    for (let shell = 0; shell < grid.perAxis; shell++) {
      // Everything in this shell and beyond lies at least so far away.
      const least = Math.max(0, shell - 1) * grid.side;
      if (reachOf(list) < least * least) break;
      offerShell({ grid, stations, station, list, shell });
    }
    keep(found, station, list);
  }
  return found;
}

function hashGrid(stations: Float64Array): HashGrid {
  const count = stations.length / 3;
  // Stations lie on a surface: the cells that it passes through are about 2 pi (2 / side)^2 / 4 of the cube's.
  const side = Math.min(2, Math.sqrt((4 * Math.PI * STATIONS_PER_CELL) / count));
  const perAxis = Math.floor(2 / side) + 1;
  const cells = new Int32Array(3 * count);
  for (let at = 0; at < cells.length; at++) {
    cells[at] = Math.min(perAxis - 1, Math.floor(((stations[at] ?? 0) + 1) / side));
  }
  const keys = Float64Array.from({ length: count }, (_none, station) => keyOf(perAxis, cellOf(cells, station)));
  const order = Int32Array.from({ length: count }, (_none, station) => station).sort(
    (one, other) => (keys[one] ?? 0) - (keys[other] ?? 0) || one - other,
  );
  const starts = new Map<number, readonly [number, number]>();
  for (let start = 0; start < count; ) {
    const key = keys[order[start] ?? 0] ?? 0;
    let end = start + 1;
    while (end < count && keys[order[end] ?? 0] === key) end++;
    starts.set(key, [start, end]);
    start = end;
  }
  return { side, perAxis, order, starts, cells };
}

type Cell = readonly [x: number, y: number, z: number];

function cellOf(cells: Int32Array, station: number): Cell {
  return [cells[3 * station] ?? 0, cells[3 * station + 1] ?? 0, cells[3 * station + 2] ?? 0];
}

function keyOf(perAxis: number, [x, y, z]: Cell): number {
  return (x * perAxis + y) * perAxis + z;
}

/** Offers what lies in the cells whose farthest axis is `shell` cells away. */
function offerShell(on: {
  grid: HashGrid;
  stations: Float64Array;
  station: number;
  list: ReturnType<typeof nearestList>;
  shell: number;
}): void {
  const { grid, station, shell } = on;
  const [x, y, z] = cellOf(grid.cells, station);
  const last = grid.perAxis - 1;
  for (let cx = Math.max(0, x - shell); cx <= Math.min(last, x + shell); cx++) {
    for (let cy = Math.max(0, y - shell); cy <= Math.min(last, y + shell); cy++) {
      const onFace = Math.abs(cx - x) === shell || Math.abs(cy - y) === shell;
      const step = onFace || shell === 0 ? 1 : 2 * shell;
      for (let cz = z - shell; cz <= z + shell; cz += step) {
        if (cz < 0 || cz > last) continue;
        const held = grid.starts.get(keyOf(grid.perAxis, [cx, cy, cz]));
        if (held !== undefined) offerCell(on, held);
      }
    }
  }
}

function offerCell(
  { grid, stations, station, list }: Parameters<typeof offerShell>[0],
  [start, end]: readonly [number, number],
): void {
  for (let index = start; index < end; index++) {
    const other = grid.order[index] ?? 0;
    if (other === station) continue;
    const dx = (stations[3 * other] ?? 0) - (stations[3 * station] ?? 0);
    const dy = (stations[3 * other + 1] ?? 0) - (stations[3 * station + 1] ?? 0);
    const dz = (stations[3 * other + 2] ?? 0) - (stations[3 * station + 2] ?? 0);
    offer(list, other, dx * dx + dy * dy + dz * dz);
  }
}
