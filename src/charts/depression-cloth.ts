/**
 * The year cloth of depression as pixels: one column a day, one row an hour of the day, hour 1 at the top, wet cloth darker
 * the more evaporation can do. Pure, as `year-cloth.ts`.
 */
import { HOURS_PER_DAY } from '../engine/conventions.ts';
import { channelsOf, classPaint, isThread } from './hour-class-colours.ts';
import { rampColour } from './ramp.ts';
import { daysOf, type YearCloth } from './year-cloth.ts';

export interface DepressionClothOptions {
  /** Depression of every slot, K, slot order, 8760 or 8784; NaN where it is not known. */
  readonly depressionK: Float64Array;
  /** Depression that is painted with the dark end of the ramp, K. */
  readonly scaleK: number;
  readonly widthPx: number;
  readonly heightPx: number;
  /** Pixels of one thread of the weave of hours that are not known. */
  readonly threadPx: number;
}

const SHADES = 256;
/** The scale ends on a whole even kelvin, and never under this, so that a humid year does not look dry. */
const LEAST_SCALE_K = 12;

/** @throws RangeError when the column is not a whole year */
export function depressionCloth(options: DepressionClothOptions): YearCloth {
  const { depressionK, scaleK, widthPx, heightPx, threadPx } = options;
  const days = daysOf(depressionK);
  const shades = Array.from({ length: SHADES }, (_, shade) => channelsOf(rampColour(shade / (SHADES - 1))));
  const unknown = classPaint.missing;
  const [paper, thread] = [channelsOf(unknown.base), channelsOf(unknown.thread)];
  const pixels = new Uint8ClampedArray(widthPx * heightPx * 4).fill(255);
  let at = 0;
  for (let y = 0; y < heightPx; y += 1) {
    const hour = Math.floor(((y + 0.5) * HOURS_PER_DAY) / heightPx);
    for (let x = 0; x < widthPx; x += 1) {
      const day = Math.floor(((x + 0.5) * days) / widthPx);
      const valueK = depressionK[day * HOURS_PER_DAY + hour] ?? Number.NaN;
      const woven = isThread(unknown.weave, { x: Math.floor(x / threadPx), y: Math.floor(y / threadPx) });
      pixels.set(Number.isNaN(valueK) ? (woven ? thread : paper) : (shades[shadeOf(valueK, scaleK)] ?? paper), at);
      at += 4;
    }
  }
  return { widthPx, heightPx, pixels };
}

function shadeOf(valueK: number, scaleK: number): number {
  return Math.round(Math.min(1, Math.max(0, valueK / scaleK)) * (SHADES - 1));
}

/** The depression, K, at the dark end of the ramp for values up to this. */
export function depressionScaleK(highestK: number): number {
  return Math.max(LEAST_SCALE_K, 2 * Math.ceil(Math.max(0, highestK) / 2));
}
