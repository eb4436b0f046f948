import { NOTHING, opaque, over, type Pixels, paintPixels } from './paint-pixels.ts';

/** Name of the picture that the pale cells of a surface are covered with. */
export const WEAVE = 'surface-weave';

/** Loose cloth: threads of the surface's own colour, and the paper between them. */
export const WEAVE_CLOTH = {
  sizePx: 4,
  threadPx: 1.5,
  paper: '#f0ebdf',
  /** Of the paper in the gaps between threads, over the threads, and where two of them cross. */
  gap: 0.8,
  thread: 0.5,
  crossing: 0.3,
} as const;

export function drawWeave(pixelRatio: number): Pixels {
  const { sizePx, threadPx, gap, thread, crossing } = WEAVE_CLOTH;
  const paper = opaque(WEAVE_CLOTH.paper);
  return paintPixels({ sizePx, pixelRatio }, (x, y) => {
    const threads = [x, y].filter((across) => Math.abs(across) < threadPx / 2).length;
    return over(NOTHING, paper, [gap, thread, crossing][threads] ?? gap);
  });
}
