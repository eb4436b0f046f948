import { describe, expect, it } from 'vitest';
import type { MapStation } from '../../../src/contract/programme-map.ts';
import { filterByName, rankedStations } from '../../../src/features/runs/ranked-stations.ts';
import { yearFigures } from '../../support/figures-of-place.ts';

function station(name: string, score: number | null, grade: MapStation['grade'] = 'C'): MapStation {
  const place = { latitude: 0, longitude: 0, elevationM: 0, scoreNote: null, verdict: null, ...yearFigures };
  return { id: name, name, score, grade, ...place };
}

const inOrder = (stations: MapStation[]) => rankedStations(stations).map(({ station: { name }, rank }) => [rank, name]);

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

describe('finding a station by name', () => {
  const all = rankedStations([station('Aloe Flat', 50), station('Łódź Lake', 40), station('São Flat', 30)]);
  const found = (typed: string) => filterByName(all, typed).map(({ station: { name } }) => name);

  it('finds every word, in any order, whatever its case and accents', () => {
    expect(found('FLAT aloe')).toEqual(['Aloe Flat']);
    expect(found('sao')).toEqual(['São Flat']);
    expect(found('flat')).toEqual(['Aloe Flat', 'São Flat']);
  });

  it('shows all while nothing is typed, and none when nothing fits', () => {
    expect(found('  ')).toHaveLength(3);
    expect(found('xyz')).toEqual([]);
  });

  it('keeps the rank that a station has among all', () => {
    expect(filterByName(all, 'sao')[0]?.rank).toBe(3);
  });
});
