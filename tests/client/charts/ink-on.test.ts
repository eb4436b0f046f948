import { describe, expect, it } from 'vitest';
import { inkOn } from '../../../src/charts/ink-on.ts';
import { rampColour } from '../../../src/charts/ramp.ts';

/** WCAG 2 contrast of two sRGB colours (formula from memory). */
function contrast(a: string, b: string): number {
  const luminance = (colour: string) => {
    const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((start) => {
      const encoded = Number.parseInt(colour.slice(start, start + 2), 16) / 255;
      return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4;
    });
    return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
  };
  const [low = 0, high = 0] = [luminance(a), luminance(b)].sort((first, second) => first - second);
  return (high + 0.05) / (low + 0.05);
}

describe('inkOn', () => {
  it('prints figures on every step of the ramp at 4.5 to 1 or more, the AA limit', () => {
    const steps = Array.from({ length: 1001 }, (_, step) => rampColour(step / 1000));
    expect(Math.min(...steps.map((colour) => contrast(colour, inkOn(colour))))).toBeGreaterThanOrEqual(4.5);
  });
});
