import { describe, expect, test } from 'vitest';
import { rankStations, type StationToChoose } from '#engine/interpolation/station-choice.ts';
import { makeStationFinder } from '#engine/interpolation/station-finder.ts';
import { seededRandom } from '../../../data/demo/seeded-random.ts';
import { samples } from '../../support/sample-size.ts';

function anywhere(random: { uniform(): number }): { latitude: number; longitude: number } {
  // Whole tenths, so that some places are the same and some on the date line or at a pole.
  return {
    latitude: Math.round((random.uniform() * 180 - 90) * 10) / 10,
    longitude: Math.round((random.uniform() * 360 - 180) * 10) / 10,
  };
}

describe('finding the default station of many sites', () => {
  test('answers what ranking all stations has first, anywhere on Earth, in any order of the stations', () => {
    const random = seededRandom('station finder');
    for (let round = 0; round < samples(20); round++) {
      const stations: StationToChoose[] = Array.from(
        { length: 1 + Math.floor(random.uniform() * 80) },
        (_none, id) => ({
          id: `${(id * 37) % 101}`,
          ...anywhere(random),
          elevationM: Math.round(random.uniform() * 3000),
        }),
      );
      const find = makeStationFinder(stations);
      for (let site = 0; site < 30; site++) {
        const elevationM = random.uniform() < 0.2 ? null : Math.round(random.uniform() * 3000);
        const asked = { ...anywhere(random), elevationM };
        expect(find(asked)).toEqual(rankStations({ site: asked, stations })[0]);
      }
    }
  });

  test('takes the lesser id of stations that stand alike, whichever comes first', () => {
    const place = { latitude: 10, longitude: 179.9, elevationM: 5 };
    const find = makeStationFinder(['m', 'c', 'x'].map((id) => ({ id, ...place })));
    expect(find({ latitude: 10, longitude: -179.9, elevationM: 5 })?.id).toBe('c');
    expect(find(place)).toMatchObject({ id: 'c', distanceKm: 0, figure: 0 });
  });

  test('answers null where there is no station', () => {
    expect(makeStationFinder([])({ latitude: 0, longitude: 0, elevationM: null })).toBeNull();
  });
});
