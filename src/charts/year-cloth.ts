/**
 * The year cloth as pixels: one column a day, one row an hour of the day, hour 1 at the top.
 * Pure: the browser paints the bytes on a canvas, the server writes them into a picture.
 */
import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../engine/conventions.ts';
import { hourClasses } from '../engine/hour-classes/hour-class.ts';
import { channelsOf, classPaint, HAIRLINE_COLOUR, isThread } from './hour-class-colours.ts';

export interface YearClothOptions {
  /** One position in `hourClasses` for every slot, slot order, 8760 or 8784. */
  readonly codes: Uint8Array;
  /** Whole pixels of the picture; under one a day or an hour, days or hours are left out. */
  readonly widthPx: number;
  readonly heightPx: number;
  /** Pixels that one thread of a weave takes, whole; 2 on a dense screen. Threads are never torn by a day's edge. */
  readonly threadPx: number;
}

export interface YearCloth {
  readonly widthPx: number;
  readonly heightPx: number;
  /** Red, green, blue, alpha of each pixel, row by row from the top left; length width x height x 4. */
  readonly pixels: Uint8ClampedArray<ArrayBuffer>;
}

const CLOSED = hourClasses.indexOf('closed');
const IDLE = hourClasses.indexOf('idle');

/** @throws RangeError when `codes` is not a whole year or holds a number that is no class. */
export function yearCloth({ codes, widthPx, heightPx, threadPx }: YearClothOptions): YearCloth {
  const days = daysOf(codes);
  const pixels = new Uint8ClampedArray(widthPx * heightPx * 4);
  const paints = hourClasses.map((hourClass) => {
    const { base, thread, weave } = classPaint[hourClass];
    return { base: channelsOf(base), thread: channelsOf(thread), weave };
  });
  const hairline = channelsOf(HAIRLINE_COLOUR);
  const dayAt = Array.from({ length: widthPx }, (_, x) => Math.floor(((x + 0.5) * days) / widthPx));
  const hourAt = Array.from({ length: heightPx }, (_, y) => Math.floor(((y + 0.5) * HOURS_PER_DAY) / heightPx));
  let at = 0;
  hourAt.forEach((hour, y) => {
    const isRowTop = hour > 0 && hourAt[y - 1] !== hour;
    dayAt.forEach((day, x) => {
      const slot = day * HOURS_PER_DAY + hour;
      const code = codes[slot] ?? -1;
      const paint = paints[code];
      if (!paint)
        throw new RangeError(`Slot ${slot} holds ${code}, which is no hour class (0 to ${paints.length - 1}).`);
      const thread = { x: Math.floor(x / threadPx), y: Math.floor(y / threadPx) };
      const woven = isThread(paint.weave, thread) ? paint.thread : paint.base;
      pixels.set(isRowTop && isPaperEdge(code, codes[slot - 1]) ? hairline : woven, at);
      pixels[at + 3] = 255;
      at += 4;
    });
  });
  return { widthPx, heightPx, pixels };
}

/** Days of a year of hours. @throws RangeError when it is not 8760 or 8784 hours. */
export function daysOf({ length }: { readonly length: number }): number {
  if (length !== SLOTS_PER_YEAR && length !== SLOTS_PER_LEAP_YEAR) {
    throw new RangeError(`A year has ${SLOTS_PER_YEAR} or ${SLOTS_PER_LEAP_YEAR} hours; ${length} were given.`);
  }
  return length / HOURS_PER_DAY;
}

function isPaperEdge(code: number, above: number | undefined): boolean {
  return (code === CLOSED && above === IDLE) || (code === IDLE && above === CLOSED);
}
