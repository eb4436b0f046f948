import { describe, expect, it } from 'vitest';
import { boxAround } from '../../../src/map/fit-stations.ts';
import { scaleBar } from '../../../src/map/scale-bar.ts';
import { BELOW_LINES, BELOW_NAMES, sheetStyle } from '../../../src/map/sheet-style.ts';
import type { SheetView } from '../../../src/map/sheet-view.ts';

const at = (latitude: number, longitude: number) => ({ latitude, longitude });

describe('the first view', () => {
  it('has no box without stations', () => {
    expect(boxAround([])).toBeNull();
  });

  it('is the box around the stations', () => {
    expect(boxAround([at(-20, 15), at(-30, 31), at(-25, 22)])).toEqual([15, -30, 31, -20]);
  });

  it('goes over 180° where that is the shorter way', () => {
    expect(boxAround([at(-18, 178), at(-14, -172), at(-41, 175)])).toEqual([175, -41, 188, -14]);
  });

  it('shows the surroundings of a single station', () => {
    expect(boxAround([at(50, 8)])).toEqual([6.5, 48.5, 9.5, 51.5]);
  });
});

describe('the scale bar', () => {
  const view: SheetView = { west: 0, east: 10, south: -1, north: 1, widthPx: 1000, heightPx: 200 };

  it('takes the longest of 1, 2 and 5 that fits, to the metre', () => {
    // 10° of the equator are 1111.95 km (IUGG mean radius), so a pixel is 1.112 km and 132 px are 146.8 km.
    const bar = scaleBar(view, { mostPx: 132, units: 'si' });
    expect(bar.figures).toEqual(['0', '50', '100']);
    expect(bar.unit).toBe('km');
    expect(bar.widthPx).toBeCloseTo(100 / 1.11195, 1);
  });

  it('counts in miles for readers who do, and in metres or feet when near', () => {
    expect(scaleBar(view, { mostPx: 132, units: 'ip' })).toMatchObject({ figures: ['0', '25', '50'], unit: 'mi' });
    const near: SheetView = { west: 0, east: 0.01, south: -0.001, north: 0.001, widthPx: 1000, heightPx: 200 };
    expect(scaleBar(near, { mostPx: 132, units: 'si' })).toMatchObject({ figures: ['0', '50', '100'], unit: 'm' });
    expect(scaleBar(near, { mostPx: 132, units: 'ip' })).toMatchObject({ figures: ['0', '100', '200'], unit: 'ft' });
  });

  it('never is longer than asked, over 60 views from a street to the world', () => {
    const widths = Array.from({ length: 60 }, (_, step) => 360 / 1.25 ** step);
    const bars = widths.map((east) => scaleBar({ ...view, east }, { mostPx: 132, units: 'si' }).widthPx);
    expect(Math.max(...bars)).toBeLessThanOrEqual(132 + 1e-9);
    expect(Math.min(...bars)).toBeGreaterThan(132 / 2.5 - 1e-9);
  });
});

describe('the style of the sheet', () => {
  const style = sheetStyle({ origin: 'https://here.example', fonts: {}, faces: { roman: 'R', italic: 'I' } });

  it('asks our own origin for everything', () => {
    const addresses = JSON.stringify(style).match(/https?:\/\/[^"]*/g);
    expect(addresses).toEqual([
      'https://here.example/tiles/{z}/{x}/{y}.mvt',
      'https://here.example/relief/{z}/{x}/{y}.png',
    ]);
    expect(style).not.toHaveProperty('glyphs');
    expect(style).not.toHaveProperty('sprite');
  });

  it('has a place under its lines and one under its names for layers to come', () => {
    const order = style.layers.map((layer) => layer.id);
    expect(order.indexOf('land')).toBeLessThan(order.indexOf(BELOW_LINES));
    expect(order.indexOf(BELOW_LINES)).toBeLessThan(order.indexOf('coast'));
    expect(order.indexOf('coast')).toBeLessThan(order.indexOf(BELOW_NAMES));
  });
});
