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
    .map((anchor) => figureColumn(anchor, stations))
    .filter(({ sums }) => sums.count > 0);
  return { stations: stations.length, elevationsM, columns };
}

function figureColumn(anchor: ScoreAnchor, stations: Parameters<typeof stationFigures>[1]): FigureColumn {
  const { component } = anchor;
  const values = Float64Array.from(stations, ({ raw }) => raw[component] ?? Number.NaN);
  const present = stations.flatMap(({ elevationM, raw }) => {
    const value = raw[component];
    return value === null ? [] : [[elevationM, value] as const];
  });
  const heights = extremesOf(present.map(([heightM]) => heightM));
  const sums = heightSums(present);
  return {
    anchor,
    values,
    everywhere: present.length === stations.length,
    extremes: extremesOf(present.map(([, value]) => value)),
    sums,
    heights,
    slopePerM: heightSlope(sums, heights.greatest - heights.least),
  };
}
