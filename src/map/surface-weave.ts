import { NOTHING, opaque, over, type Pixels, paintPixels } from './paint-pixels.ts';

/** Name of the picture that the pale parts of a surface are covered with. */
export const WEAVE = 'surface-weave';

const SIZE_PX = 6;
const THREAD_PX = 1.4;
const PAPER = opaque('#f0ebdf');
/** Of the paper between the threads, and of the threads themselves. */
const CLOTH = 0.42;
const THREAD = 0.85;

/** Loose cloth: the surface shines through between warp and weft, and pales under them. */
export function drawWeave(pixelRatio: number): Pixels {
  return paintPixels({ sizePx: SIZE_PX, pixelRatio }, (x, y) => {
    const onThread = Math.abs(x) < THREAD_PX / 2 || Math.abs(y) < THREAD_PX / 2;
    return over(NOTHING, PAPER, onThread ? THREAD : CLOTH);
  });
}
