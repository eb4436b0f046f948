import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { HourClass } from './runs.ts';

/** What the plant does at one design point, per kW of design load. */
export const DesignState = z.object({
  hourClass: HourClass,
  /** The stage that runs; null when a tower stands. */
  running: z.nullable(z.string()),
  /** Of a tower the cold water, else the air. */
  supplyC: z.number(),
  /** Cooling delivered without back-up. */
  capacityKw: z.number(),
  backUpKw: z.number(),
  makeUpLitresPerH: z.number(),
  /** At the density of the entering outdoor air; null for a tower. */
  airflowLPerS: z.nullable(z.number()),
});

export const DesignPoints = z.object({
  /** What the points follow: the dry bulb with its mean coincident wet bulb, or of a tower the other way round. */
  follows: z.enum(['dry bulb', 'wet bulb']),
  /** None for a year whose pressure is nowhere known. */
  points: z.array(
    z.object({
      /** Share of the hours of the year in which the value is passed, %. */
      percent: z.number(),
      dryBulbC: z.number(),
      wetBulbC: z.number(),
      /** null: no demand at this point. */
      state: z.nullable(DesignState),
    }),
  ),
  /** Why the points are not for sizing; null for an actual year. */
  caution: z.nullable(z.string()),
});
export type DesignPoints = z.infer<typeof DesignPoints>;

export const getDesignPoints = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/runs/:runId/design-points',
  summary:
    'What the plant of a run does at the design values of its year: state, airflow, capacity, back-up and water.',
  params: z.strictObject({ teamId: z.uuid(), runId: z.uuid() }),
  query: z.strictObject({}),
  body: none,
  response: json(DesignPoints),
  errors: ['wrong_state'],
  allow: 'runs.view',
  limits: ordinary,
});
