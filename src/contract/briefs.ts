import * as z from 'zod/mini';
import { BriefBody, BriefDraft } from './brief-body.ts';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { GateAnswer, Ledger, ScorePart, ToleranceAnswer, Verdict } from './runs.ts';

const ProgrammeParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid() });
const BriefParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), briefId: z.uuid() });
const VersionNumber = z.coerce.number().check(z.int(), z.positive());

export const Preset = z.object({
  id: z.string(),
  name: z.string(),
  /** What it is for, and where its limits come from. */
  use: z.string(),
  source: z.string(),
  sentence: z.string(),
  body: BriefBody,
});
export type Preset = z.infer<typeof Preset>;

export const BriefVersionView = z.object({
  briefId: z.uuid(),
  name: z.string(),
  versionId: z.uuid(),
  version: z.int(),
  /** SHA-256 of the body as it is written canonically. */
  hash: z.string(),
  preset: z.string(),
  presetName: z.string(),
  sentence: z.string(),
  madeBy: z.string(),
  madeAt: z.iso.datetime(),
  /** Where it is used: stations with a year judged by it under this release's method, and those that wait. */
  stationsJudged: z.int(),
  stationsPending: z.int(),
});
export type BriefVersionView = z.infer<typeof BriefVersionView>;

export const BriefVersionRecord = z.object({
  version: BriefVersionView,
  /** The number of the brief's newest version; only that one is judged when weather comes. */
  newest: z.int(),
  body: BriefBody,
  stations: z.array(z.object({ id: z.uuid(), name: z.string(), judged: z.boolean() })),
});
export type BriefVersionRecord = z.infer<typeof BriefVersionRecord>;

/** One field that differs, in words with units. */
export const BriefChange = z.object({
  path: z.string(),
  label: z.string(),
  before: z.string(),
  after: z.string(),
});
export type BriefChange = z.infer<typeof BriefChange>;

export const listPresets = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/presets',
  summary: 'The briefs to start from, with their sources.',
  params: z.strictObject({ teamId: z.uuid() }),
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(Preset) })),
  errors: [],
  allow: 'briefs.view',
  limits: ordinary,
});

export const listBriefs = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs',
  summary: 'The programme’s briefs, each by its newest version, the one saved last first.',
  params: ProgrammeParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(BriefVersionView) })),
  errors: [],
  allow: 'briefs.view',
  limits: ordinary,
});

export const makeBrief = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs',
  summary: 'Make a brief from a preset. Every accepted year of the team is judged by it.',
  params: ProgrammeParams,
  query: empty,
  body: json(
    z.strictObject({
      name: z
        .string()
        .check(z.trim(), z.minLength(1, 'Type a name.'), z.maxLength(120, 'Use 120 characters or fewer.')),
      preset: z.string().check(z.minLength(1, 'Choose a preset.'), z.maxLength(60)),
    }),
  ),
  response: json(BriefVersionView),
  errors: ['wrong_state'],
  allow: 'briefs.change',
  limits: { ...ordinary, perMinute: 60 },
});

export const listBriefVersions = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs/:briefId/versions',
  summary: 'Every version of a brief, newest first.',
  params: BriefParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(BriefVersionView) })),
  errors: [],
  allow: 'briefs.view',
  limits: ordinary,
});

export const getBriefVersion = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs/:briefId/versions/:version',
  summary: 'One version of a brief: every field, who made it and when, and where it is used.',
  params: z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), briefId: z.uuid(), version: VersionNumber }),
  query: empty,
  body: none,
  response: json(BriefVersionRecord),
  errors: [],
  allow: 'briefs.view',
  limits: ordinary,
});

export const compareBriefVersions = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs/:briefId/difference',
  summary: 'What changed between two versions of a brief.',
  params: BriefParams,
  query: z.strictObject({ from: VersionNumber, to: VersionNumber }),
  body: none,
  response: json(z.object({ from: z.int(), to: z.int(), changes: z.array(BriefChange) })),
  errors: [],
  allow: 'briefs.view',
  limits: ordinary,
});

export const saveBriefVersion = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs/:briefId/versions',
  summary: 'Save a new version of a brief. The body of the newest version makes none and is answered by that version.',
  params: BriefParams,
  query: empty,
  body: json(z.strictObject({ basedOn: z.int().check(z.positive()), body: BriefDraft })),
  response: json(z.object({ version: BriefVersionView, made: z.boolean() })),
  errors: ['wrong_state'],
  allow: 'briefs.change',
  limits: { ...ordinary, perMinute: 60 },
});

export const BriefPreview = z.object({
  station: z.object({ id: z.uuid(), name: z.string() }),
  kind: z.enum(['typical', 'actual', 'derived']),
  year: z.nullable(z.int()),
  ledger: Ledger,
  verdict: Verdict,
  tolerances: z.array(ToleranceAnswer),
  gates: z.array(GateAnswer),
  score: z.nullable(z.int()),
  scoreNote: z.nullable(z.string()),
  words: z.nullable(z.string()),
  parts: z.array(ScorePart),
  /** One byte a slot, the position of its class in the list of classes; base64. */
  hourClasses: z.string(),
});
export type BriefPreview = z.infer<typeof BriefPreview>;

export const previewBrief = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/briefs/preview',
  summary: 'Judge one example year of a station by a draft. Nothing is stored.',
  params: ProgrammeParams,
  query: empty,
  body: json(z.strictObject({ stationId: z.uuid(), body: BriefDraft })),
  response: json(BriefPreview),
  errors: [],
  allow: 'briefs.view',
  limits: { ...ordinary, perMinute: 300 },
});
