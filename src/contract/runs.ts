import * as z from 'zod/mini';
import { endpoint, json, none, ordinary } from './endpoint.ts';
import { FileStatus } from './weather.ts';

export const ProgrammeParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid() });

/** Which of the programme's briefs; without one, the brief that was saved last. */
export const OfBrief = z.strictObject({ brief: z.optional(z.uuid()) });

export const HourClass = z.enum([
  'closed',
  'missing',
  'idle',
  'frozen',
  'damp',
  'air',
  'direct',
  'indirect',
  'dewpoint',
  'twostage',
  'short',
  'beyond',
]);

export const Grade = z.enum(['A', 'B', 'C', 'D']);
export type Grade = z.infer<typeof Grade>;

export const Verdict = z.enum(['meets the brief', 'does not', 'no tolerance set']);
export type Verdict = z.infer<typeof Verdict>;

/** Brief, weather and method that a number rests on; a number never stands without it. */
export const BriefBasis = z.object({
  briefId: z.uuid(),
  briefVersionId: z.uuid(),
  name: z.string(),
  version: z.int(),
  preset: z.string(),
  /** The requirement in one sentence. */
  sentence: z.string(),
  methodVersion: z.string(),
});
export type BriefBasis = z.infer<typeof BriefBasis>;

/** One component of the score with its arithmetic: s = clamp(100 (raw - a0) / (a100 - a0)), points = s x weight / 100. */
export const ScorePart = z.object({
  component: z.string(),
  label: z.string(),
  unit: z.string(),
  /** null: not applicable; its weight is shared over the others. */
  raw: z.nullable(z.number()),
  a0: z.number(),
  a100: z.number(),
  normalised: z.nullable(z.number()),
  /** Weight after sharing, of 100. */
  weight: z.number(),
  points: z.nullable(z.number()),
});
export type ScorePart = z.infer<typeof ScorePart>;

export const GateAnswer = z.object({
  gate: z.string(),
  answer: z.enum(['pass', 'fail', 'not known']),
  note: z.string(),
});
export type GateAnswer = z.infer<typeof GateAnswer>;

/** One tolerance of the brief against what was found. */
export const ToleranceAnswer = z.object({
  tolerance: z.string(),
  found: z.number(),
  allowed: z.number(),
  unit: z.string(),
  holds: z.boolean(),
});
export type ToleranceAnswer = z.infer<typeof ToleranceAnswer>;

export const Ledger = z.object({
  hours: z.int(),
  classes: z.record(HourClass, z.int()),
  /** `damp` split by reason. */
  dampOutside: z.int(),
  dampPlant: z.int(),
  demand: z.int(),
  met: z.int(),
});
export type Ledger = z.infer<typeof Ledger>;

export const PlaceYear = z.object({
  runId: z.uuid(),
  weatherFileId: z.uuid(),
  kind: z.enum(['typical', 'actual', 'derived']),
  year: z.nullable(z.int()),
  hours: z.int(),
  score: z.nullable(z.int()),
});

/** What a run came to, for years beside one another. */
export const YearFigures = z.object({
  runId: z.uuid(),
  demand: z.int(),
  met: z.int(),
  /** Of the year by itself; null: excluded or without demand. */
  score: z.nullable(z.int()),
  verdict: Verdict,
  severityKh: z.number(),
  worstSpellHours: z.int(),
  makeUpLitres: z.number(),
});
export type YearFigures = z.infer<typeof YearFigures>;

/** A derived year beside the year that it was made of; in no figure of the place. */
export const DerivedPlaceYear = z.object({
  weatherFileId: z.uuid(),
  name: z.string(),
  /** The change in a phrase. */
  words: z.string(),
  figures: YearFigures,
  parent: z.object({
    weatherFileId: z.uuid(),
    kind: z.enum(['typical', 'actual']),
    year: z.nullable(z.int()),
    /** Another than `accepted`: it no longer counts, and has no figures here. */
    status: FileStatus,
    figures: z.nullable(YearFigures),
  }),
});
export type DerivedPlaceYear = z.infer<typeof DerivedPlaceYear>;

export const GradeColumn = z.object({ column: z.string(), grade: Grade, reason: z.string() });

export const YearlyMoney = z.object({
  currency: z.string(),
  plant: z.number(),
  reference: z.number(),
  saving: z.number(),
  /** Years; null where the brief gives no extra capital. */
  payback: z.nullable(z.union([z.number(), z.enum(['never', 'at once'])])),
  notes: z.array(z.string()),
});
export type YearlyMoney = z.infer<typeof YearlyMoney>;

export const YearlyCarbon = z.object({
  plantKg: z.number(),
  referenceKg: z.number(),
  savedKg: z.number(),
  /** Where the grid factor comes from. */
  source: z.string(),
});

/** A run as it is shown: its ledger and what follows from it, with the score that stands beside it. */
export const ShownRun = z.object({
  runId: z.uuid(),
  ledger: Ledger,
  verdict: Verdict,
  tolerances: z.array(ToleranceAnswer),
  gates: z.array(GateAnswer),
  score: z.nullable(z.int()),
  scoreNote: z.nullable(z.string()),
  scoreExact: z.nullable(z.number()),
  geometricMean: z.nullable(z.number()),
  words: z.nullable(z.string()),
  parts: z.array(ScorePart),
  worstSpell: z.nullable(
    z.object({
      hours: z.int(),
      start: z.string(),
      end: z.string(),
      severityKh: z.number(),
      worstK: z.number(),
      cutAtJoint: z.boolean(),
    }),
  ),
  severityKh: z.number(),
  /** Per kW of design load. */
  water: z.object({
    makeUpLitres: z.number(),
    litresPerKwh: z.nullable(z.number()),
    peakDayLitres: z.number(),
    peakDay: z.nullable(z.string()),
  }),
  /** null: not applicable, as for turbine inlets. */
  electricity: z.nullable(
    z.object({
      kwh: z.number(),
      referenceKwh: z.number(),
      savedPct: z.nullable(z.number()),
      peakKw: z.number(),
      referencePeakKw: z.number(),
    }),
  ),
  /** Of a year, per kW of design load; null with the reason in `moneyNote`. */
  money: z.nullable(YearlyMoney),
  moneyNote: z.nullable(z.string()),
  carbon: z.nullable(YearlyCarbon),
  cautions: z.array(z.string()),
});
export type ShownRun = z.infer<typeof ShownRun>;

/** One run by itself, for comparing: the score and its parts are those of its own year. */
export const RunRecord = z.object({
  runId: z.uuid(),
  station: z.object({ id: z.uuid(), name: z.string() }),
  weatherFileId: z.uuid(),
  fileName: z.string(),
  kind: z.enum(['typical', 'actual', 'derived']),
  year: z.nullable(z.int()),
  heightM: z.number(),
  heightAdjusted: z.boolean(),
  brief: z.object({ name: z.string(), version: z.int() }),
  methodVersion: z.string(),
  shown: ShownRun,
  /** Demand hours by supply temperature, ascending bins of 1 K without a gap. */
  supplyCurve: z.array(z.object({ fromC: z.number(), hours: z.int() })),
});
export type RunRecord = z.infer<typeof RunRecord>;

export const getRun = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/runs/:runId',
  summary: 'One weather year judged by one brief version, with its own score and its supply temperatures.',
  params: z.strictObject({ teamId: z.uuid(), runId: z.uuid() }),
  query: z.strictObject({}),
  body: none,
  response: json(RunRecord),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
