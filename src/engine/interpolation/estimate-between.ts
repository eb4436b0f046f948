import type { ScoreAnchor } from '../brief/brief.ts';
import { type RawComponents, type WeightedScore, weightedScore } from '../score/weighted-score.ts';
import { distanceWeights } from './distance-weights.ts';
import { greatCircleKm, type Position } from './great-circle-km.ts';
import { interpolateColumn, type SurfacePoints } from './interpolate-score.ts';
import { nearestOf } from './nearest-stations.ts';
import { columnsOf, unitVectors } from './sphere-vectors.ts';
import { stationFigures } from './station-figures.ts';
import { bestSupport, type SupportClass, supportClass } from './support-class.ts';

/** A station whose figures an estimate may rest on. */
export interface StationToRestOn extends Position {
  readonly elevationM: number;
  readonly raw: RawComponents;
}

export interface EstimateBasis {
  /** Index of the station in the list that was given. */
  readonly station: number;
  readonly distanceKm: number;
  /** Station less place, m. */
  readonly heightDifferenceM: number;
  /** Of 1. */
  readonly weight: number;
}

export interface EstimateBetween {
  readonly weighted: WeightedScore;
  /** Nearest first. */
  readonly basis: readonly EstimateBasis[];
  readonly support: SupportClass;
}

/**
 * The figures of one place between stations, by the same functions as the surface. At a station they are the station's.
 * @param input.elevationM of the place
 * @param input.stations at least one, each with a score
 */
export function estimateBetween(input: {
  position: Position;
  elevationM: number;
  stations: readonly StationToRestOn[];
  anchors: readonly ScoreAnchor[];
  indexPoints: boolean;
  each: number;
  power: number;
}): EstimateBetween {
  const { position, elevationM, stations, anchors, indexPoints, each, power } = input;
  const neighbours = nearestOf({
    point: unitVectors(columnsOf([position])),
    stations: unitVectors(columnsOf(stations)),
    each,
  });
  const weights = distanceWeights(neighbours, power);
  const atStation = (neighbours.km[0] ?? 1) === 0;
  // A relief that is approximate is not asked where a station says its height.
  const heightM = atStation ? (stations[neighbours.stations[0] ?? 0]?.elevationM ?? elevationM) : elevationM;
  const points: SurfacePoints = {
    neighbours,
    weights,
    elevationsM: Float32Array.of(heightM),
    held: Int32Array.of(atStation ? (neighbours.stations[0] ?? -1) : -1),
  };
  const figures = stationFigures(anchors, stations);
  const found = new Map(
    figures.columns.map((column) => [column.anchor.component, interpolateColumn(column, { figures, points })[0]]),
  );
  const basis = [...neighbours.stations].map((station, place) => ({
    station,
    distanceKm: neighbours.km[place] ?? 0,
    heightDifferenceM: (stations[station]?.elevationM ?? 0) - heightM,
    weight: weights[place] ?? 0,
  }));
  return {
    weighted: weightedScore(anchors, rawComponents(found), { indexPoints }),
    basis,
    // One that is farther in distance may be nearer in height, so all are asked.
    support: bestSupport(
      stations.map((station) => supportClass(greatCircleKm(position, station), station.elevationM - heightM)),
    ),
  };
}

function rawComponents(found: ReadonlyMap<string, number | undefined>): RawComponents {
  const of = (component: keyof RawComponents): number | null => {
    const value = found.get(component);
    return value === undefined || Number.isNaN(value) ? null : value;
  };
  return {
    served: of('served'),
    severity: of('severity'),
    spell: of('spell'),
    damp: of('damp'),
    water: of('water'),
    electricity: of('electricity'),
    'worst-year': of('worst-year'),
  };
}
