import { describe, expect, it } from 'vitest';
import { rampColour } from '../../../src/charts/ramp.ts';
import type { MapStation } from '../../../src/contract/programme-map.ts';
import { stationFeatures, stationSentence } from '../../../src/map/station-features.ts';
import { drawMark, MARK_SIZE_PX, markName, markNamed } from '../../../src/map/station-mark.ts';
import { yearFigures } from '../../support/figures-of-place.ts';
import { lightnessOf } from '../../support/lightness.ts';

const STATION: MapStation = {
  id: '00000000-0000-4000-8000-000000000001',
  name: 'Korrel Pan',
  latitude: -25.1,
  longitude: 21.4,
  elevationM: 970,
  score: 84,
  scoreNote: null,
  grade: 'B',
  verdict: 'does not',
  ...yearFigures,
};

/** The colour in the middle of a mark's lower half, where the field is widest, and how opaque it is. */
function fieldOf(mark: Parameters<typeof drawMark>[0]) {
  const { width, data } = drawMark(mark, 2);
  const start = (Math.round(width * 0.58) * width + width / 2) * 4;
  const [red = 0, green = 0, blue = 0, alpha = 0] = data.subarray(start, start + 4);
  return { colour: `#${[red, green, blue].map((value) => value.toString(16).padStart(2, '0')).join('')}`, alpha };
}

describe('the mark of a station', () => {
  it('is filled with the ramp’s colour of its score, for each of the 101 scores', () => {
    const wrong = Array.from({ length: 101 }, (_, score) => score).filter(
      (score) => fieldOf({ score, hatched: false }).colour !== rampColour(score / 100),
    );
    expect(wrong).toEqual([]);
  });

  it('is hollow without a score: one sees the map through it', () => {
    expect(fieldOf({ score: null, hatched: false }).alpha).toBeLessThan(180);
    expect(fieldOf({ score: 0, hatched: false }).alpha).toBe(255);
  });

  it('is hatched in grade D: darker in streaks than the same score in another grade', () => {
    const lightness = (hatched: boolean) => {
      const { data } = drawMark({ score: 10, hatched }, 2);
      let dark = 0;
      for (let at = 0; at < data.length; at += 4) {
        const channels = [...data.subarray(at, at + 3)].map((value) => value.toString(16).padStart(2, '0')).join('');
        if (data[at + 3] === 255 && lightnessOf(`#${channels}`) < 60) dark += 1;
      }
      return dark;
    };
    expect(lightness(true)).toBeGreaterThan(lightness(false) * 1.2);
  });

  it('has an ink outline, a clear corner and the size that it says', () => {
    const { width, height, data } = drawMark({ score: 50, hatched: false }, 3);
    expect([width, height]).toEqual([MARK_SIZE_PX * 3, MARK_SIZE_PX * 3]);
    expect(data[3]).toBe(0);
    let ink = 0;
    for (let at = 0; at < data.length; at += 4)
      if (data[at] === 34 && data[at + 1] === 48 && data[at + 2] === 47) ink += 1;
    expect(ink).toBeGreaterThan(100);
  });

  it('is found again by its name, and nothing else is', () => {
    const marks = [0, 7, 100, null].flatMap((score) => [true, false].map((hatched) => ({ score, hatched })));
    expect(marks.map((mark) => markNamed(markName(mark)))).toEqual(marks);
    expect(['town', 'station:', 'station:1e3:plain', 'station:5:striped'].map(markNamed)).toEqual([
      null,
      null,
      null,
      null,
    ]);
  });
});

describe('stations as features', () => {
  it('carry position, name, mark and figure', () => {
    const { features } = stationFeatures([
      STATION,
      { ...STATION, score: null, scoreNote: 'not judged yet', grade: 'D' },
    ]);
    expect(features[0]?.geometry.coordinates).toEqual([21.4, -25.1]);
    expect(features[0]?.properties).toMatchObject({ name: 'Korrel Pan', mark: 'station:84:plain', figure: '84' });
    expect(features[1]?.properties).toMatchObject({ mark: 'station:none:hatched', figure: '' });
  });

  it('are told in a sentence to readers who do not see the map', () => {
    expect(stationSentence(STATION)).toBe('Korrel Pan: score 84 of 100, grade B, does not meet the brief');
    expect(stationSentence({ ...STATION, score: null, scoreNote: 'not judged yet', verdict: null })).toBe(
      'Korrel Pan: not judged yet, grade B',
    );
    expect(stationSentence({ ...STATION, verdict: 'no tolerance set' })).toBe('Korrel Pan: score 84 of 100, grade B');
  });
});
