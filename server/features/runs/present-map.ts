import type { MapStation } from '#contract/programme-map.ts';
import type { JudgedStation } from './judge-station.ts';

export function presentMapStation({ station, figures, grade, scoreNote }: JudgedStation): MapStation {
  return {
    id: station.stationId,
    name: station.stationName,
    latitude: station.latitude,
    longitude: station.longitude,
    elevationM: station.elevationM,
    score: figures.score,
    scoreNote,
    grade: grade.grade,
    verdict: figures.verdict,
  };
}
