import type { PlaceEstimate } from '#contract/surface.ts';
import { isIndexLimit } from '#engine/hour-classes/index-limit.ts';
import { estimateBetween } from '#engine/interpolation/estimate-between.ts';
import type { Position } from '#engine/interpolation/great-circle-km.ts';
import { choosePower } from '#engine/interpolation/leave-one-out.ts';
import { nearestOthers } from '#engine/interpolation/other-stations.ts';
import { columnsOf, unitVectors } from '#engine/interpolation/sphere-vectors.ts';
import { stationFigures } from '#engine/interpolation/station-figures.ts';
import { PALE_SUPPORT } from '#engine/interpolation/support-class.ts';
import { gradePlace } from '#engine/score/grade-place.ts';
import { bandWord } from '#engine/score/weighted-score.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { ProgrammeBrief } from '../briefs/brief-read-model.ts';
import { presentBriefBasis } from './brief-basis.ts';
import { LEAST_STATIONS, offWords, presentMethod, type ScoredStation } from './surface.ts';
import { NEAREST_STATIONS } from './surface-grid.ts';

export interface NamedStation extends ScoredStation {
  readonly stationId: string;
  readonly name: string;
  readonly score: number;
}

/** Off the coast by no more than the relief's own grain, a place is still taken for land. */
const AT_SEA_KM = 5;

/** What an estimate has not of its own; the grade is D by its kind, whatever these would be. */
const OF_NO_STATION = { years: { actual: 0, typical: false }, measuredSharePct: null, flagsInformative: false };
const TOLD: readonly string[] = ['distance', 'height difference', 'kind'];

/** What a position comes to between stations, by the functions of the surface. */
export function estimatePlace(
  relief: Relief,
  asked: { brief: ProgrammeBrief; stations: readonly NamedStation[]; position: Position },
): PlaceEstimate {
  const { brief, stations, position } = asked;
  const { latitude, longitude } = position;
  const elevationM = Math.round(relief.heightM(latitude, longitude));
  const atSea = relief.kmFromLand(latitude, longitude) > AT_SEA_KM;
  const place = { latitude, longitude, elevationM, atSea, invented: brief.invented, brief: presentBriefBasis(brief) };
  if (stations.length < LEAST_STATIONS) return { ...place, ...nothing(offWords(stations.length)) };
  const anchors = brief.body.score;
  const figures = stationFigures(anchors, stations);
  const chosen = choosePower({ figures, others: nearestOthers(unitVectors(columnsOf(stations)), NEAREST_STATIONS) });
  const found = estimateBetween({
    position,
    elevationM,
    stations,
    anchors,
    indexPoints: isIndexLimit(brief.body.limit),
    each: NEAREST_STATIONS,
    power: chosen.power,
  });
  const note = noteOf({ atSea, support: found.support });
  const { scoreExact, parts: scoreParts } = found.weighted;
  const shown = note === null && scoreExact !== null;
  const nearest = found.basis[0];
  const grade = gradePlace({
    distanceKm: nearest?.distanceKm ?? Number.POSITIVE_INFINITY,
    heightDifferenceM: nearest?.heightDifferenceM ?? 0,
    heightFromRelief: nearest?.distanceKm !== 0,
    ...OF_NO_STATION,
    kind: 'estimate',
  });
  return {
    ...place,
    elevationM: nearest?.distanceKm === 0 ? (stations[nearest.station]?.elevationM ?? elevationM) : elevationM,
    support: found.support,
    score: shown ? Math.round(scoreExact) : null,
    scoreExact: shown ? scoreExact : null,
    scoreNote: shown ? null : (note ?? 'not applicable: no demand'),
    words: shown ? bandWord(Math.round(scoreExact)) : null,
    parts: shown ? [...scoreParts] : [],
    stations: found.basis.flatMap(({ station, weight, ...away }) => {
      const named = stations[station];
      if (named === undefined) return [];
      return [{ stationId: named.stationId, name: named.name, score: named.score, ...away, weightPct: 100 * weight }];
    }),
    grade: grade.grade,
    gradeColumns: grade.columns.filter(({ column }) => TOLD.includes(column)).map((column) => ({ ...column })),
    ...presentMethod(figures, chosen),
  };
}

function noteOf({ atSea, support }: Pick<PlaceEstimate, 'atSea' | 'support'>): string | null {
  if (atSea) return 'at sea: nothing is estimated there';
  if (support !== 'none') return null;
  return `no station within ${PALE_SUPPORT.km} km and ${PALE_SUPPORT.m} m of height: nothing is estimated so far away`;
}

function nothing(
  scoreNote: string,
): Omit<PlaceEstimate, 'latitude' | 'longitude' | 'elevationM' | 'atSea' | 'invented' | 'brief'> {
  return {
    support: 'none',
    score: null,
    scoreExact: null,
    scoreNote,
    words: null,
    parts: [],
    stations: [],
    grade: 'D',
    gradeColumns: [{ column: 'kind', grade: 'D', reason: 'estimate between stations' }],
    power: 2,
    neighbours: 0,
    error: null,
    withHeight: [],
  };
}
