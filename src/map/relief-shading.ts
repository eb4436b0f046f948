/** Shading of the ground from its heights, once for each tile: light from the north-west, as on printed sheets. Pure. */

/** Heights of a tile of Mercator's sheet at the middles of its pixels. */
export interface ReliefTile {
  readonly heightsM: Float32Array;
  /** Pixels along an edge. */
  readonly size: number;
  readonly zoom: number;
  readonly row: number;
}

/** Of the ground at the equator, m. */
const WORLD_WIDTH_M = 40_075_016.7;
/** Where the light comes from, clockwise from north. */
const LIGHT_DEGREES = 315;
/** Slopes are drawn so many times steeper by zoom, or nothing would be seen of them; the more, the smaller the scale. */
const STEEPER_BY_ZOOM = [18, 18, 18, 14, 8, 8] as const;
/** Of a steepened slope, before its angle is taken. */
const SLOPE_PART = 0.625;
/** How soon a gentle slope shows: below 1, the sooner the smaller. */
const EASE = 0.475;

interface Ink {
  readonly rgb: readonly [number, number, number];
  readonly alpha: number;
}

const SHADOW: Ink = { rgb: [72, 64, 44], alpha: 0.8 };
const LIGHT: Ink = { rgb: [255, 252, 240], alpha: 0.5 };
/** Over every slope, whichever way it falls. */
const STEEP: Ink = { rgb: [72, 64, 44], alpha: 0.3 };

const HALF_TURN = Math.PI / 2;
const MOST_SLOPE = 4;
const STEPS = 1024;
/** Angle of a slope as it is drawn, by slope. */
const DRAWN_ANGLE = Float64Array.from({ length: STEPS + 1 }, (_none, step) => {
  const angle = Math.atan((SLOPE_PART * MOST_SLOPE * step) / STEPS);
  return ((EASE ** angle - 1) / (EASE ** HALF_TURN - 1)) * HALF_TURN;
});

/** @returns straight RGBA, row by row: nothing on level ground */
export function shadedRelief(tile: ReliefTile): Uint8ClampedArray<ArrayBuffer> {
  const { size, zoom } = tile;
  const steeper = STEEPER_BY_ZOOM[Math.min(zoom, STEEPER_BY_ZOOM.length - 1)] ?? 1;
  const pixels = new Uint8ClampedArray(size * size * 4);
  for (let y = 0; y < size; y++) {
    // A pixel covers less ground the farther it is from the equator.
    const perPixel = (steeper * size * 2 ** zoom) / (WORLD_WIDTH_M * Math.cos(latitudeOf(tile, y)));
    for (let x = 0; x < size; x++) {
      const [east, south] = fallAt(tile, x, y);
      if (east === 0 && south === 0) continue;
      inkPixel(pixels, 4 * (y * size + x), { east: east * perPixel, south: south * perPixel });
    }
  }
  return pixels;
}

function latitudeOf({ size, zoom, row }: ReliefTile, y: number): number {
  return Math.atan(Math.sinh(Math.PI * (1 - (2 * (row * size + y + 0.5)) / (size * 2 ** zoom))));
}

/** Rise per pixel to the east and to the south, over the eight neighbours (Horn 1981); at an edge to one side alone. */
function fallAt({ heightsM, size }: ReliefTile, x: number, y: number): readonly [east: number, south: number] {
  const [left, right] = [Math.max(0, x - 1), Math.min(size - 1, x + 1)];
  const [above, below] = [Math.max(0, y - 1) * size, Math.min(size - 1, y + 1) * size];
  const here = y * size;
  const at = (index: number) => heightsM[index] ?? 0;
  const [northWest, north, northEast] = [at(above + left), at(above + x), at(above + right)];
  const [southWest, south, southEast] = [at(below + left), at(below + x), at(below + right)];
  const [west, east] = [at(here + left), at(here + right)];
  return [
    (northEast + 2 * east + southEast - northWest - 2 * west - southWest) / (4 * (right - left)),
    (southWest + 2 * south + southEast - northWest - 2 * north - northEast) / (4 * ((below - above) / size)),
  ];
}

function inkPixel(pixels: Uint8ClampedArray, at: number, fall: { east: number; south: number }): void {
  const slope = Math.min(MOST_SLOPE, Math.hypot(fall.east, fall.south));
  const angle = DRAWN_ANGLE[Math.round((slope / MOST_SLOPE) * STEPS)] ?? 0;
  const strength = Math.sin(angle);
  const steep = (1 - Math.cos(angle)) * STEEP.alpha;
  const lit = litShare(fall);
  const shadow = SHADOW.alpha * (1 - lit) * strength;
  const light = LIGHT.alpha * lit * strength;
  const under = steep * (1 - shadow - light);
  const alpha = shadow + light + under;
  if (alpha === 0) return;
  for (let channel = 0; channel < 3; channel++) {
    const sum =
      shadow * (SHADOW.rgb[channel] ?? 0) + light * (LIGHT.rgb[channel] ?? 0) + under * (STEEP.rgb[channel] ?? 0);
    pixels[at + channel] = sum / alpha;
  }
  pixels[at + 3] = 255 * alpha;
}

/** 1 where a slope faces the light, 0 where it turns its back. */
function litShare({ east, south }: { east: number; south: number }): number {
  // The ground falls against its rise; turns are counted clockwise from north.
  const facing = Math.atan2(-east, south);
  const turn = Math.abs(facing - (LIGHT_DEGREES * Math.PI) / 180) / Math.PI;
  return Math.abs((turn % 2) - 1);
}
