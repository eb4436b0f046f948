import type { MapStation } from '#contract/programme-map.ts';
import type { JudgedStation } from './judge-station.ts';
import { presentFigures, shownYearOf } from './present-figures.ts';

export function presentMapStation({ station, figures, grade, scoreNote }: JudgedStation): MapStation {
  const shown = figures.shown === null ? null : shownYearOf(figures.shown.result);
  return {
    id: station.stationId,
    name: station.stationName,
    latitude: station.latitude,
    longitude: station.longitude,
    elevationM: station.elevationM,
    ...presentFigures({ ...figures, scoreNote, yearsCounted: figures.runs.length, shown }, grade.grade),
  };
}
