/** The part of the world that the map shows and the size at which it shows it: north up, Mercator, no tilt. */
export type SheetView = {
  /** Degrees; `west` and `east` run on past 180 where the view crosses it. */
  readonly west: number;
  readonly east: number;
  readonly south: number;
  readonly north: number;
  readonly widthPx: number;
  readonly heightPx: number;
};

/** Pixels from the left edge to a meridian; `longitude` must run on as the view does. */
export function meridianX(view: SheetView, longitude: number): number {
  return ((longitude - view.west) / (view.east - view.west)) * view.widthPx;
}

/** Pixels from the top edge to a parallel. */
export function parallelY(view: SheetView, latitude: number): number {
  const top = mercatorHeight(view.north);
  return ((top - mercatorHeight(latitude)) / (top - mercatorHeight(view.south))) * view.heightPx;
}

/** The meridian so many pixels from the left edge. */
export function longitudeAt(view: SheetView, x: number): number {
  return view.west + (x / view.widthPx) * (view.east - view.west);
}

/** The parallel so many pixels from the top edge; on Mercator's sheet half way down is not half way in degrees. */
export function latitudeAt(view: SheetView, y: number): number {
  const top = mercatorHeight(view.north);
  return parallelOf(top - (y / view.heightPx) * (top - mercatorHeight(view.south)));
}

export function degreesPerPixel(view: SheetView): number {
  return (view.east - view.west) / view.widthPx;
}

/** Ground distance across one pixel in the middle of the view, on a sphere of the mean radius of the Earth. */
export function metresPerPixel(view: SheetView): number {
  const middle = parallelOf((mercatorHeight(view.north) + mercatorHeight(view.south)) / 2);
  return degreesPerPixel(view) * METRES_PER_DEGREE * Math.cos((middle * Math.PI) / 180);
}

/** Mean radius 6371.0088 km (IUGG). */
const METRES_PER_DEGREE = (Math.PI / 180) * 6_371_008.8;

/** Height above the equator on Mercator's sheet, in radians of longitude. */
function mercatorHeight(latitude: number): number {
  return Math.asinh(Math.tan((latitude * Math.PI) / 180));
}

function parallelOf(height: number): number {
  return (Math.atan(Math.sinh(height)) * 180) / Math.PI;
}
