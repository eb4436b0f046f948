import { NOTHING, opaque, over, type Pixels, paintPixels } from './paint-pixels.ts';

/** Name of the picture that the pale parts of a surface are covered with. */
export const WEAVE = 'surface-weave';

const SIZE_PX = 4;
const THREAD_PX = 1.5;
const PAPER = opaque('#f0ebdf');
/** Of the paper in the gaps between threads, over the threads, and where two of them cross. */
const GAP = 0.8;
const THREAD = 0.5;
const CROSSING = 0.3;

/** Loose cloth: threads of the surface's own colour, and the paper between them. */
export function drawWeave(pixelRatio: number): Pixels {
  return paintPixels({ sizePx: SIZE_PX, pixelRatio }, (x, y) => {
    const threads = [x, y].filter((across) => Math.abs(across) < THREAD_PX / 2).length;
    return over(NOTHING, PAPER, [GAP, THREAD, CROSSING][threads] ?? GAP);
  });
}
