/**
 * How each hour class is painted, on the year cloth and in every bar. Never a colour of the ramp: the ramp says how much
 * evaporation can do, these say what an hour is. Met hours are flat slate greens at L* 55 to 80; hours not met are woven
 * in weld to madder at L* 25 to 40, so the two differ by at least 20 L* and by texture, in colour and in grey.
 */
import type { HourClass } from '../engine/hour-classes/hour-class.ts';

export type Weave = 'flat' | 'diagonal' | 'cross' | 'dots' | 'hatch';

export interface ClassPaint {
  readonly base: string;
  /** Colour of the threads of the weave; the base again where it is flat. */
  readonly thread: string;
  readonly weave: Weave;
}

const flat = (colour: string): ClassPaint => ({ base: colour, thread: colour, weave: 'flat' });

export const classPaint: Readonly<Record<HourClass, ClassPaint>> = {
  closed: flat('#f1ede4'),
  missing: { base: '#fbf9f3', thread: '#5d6a66', weave: 'hatch' },
  idle: flat('#dcd8d0'),
  frozen: { base: '#cbcdce', thread: '#4c5759', weave: 'dots' },
  damp: { base: '#6a291c', thread: '#7d5420', weave: 'diagonal' },
  air: flat('#bbcb9c'),
  direct: flat('#9cbe91'),
  indirect: flat('#92ac8d'),
  dewpoint: flat('#769f77'),
  twostage: flat('#6c8e76'),
  short: { base: '#6f4a1c', thread: '#583a17', weave: 'cross' },
  beyond: flat('#8c3a26'),
};

/** The hairline between closed and idle hours, whose paper tones are near. */
export const HAIRLINE_COLOUR = '#bdb39f';

/** Classes of hours with demand that the brief counts as met, least plant first. */
export const metClasses = ['air', 'direct', 'indirect', 'dewpoint', 'twostage'] as const satisfies HourClass[];

/** Classes of hours with demand that are not met. */
export const unmetClasses = ['short', 'damp', 'beyond'] as const satisfies HourClass[];

/** Threads between two repeats of every weave, both ways. */
export const WEAVE_REPEAT = 8;

/** Whether a weave shows its thread at a thread position, counted from any corner; repeats every 8 both ways. */
export function isThread(weave: Weave, position: { x: number; y: number }): boolean {
  const x = position.x % WEAVE_REPEAT;
  const y = position.y % WEAVE_REPEAT;
  switch (weave) {
    case 'flat':
      return false;
    case 'diagonal':
      return (x + y) % 4 === 0;
    case 'cross':
      return (x % 4 === 1 && y % 4 < 3) || (y % 4 === 1 && x % 4 < 3);
    case 'dots':
      return x % 4 === y % 4 && x % 2 === 1;
    case 'hatch':
      return (x + WEAVE_REPEAT - y) % WEAVE_REPEAT === 0;
  }
}

/** Share of a weave's area that its threads cover. */
export function threadShare(weave: Weave): number {
  let threads = 0;
  for (let y = 0; y < WEAVE_REPEAT; y += 1) {
    for (let x = 0; x < WEAVE_REPEAT; x += 1) if (isThread(weave, { x, y })) threads += 1;
  }
  return threads / (WEAVE_REPEAT * WEAVE_REPEAT);
}

/** Red, green and blue, 0 to 255, of a `#rrggbb` colour. */
export function channelsOf(colour: string): [number, number, number] {
  const value = Number.parseInt(colour.slice(1), 16);
  return [value >> 16, (value >> 8) & 255, value & 255];
}
