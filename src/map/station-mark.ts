import { rampColour } from '../charts/ramp.ts';
import { blend, type Colour, NOTHING, opaque, over, type Pixels, paintPixels, softEdge } from './paint-pixels.ts';

/**
 * The survey triangle of a station as pixels, drawn in code: filled by its score, hatched where the weather cannot be
 * trusted (grade D), hollow where there is no score.
 */
export type StationMark = { readonly score: number | null; readonly hatched: boolean };

/** All lengths in CSS pixels. */
export const MARK_SIZE_PX = 24;
const HALF_SIDE_PX = 7.6;
const LINE_PX = 1.3;
const HALO_PX = 1.5;
const HATCH_SPACING_PX = 3.4;
const HATCH_PX = 0.9;
/** A triangle looks centred when its centre of mass is; this lifts the box's middle to it. */
const DROP_PX = 1.4;

const INK = opaque('#22302f');
const PAPER = opaque('#fbf9f3');

/** The name under which the map keeps the picture of a mark. */
export function markName({ score, hatched }: StationMark): string {
  return `station:${score ?? 'none'}:${hatched ? 'hatched' : 'plain'}`;
}

/** The mark that `markName` named; null for the name of anything else. */
export function markNamed(name: string): StationMark | null {
  const found = /^station:(none|\d{1,3}):(hatched|plain)$/.exec(name);
  if (found === null) return null;
  return { score: found[1] === 'none' ? null : Number(found[1]), hatched: found[2] === 'hatched' };
}

/** The picture of a mark, `pixelRatio` device pixels to a CSS pixel. */
export function drawMark(mark: StationMark, pixelRatio: number): Pixels {
  const fill = mark.score === null ? { ...PAPER, alpha: 0.55 } : opaque(rampColour(mark.score / 100));
  return paintPixels({ sizePx: MARK_SIZE_PX, pixelRatio }, (x, y) =>
    colourAt({ x, y: y - DROP_PX, pixelRatio, fill, hatched: mark.hatched }),
  );
}

type Spot = {
  readonly x: number;
  readonly y: number;
  readonly pixelRatio: number;
  readonly fill: Colour;
  readonly hatched: boolean;
};

function colourAt({ x, y, pixelRatio, fill, hatched }: Spot): Colour {
  const outside = distanceToTriangle(x, y);
  const within = (reach: number) => softEdge(reach - outside, pixelRatio);
  const halo = over(NOTHING, PAPER, within(LINE_PX / 2 + HALO_PX) * 0.85);
  const outlined = over(halo, INK, within(LINE_PX / 2));
  const inside = within(-LINE_PX / 2);
  if (inside === 0) return outlined;
  const field = hatched ? over(fill, INK, hatchAt(x, y, pixelRatio) * 0.8) : fill;
  return blend(outlined, field, inside);
}

/** Signed distance to an upright equilateral triangle around the origin: negative inside. */
function distanceToTriangle(x: number, y: number): number {
  const inradius = HALF_SIDE_PX / Math.sqrt(3);
  const slant = (Math.abs(x) * Math.sqrt(3) - y) / 2;
  const nearest = Math.max(y, slant) - inradius;
  if (nearest <= 0) return nearest;
  // Outside, the corners count: the distance to the outline itself, so that the halo turns round them.
  const corners = [
    [0, -2 * inradius],
    [HALF_SIDE_PX, inradius],
    [-HALF_SIDE_PX, inradius],
  ] as const;
  return Math.min(
    ...corners.map(([ax, ay], index) => {
      const [bx, by] = corners[(index + 1) % 3] ?? corners[0];
      const along = ((x - ax) * (bx - ax) + (y - ay) * (by - ay)) / ((bx - ax) ** 2 + (by - ay) ** 2);
      const held = Math.min(1, Math.max(0, along));
      return Math.hypot(x - ax - held * (bx - ax), y - ay - held * (by - ay));
    }),
  );
}

/** Thin strokes falling to the right, as on a hatched plate. */
function hatchAt(x: number, y: number, pixelRatio: number): number {
  const across = ((((x + y) / Math.SQRT2) % HATCH_SPACING_PX) + HATCH_SPACING_PX) % HATCH_SPACING_PX;
  const fromStroke = Math.abs(across - HATCH_SPACING_PX / 2);
  return softEdge(HATCH_PX / 2 - fromStroke, pixelRatio);
}
