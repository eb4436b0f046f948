import type { Brief } from '#engine/brief/brief.ts';
import { briefNotes } from '#engine/brief/brief-notes.ts';
import type { GradeAnswer } from '#engine/score/grade-place.ts';
import { type PlaceFigures, placeFigures } from '#engine/score/place-figures.ts';
import { AT_THE_STATION, gradeOfYears, type WhereItStands } from './grade-of-years.ts';
import { noteWithoutRun } from './judged-places.ts';
import type { RunOfYear, StationYear } from './station-years-read-model.ts';

/** A station as a place: what its accepted years come to under a brief. */
export interface JudgedStation {
  readonly station: StationYear;
  readonly figures: PlaceFigures<JudgedYear>;
  /** Every judged year, newest file first where years repeat. */
  readonly judged: readonly JudgedYear[];
  readonly grade: GradeAnswer;
  /** What the brief says with every result. */
  readonly notes: readonly string[];
  /** Accepted years whose run is still to come. */
  readonly pending: number;
  /** Why there is no score; null with one. */
  readonly scoreNote: string | null;
}

export interface JudgedYear {
  readonly kind: StationYear['kind'];
  readonly year: number | null;
  readonly result: RunOfYear['figures'];
  readonly run: RunOfYear;
  readonly weather: StationYear;
}

/**
 * @param years the accepted years of one station, at least one
 * @param at where the place stands to it
 */
export function judgeStation(
  brief: Brief,
  [first, ...others]: readonly [StationYear, ...StationYear[]],
  at: WhereItStands = AT_THE_STATION,
): JudgedStation {
  const years = [first, ...others];
  const judged = years.flatMap((weather) => {
    const { kind, year, run } = weather;
    return run === null ? [] : [{ kind, year, result: run.figures, run, weather }];
  });
  const figures = placeFigures({ brief, runs: judged });
  const open = years.filter(({ run }) => run === null);
  return {
    station: first,
    figures,
    judged,
    grade: gradeOfYears(
      years.map(({ run, ...year }) => ({ ...year, usable: run === null || run.figures.usable })),
      at,
    ),
    notes: briefNotes(brief),
    pending: open.filter(({ failure }) => failure === null).length,
    scoreNote:
      judged.length === 0
        ? noteWithoutRun(open.map(({ failure }) => ({ failed: failure !== null })))
        : figures.scoreNote,
  };
}

/** The rows of a map, one group per station; they come ordered by station. */
export function byStation(years: readonly StationYear[]): readonly (readonly [StationYear, ...StationYear[]])[] {
  const groups: [StationYear, ...StationYear[]][] = [];
  for (const year of years) {
    const last = groups.at(-1);
    if (last?.[0].stationId === year.stationId) last.push(year);
    else groups.push([year]);
  }
  return groups;
}
