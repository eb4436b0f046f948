import * as z from 'zod/mini';
import { endpoint, json } from './endpoint.ts';
import { OfBrief, Verdict } from './runs.ts';

/** A station or a site of a programme as a place. */
export const PlaceKind = z.enum(['stations', 'sites']);
export type PlaceKind = z.infer<typeof PlaceKind>;

const AnyPlaceParams = z.strictObject({
  teamId: z.uuid(),
  programmeId: z.uuid(),
  placeKind: PlaceKind,
  placeId: z.uuid(),
});

/** A draft in place of the saved brief; the engine reads it whole and answers every fault at once, each at its path. */
const DraftOrSaved = json(z.strictObject({ body: z.optional(z.record(z.string(), z.unknown())) }));

/** Judging one place some dozens of times. */
const severalJudgings = { bodyBytes: 192 * 1024, perMinute: 120, seconds: 60 };

/** One end of a doubt: the year judged again with what is doubted a little lower or higher. */
const RangeEnd = z.object({
  /** Such as `-0.5 K dew point`. */
  label: z.string(),
  /** Weighted sum before gates, whole; null when no component applies. */
  score: z.nullable(z.int()),
});

export const PlaceRange = z.object({
  /** Of the year that is judged again, as it stands. */
  score: z.nullable(z.int()),
  year: z.object({ kind: z.enum(['typical', 'actual', 'derived']), year: z.nullable(z.int()) }),
  /** Scores over the years; null with fewer than two. */
  years: z.nullable(
    z.object({
      low: z.int(),
      high: z.int(),
      scores: z.array(
        z.object({ kind: z.enum(['typical', 'actual']), year: z.nullable(z.int()), score: z.nullable(z.int()) }),
      ),
    }),
  ),
  pairs: z.array(
    z.object({
      doubt: z.enum(['humidity reading', 'plant tolerance', 'set-point', 'humidity cap']),
      minus: RangeEnd,
      plus: RangeEnd,
    }),
  ),
  /** The doubt whose two ends lie furthest apart, the years among them. */
  largest: z.nullable(z.enum(['years', 'humidity reading', 'plant tolerance', 'set-point', 'humidity cap'])),
});
export type PlaceRange = z.infer<typeof PlaceRange>;

export const judgeRange = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/places/:placeKind/:placeId/range',
  summary:
    'How far a place’s score moves with what is not known for certain: each doubt a pair of its own. Nothing is stored.',
  params: AnyPlaceParams,
  query: OfBrief,
  body: DraftOrSaved,
  response: json(PlaceRange),
  errors: ['wrong_state'],
  allow: 'runs.view',
  limits: severalJudgings,
});

/** A single change of a brief at which the verdict of a place turns. */
export const TurningChange = z.object({
  lever: z.enum(['set-point', 'humidity cap', 'effectiveness', 'stage']),
  /** Where in the brief, such as `caps.roomRhPct`; `stages` for one that is added. */
  path: z.string(),
  label: z.string(),
  from: z.nullable(z.number()),
  to: z.nullable(z.number()),
  unit: z.string(),
  /** The stage that is added. */
  stage: z.nullable(z.string()),
  /** The change in the widths of doubt of the method (1 K, 5 %, 0.05 direct, 0.10 others); null for a stage. */
  size: z.nullable(z.number()),
  /** Score of the place with it. */
  score: z.nullable(z.int()),
});
export type TurningChange = z.infer<typeof TurningChange>;

export const WhatWouldPass = z.object({
  verdict: z.nullable(Verdict),
  /** What fails now: names of tolerances and hard limits, over all the years. */
  failed: z.array(z.string()),
  /** Of each lever the least change that turns the verdict; the least of all first. A stage that is added comes last. */
  changes: z.array(TurningChange),
  /** Why there is none: nothing fails, no tolerance is set, or no single change within bounds turns the verdict. */
  note: z.nullable(z.string()),
  /** How far each lever was moved: "set-point up to 31 °C". */
  bounds: z.array(z.string()),
});
export type WhatWouldPass = z.infer<typeof WhatWouldPass>;

export const findWhatWouldPass = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/places/:placeKind/:placeId/what-would-pass',
  summary:
    'The least single change of set-point, cap, stage or effectiveness that turns a place’s verdict. Nothing is stored.',
  params: AnyPlaceParams,
  query: OfBrief,
  body: DraftOrSaved,
  response: json(WhatWouldPass),
  errors: ['wrong_state'],
  allow: 'runs.view',
  limits: severalJudgings,
});
