import { describe, expect, it } from 'vitest';
import { drawField, drawInk, fieldName, inkName, MARK_SIZE_PX, markPicture } from '../../../src/map/mark-pictures.ts';
import { figureFeatures, markFeatures, nameFeatures, raisedFeatures } from '../../../src/map/place-features.ts';
import type { MarkInks, SheetPlace } from '../../../src/map/sheet-place.ts';

const STATION: SheetPlace = { id: 's', name: 'Korrel Pan', latitude: -25.1, longitude: 21.4, grade: 'B' };
const SITE: SheetPlace = { ...STATION, id: 'p', name: 'Redpan school', letters: 'aa', grade: 'D' };
const INKS: MarkInks = new Map([
  ['s', { colour: '#1c3a6b', figure: '84' }],
  ['p', { colour: null, figure: '' }],
]);

/** Share of the picture that is opaque, and of that the share that is ink. */
function look({ data }: { readonly data: Uint8Array }) {
  let opaque = 0;
  let ink = 0;
  for (let at = 0; at < data.length; at += 4) {
    if ((data[at + 3] ?? 0) < 250) continue;
    opaque += 1;
    if (data[at] === 34 && data[at + 1] === 48 && data[at + 2] === 47) ink += 1;
  }
  return { opaque: opaque / (data.length / 4), ink: ink / (data.length / 4) };
}

/** Alpha of a picture at CSS pixels right of and below its middle. */
function alphaAt({ width, data }: { width: number; data: Uint8Array }, x: number, y: number): number {
  const ratio = width / MARK_SIZE_PX;
  const column = Math.floor((x + MARK_SIZE_PX / 2) * ratio);
  const row = Math.floor((y + MARK_SIZE_PX / 2) * ratio);
  return data[(row * width + column) * 4 + 3] ?? Number.NaN;
}

describe('the mark of a place', () => {
  // MapLibre draws the edge of a distance field where alpha is 0.75 of 255.
  const EDGE = 191;

  it('of a station is a triangle whose inside takes the colour of the layer, of a site a rule round its letter', () => {
    const triangle = drawField('station', 2);
    expect(alphaAt(triangle, 0, 2)).toBeGreaterThan(EDGE);
    expect(alphaAt(triangle, 0, -4)).toBeGreaterThan(EDGE);
    expect(alphaAt(triangle, -6, -4)).toBeLessThan(EDGE);
    const rule = drawField('site', 2);
    expect(alphaAt(rule, 7, 0)).toBeGreaterThan(EDGE);
    expect(alphaAt(rule, 0, -7)).toBeGreaterThan(EDGE);
    expect(alphaAt(rule, 0, 0)).toBeLessThan(EDGE);
  });

  it('lets its field show through the ink, and gives a site paper for its letter', () => {
    expect(alphaAt(drawInk('station', { hatched: false, pixelRatio: 2 }), 0, 2)).toBe(0);
    expect(alphaAt(drawInk('site', { hatched: false, pixelRatio: 2 }), 6.8, 0)).toBe(0);
    expect(alphaAt(drawInk('site', { hatched: false, pixelRatio: 2 }), 0, 0)).toBe(255);
  });

  it.each(['station', 'site'] as const)('of a %s is hatched in grade D: more ink than in another grade', (kind) => {
    const plain = look(drawInk(kind, { hatched: false, pixelRatio: 3 }));
    const hatched = look(drawInk(kind, { hatched: true, pixelRatio: 3 }));
    expect(plain.ink).toBeGreaterThan(0.03);
    const streaked = drawInk(kind, { hatched: true, pixelRatio: 3 }).data.filter(
      (alpha, at) => at % 4 === 3 && alpha > 120,
    );
    const clear = drawInk(kind, { hatched: false, pixelRatio: 3 }).data.filter(
      (alpha, at) => at % 4 === 3 && alpha > 120,
    );
    expect(streaked.length).toBeGreaterThan(clear.length * 1.1);
    expect(hatched.ink).toBeGreaterThanOrEqual(plain.ink);
  });

  it('is found again by its name, and nothing else is', () => {
    const names = (['station', 'site'] as const).flatMap((kind) => [
      fieldName(kind),
      inkName(kind, true),
      inkName(kind, false),
    ]);
    expect(names.map((name) => markPicture(name, 2)?.isField)).toEqual([true, false, false, true, false, false]);
    expect(['town', 'field:', 'ink:pin:plain', 'station:5:striped'].map((name) => markPicture(name, 2))).toEqual([
      null,
      null,
      null,
      null,
    ]);
  });
});

describe('places as features', () => {
  it('carry position, ink and letters; nothing of what a slider changes', () => {
    const [feature] = markFeatures('station', [STATION]).features;
    expect(feature?.geometry.coordinates).toEqual([21.4, -25.1]);
    expect(feature?.properties).toEqual({ id: 's', ink: 'ink:station:plain', letters: '' });
    expect(markFeatures('site', [SITE]).features[0]?.properties).toEqual({
      id: 'p',
      ink: 'ink:site:hatched',
      letters: 'aa',
    });
    expect(nameFeatures([SITE]).features[0]?.properties).toEqual({ id: 'p', name: 'aa  Redpan school' });
  });

  it('have the figure of the layer where there is one', () => {
    expect(figureFeatures([STATION, SITE], INKS).features.map(({ properties }) => properties)).toEqual([
      { figure: '84' },
    ]);
  });

  it('are raised when chosen, pointed at or held', () => {
    const raised = [{ place: SITE, kind: 'site' as const, how: 'held' as const }];
    expect(raisedFeatures(raised, INKS).features[0]?.properties).toMatchObject({
      how: 'held',
      ink: 'ink:site:hatched',
    });
  });
});
