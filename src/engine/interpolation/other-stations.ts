import { type NearestList, nearestList, offer, reachOf } from './nearest-list.ts';
import { keep, MOST_STATIONS, type Neighbours } from './nearest-stations.ts';

/** Cells of the grid that hold any station hold about so many. */
const STATIONS_PER_CELL = 3;

/** The cube around the unit sphere in cells, and the stations in each, in their own order. */
interface CubeGrid {
  readonly side: number;
  readonly perAxis: number;
  /** Stations by cell; those of cell c stand from starts[c] to starts[c + 1]. */
  readonly order: Int32Array;
  readonly starts: Int32Array;
  readonly stations: Float64Array;
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
  const grid = cubeGrid(stations);
  const list = nearestList(most);
  for (let station = 0; station < count; station++) {
    list.count = 0;
    for (let shell = 0; shell < grid.perAxis; shell++) {
      // Everything in this shell and beyond lies at least so far away.
      const least = Math.max(0, shell - 1) * grid.side;
      if (reachOf(list) < least * least) break;
      offerShell(grid, station, shell, list);
    }
    keep(found, station, list);
  }
  return found;
}

function cubeGrid(stations: Float64Array): CubeGrid {
  const count = stations.length / 3;
  // A sphere of the unit radius passes through about 6 pi / side^2 cells of its cube (half again its area, as they lie at all angles).
  const side = Math.min(2, Math.sqrt((6 * Math.PI * STATIONS_PER_CELL) / count));
  const perAxis = Math.floor(2 / side) + 1;
  const starts = new Int32Array(perAxis ** 3 + 1);
  const cells = new Int32Array(count);
  for (let station = 0; station < count; station++) {
    const cell =
      (axisCell(stations[3 * station] ?? 0, side) * perAxis + axisCell(stations[3 * station + 1] ?? 0, side)) *
        perAxis +
      axisCell(stations[3 * station + 2] ?? 0, side);
    cells[station] = cell;
    starts[cell + 1] = (starts[cell + 1] ?? 0) + 1;
  }
  for (let cell = 1; cell < starts.length; cell++) starts[cell] = (starts[cell] ?? 0) + (starts[cell - 1] ?? 0);
  const order = new Int32Array(count);
  const filled = starts.slice();
  for (let station = 0; station < count; station++) {
    const cell = cells[station] ?? 0;
    const place = filled[cell] ?? 0;
    order[place] = station;
    filled[cell] = place + 1;
  }
  return { side, perAxis, order, starts, stations };
}

function axisCell(coordinate: number, side: number): number {
  return Math.floor((coordinate + 1) / side);
}

/** Offers what lies in the cells whose farthest axis is `shell` cells away; rows of cells along z are read as one. */
function offerShell(grid: CubeGrid, station: number, shell: number, list: NearestList): void {
  const { side, perAxis, stations } = grid;
  const x = axisCell(stations[3 * station] ?? 0, side);
  const y = axisCell(stations[3 * station + 1] ?? 0, side);
  const z = axisCell(stations[3 * station + 2] ?? 0, side);
  const last = perAxis - 1;
  const low = Math.max(0, z - shell);
  const high = Math.min(last, z + shell);
  for (let cx = Math.max(0, x - shell); cx <= Math.min(last, x + shell); cx++) {
    for (let cy = Math.max(0, y - shell); cy <= Math.min(last, y + shell); cy++) {
      const row = (cx * perAxis + cy) * perAxis;
      if (Math.abs(cx - x) === shell || Math.abs(cy - y) === shell) {
        offerCells(grid, station, row + low, row + high, list);
        continue;
      }
      if (z - shell >= 0) offerCells(grid, station, row + z - shell, row + z - shell, list);
      if (z + shell <= last) offerCells(grid, station, row + z + shell, row + z + shell, list);
    }
  }
}

function offerCells(grid: CubeGrid, station: number, first: number, last: number, list: NearestList): void {
  const { order, starts, stations } = grid;
  const x = stations[3 * station] ?? 0;
  const y = stations[3 * station + 1] ?? 0;
  const z = stations[3 * station + 2] ?? 0;
  const end = starts[last + 1] ?? 0;
  for (let index = starts[first] ?? 0; index < end; index++) {
    const other = order[index] ?? 0;
    if (other === station) continue;
    const dx = (stations[3 * other] ?? 0) - x;
    const dy = (stations[3 * other + 1] ?? 0) - y;
    const dz = (stations[3 * other + 2] ?? 0) - z;
    const squared = dx * dx + dy * dy + dz * dz;
    if (squared <= reachOf(list)) offer(list, other, squared);
  }
}
