import { describe, expect, it } from 'vitest';
import type { MapPlace } from '../../../src/features/runs/map-places.ts';
import { filterByName, firstOfRanked, rankedPlaces } from '../../../src/features/runs/ranked-places.ts';
import { yearFigures } from '../../support/figures-of-place.ts';

function station(name: string, score: number | null, grade: MapPlace['grade'] = 'C'): MapPlace {
  const place = { latitude: 0, longitude: 0, scoreNote: null, verdict: null, ...yearFigures };
  return { kind: 'station', id: name, stationId: name, name, score, grade, ...place };
}

const inOrder = (stations: MapPlace[]) => rankedPlaces(stations).map(({ place: { name }, rank }) => [rank, name]);

describe('stations by score', () => {
  it('stand highest first, equal scores sharing a rank in the order of their names', () => {
    const stations = [station('Shale', 94), station('Reed', 12), station('Dune', 94), station('Gannet', 96)];
    expect(inOrder(stations)).toEqual([
      [1, 'Gannet'],
      [2, 'Dune'],
      [2, 'Shale'],
      [4, 'Reed'],
    ]);
  });

  it('rank no grade D and nothing without a score, but still list them', () => {
    const stations = [station('Open', null), station('Doubt', 99, 'D'), station('Ash', null), station('Good', 50)];
    expect(inOrder(stations)).toEqual([
      [1, 'Good'],
      [null, 'Doubt'],
      [null, 'Ash'],
      [null, 'Open'],
    ]);
  });

  it('keep a score of 0 in the ranking', () => {
    expect(inOrder([station('Wet', 0), station('None', null)])).toEqual([
      [1, 'Wet'],
      [null, 'None'],
    ]);
  });
});

describe('the part of a long ranking that is listed', () => {
  const all = rankedPlaces(Array.from({ length: 500 }, (_none, at) => station(`Place ${at}`, 500 - at)));
  const names = (asked: Parameters<typeof firstOfRanked>[1]) =>
    firstOfRanked(all, asked).map(({ place, rank }) => `${rank} ${place.name}`);

  it('are its first places, and the chosen one once, wherever it stands', () => {
    expect(names({ count: 3, chosenId: null })).toEqual(['1 Place 0', '2 Place 1', '3 Place 2']);
    expect(names({ count: 3, chosenId: 'Place 1' })).toHaveLength(3);
    expect(names({ count: 2, chosenId: 'Place 499' })).toEqual(['1 Place 0', '2 Place 1', '500 Place 499']);
    expect(names({ count: 900, chosenId: 'Place 499' })).toHaveLength(500);
  });
});

describe('finding a station by name', () => {
  const all = rankedPlaces([station('Aloe Flat', 50), station('Łódź Lake', 40), station('São Flat', 30)]);
  const found = (typed: string) => filterByName(all, typed).map(({ place: { name } }) => name);

  it('finds every word, in any order, whatever its case and accents', () => {
    expect(found('FLAT aloe')).toEqual(['Aloe Flat']);
    expect(found('sao')).toEqual(['São Flat']);
    expect(found('flat')).toEqual(['Aloe Flat', 'São Flat']);
  });

  it('finds a site by its letters', () => {
    const sites = rankedPlaces([
      { ...station('Aloe Flat', 50), letters: 'ab' },
      { ...station('Babel', 40), letters: 'c' },
    ]);
    expect(filterByName(sites, 'ab').map(({ place: { name } }) => name)).toEqual(['Aloe Flat', 'Babel']);
    expect(filterByName(sites, 'c').map(({ place: { name } }) => name)).toEqual(['Babel']);
  });

  it('shows all while nothing is typed, and none when nothing fits', () => {
    expect(found('  ')).toHaveLength(3);
    expect(found('xyz')).toEqual([]);
  });

  it('keeps the rank that a station has among all', () => {
    expect(filterByName(all, 'sao')[0]?.rank).toBe(3);
  });
});
