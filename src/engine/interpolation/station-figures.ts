/** The raw components of all stations in columns, with what a surface needs to know of each. */
import type { ScoreAnchor } from '../brief/brief.ts';
import type { RawComponents } from '../score/weighted-score.ts';
import { type Extremes, extremesOf, type HeightSums, heightSlope, heightSums } from './height-slope.ts';

export interface FigureColumn {
  readonly anchor: ScoreAnchor;
  /** By station; NaN where the component does not apply. */
  readonly values: Float64Array;
  /** Whether it applies at every station. */
  readonly everywhere: boolean;
  readonly extremes: Extremes;
  readonly sums: HeightSums;
  /** Heights of the stations where it applies, m. */
  readonly heights: Extremes;
  /** Per metre of height; 0 where the stations tell none. */
  readonly slopePerM: number;
}

export interface StationFigures {
  readonly stations: number;
  readonly elevationsM: Float64Array;
  /** Of components that apply somewhere and weigh something. */
  readonly columns: readonly FigureColumn[];
}

/** @param stations every one with a score: only what has a figure can be interpolated */
export function stationFigures(
  anchors: readonly ScoreAnchor[],
  stations: readonly { readonly elevationM: number; readonly raw: RawComponents }[],
): StationFigures {
  const elevationsM = Float64Array.from(stations, ({ elevationM }) => elevationM);
  const columns = anchors
    .filter(({ weight }) => weight > 0)
    .map((anchor) => figureColumn(anchor, { stations, elevationsM }))
    .filter(({ sums }) => sums.count > 0);
  return { stations: stations.length, elevationsM, columns };
}

function figureColumn(
  anchor: ScoreAnchor,
  on: { stations: Parameters<typeof stationFigures>[1]; elevationsM: Float64Array },
): FigureColumn {
  const { stations, elevationsM } = on;
  const values = new Float64Array(stations.length);
  for (let station = 0; station < values.length; station++) {
    values[station] = stations[station]?.raw[anchor.component] ?? Number.NaN;
  }
  const heights = extremesOf(elevationsM, values);
  const sums = heightSums(elevationsM, values);
  return {
    anchor,
    values,
    everywhere: sums.count === stations.length,
    extremes: extremesOf(values, values),
    sums,
    heights,
    slopePerM: heightSlope(sums, heights.greatest - heights.least),
  };
}
