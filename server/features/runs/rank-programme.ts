import type { Knex } from 'knex';
import type { RankedPlace, Ranking as WireRanking } from '#contract/ranking.ts';
import type { Brief } from '#engine/brief/brief.ts';
import type { PlaceToRank } from '#engine/ranking/place-to-rank.ts';
import { RANKING_DRAWS, type Ranking, shareInTop } from '#engine/ranking/rank-places.ts';
import type { WeightView } from '#engine/ranking/weight-draws.ts';
import { componentLabel } from '#engine/score/weighted-score.ts';
import type { DoubtsTask } from '../../jobs/web-task.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';
import type { ProgrammeBrief } from '../briefs/brief-read-model.ts';
import type { ColumnCache } from './column-cache.ts';
import { placesToJudge } from './place-to-judge.ts';
import { type PlacesUnderBrief, programmePlaces } from './programme-places.ts';

/** The same draws for everyone who asks: a ranking is the same again. */
const SEED = 1;
/** Places a thread works on before it looks whether anybody still waits. */
const PLACES_PER_TASK = 4;

interface Ranker {
  readonly db: Knex;
  readonly cache: ColumnCache;
  readonly threads: Pick<WebThreads, 'doubts' | 'rank'>;
}

interface RankingAsked {
  readonly teamId: string;
  readonly programmeId: string;
  readonly brief: ProgrammeBrief;
  readonly view: WeightView;
  readonly k: number;
  readonly placeIds: readonly string[] | null;
  readonly most: number;
  readonly signal: AbortSignal;
}

/** A place that could be ranked, with what the answer tells of it. */
interface Candidate {
  readonly placeKind: RankedPlace['placeKind'];
  readonly id: string;
  readonly letters: string | null;
  readonly name: string;
  readonly score: number | null;
  /** Why it is not ranked; null where it is. */
  readonly reason: string | null;
}

/** Ranks places by the scores of their saved runs; what is not known for certain is judged in the threads. */
export async function rankProgramme({ db, cache, threads }: Ranker, asked: RankingAsked): Promise<WireRanking> {
  const { teamId, programmeId, brief, placeIds, signal } = asked;
  const candidates = candidatesOf(await programmePlaces(db, { teamId, programmeId, brief }), placeIds);
  const ranked = candidates.filter(({ reason }) => reason === null);
  const best = ranked.toSorted((one, other) => (other.score ?? 0) - (one.score ?? 0)).slice(0, asked.most);
  const places = await placesToJudge({ db, cache }, { teamId, programmeId, places: best, signal });
  const toRank = await inTasks(threads, { brief: brief.body, places, signal });
  const ranking = await threads.rank(
    {
      places: toRank,
      weights: brief.body.score.map(({ weight }) => weight),
      view: asked.view,
      seed: SEED,
      draws: RANKING_DRAWS,
    },
    signal,
  );
  return {
    ...{ view: asked.view, draws: ranking.draws, seed: SEED, k: asked.k },
    ...presentRanking(ranking, { candidates, k: asked.k, brief: brief.body }),
    notRanked: placeIds === null ? [] : candidates.flatMap(presentNotRanked),
    leftOut: ranked.length - best.length,
  };
}

/** Of a programme without named places its sites; its stations while it has none. */
function candidatesOf({ stations, sites }: PlacesUnderBrief, placeIds: readonly string[] | null): readonly Candidate[] {
  const named = placeIds === null ? null : new Set(placeIds);
  const ofSites = sites
    .filter(({ site }) => named === null || named.has(site.id))
    .map(({ site: { id, letters, name }, wire, grade }) => ({
      ...{ placeKind: 'sites' as const, id, letters, name, score: wire.score },
      reason: whyNot(wire, grade),
    }));
  if (named === null && ofSites.length > 0) return ofSites;
  const ofStations = stations
    .filter(({ station }) => named === null || named.has(station.id))
    .map(({ station: { id, name }, judged: { wire }, grade }) => ({
      ...{ placeKind: 'stations' as const, id, letters: null, name, score: wire.score },
      reason: whyNot(wire, grade.grade),
    }));
  return [...ofSites, ...ofStations];
}

function whyNot(
  { score, scoreNote }: { score: number | null; scoreNote: string | null },
  grade: string,
): string | null {
  if (score === null) return scoreNote ?? 'no score';
  return grade === 'D' ? 'grade D is not ranked' : null;
}

async function inTasks(
  threads: Pick<WebThreads, 'doubts'>,
  { brief, places, signal }: { brief: Brief; places: DoubtsTask['places']; signal: AbortSignal },
): Promise<readonly PlaceToRank[]> {
  const tasks: Promise<readonly PlaceToRank[]>[] = [];
  for (let from = 0; from < places.length; from += PLACES_PER_TASK)
    tasks.push(threads.doubts({ brief, places: places.slice(from, from + PLACES_PER_TASK) }, signal));
  return (await Promise.all(tasks)).flat();
}

function presentRanking(ranking: Ranking, on: { candidates: readonly Candidate[]; k: number; brief: Brief }) {
  const { candidates, k, brief } = on;
  const known = new Map(candidates.map((candidate) => [candidate.id, candidate]));
  const total = brief.score.reduce((sum, { weight }) => sum + weight, 0);
  const weights = brief.score.map(({ component, weight }) => ({
    component,
    label: componentLabel(component),
    weight: (100 * weight) / total,
  }));
  return {
    weights,
    places: ranking.places.flatMap((place) => {
      const candidate = known.get(place.id);
      if (candidate === undefined) return [];
      const { placeKind, id, letters, name } = candidate;
      const { scoreExact, rank, tied, rankShares, centralWeights } = place;
      return {
        ...{ placeKind, id, letters, name, scoreExact, rank, tied },
        rankShares: rankShares.map(toTenThousandth),
        topShare: toTenThousandth(shareInTop(place, k)),
        centralWeights: centralWeights === null ? null : centralWeights.map((weight) => 100 * weight),
      };
    }),
    neighbours: ranking.neighbours.map(({ aheadId, behindId, aheadShare, tie, swap }) => ({
      ...{ aheadId, behindId, aheadShare, tie },
      swap:
        swap === null
          ? null
          : {
              label: weights[swap.criterion]?.label ?? '',
              fromWeight: swap.fromWeight,
              toWeight: swap.toWeight,
            },
    })),
  };
}

/** A draw more or less is one in ten thousand. */
function toTenThousandth(share: number): number {
  return Math.round(share * RANKING_DRAWS) / RANKING_DRAWS;
}

function presentNotRanked({ placeKind, id, name, reason }: Candidate): WireRanking['notRanked'] {
  return reason === null ? [] : [{ placeKind, id, name, reason }];
}
