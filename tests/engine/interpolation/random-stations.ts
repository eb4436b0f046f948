import { seededRandom } from '#engine/ranking/seeded-random.ts';
import type { RawComponents } from '#engine/score/weighted-score.ts';

export interface RandomStation {
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly raw: RawComponents;
}

/** Stations over the whole Earth, half of them in clusters, as records of a large network lie. */
export function randomStations(count: number, seed: number): RandomStation[] {
  const draw = seededRandom(seed, 'stations of a surface');
  const places: RandomStation[] = [];
  for (let index = 0; index < count; index++) {
    const near = index % 2 === 1 ? places[Math.floor(draw() * places.length)] : undefined;
    const latitude =
      near === undefined ? -85 + 170 * draw() : Math.max(-89, Math.min(89, near.latitude + 2 * draw() - 1));
    const longitude = near === undefined ? -180 + 360 * draw() : ((near.longitude + 2 * draw() + 179) % 360) - 180;
    const elevationM = Math.round(2500 * draw());
    places.push({ latitude, longitude, elevationM, raw: rawAt(latitude, elevationM, draw) });
  }
  return places;
}

function rawAt(latitude: number, elevationM: number, draw: () => number): RawComponents {
  const served = Math.min(100, 60 + Math.abs(latitude) / 3 + elevationM / 200 + 5 * draw());
  return {
    served,
    severity: 300 * draw(),
    spell: Math.round(240 * draw()),
    damp: 40 * draw(),
    water: 1 + 3 * draw(),
    electricity: 70 * draw(),
    'worst-year': Math.max(0, served - 10 * draw()),
  };
}
