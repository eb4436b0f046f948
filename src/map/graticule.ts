import type { FeatureCollection, LineString } from 'geojson';
import { degreesPerPixel, meridianX, parallelY, type SheetView } from './sheet-view.ts';

/** Steps of the graticule in minutes of arc, those that a printed sheet would use. */
const STEPS_MINUTES = [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 900, 1800] as const;
const WIDEST_STEP_MINUTES = 1800;
/** Meridians stand no nearer together than this. */
const LEAST_SPACING_PX = 88;
/** The pole is not on Mercator's sheet. */
const LAST_PARALLEL = 85;

export type Tick = { readonly degrees: number; readonly px: number; readonly label: string };

export type Graticule = {
  readonly stepMinutes: number;
  readonly meridians: readonly Tick[];
  readonly parallels: readonly Tick[];
};

/** The step whose meridians stand nearest together without crowding. */
export function graticuleStepMinutes(view: SheetView): number {
  const leastMinutes = degreesPerPixel(view) * LEAST_SPACING_PX * 60;
  return STEPS_MINUTES.find((step) => step >= leastMinutes) ?? WIDEST_STEP_MINUTES;
}

/** Where meridians and parallels of whole steps meet the frame, with what the margin prints there. */
export function graticule(view: SheetView): Graticule {
  const stepMinutes = graticuleStepMinutes(view);
  return {
    stepMinutes,
    meridians: multiples({ from: view.west, to: view.east, stepMinutes }).map((degrees) => ({
      degrees,
      px: meridianX(view, degrees),
      label: longitudeLabel(degrees),
    })),
    parallels: multiples({
      from: Math.max(view.south, -LAST_PARALLEL),
      to: Math.min(view.north, LAST_PARALLEL),
      stepMinutes,
    }).map((degrees) => ({
      degrees,
      px: parallelY(view, degrees),
      label: latitudeLabel(degrees),
    })),
  };
}

/** A box of whole steps around a view, so far beyond it that panning a little does not leave it. */
export type GraticuleArea = {
  readonly stepMinutes: number;
  readonly west: number;
  readonly east: number;
  readonly south: number;
  readonly north: number;
};

/** Steps to a block of the area. The area changes only when the view enters another block, or takes another step. */
const BLOCK_STEPS = 16;

export function graticuleArea(view: SheetView): GraticuleArea {
  const stepMinutes = graticuleStepMinutes(view);
  const block = (stepMinutes * BLOCK_STEPS) / 60;
  const west = (Math.floor(view.west / block) - 1) * block;
  const east = (Math.ceil(view.east / block) + 1) * block;
  const round = east - west >= 360;
  return {
    stepMinutes,
    west: round ? -180 : west,
    east: round ? 180 : east,
    south: Math.max(-LAST_PARALLEL, (Math.floor(view.south / block) - 1) * block),
    north: Math.min(LAST_PARALLEL, (Math.ceil(view.north / block) + 1) * block),
  };
}

/** Meridians and parallels of an area as lines. */
export function graticuleLines(area: GraticuleArea): FeatureCollection<LineString> {
  const { stepMinutes, west, east, south, north } = area;
  const meridians = multiples({ from: west, to: east, stepMinutes }).filter((degrees) => degrees < west + 360);
  const lines = [
    ...meridians.map((degrees) => [
      [degrees, south],
      [degrees, north],
    ]),
    ...multiples({ from: south, to: north, stepMinutes }).map((degrees) => [
      [west, degrees],
      [east, degrees],
    ]),
  ];
  return {
    type: 'FeatureCollection',
    features: lines.map((coordinates) => ({
      type: 'Feature',
      properties: {},
      geometry: { type: 'LineString', coordinates },
    })),
  };
}

/** 20°S, 0°, 12°30′N. */
export function latitudeLabel(degrees: number): string {
  return angle(degrees, { positive: 'N', negative: 'S' });
}

/** 15°E, 0°, 180°; longitudes past 180 are brought back first. */
export function longitudeLabel(degrees: number): string {
  const home = ((((degrees + 180) % 360) + 360) % 360) - 180;
  return Math.round(Math.abs(home) * 60) === 180 * 60 ? '180°' : angle(home, { positive: 'E', negative: 'W' });
}

function angle(degrees: number, sides: { positive: string; negative: string }): string {
  const minutes = Math.round(Math.abs(degrees) * 60);
  if (minutes === 0) return '0°';
  const rest = minutes % 60;
  const printed = rest === 0 ? '' : `${String(rest).padStart(2, '0')}′`;
  return `${Math.floor(minutes / 60)}°${printed}${degrees < 0 ? sides.negative : sides.positive}`;
}

type Span = { readonly from: number; readonly to: number; readonly stepMinutes: number };

/** Counted in whole steps, so that no line drifts by adding up fractions. */
function multiples({ from, to, stepMinutes }: Span): number[] {
  const first = Math.ceil((from * 60) / stepMinutes);
  const last = Math.floor((to * 60) / stepMinutes);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => ((first + index) * stepMinutes) / 60);
}
