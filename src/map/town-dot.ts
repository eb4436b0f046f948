import { blend, NOTHING, opaque, over, type Pixels, paintPixels, softEdge } from './paint-pixels.ts';
import { CAPITAL_DOT, SHEET, TOWN_DOT } from './sheet-style.ts';

const SIZE_PX = 8;
const RADIUS_PX = 1.9;
const LINE_PX = 0.9;

/** The dot of a town (open) or of a capital (full) by the name that the style calls it; null for any other name. */
export function drawTownDot(name: string, pixelRatio: number): Pixels | null {
  if (name !== TOWN_DOT && name !== CAPITAL_DOT) return null;
  const line = opaque(SHEET.placeName);
  const fill = name === CAPITAL_DOT ? line : opaque(SHEET.halo);
  return paintPixels({ sizePx: SIZE_PX, pixelRatio }, (x, y) => {
    const outside = Math.hypot(x, y) - RADIUS_PX;
    const ring = over(NOTHING, line, softEdge(LINE_PX / 2 - outside, pixelRatio));
    return blend(ring, fill, softEdge(-LINE_PX / 2 - outside, pixelRatio));
  });
}
