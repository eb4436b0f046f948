import { describe, expect, it } from 'vitest';
import {
  graticule,
  graticuleArea,
  graticuleLines,
  graticuleStepMinutes,
  latitudeLabel,
  longitudeLabel,
} from '../../../src/map/graticule.ts';
import { metresPerPixel, parallelY, type SheetView } from '../../../src/map/sheet-view.ts';

const SOUTHERN_AFRICA: SheetView = { west: 9, east: 43, south: -35, north: -15, widthPx: 850, heightPx: 540 };

/** A view whose meridians are `pixels` apart per degree. */
function viewOf(pixelsPerDegree: number): SheetView {
  return { west: 0, east: 800 / pixelsPerDegree, south: 0, north: 1, widthPx: 800, heightPx: 400 };
}

describe('the step of the graticule', () => {
  it('is the finest whose meridians stand at least 88 px apart', () => {
    const steps = [2, 6, 10, 20, 60, 100, 200, 600, 2000].map((pixels) => [
      pixels,
      graticuleStepMinutes(viewOf(pixels)),
    ]);
    expect(steps).toEqual([
      [2, 1800],
      [6, 900],
      [10, 600],
      [20, 300],
      [60, 120],
      [100, 60],
      [200, 30],
      [600, 10],
      [2000, 5],
    ]);
  });
});

describe('ticks in the margin', () => {
  it('stand at whole steps, where the map has them', () => {
    const { stepMinutes, meridians, parallels } = graticule(SOUTHERN_AFRICA);
    expect(stepMinutes).toBe(300);
    expect(meridians.map((tick) => tick.label)).toEqual(['10°E', '15°E', '20°E', '25°E', '30°E', '35°E', '40°E']);
    expect(parallels.map((tick) => tick.label)).toEqual(['35°S', '30°S', '25°S', '20°S', '15°S']);
    // 25 px to a degree of longitude.
    expect(meridians.map((tick) => Math.round(tick.px))).toEqual([25, 150, 275, 400, 525, 650, 775]);
    expect(parallels[0]?.px).toBeCloseTo(540, 6);
    expect(parallels[4]?.px).toBeCloseTo(0, 6);
  });

  it('lie farther apart towards the poles, as on Mercator’s sheet', () => {
    // Height above the equator: ln tan(45° + φ/2); 60° N lies at 1.316958, 30° N at 0.549306 (worked by hand).
    const view: SheetView = { west: 0, east: 60, south: 0, north: 60, widthPx: 600, heightPx: 1000 };
    expect(parallelY(view, 30)).toBeCloseTo(1000 * (1 - 0.549306 / 1.316958), 2);
  });

  it('run on over 180° with the names that maps print there', () => {
    const pacific: SheetView = { west: 165, east: 200, south: -30, north: 0, widthPx: 850, heightPx: 600 };
    expect(graticule(pacific).meridians.map((tick) => tick.label)).toEqual([
      '165°E',
      '170°E',
      '175°E',
      '180°',
      '175°W',
      '170°W',
      '165°W',
      '160°W',
    ]);
  });

  it('are printed with minutes below a degree, and without letters on the equator and at Greenwich', () => {
    expect([12.5, -12.5, 0, 33 + 5 / 60].map(latitudeLabel)).toEqual(['12°30′N', '12°30′S', '0°', '33°05′N']);
    expect([0, -0.25, 180, -180, 360, 540, 190].map(longitudeLabel)).toEqual([
      '0°',
      '0°15′W',
      '180°',
      '180°',
      '0°',
      '180°',
      '170°W',
    ]);
  });
});

describe('lines of the graticule', () => {
  it('reach beyond the view on every side and stay the same while it moves within them', () => {
    const area = graticuleArea(SOUTHERN_AFRICA);
    expect(area.west).toBeLessThan(SOUTHERN_AFRICA.west);
    expect(area.east).toBeGreaterThan(SOUTHERN_AFRICA.east);
    expect(graticuleArea({ ...SOUTHERN_AFRICA, west: 10, east: 44 })).toEqual(area);
  });

  it('are drawn once each round the whole world, not twice at 180°', () => {
    const world = graticuleArea({ west: -170, east: 190, south: -80, north: 80, widthPx: 850, heightPx: 850 });
    const { features } = graticuleLines(world);
    const meridians = features.filter(({ geometry: { coordinates } }) => coordinates[0]?.[0] === coordinates[1]?.[0]);
    const home = meridians.map(({ geometry }) => (((geometry.coordinates[0]?.[0] ?? 0) % 360) + 360) % 360);
    expect(home.length).toBe((360 * 60) / world.stepMinutes);
    expect(new Set(home).size).toBe(home.length);
  });
});

describe('the ground under a pixel', () => {
  it('is the Earth’s girth shared over the pixels at the equator, half of it at 60°', () => {
    // 2π × 6371.0088 km = 40030.23 km (IUGG mean radius).
    const equator: SheetView = { west: -180, east: 180, south: -1, north: 1, widthPx: 1000, heightPx: 10 };
    expect(metresPerPixel(equator)).toBeCloseTo(40_030.23, 1);
    const sixty: SheetView = { ...equator, south: 59.999, north: 60.001 };
    expect(metresPerPixel(sixty) / metresPerPixel(equator)).toBeCloseTo(0.5, 4);
  });
});
