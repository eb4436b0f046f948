import type { FeatureCollection, Point } from 'geojson';
import type { MapStation } from '../contract/programme-map.ts';
import { markName } from './station-mark.ts';

export type StationProperties = {
  readonly id: string;
  readonly name: string;
  /** Name of the picture that stands for it. */
  readonly mark: string;
  /** What stands beside it: the score, or nothing. */
  readonly figure: string;
  /** The greater, the later drawn: a station in front hides one behind it, not the other way about. */
  readonly order: number;
};

/** The stations as points for the map. */
export function stationFeatures(stations: readonly MapStation[]): FeatureCollection<Point, StationProperties> {
  return {
    type: 'FeatureCollection',
    features: stations.map((station) => ({
      type: 'Feature',
      geometry: { type: 'Point', coordinates: [station.longitude, station.latitude] },
      properties: {
        id: station.id,
        name: station.name,
        mark: markName({ score: station.score, hatched: station.grade === 'D' }),
        figure: station.score === null ? '' : String(station.score),
        order: -station.latitude,
      },
    })),
  };
}

/** What a reader who does not see the map is told of a station. */
export function stationSentence(station: MapStation): string {
  const score = station.score === null ? (station.scoreNote ?? 'no score') : `score ${station.score} of 100`;
  const verdict =
    station.verdict === null || station.verdict === 'no tolerance set' ? '' : verdictWords(station.verdict);
  return `${station.name}: ${score}, grade ${station.grade}${verdict}`;
}

function verdictWords(verdict: 'meets the brief' | 'does not'): string {
  return verdict === 'does not' ? ', does not meet the brief' : ', meets the brief';
}
