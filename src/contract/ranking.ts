import * as z from 'zod/mini';
import { endpoint, json, ordinary } from './endpoint.ts';
import { PlaceKind } from './place-doubts.ts';
import { OfBrief, ProgrammeParams } from './runs.ts';

/** The brief's weights moved by up to a quarter, or any weights at all. */
export const RankingView = z.enum(['near the brief', 'any weights']);
export type RankingView = z.infer<typeof RankingView>;

const MOST_RANKED = 200;

export const RankedPlace = z.object({
  placeKind: PlaceKind,
  id: z.uuid(),
  /** Of a site. */
  letters: z.nullable(z.string()),
  name: z.string(),
  /** Weighted sum under the brief's own weights. */
  scoreExact: z.number(),
  rank: z.int(),
  tied: z.boolean(),
  /** Share of the draws, 0..1, at rank 1, 2, ... */
  rankShares: z.array(z.number()),
  /** Share of the draws among the first k. */
  topShare: z.number(),
  /** Mean weights, of 100, of the draws in which it is first; null when it never is. */
  centralWeights: z.nullable(z.array(z.number())),
});
export type RankedPlace = z.infer<typeof RankedPlace>;

export const Ranking = z.object({
  view: RankingView,
  draws: z.int(),
  seed: z.int(),
  k: z.int(),
  /** In the order of `centralWeights`; of 100. */
  weights: z.array(z.object({ component: z.string(), label: z.string(), weight: z.number() })),
  /** Best first. */
  places: z.array(RankedPlace),
  /** Each place with the next one. */
  neighbours: z.array(
    z.object({
      aheadId: z.uuid(),
      behindId: z.uuid(),
      /** Share of the draws in which it is ahead. */
      aheadShare: z.number(),
      /** To be shown as a tie. */
      tie: z.boolean(),
      /** The least change of one weight at which they tie; null when no weight does. */
      swap: z.nullable(z.object({ label: z.string(), fromWeight: z.number(), toWeight: z.number() })),
    }),
  ),
  /** Of the places that were named: those that are not ranked, and why. */
  notRanked: z.array(z.object({ placeKind: PlaceKind, id: z.uuid(), name: z.string(), reason: z.string() })),
  /** Places with a score beyond the most that are ranked together. */
  leftOut: z.int(),
});
export type Ranking = z.infer<typeof Ranking>;

export const rankPlaces = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/ranking',
  summary:
    'The places of a programme in their order under a brief, and how sure it is: weights and what is not known drawn together.',
  params: ProgrammeParams,
  query: OfBrief,
  body: json(
    z.strictObject({
      view: z._default(RankingView, 'near the brief'),
      /** P(top k). */
      k: z._default(z.int().check(z.gte(1), z.lte(MOST_RANKED)), 3),
      /** Stations and sites by id; left out: the best of all sites, or of all stations where there is no site. */
      placeIds: z.optional(z.array(z.uuid()).check(z.minLength(1), z.maxLength(MOST_RANKED))),
      /** So many of the best. */
      most: z._default(z.int().check(z.gte(2), z.lte(MOST_RANKED)), 50),
    }),
  ),
  response: json(Ranking),
  errors: [],
  allow: 'runs.view',
  limits: { ...ordinary, perMinute: 60, seconds: 120 },
});
