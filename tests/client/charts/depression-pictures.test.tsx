import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { CumulativeCurves } from '../../../src/charts/cumulative-curves.tsx';
import { depressionCloth, depressionScaleK } from '../../../src/charts/depression-cloth.ts';
import { depressionCurve, hoursAtOrAbove } from '../../../src/charts/depression-curve.ts';
import { channelsOf } from '../../../src/charts/hour-class-colours.ts';
import { rampColour } from '../../../src/charts/ramp.ts';
import { hoursAtLeast } from '../../../src/engine/reduction/depression-hours.ts';
import { reachedHundredths } from '../../../src/engine/reduction/derived-columns.ts';

function pixelAt(cloth: ReturnType<typeof depressionCloth>, { x, y }: { x: number; y: number }): number[] {
  const at = (y * cloth.widthPx + x) * 4;
  return [...cloth.pixels.slice(at, at + 3)];
}

/** Every depression from 0 to 19.99 K, each hundredth in its turn, the hours of March not known. */
function sweep(slots = 8760): Float64Array {
  return Float64Array.from({ length: slots }, (_, slot) =>
    slot >= 1416 && slot < 2160 ? Number.NaN : ((slot * 7) % 2000) / 100,
  );
}

describe('the year cloth of depression', () => {
  it('paints an hour with the ramp at its depression over the scale, hour 1 at the top', () => {
    const depressionK = new Float64Array(8760);
    depressionK[1] = 6;
    depressionK[364 * 24 + 23] = 12;
    const cloth = depressionCloth({ depressionK, scaleK: 12, widthPx: 365, heightPx: 24, threadPx: 1 });
    expect(pixelAt(cloth, { x: 0, y: 0 })).toEqual(channelsOf(rampColour(0)));
    // 256 shades: 6 of 12 K is the shade 128 of 255.
    expect(pixelAt(cloth, { x: 0, y: 1 })).toEqual(channelsOf(rampColour(128 / 255)));
    expect(pixelAt(cloth, { x: 364, y: 23 })).toEqual(channelsOf(rampColour(1)));
  });

  it('weaves hours that are not known, which no colour of the ramp could be taken for', () => {
    const depressionK = new Float64Array(8760).fill(Number.NaN);
    const cloth = depressionCloth({ depressionK, scaleK: 12, widthPx: 365, heightPx: 24, threadPx: 1 });
    const seen = new Set<string>();
    for (let y = 0; y < 24; y += 1) for (let x = 0; x < 365; x += 1) seen.add(pixelAt(cloth, { x, y }).join());
    expect(seen.size).toBe(2);
    const ramp = Array.from({ length: 256 }, (_, shade) => channelsOf(rampColour(shade / 255)).join());
    expect([...seen].filter((colour) => ramp.includes(colour))).toEqual([]);
  });

  it('takes leap years and refuses what is no year', () => {
    const size = { scaleK: 12, widthPx: 366, heightPx: 24, threadPx: 1 };
    expect(depressionCloth({ depressionK: new Float64Array(8784), ...size }).widthPx).toBe(366);
    expect(() => depressionCloth({ depressionK: new Float64Array(100), ...size })).toThrow(/8760 or 8784/);
  });

  it('ends its scale on a whole even kelvin, never under 12 K', () => {
    expect([0, 11.9, 12.1, 14, 21.3].map(depressionScaleK)).toEqual([12, 12, 14, 14, 22]);
  });
});

describe('the cumulative curve', () => {
  it('counts whole kelvins exactly as the record does', () => {
    const depressionK = sweep();
    const curve = depressionCurve(depressionK);
    for (const { atLeastK, hours } of hoursAtLeast(reachedHundredths(depressionK))) {
      expect(hoursAtOrAbove(curve, atLeastK), `${atLeastK} K`).toBe(hours);
    }
  });

  it('starts with every hour known, never rises, and ends at none', () => {
    const curve = depressionCurve(sweep());
    expect(curve[0]).toEqual({ atLeastK: 0, hours: 8760 - 744 });
    expect(curve.at(-1)).toEqual({ atLeastK: 20, hours: 0 });
    for (const [index, { hours }] of curve.slice(1).entries()) {
      expect(hours).toBeLessThanOrEqual(curve[index]?.hours ?? 0);
    }
  });

  it('reads no hour off beyond its end, and counts nothing where nothing is known', () => {
    expect(hoursAtOrAbove(depressionCurve(sweep()), 40)).toBe(0);
    expect(depressionCurve(new Float64Array(8760).fill(Number.NaN))).toEqual([{ atLeastK: 0, hours: 0 }]);
  });

  it('is drawn a line for each year, each with a stroke of its own, and says itself in words', () => {
    const points = depressionCurve(sweep());
    const curves = ['2021', '2022', '2023'].map((name) => ({ name, points }));
    const markup = renderToStaticMarkup(
      <CumulativeCurves curves={curves} hoursOfYear={8760} readAtK={8} label="Three years." />,
    );
    expect(markup).toContain('role="img" aria-label="Three years."');
    const strokes = [...markup.matchAll(/<path [^>]*stroke-dasharray="([^"]*)"/g)].map(([, dash]) => dash);
    expect(new Set(strokes).size).toBe(3);
  });
});
