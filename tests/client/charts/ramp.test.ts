import { describe, expect, it } from 'vitest';
import { RAMP_STOPS, rampColour } from '../../../src/charts/ramp.ts';
import { lightnessOf } from '../../support/lightness.ts';

describe('the ramp', () => {
  it('gets darker along 1000 steps, looked at twenty apart (0.4 L* at least), and by 60 L* in all', () => {
    const steps = Array.from({ length: 1001 }, (_, index) => lightnessOf(rampColour(index / 1000)));
    // Colours have 8 bits a channel, so neighbours of a thousand may tie; twenty steps apart they may not.
    const falls = steps.slice(20).map((lightness, index) => (steps[index] ?? Number.NaN) - lightness);
    expect(falls).toHaveLength(981);
    expect(Math.min(...falls)).toBeGreaterThan(0.4);
    expect((steps[0] ?? 0) - (steps[1000] ?? 0)).toBeGreaterThan(60);
  });

  it('never gets lighter between two neighbouring steps of a thousand', () => {
    const steps = Array.from({ length: 1001 }, (_, index) => lightnessOf(rampColour(index / 1000)));
    expect(steps.filter((lightness, index) => index > 0 && lightness > (steps[index - 1] ?? 100) + 1e-9)).toEqual([]);
  });

  it('passes through each of the six colours of the design', () => {
    expect(RAMP_STOPS.map((stop) => rampColour(stop.share))).toEqual([
      '#efe4cb',
      '#d9d3b6',
      '#a7bfb2',
      '#6a9fa9',
      '#3a6f92',
      '#1c3a6b',
    ]);
  });

  it('holds shares beyond its ends and refuses what is not a number', () => {
    expect(rampColour(-3)).toBe('#efe4cb');
    expect(rampColour(1.5)).toBe('#1c3a6b');
    expect(() => rampColour(Number.NaN)).toThrow(RangeError);
  });

  it('mixes two stops by their channels', () => {
    // Half way from #efe4cb to #d9d3b6: (239+217)/2 = 228, (228+211)/2 = 219.5, (203+182)/2 = 192.5.
    expect(rampColour(0.1)).toBe('#e4dcc1');
  });
});
