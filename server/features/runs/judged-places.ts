/** What stations, and sites at their own heights, come to under a brief version, from the stored runs in short. */
import type { Brief, ScoreComponent } from '#engine/brief/brief.ts';
import { isIndexLimit } from '#engine/hour-classes/index-limit.ts';
import type { ScorePart } from '#engine/run/run-result.ts';
import { type PlaceFigures, placeFigures } from '#engine/score/place-figures.ts';
import { weightedScore } from '#engine/score/weighted-score.ts';
import { type YearsOfGrade, type YearToGrade, yearsOfGrade } from './grade-of-years.ts';
import type { AcceptedYear, RunInShort, StationPlace } from './places-read-model.ts';
import type { FiguresOfPlace, ShownYear } from './present-figures.ts';

/** A year of a station as it was judged at some height. */
export interface YearInShort {
  readonly kind: AcceptedYear['kind'];
  readonly year: number | null;
  readonly weather: AcceptedYear;
  readonly run: RunInShort;
  readonly result: {
    readonly usable: boolean;
    readonly monthsShort: readonly number[];
    readonly gates: readonly { readonly gate: string; readonly answer: 'fail'; readonly note: string }[];
    readonly parts: readonly ScorePart[];
    readonly verdict: RunInShort['verdict'];
    readonly score: number | null;
    readonly scoreExact: number | null;
  };
}

export interface JudgedPlace {
  readonly figures: PlaceFigures<YearInShort>;
  readonly wire: FiguresOfPlace;
  /** What its years bring to the grade of whoever stands there. */
  readonly grading: YearsOfGrade;
  /** Years whose run at this height is still to come. */
  readonly pending: number;
}

export interface JudgedPlaces {
  /** The place that a station's weather makes at a height; sites of the same height share it. */
  at(stationId: string, heightM: number): JudgedPlace;
}

export function makeJudgedPlaces(on: {
  brief: Brief;
  stations: readonly StationPlace[];
  years: readonly AcceptedYear[];
  runs: readonly RunInShort[];
}): JudgedPlaces {
  const { brief } = on;
  const yearsOf = new Map<string, AcceptedYear[]>();
  for (const year of on.years) {
    const own = yearsOf.get(year.stationId);
    if (own === undefined) yearsOf.set(year.stationId, [year]);
    else own.push(year);
  }
  const elevations = new Map(on.stations.map(({ id, elevationM }) => [id, elevationM]));
  const runAt = new Map(on.runs.map((run) => [keyAt(run), run]));
  const judged = new Map<string, JudgedPlace>();
  const runOf = ({ weatherYearId, stationId }: AcceptedYear, heightM: number) => {
    const elevationM = elevations.get(stationId) ?? heightM;
    return runAt.get(keyAt({ weatherYearId, heightM, adjustedFromM: elevationM === heightM ? null : elevationM }));
  };
  return {
    at(stationId, heightM) {
      const key = `${stationId} ${heightM}`;
      const known = judged.get(key);
      if (known !== undefined) return known;
      const years = (yearsOf.get(stationId) ?? []).map((weather) => ({ weather, run: runOf(weather, heightM) }));
      const place = judgePlace(brief, years);
      judged.set(key, place);
      return place;
    },
  };
}

function keyAt(run: { weatherYearId: string; heightM: number; adjustedFromM: number | null }): string {
  return `${run.weatherYearId} ${run.heightM} ${run.adjustedFromM}`;
}

function toGrade({ kind, hours, measuredHours, flagsUniform }: AcceptedYear, usable: boolean): YearToGrade {
  return { kind, hours, measuredHours, flagsUniform, usable };
}

interface YearWithRun {
  readonly weather: AcceptedYear;
  readonly run: RunInShort | undefined;
}

function judgePlace(brief: Brief, years: readonly YearWithRun[]): JudgedPlace {
  const judged = years.flatMap(({ weather, run }) => (run === undefined ? [] : [yearInShort(brief, weather, run)]));
  const figures = placeFigures({ brief, runs: judged });
  const open = years.filter(({ run }) => run === undefined);
  return {
    figures,
    pending: open.filter(({ weather }) => !weather.failed).length,
    grading: yearsOfGrade(years.map(({ weather, run }) => toGrade(weather, run?.usable ?? true))),
    wire: {
      score: figures.score,
      words: figures.words,
      verdict: figures.verdict,
      yearsMeeting: figures.yearsMeeting,
      range: figures.range,
      scoreNote: judged.length === 0 ? noteWithoutRun(open.map(({ weather }) => weather)) : figures.scoreNote,
      yearsCounted: figures.runs.length,
      shown: figures.shown === null ? null : shownYear(figures.shown.run),
    },
  };
}

function yearInShort(brief: Brief, weather: AcceptedYear, run: RunInShort): YearInShort {
  const { usable, monthsShort, verdict, score, scoreExact, gatesFailed } = run;
  const gates = gatesFailed.map((note) => ({ gate: '', answer: 'fail' as const, note }));
  const result = { usable, monthsShort, verdict, score, scoreExact, gates, parts: partsOf(brief, run) };
  return { kind: weather.kind, year: weather.year, weather, run, result };
}

/** The parts of a run as its result has them, formed from the raw figures alone. */
function partsOf(brief: Brief, { rawComponents }: RunInShort): readonly ScorePart[] {
  const raw: Record<ScoreComponent, number | null> = {
    served: null,
    severity: null,
    spell: null,
    damp: null,
    water: null,
    electricity: null,
    'worst-year': null,
  };
  for (const [at, { component }] of brief.score.entries()) raw[component] = rawComponents[at] ?? null;
  return weightedScore(brief.score, raw, { indexPoints: isIndexLimit(brief.limit) }).parts;
}

function shownYear(run: RunInShort): ShownYear {
  const { classes, demand, met, litresPerKwh, savedPct, worstSpellHours, severityKh } = run;
  return {
    classes,
    demand,
    met,
    litresPerKwh,
    savedPct,
    severityKh,
    worstSpellHours: worstSpellHours ?? 0,
  };
}

/** Why there is no score where no year has been judged. */
export function noteWithoutRun(open: readonly { readonly failed: boolean }[]): string {
  return open.length > 0 && open.every(({ failed }) => failed)
    ? 'not judged: a fault of ours stopped it, its weather file says so'
    : 'not judged yet';
}
