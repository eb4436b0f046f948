import { describe, expect, it } from 'vitest';
import { rampColour } from '../../../src/charts/ramp.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import {
  figureOf,
  layerKinds,
  layerValue,
  type MapLayer,
  printLayer,
  readLayer,
  scaleOf,
  usualLayer,
} from '../../../src/features/runs/map-layer.ts';
import type { MapPlace } from '../../../src/features/runs/map-places.ts';
import { inkedLayer, placeSentence } from '../../../src/features/runs/place-inks.ts';
import { yearFigures } from '../../support/figures-of-place.ts';

const NONE = new Map<string, number | null>();
const place: MapPlace = {
  ...yearFigures,
  kind: 'site',
  id: 'p',
  name: 'Redpan school',
  letters: 'a',
  latitude: -25,
  longitude: 21,
  stationId: 's',
  score: 61,
  scoreNote: null,
  verdict: 'does not',
  grade: 'B',
  ledger: { classes: hourClasses.map((_, index) => index * 10), demand: 500, met: 300 },
  litresPerKwh: 1.234,
  savedPct: 41.26,
};

describe('the layers of the map', () => {
  it('are written into an address and read from it', () => {
    const layers: MapLayer[] = [
      ...layerKinds.map(usualLayer),
      { kind: 'hours', hourClass: 'short' },
      { kind: 'depression', atLeastK: 0, months: [12] },
    ];
    expect(layers.map((layer) => readLayer(printLayer(layer)))).toEqual(layers);
  });

  it('have each its figure of a place; a site has the depression of its station', () => {
    const of = (layer: MapLayer, depression = NONE) => layerValue(layer, place, depression);
    expect(of({ kind: 'score' })).toBe(61);
    expect(of({ kind: 'hours', hourClass: 'damp' })).toBe(10 * hourClasses.indexOf('damp'));
    expect(of(usualLayer('depression'), new Map([['s', 2345]]))).toBe(2345);
    expect(of(usualLayer('depression'))).toBeNull();
    expect(figureOf({ kind: 'water' }, of({ kind: 'water' }))).toBe('1.2');
    expect(figureOf({ kind: 'electricity' }, of({ kind: 'electricity' }))).toBe('41\u00a0%');
    expect(figureOf({ kind: 'grade' }, of({ kind: 'grade' }))).toBe('B');
  });

  it('use the ramp for score and depression alone', () => {
    const ramped = layerKinds.filter((kind) => scaleOf(usualLayer(kind), 100).isRamp);
    expect(ramped).toEqual(['score', 'depression']);
  });

  it('keep the limits of every flat layer while a slider moves', () => {
    for (const kind of ['hours', 'water', 'electricity', 'grade'] as const) {
      expect(scaleOf(usualLayer(kind), 3)).toEqual(scaleOf(usualLayer(kind), 8000));
    }
  });

  it('ink a place by its figure, and leave it hollow without one', () => {
    const inked = inkedLayer(
      { kind: 'score' },
      { stations: [], sites: [place, { ...place, id: 'q', score: null }] },
      NONE,
    );
    expect(inked.inks.get('p')).toEqual({ colour: rampColour(0.61), figure: '61' });
    expect(inked.inks.get('q')).toEqual({ colour: null, figure: '' });
    expect(inked.legend).toHaveLength(2);
  });

  it('are told in a sentence to readers who do not see the map', () => {
    expect(placeSentence(place, { kind: 'score' }, NONE)).toBe(
      'Site a, Redpan school: score 61 of 100, grade B, does not meet the brief',
    );
    expect(
      placeSentence({ ...place, score: null, scoreNote: 'not judged yet', verdict: null }, { kind: 'score' }, NONE),
    ).toBe('Site a, Redpan school: not judged yet, grade B');
    expect(placeSentence(place, { kind: 'hours', hourClass: 'short' }, NONE)).toMatch(/, plant too weak [\d]+\u00a0h$/);
  });
});
