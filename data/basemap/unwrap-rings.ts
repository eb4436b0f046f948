import type { PolygonRings, Position, Ring } from './read-atlas.ts';

/**
 * world-atlas joins what lies on both sides of 180°, so a ring there jumps from one end of a flat map to the other. Here
 * longitudes run on past 180° instead (the tile cutter brings them round), and a ring that goes about the pole is closed
 * along the foot of the map.
 */

const FOOT_LATITUDE = -90;
/** The flat map ends at 85.05°; outlines south of this are never seen. */
const UNSEEN_LATITUDE = -85.06;
const MERIDIAN_GRAIN = 0.01;

/** A polygon without jumps; rings that lie wholly under the foot of the map are left out. */
export function unwrappedPolygon(polygon: PolygonRings): PolygonRings {
  return polygon.filter((ring) => ring.some((position) => position[1] > UNSEEN_LATITUDE)).map(unwrappedRing);
}

/** Lines without jumps and without the segments along 180° and the foot, where data were cut and no coast runs. */
export function unwrappedLines(lines: readonly Ring[]): Ring[] {
  return lines.flatMap((line) => {
    const pieces: Position[][] = [];
    let piece: Position[] = [];
    for (const [index, position] of line.entries()) {
      const previous = line[index - 1];
      if (previous !== undefined && alongCut(previous, position)) {
        pieces.push(piece);
        piece = [];
      }
      piece.push(position);
    }
    pieces.push(piece);
    return pieces.filter((kept) => kept.length > 1).map((kept) => runOn(kept));
  });
}

function unwrappedRing(ring: Ring): Ring {
  const run = runOn(ring);
  const first = run[0];
  const last = run.at(-1);
  if (first === undefined || last === undefined || Math.abs(last[0] - first[0]) < 180) return run;
  return [...run, [last[0], FOOT_LATITUDE], [first[0], FOOT_LATITUDE], first];
}

function runOn(line: Ring): Position[] {
  let turns = 0;
  let previous: number | null = null;
  const run = line.map(([longitude, latitude]): Position => {
    if (previous !== null && longitude - previous > 180) turns -= 1;
    if (previous !== null && longitude - previous < -180) turns += 1;
    previous = longitude;
    return [longitude + 360 * turns, latitude];
  });
  const middle =
    (Math.min(...run.map((position) => position[0])) + Math.max(...run.map((position) => position[0]))) / 2;
  const shift = 360 * Math.round(middle / 360);
  return shift === 0 ? run : run.map(([longitude, latitude]) => [longitude - shift, latitude]);
}

function alongCut(a: Position, b: Position): boolean {
  const onMeridian = (position: Position) => Math.abs(position[0]) > 180 - MERIDIAN_GRAIN;
  const onFoot = (position: Position) => position[1] < UNSEEN_LATITUDE;
  return (onMeridian(a) && onMeridian(b)) || (onFoot(a) && onFoot(b));
}
