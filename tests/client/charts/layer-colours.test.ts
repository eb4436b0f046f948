import { describe, expect, it } from 'vitest';
import { classCounts, classOf, colourOf, flatScale, rampScale, roundTop } from '../../../src/charts/layer-scale.ts';
import { rampColour } from '../../../src/charts/ramp.ts';
import { BRONZE, GRADES, MADDER, MOSS, PLUM, UMBER } from '../../../src/charts/sequences.ts';
import { deficiencies, seenWith } from '../../support/colour-vision.ts';
import { lightnessOf } from '../../support/lightness.ts';

const flat = { MOSS, MADDER, UMBER, PLUM, BRONZE } as const;
const grades = [GRADES.D, GRADES.C, GRADES.B, GRADES.A];
const score = rampScale(100).colours;
const every: Readonly<Record<string, readonly string[]>> = { ...flat, grades, score };

/** Least fall of lightness from one class to the next. */
function leastStep(colours: readonly string[]): number {
  const lightness = colours.map(lightnessOf);
  return Math.min(...lightness.slice(1).map((value, index) => (lightness[index] ?? Number.NaN) - value));
}

/** Distance in CIE 1976 L*a*b* (D65; formulas of CIE 15, from memory). */
function labOf(colour: string): [number, number, number] {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((start) => {
    const encoded = Number.parseInt(colour.slice(start, start + 2), 16) / 255;
    return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4;
  });
  const f = (t: number) => (t > 216 / 24389 ? Math.cbrt(t) : (t * 24389) / 27 / 116 + 16 / 116);
  const x = f((0.4124 * r + 0.3576 * g + 0.1805 * b) / 0.95047);
  const y = f(0.2126 * r + 0.7152 * g + 0.0722 * b);
  const z = f((0.0193 * r + 0.1192 * g + 0.9505 * b) / 1.08883);
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)];
}

describe('the colours of a layer', () => {
  // Three just noticeable differences of 2.3 (Mahy, Van Eycken and Oosterlinck 1994, from memory).
  const LEAST = 6.9;

  it.each(Object.entries(every))(
    '%s falls from class to class by three just noticeable differences at least, so that grey print keeps its order',
    (_, colours) => {
      expect(leastStep(colours)).toBeGreaterThanOrEqual(LEAST);
    },
  );

  it.each(Object.entries(every))(
    '%s keeps its order and its steps for three kinds of colour-vision deficiency',
    (_, colours) => {
      const least = deficiencies.map((deficiency) => leastStep(colours.map((colour) => seenWith(deficiency, colour))));
      expect(Math.min(...least)).toBeGreaterThanOrEqual(LEAST);
    },
  );

  it('the simulation itself mixes up what protanopia and deuteranopia mix up, and leaves greys alone', () => {
    const apart = (colour: string, other: string, deficiency: (typeof deficiencies)[number]) =>
      Math.hypot(
        ...labOf(seenWith(deficiency, colour))
          .map((value, index) => value - (labOf(seenWith(deficiency, other))[index] ?? 0))
          .slice(1),
      );
    // A red and a green of like lightness: far apart to the usual eye in a* and b*, close to the others.
    const usual = Math.hypot(labOf('#b0644b')[1] - labOf('#6f8a3c')[1], labOf('#b0644b')[2] - labOf('#6f8a3c')[2]);
    expect(usual).toBeGreaterThan(40);
    for (const deficiency of ['protanopia', 'deuteranopia'] as const)
      expect(apart('#b0644b', '#6f8a3c', deficiency)).toBeLessThan(usual / 2);
    for (const deficiency of deficiencies) expect(seenWith(deficiency, '#808080')).toMatch(/^#(7f|80|81){3}$/);
  });

  it('flat sequences and grades are none of the ramp’s colours: 7 in L*a*b* away from it at the least', () => {
    const ramp = Array.from({ length: 101 }, (_, index) => labOf(rampColour(index / 100)));
    const distances = [...Object.values(flat).flat(), ...grades].map((colour) => {
      const [l, a, b] = labOf(colour);
      return Math.min(...ramp.map(([rl, ra, rb]) => Math.hypot(l - rl, a - ra, b - rb)));
    });
    expect(Math.min(...distances)).toBeGreaterThan(7);
  });
});

describe('the scale of a layer', () => {
  const flatHours = flatScale([0, 50, 200, 500, 1000, 2000, Number.POSITIVE_INFINITY], MOSS);

  it('puts a figure in the class that holds it, lower limit included, the last one both', () => {
    expect([0, 19.9, 20, 79, 80, 100].map((value) => classOf(rampScale(100), value))).toEqual([0, 0, 1, 3, 4, 4]);
    expect([0, 49, 50, 1999, 2000, 8784].map((value) => classOf(flatHours, value))).toEqual([0, 0, 1, 4, 5, 5]);
  });

  it('inks by the ramp itself within a class, and a flat class in one colour', () => {
    expect(colourOf(rampScale(100), 37)).toBe(rampColour(0.37));
    expect(colourOf(flatHours, 60)).toBe(colourOf(flatHours, 199));
    expect(colourOf(flatHours, 200)).not.toBe(colourOf(flatHours, 199));
  });

  it('counts every place once', () => {
    const values = [0, 19, 20, 59, 60, 80, 99, 100, null, null];
    expect(classCounts(rampScale(100), values)).toEqual({ classes: [2, 1, 1, 1, 3], none: 2 });
  });

  it('ends at a round figure that holds the greatest', () => {
    expect([0, 3, 37, 51, 4100, 4999, 5001, 8760].map(roundTop)).toEqual([5, 5, 50, 100, 5000, 5000, 10000, 10000]);
  });
});
