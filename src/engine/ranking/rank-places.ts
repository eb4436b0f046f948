/**
 * Ranking of places under one brief, and how sure it is (method 7.8): stochastic multicriteria acceptability analysis
 * (SMAA-2, Lahdelma and Salminen, Oper. Res. 49(3), 2001) by simulation (Tervonen and Lahdelma, Eur. J. Oper. Res. 178(2),
 * 2007). With 10,000 draws a share is good to 0.01 (1.96 sqrt(0.25 / 10,000)).
 */
import { hundredths } from '../conventions.ts';
import { placeStates } from './place-states.ts';
import type { Criteria, PlaceToRank } from './place-to-rank.ts';
import { rankCounts } from './rank-counts.ts';
import { seededRandom } from './seeded-random.ts';
import { type WeightView, weightDraws } from './weight-draws.ts';
import { leastWeightSwap, type WeightSwap } from './weight-swap.ts';

export interface RankedPlace {
  readonly id: string;
  /** Weighted sum under the brief's own weights, before any draw. */
  readonly scoreExact: number;
  /** 1 first; places whose scores are the same to 0.01 share a rank, and the next ones follow after as many. */
  readonly rank: number;
  /** Shares its rank with another. */
  readonly tied: boolean;
  /** Share of the draws, 0..1, in which the place has rank 1, 2, ..; ties in equal parts. */
  readonly rankShares: readonly number[];
  /** Mean weights, sum 1, of the draws in which the place is first; null when it never is. */
  readonly centralWeights: readonly number[] | null;
}

export interface NeighbourPair {
  readonly aheadId: string;
  readonly behindId: string;
  /** Share of the draws, 0..1, in which the one ahead is ahead, ties by halves. */
  readonly aheadShare: number;
  /** To be shown as a tie: the same score, or ahead in fewer than 95 % of the draws (ours). */
  readonly tie: boolean;
  /** Least change of one weight at which they tie; null when no weight does. */
  readonly swap: WeightSwap | null;
}

export interface Ranking {
  readonly view: WeightView;
  readonly draws: number;
  readonly seed: number;
  /** Best first; of equals, the first named. */
  readonly places: readonly RankedPlace[];
  /** Each place with the next one. */
  readonly neighbours: readonly NeighbourPair[];
}

export interface RankPlacesInput {
  readonly places: readonly PlaceToRank[];
  /** The brief's weights in the order of its score, any scale. */
  readonly weights: readonly number[];
  readonly view: WeightView;
  readonly seed: number;
  readonly draws?: number;
}

export const RANKING_DRAWS = 10_000;
const SURE_FROM = 0.95;

/**
 * Ranks places by their criteria. The same input gives the same ranking, and what a place draws depends on the seed and
 * its id alone, so that one more place changes the order of no others.
 * @throws RangeError on weights that are no weights, on no draws, on ids that repeat and on a place to which no criterion
 * applies
 */
export function rankPlaces(input: RankPlacesInput): Ranking {
  checkInput(input);
  const { places, weights, view, seed, draws = RANKING_DRAWS } = input;
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const shares = weights.map((weight) => weight / total);
  const scores = places.map(({ criteria }) => weightedSum(criteria, shares));
  const order = places.map((_place, at) => at);
  order.sort((one, other) => grain(scores[other] ?? 0) - grain(scores[one] ?? 0) || one - other);
  const drawn = runDraws({ ...input, draws, shares, order });
  const ranked = order.map((at, place) => {
    const firsts = drawn.firsts[at] ?? 0;
    return {
      id: places[at]?.id ?? '',
      scoreExact: scores[at] ?? Number.NaN,
      ...rankOf(order, scores, place),
      rankShares: sharesOf(drawn.counts.subarray(at * places.length, (at + 1) * places.length), draws),
      centralWeights: firsts === 0 ? null : drawn.firstWeights.map((column) => (column[at] ?? 0) / firsts),
    };
  });
  const neighbours = order.slice(1).flatMap((behindAt, pair) => {
    const ahead = places[order[pair] ?? 0];
    const behind = places[behindAt];
    if (ahead === undefined || behind === undefined) return [];
    const aheadShare = (drawn.ahead[pair] ?? 0) / draws;
    const tie = ranked[pair]?.rank === ranked[pair + 1]?.rank || aheadShare < SURE_FROM;
    const swap = leastWeightSwap({ weights, ahead: ahead.criteria, behind: behind.criteria });
    return [{ aheadId: ahead.id, behindId: behind.id, aheadShare, tie, swap }];
  });
  return { view, draws, seed, places: ranked, neighbours };
}

/** P(top k): the share of draws in which a place has rank k or better. */
export function shareInTop(place: Pick<RankedPlace, 'rankShares'>, k: number): number {
  return place.rankShares.slice(0, k).reduce((sum, share) => sum + share, 0);
}

function checkInput({ places, weights, draws = RANKING_DRAWS }: RankPlacesInput): void {
  const sum = weights.reduce((all, weight) => all + weight, 0);
  if (!Number.isFinite(sum) || sum <= 0 || weights.some((weight) => weight < 0)) {
    throw new RangeError(`weights of a ranking are never below 0, not all 0: ${weights.join(', ')}`);
  }
  if (!Number.isInteger(draws) || draws < 1) throw new RangeError(`a ranking needs draws, not ${draws}`);
  if (new Set(places.map(({ id }) => id)).size < places.length) throw new RangeError('a place is ranked once');
  for (const { id, criteria } of places) {
    const applying = weights.filter((_weight, criterion) => (criteria[criterion] ?? null) !== null);
    if (!applying.some((weight) => weight > 0)) throw new RangeError(`place ${id} has no criterion to be ranked by`);
  }
}

/** The weight of a criterion that does not apply is shared over the others (method 7.3). */
function weightedSum(criteria: Criteria, weights: readonly number[]): number {
  let sum = 0;
  let applying = 0;
  for (const [criterion, weight] of weights.entries()) {
    const value = criteria[criterion] ?? null;
    if (value === null) continue;
    sum += weight * value;
    applying += weight;
  }
  return sum / applying;
}

/**
 * A score in the whole hundredths by which it is compared. Criteria and weights are whole numbers more often than not, so that scores stand
 * right between two hundredths (14.875); the last bits of a sum, which the scale of the weights decides, must not tell equal ones apart.
 */
function grain(score: number): number {
  return hundredths(score + 1e-8);
}

function rankOf(order: readonly number[], scores: readonly number[], place: number): { rank: number; tied: boolean } {
  const scoreAt = (index: number): number => grain(scores[order[index] ?? -1] ?? Number.NaN);
  let first = place;
  while (first > 0 && scoreAt(first - 1) === scoreAt(place)) first--;
  return { rank: first + 1, tied: first < place || scoreAt(place + 1) === scoreAt(place) };
}

function sharesOf(counts: Float64Array, draws: number): readonly number[] {
  const shares: number[] = [];
  for (let rank = 0; rank < counts.length; rank++) shares.push((counts[rank] ?? 0) / draws);
  return shares;
}

interface Drawn {
  readonly counts: Float64Array;
  /** Draws in which each place is first, ties in equal parts. */
  readonly firsts: Float64Array;
  /** Sums of the weights of those draws: a column per criterion. */
  readonly firstWeights: readonly Float64Array[];
  /** Draws in which the first of each pair of neighbours is ahead, ties by halves. */
  readonly ahead: Float64Array;
}

function runDraws(
  input: RankPlacesInput & { draws: number; shares: readonly number[]; order: readonly number[] },
): Drawn {
  const { places, shares, view, seed, draws } = input;
  const order = Int32Array.from(input.order);
  const states = placeStates({ places, criteria: shares.length, seed });
  const nextWeights = weightDraws({ view, weights: shares, random: seededRandom(seed, 'weights') });
  const weights = new Float64Array(shares.length);
  const scores = new Float64Array(places.length);
  const ranks = rankCounts(places.length);
  const firsts = new Float64Array(places.length);
  const firstWeights = shares.map(() => new Float64Array(places.length));
  const ahead = new Float64Array(Math.max(places.length - 1, 0));
  for (let draw = 0; draw < draws; draw++) {
    nextWeights(weights);
    states.draw();
    weightedSums({ ...states, weights }, scores);
    ranks.add(scores);
    addFirsts(ranks, { firsts, firstWeights, weights });
    addNeighbours(ranks.steps, { order, ahead });
  }
  return { counts: ranks.counts, firsts, firstWeights, ahead };
}

/** Scores of all places under one draw, column by column. */
export function weightedSums(
  input: {
    columns: readonly Float64Array[];
    applies: readonly Float64Array[] | null;
    weights: ArrayLike<number>;
  },
  scores: Float64Array,
): void {
  const { columns, applies, weights } = input;
  addColumns(columns, weights, scores);
  if (applies === null) return;
  const applying = new Float64Array(scores.length);
  addColumns(applies, weights, applying);
  for (let place = 0; place < scores.length; place++) {
    scores[place] = (scores[place] ?? 0) / (applying[place] ?? 1);
  }
}

function addColumns(columns: readonly Float64Array[], weights: ArrayLike<number>, sums: Float64Array): void {
  sums.fill(0);
  for (let criterion = 0; criterion < columns.length; criterion++) {
    const column = columns[criterion];
    const weight = weights[criterion] ?? 0;
    if (column === undefined) continue;
    for (let place = 0; place < sums.length; place++) {
      sums[place] = (sums[place] ?? 0) + weight * (column[place] ?? 0);
    }
  }
}

function addFirsts(
  { order, steps }: { order: Int32Array; steps: Float64Array },
  { firsts, firstWeights, weights }: Pick<Drawn, 'firsts' | 'firstWeights'> & { weights: Float64Array },
): void {
  const best = steps[order[0] ?? -1];
  let members = 0;
  while (members < order.length && steps[order[members] ?? -1] === best) members++;
  for (let member = 0; member < members; member++) {
    const place = order[member] ?? 0;
    firsts[place] = (firsts[place] ?? 0) + 1 / members;
    for (const [criterion, column] of firstWeights.entries()) {
      column[place] = (column[place] ?? 0) + (weights[criterion] ?? 0) / members;
    }
  }
}

function addNeighbours(steps: Float64Array, { order, ahead }: { order: Int32Array; ahead: Float64Array }): void {
  let one = steps[order[0] ?? 0] ?? 0;
  for (let pair = 0; pair < ahead.length; pair++) {
    const next = steps[order[pair + 1] ?? 0] ?? 0;
    if (one >= next) ahead[pair] = (ahead[pair] ?? 0) + (one > next ? 1 : 0.5);
    one = next;
  }
}
