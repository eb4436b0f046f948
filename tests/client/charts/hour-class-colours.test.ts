import { describe, expect, it } from 'vitest';
import {
  channelsOf,
  classPaint,
  isThread,
  metClasses,
  threadShare,
  unmetClasses,
  WEAVE_REPEAT,
} from '../../../src/charts/hour-class-colours.ts';
import { rampColour } from '../../../src/charts/ramp.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import { lightnessOf } from '../../support/lightness.ts';

// The rules are those of the product's design: met hours flat at L* 55 to 80, hours not met woven at L* 25 to 40, the
// two at least 20 L* apart. L* of a weave is the mean over its threads and its ground, by area, of what a reader sees.

function lightnessOfClass(hourClass: (typeof hourClasses)[number]): number {
  const { base, thread, weave } = classPaint[hourClass];
  const share = threadShare(weave);
  return (1 - share) * lightnessOf(base) + share * lightnessOf(thread);
}

function distance(a: string, b: string): number {
  const [first, second] = [channelsOf(a), channelsOf(b)];
  return Math.hypot(...first.map((channel, index) => channel - (second[index] ?? 0)));
}

describe('the paints of the hour classes', () => {
  it('are one for every class', () => {
    expect(Object.keys(classPaint).sort()).toEqual([...hourClasses].sort());
  });

  it('are flat and of L* 55 to 80 where the hour is met', () => {
    for (const hourClass of metClasses) {
      expect(classPaint[hourClass].weave).toBe('flat');
      expect(lightnessOfClass(hourClass), hourClass).toBeGreaterThanOrEqual(55);
      expect(lightnessOfClass(hourClass), hourClass).toBeLessThanOrEqual(80);
    }
  });

  it('keep both ground and thread within L* 25 to 40 where the hour is not met', () => {
    for (const hourClass of unmetClasses) {
      for (const colour of [classPaint[hourClass].base, classPaint[hourClass].thread]) {
        expect(lightnessOf(colour), `${hourClass} ${colour}`).toBeGreaterThanOrEqual(25);
        expect(lightnessOf(colour), `${hourClass} ${colour}`).toBeLessThanOrEqual(40);
      }
    }
  });

  it('set met and not met at least 20 L* apart, so that the cloth reads in grey', () => {
    const differences = metClasses.flatMap((met) =>
      unmetClasses.map((unmet) => lightnessOfClass(met) - lightnessOfClass(unmet)),
    );
    expect(differences).toHaveLength(15);
    expect(Math.min(...differences)).toBeGreaterThanOrEqual(20);
  });

  it('tell neighbouring met classes apart by at least 5 L*, also in grey', () => {
    const lightness = metClasses.map(lightnessOfClass).sort((a, b) => a - b);
    const steps = lightness.slice(1).map((value, index) => value - (lightness[index] ?? 0));
    expect(Math.min(...steps)).toBeGreaterThanOrEqual(5);
  });

  it('tell the three ways of not being met apart by their weave', () => {
    expect(new Set(unmetClasses.map((hourClass) => classPaint[hourClass].weave)).size).toBe(3);
  });

  it('keep closed, idle and missing lighter than every met hour', () => {
    const lightestMet = Math.max(...metClasses.map(lightnessOfClass));
    for (const hourClass of ['closed', 'idle', 'missing'] as const) {
      expect(lightnessOfClass(hourClass), hourClass).toBeGreaterThan(lightestMet + 5);
    }
  });

  it('never use a colour of the ramp, which stands for how much evaporation can do', () => {
    const ramp = Array.from({ length: 101 }, (_, step) => rampColour(step / 100));
    for (const hourClass of hourClasses) {
      for (const colour of [classPaint[hourClass].base, classPaint[hourClass].thread]) {
        const nearest = Math.min(...ramp.map((step) => distance(step, colour)));
        // 14 of 255: ten times the step between neighbouring colours of the ramp at this fineness, our own choice.
        expect(nearest, `${hourClass} ${colour}`).toBeGreaterThan(14);
      }
    }
  });
});

describe('a weave', () => {
  it('repeats every 8 threads both ways', () => {
    for (const weave of ['diagonal', 'cross', 'dots', 'hatch'] as const) {
      for (let y = 0; y < WEAVE_REPEAT; y += 1) {
        for (let x = 0; x < WEAVE_REPEAT; x += 1) {
          const here = isThread(weave, { x, y });
          expect(isThread(weave, { x: x + WEAVE_REPEAT, y })).toBe(here);
          expect(isThread(weave, { x, y: y + 2 * WEAVE_REPEAT })).toBe(here);
        }
      }
    }
  });

  it('shows both ground and thread unless it is flat', () => {
    expect(threadShare('flat')).toBe(0);
    for (const weave of ['diagonal', 'cross', 'dots', 'hatch'] as const) {
      expect(threadShare(weave)).toBeGreaterThan(0.05);
      expect(threadShare(weave)).toBeLessThan(0.5);
    }
  });
});
