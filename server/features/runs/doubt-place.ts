/** What is asked of one place beyond its score, judged in a thread of the web process. */
import type { Brief } from '#engine/brief/brief.ts';
import { type PlaceToRank, placeToRank } from '#engine/ranking/place-to-rank.ts';
import { type Ranking, rankPlaces } from '#engine/ranking/rank-places.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import type { RunResult } from '#engine/run/run-result.ts';
import { type PlaceFigures, placeFigures } from '#engine/score/place-figures.ts';
import { scoreRange } from '#engine/score/score-range.ts';
import { nearestTurning, turningLevers } from '#engine/score/turning-levers.ts';
import type {
  DoubtsTask,
  JudgedRange,
  RangeTask,
  RankTask,
  StationToRescore,
  TurnedVerdict,
  TurningTask,
} from '../../jobs/web-task.ts';
import { keptYear } from './kept-years.ts';

interface JudgedYear {
  readonly weatherYearId: string;
  readonly kind: WeatherYear['kind'];
  readonly year: number | null;
  readonly result: RunResult;
}

/** @returns null without a usable year */
export function rangeOfPlace({ brief, station, humidityFrom }: RangeTask): JudgedRange | null {
  const { runs, shown, range } = figuresOf(station, brief);
  if (shown === null) return null;
  const { zone, heightM, position } = station;
  const year = weatherOf(station, shown.weatherYearId);
  const doubted = scoreRange({
    ...{ year, brief, zone, heightM, position },
    humidityFrom: humidityFrom.get(shown.weatherYearId) ?? 'dew point',
  });
  const ofYear = ({ kind, year: calendarYear, result }: JudgedYear) => ({
    kind,
    year: calendarYear,
    score: result.score,
  });
  return {
    year: { kind: shown.kind, year: shown.year },
    scoreExact: shown.result.scoreExact,
    years: runs.map(ofYear),
    range,
    pairs: doubted.pairs,
  };
}

/** What of each place goes into a ranking; places without a score stay out. */
export function doubtPlaces({ brief, places }: DoubtsTask): readonly PlaceToRank[] {
  return places.flatMap(({ id, station, humidityFrom }) => {
    const figures = figuresOf(station, brief);
    const { shown, score } = figures;
    if (shown === null || score === null) return [];
    const { zone, heightM, position } = station;
    const range = scoreRange({
      ...{ year: weatherOf(station, shown.weatherYearId), brief, zone, heightM, position },
      humidityFrom: humidityFrom.get(shown.weatherYearId) ?? 'dew point',
    });
    return [placeToRank({ id, figures, range })];
  });
}

export function drawRanks(task: RankTask): Ranking {
  return rankPlaces(task);
}

/** Judges the years that the verdict rests on, as often as the lever needs. */
export function turnVerdict({ brief, station, lever: place }: TurningTask): TurnedVerdict {
  const asItIs = figuresOf(station, brief);
  const lever = place === null ? undefined : turningLevers(brief)[place];
  if (lever === undefined) return { ...verdictOf(asItIs), turning: null };
  const ids = new Set(asItIs.runs.map(({ weatherYearId }) => weatherYearId));
  const counted = { ...station, years: station.years.filter(({ weatherYearId }) => ids.has(weatherYearId)) };
  const passes = (changed: Brief): boolean =>
    counted.years.every(({ weatherYearId }) => judged(counted, weatherYearId, changed).verdict === 'meets the brief');
  const turning = nearestTurning(lever, passes) ?? null;
  if (turning === null) return { ...verdictOf(asItIs), turning };
  return { ...verdictOf(figuresOf(counted, lever.briefAt(turning.value))), turning };
}

function verdictOf({ verdict, score, runs }: PlaceFigures<JudgedYear>): Omit<TurnedVerdict, 'turning'> {
  return { verdict, score, failed: [...new Set(runs.flatMap(({ result }) => result.failed))] };
}

function figuresOf(station: StationToRescore, brief: Brief): PlaceFigures<JudgedYear> {
  const runs = station.years.map(({ weatherYearId, kind, year }) => ({
    ...{ weatherYearId, kind, year },
    result: judged(station, weatherYearId, brief),
  }));
  return placeFigures({ brief, runs });
}

function judged(station: StationToRescore, weatherYearId: string, brief: Brief): RunResult {
  const { zone, heightM, position } = station;
  return judgeYear({ year: weatherOf(station, weatherYearId), brief, zone, heightM, position });
}

function weatherOf({ years, heightM, adjustedFromM }: StationToRescore, weatherYearId: string): WeatherYear {
  const found = years.find((each) => each.weatherYearId === weatherYearId);
  if (found === undefined) throw new RangeError(`the place has no weather year ${weatherYearId}`);
  const { kind, year, utcOffsetMin } = found;
  return { kind, year, utcOffsetMin, packed: keptYear({ ...found, heightM, adjustedFromM }) };
}
