/**
 * The pictures of marks as pixels, drawn in code. Each mark is two pictures: a field whose colour the map is told (a distance
 * field, so that a slider recolours it without new geometry), and over it the ink: outline, halo, and hatching in grade D.
 */
import {
  blend,
  type Colour,
  NOTHING,
  opaque,
  over,
  type Pixels,
  paintDistance,
  paintPixels,
  softEdge,
} from './paint-pixels.ts';
import type { PlaceKind } from './sheet-place.ts';

/** All lengths in CSS pixels. */
export const MARK_SIZE_PX = 24;
const LINE_PX = 1.3;
const HALO_PX = 1.5;
const HATCH_SPACING_PX = 3.4;
const HATCH_PX = 1.1;

const HALF_SIDE_PX = 7.6;
/** A triangle looks centred when its centre of mass is; this lifts the box's middle to it. */
const DROP_PX = 1.4;

/** Half the outer edge of a site's square, and how wide the coloured rule is that runs round its letter. */
const HALF_SQUARE_PX = 9.2;
const RULE_PX = 2.8;
const INNER_LINE_PX = 0.9;

const INK = opaque('#22302f');
const PAPER = opaque('#fbf9f3');

export function fieldName(kind: PlaceKind): string {
  return `field:${kind}`;
}

export function inkName(kind: PlaceKind, hatched: boolean): string {
  return `ink:${kind}:${hatched ? 'hatched' : 'plain'}`;
}

export const POINT_CROSS = 'point:cross';

export interface MarkPicture {
  readonly pixels: Pixels;
  readonly isField: boolean;
}

/** The picture that `fieldName` or `inkName` named; null for the name of anything else. */
export function markPicture(name: string, pixelRatio: number): MarkPicture | null {
  if (name === POINT_CROSS) return { pixels: drawCross(pixelRatio), isField: false };
  const found = /^(field|ink):(station|site)(?::(hatched|plain))?$/.exec(name);
  if (found === null) return null;
  const kind: PlaceKind = found[2] === 'site' ? 'site' : 'station';
  if (found[1] === 'field') return { pixels: drawField(kind, pixelRatio), isField: true };
  return { pixels: drawInk(kind, { hatched: found[3] === 'hatched', pixelRatio }), isField: false };
}

/** The inside of a mark as a distance field: the map fills it with the colour of the layer. */
export function drawField(kind: PlaceKind, pixelRatio: number): Pixels {
  const distance = kind === 'station' ? toTriangle : toRule;
  return paintDistance({ sizePx: MARK_SIZE_PX, pixelRatio }, distance);
}

interface InkOptions {
  readonly hatched: boolean;
  readonly pixelRatio: number;
}

/** Outline and halo of a mark, clear where its field shows; hatched where the weather cannot be trusted (grade D). */
export function drawInk(kind: PlaceKind, { hatched, pixelRatio }: InkOptions): Pixels {
  const distance = kind === 'station' ? toTriangle : toSquare;
  return paintPixels({ sizePx: MARK_SIZE_PX, pixelRatio }, (x, y) => {
    const outside = distance(x, y);
    const within = (reach: number) => softEdge(reach - outside, pixelRatio);
    const halo = over(NOTHING, PAPER, within(LINE_PX / 2 + HALO_PX) * 0.85);
    const outlined = over(halo, INK, within(LINE_PX / 2));
    const inside = within(-LINE_PX / 2);
    if (inside === 0) return outlined;
    const streaks = hatched ? over(NOTHING, INK, hatchAt(x, y, pixelRatio) * 0.8) : NOTHING;
    const field = kind === 'site' ? innerSquare(streaks, { depth: -outside, pixelRatio }) : streaks;
    return blend(outlined, field, inside);
  });
}

/** Inside the coloured rule of a site: a hairline, then paper for its letter. */
function innerSquare(rule: Colour, { depth, pixelRatio }: { depth: number; pixelRatio: number }): Colour {
  const lined = over(rule, INK, softEdge(depth - RULE_PX, pixelRatio));
  return over(lined, PAPER, softEdge(depth - RULE_PX - INNER_LINE_PX, pixelRatio));
}

const CROSS_REACH_PX = 8;
const CROSS_GAP_PX = 2;

/** A clicked position: a cross that leaves its middle free. */
function drawCross(pixelRatio: number): Pixels {
  return paintPixels({ sizePx: MARK_SIZE_PX, pixelRatio }, (x, y) => {
    const along = Math.max(Math.abs(x), Math.abs(y));
    const across = Math.min(Math.abs(x), Math.abs(y));
    const inArm = (wider: number) =>
      softEdge(LINE_PX / 2 + wider - across, pixelRatio) *
      softEdge(CROSS_REACH_PX + wider - along, pixelRatio) *
      softEdge(along - CROSS_GAP_PX + wider, pixelRatio);
    return over(over(NOTHING, PAPER, inArm(HALO_PX) * 0.85), INK, inArm(0));
  });
}

/** Signed distance to an upright equilateral triangle: negative inside. */
function toTriangle(x: number, pageY: number): number {
  const y = pageY - DROP_PX;
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

function toSquare(x: number, y: number): number {
  const across = Math.abs(x) - HALF_SQUARE_PX;
  const down = Math.abs(y) - HALF_SQUARE_PX;
  if (across <= 0 && down <= 0) return Math.max(across, down);
  return Math.hypot(Math.max(0, across), Math.max(0, down));
}

/** The ruled band of a site's square: the letter stands on paper inside it. */
function toRule(x: number, y: number): number {
  const outside = toSquare(x, y);
  return Math.max(outside, -(outside + RULE_PX));
}

/** Thin strokes falling to the right, as on a hatched plate. */
function hatchAt(x: number, y: number, pixelRatio: number): number {
  const across = ((((x + y) / Math.SQRT2) % HATCH_SPACING_PX) + HATCH_SPACING_PX) % HATCH_SPACING_PX;
  const fromStroke = Math.abs(across - HATCH_SPACING_PX / 2);
  return softEdge(HATCH_PX / 2 - fromStroke, pixelRatio);
}
