/**
 * `rank`: every rank of 500 places under 2,000 draws of weights, with what a ranking says beside it (central weights, neighbours,
 * swaps), against the plain way to the ranks alone: an object for each place and draw, sorted by comparing scores.
 */
import type { PlaceToRank } from '#engine/ranking/place-to-rank.ts';
import { type Ranking, rankPlaces } from '#engine/ranking/rank-places.ts';
import { seededRandom } from '#engine/ranking/seeded-random.ts';
import { weightDraws } from '#engine/ranking/weight-draws.ts';
import type { Bench } from '../bench.ts';
import { sideBySide } from '../side-by-side.ts';

const PLACES = 500;
const DRAWS = 2000;
const WEIGHTS = [1, 1, 1, 1, 1, 1];
const SEED = 5;
/** The plain way takes a tenth of the draws while it is timed; all of them once, for the ranks to be compared. */
const PLAIN_EVERY = 10;

interface PlainPlace {
  readonly at: number;
  readonly criteria: readonly number[];
}

function madeUpPlaces(): readonly PlainPlace[] {
  const random = seededRandom(17);
  return Array.from({ length: PLACES }, (_none, at) => ({ at, criteria: WEIGHTS.map(() => 100 * random()) }));
}

/** Draws at each rank, place by place. */
function plainRanks(places: readonly PlainPlace[], draws: number): number[][] {
  const counts = places.map(() => places.map(() => 0));
  const shares = WEIGHTS.map((weight) => weight / WEIGHTS.length);
  const next = weightDraws({ view: 'any weights', weights: shares, random: seededRandom(SEED, 'weights') });
  const drawn = new Float64Array(WEIGHTS.length);
  for (let draw = 0; draw < draws; draw++) {
    next(drawn);
    const scored = places.map(({ at, criteria }) => ({
      at,
      score: criteria.reduce((sum, value, criterion) => sum + value * (drawn[criterion] ?? 0), 0),
    }));
    scored.sort((one, other) => other.score - one.score);
    for (const [rank, { at }] of scored.entries()) {
      const row = counts[at];
      if (row !== undefined) row[rank] = (row[rank] ?? 0) + 1;
    }
  }
  return counts;
}

function differingRanks(ranking: Ranking, plain: readonly (readonly number[])[]): number {
  let differing = 0;
  for (const { id, rankShares } of ranking.places) {
    const row = plain[Number(id)] ?? [];
    for (const [rank, share] of rankShares.entries()) if (share !== (row[rank] ?? 0) / DRAWS) differing++;
  }
  return differing;
}

export const rankBench: Bench = {
  name: 'rank',
  about: '2,000 draws of weights over 500 places of 6 criteria, objects sorted by comparing / the whole ranking',
  gate: 2.5,
  compare: 'at least',
  run: () => {
    const plainPlaces = madeUpPlaces();
    const places = plainPlaces.map(
      ({ at, criteria }): PlaceToRank => ({ id: String(at), criteria, years: [], doubts: [] }),
    );
    const rank = () => rankPlaces({ places, weights: WEIGHTS, view: 'any weights', seed: SEED, draws: DRAWS });
    const { plainMs, oursMs } = sideBySide({
      plain: () => plainRanks(plainPlaces, DRAWS / PLAIN_EVERY),
      plainUnits: 1 / PLAIN_EVERY,
      ours: rank,
      oursUnits: 1,
    });
    const differing = differingRanks(rank(), plainRanks(plainPlaces, DRAWS));
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(0)} ms, by scaling`,
      ours: `${oursMs.toFixed(0)} ms`,
      fault: differing === 0 ? null : `${differing} of ${PLACES * PLACES} ranks differ`,
    };
  },
};
