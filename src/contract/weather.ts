import * as z from 'zod/mini';
import { empty, endpoint, file, json, none, ordinary, upload } from './endpoint.ts';
import { AnswersBody, StatedPlaceBody, TableMappingBody } from './weather-answers.ts';
import { ClimateDifference, HumidityRule, MonthlyChange } from './weather-change.ts';

const TeamParams = z.strictObject({ teamId: z.uuid() });
const FileParams = z.strictObject({ teamId: z.uuid(), fileId: z.uuid() });

export const FileStatus = z.enum(['reading', 'asks', 'review', 'accepted', 'refused', 'withdrawn', 'superseded']);
export type FileStatus = z.infer<typeof FileStatus>;

/** The steps of reading, in order; null once reading has ended. */
export const ReadingStep = z.enum(['received', 'reading', 'reducing', 'storing']);
export type ReadingStep = z.infer<typeof ReadingStep>;

export const Severity = z.enum(['note', 'repair', 'doubt', 'ask', 'refuse']);
export type Severity = z.infer<typeof Severity>;

export const Finding = z.object({
  code: z.string(),
  severity: Severity,
  /** First line of the file that it concerns, counted from 1; null when it concerns the whole file. */
  line: z.nullable(z.int()),
  column: z.nullable(z.int()),
  /** Last line that it concerns. */
  lastLine: z.nullable(z.int()),
  /** Hours or rows concerned. */
  count: z.int(),
  /** What of an hour it concerns; null when no one variable. */
  variable: z.nullable(z.string()),
  /** What was done, in a few words; null where the message alone says it. */
  done: z.nullable(z.string()),
  message: z.string(),
});
export type Finding = z.infer<typeof Finding>;

/** What a file that `asks` wants to know before it can be accepted. */
export const Ask = z.object({ what: z.string(), message: z.string(), proposal: z.nullable(z.string()) });
export type Ask = z.infer<typeof Ask>;

/** The place that the file itself declares; null is what it does not say (the file then asks). */
export const DeclaredStation = z.object({
  name: z.string(),
  latitude: z.nullable(z.number()),
  longitude: z.nullable(z.number()),
  elevationM: z.nullable(z.number()),
  utcOffsetH: z.nullable(z.number()),
  wmoNumber: z.nullable(z.string()),
});
export type DeclaredStation = z.infer<typeof DeclaredStation>;

/** The measured year that a derived one was made of. */
const ParentYear = z.object({
  fileId: z.uuid(),
  name: z.string(),
  kind: z.enum(['typical', 'actual']),
  year: z.nullable(z.int()),
  /** Another than `accepted`: the parent no longer counts. */
  status: FileStatus,
});
export type ParentYear = z.infer<typeof ParentYear>;

export const WeatherFile = z.object({
  id: z.uuid(),
  name: z.string(),
  bytes: z.int(),
  /** SHA-256 of the original bytes, hexadecimal. */
  fingerprint: z.string(),
  format: z.nullable(z.string()),
  status: FileStatus,
  step: z.nullable(ReadingStep),
  /** Why reading stopped for a fault of ours; null otherwise. */
  failure: z.nullable(z.string()),
  uploadedBy: z.string(),
  uploadedAt: z.iso.datetime(),
  batchId: z.nullable(z.uuid()),
  /** Which year or station of a file that holds several; empty when it holds one. */
  part: z.string(),
  station: z.nullable(DeclaredStation),
  /** The station that accepting made or found. */
  stationId: z.nullable(z.uuid()),
  kind: z.nullable(z.enum(['typical', 'actual', 'derived'])),
  year: z.nullable(z.int()),
  /** Share of slots with dry bulb, humidity and pressure, %. */
  completePct: z.nullable(z.number()),
  licence: z.enum(['open', 'attribution', 'non-commercial', 'no redistribution', 'unknown']),
  attribution: z.nullable(z.string()),
  findingCounts: z.object({ note: z.int(), repair: z.int(), doubt: z.int(), ask: z.int(), refuse: z.int() }),
  /** Of a derived year, which is always shown with its parent; else null. */
  parent: z.nullable(ParentYear),
});
export type WeatherFile = z.infer<typeof WeatherFile>;

const DesignRow = z.object({ percent: z.number(), valueC: z.number(), coincidentC: z.number() });

/** What the weather year was reduced to. */
export const YearFacts = z.object({
  hours: z.int(),
  measured: z.int(),
  estimated: z.int(),
  repaired: z.int(),
  missing: z.int(),
  /** Hours whose pressure is the standard atmosphere at the elevation. */
  assumedPressure: z.int(),
  belowZero: z.enum(['water', 'ice']),
  meanDryBulbC: z.number(),
  /** null while neither pressure nor elevation is known, so that no hour has a wet bulb. */
  meanWetBulbC: z.nullable(z.number()),
  maxDepressionK: z.nullable(z.number()),
  /** Hours with a depression of at least K kelvin, K = 1..25. */
  depressionHours: z.array(z.object({ atLeastK: z.int(), hours: z.int() })),
  /** Mean depression, K, by month (12) and hour of day (24); null where no hour is known. */
  meanDepressionK: z.array(z.array(z.nullable(z.number()))),
  /** Share of hours present, %, by month. */
  monthCompletePct: z.array(z.number()),
  design: z.object({ dryBulb: z.array(DesignRow), wetBulb: z.array(DesignRow), dewPoint: z.array(DesignRow) }),
});
export type YearFacts = z.infer<typeof YearFacts>;

const SampleRow = z.object({
  line: z.int(),
  time: z.nullable(z.string()),
  dryBulbC: z.nullable(z.number()),
  dewPointC: z.nullable(z.number()),
  relativeHumidityPct: z.nullable(z.number()),
  wetBulbC: z.nullable(z.number()),
  pressurePa: z.nullable(z.number()),
});

/** A guess at what a table holds, for a person to confirm or correct. */
export const TableGuess = z.object({
  shapeKey: z.string(),
  mapping: z.nullable(TableMappingBody),
  questions: z.array(z.object({ about: z.string(), message: z.string() })),
  columns: z.array(z.object({ name: z.string(), unit: z.string(), cells: z.array(z.string()) })),
  sample: z.array(SampleRow),
  stepMin: z.nullable(z.number()),
});
export type TableGuess = z.infer<typeof TableGuess>;

/** As `FileAnswers`, which a person sends: the parts that a form shows again. */
const FileAnswersAsKept = z.object({
  place: z.exactOptional(StatedPlaceBody),
  mapping: z.exactOptional(TableMappingBody),
  answers: z.exactOptional(AnswersBody),
  keepSuspect: z.exactOptional(z.boolean()),
  fillLongGaps: z.exactOptional(z.boolean()),
  rulesOff: z.exactOptional(z.array(z.object({ rule: z.string(), reason: z.string() }))),
});

export const WeatherFileRecord = z.object({
  file: WeatherFile,
  findings: z.array(Finding),
  asks: z.array(Ask),
  /** What a table seems to hold, until somebody confirms it; null for every other file. */
  table: z.nullable(TableGuess),
  /** What people have answered of the file. */
  answers: FileAnswersAsKept,
  /** Text of the file about its licence or source, as it stands. */
  comments: z.nullable(z.string()),
  /** Why a person refused it, withdrew it, or which file took its place; null otherwise. */
  decision: z.nullable(
    z.object({
      by: z.string(),
      at: z.iso.datetime(),
      reason: z.nullable(z.string()),
      otherFileId: z.nullable(z.uuid()),
    }),
  ),
  /** Other station-years of the same upload. */
  parts: z.array(z.object({ fileId: z.uuid(), part: z.string(), status: FileStatus })),
  acceptedBy: z.nullable(z.string()),
  facts: z.nullable(YearFacts),
  /** How a derived year was made of its parent, and what became of it; else null. */
  derivation: z.nullable(
    z.object({
      humidityRule: HumidityRule,
      /** January first. */
      monthly: z.array(MonthlyChange),
      /** Hours whose humidity would have passed saturation and was held there. */
      cappedHours: z.int(),
      difference: ClimateDifference,
    }),
  ),
  /** Derived years that were made of this one, newest first. */
  children: z.array(z.object({ fileId: z.uuid(), name: z.string(), status: FileStatus })),
});
export type WeatherFileRecord = z.infer<typeof WeatherFileRecord>;

/** Largest plain file that is taken. */
export const MAX_FILE_BYTES = 64 * 1024 * 1024;

export const uploadWeatherFile = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/weather-files',
  summary:
    'Upload one hourly weather file, into a batch or by itself; it is read in the background. The same bytes again answer the file that is there.',
  params: TeamParams,
  query: z.strictObject({ batchId: z.optional(z.uuid()) }),
  body: upload({ maxFiles: 1, maxBytes: MAX_FILE_BYTES }),
  response: json(z.object({ file: WeatherFile, known: z.boolean() })),
  errors: ['too_large', 'unreadable_body', 'unsupported_format', 'wrong_state'],
  allow: 'weather.upload',
  limits: { bodyBytes: MAX_FILE_BYTES, perMinute: 600, seconds: 300 },
});

export const getWeatherFile = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-files/:fileId',
  summary: 'One weather file with its findings and what its year was reduced to.',
  params: FileParams,
  query: empty,
  body: none,
  response: json(WeatherFileRecord),
  errors: [],
  allow: 'weather.view',
  limits: ordinary,
});

export const getOriginal = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/weather-files/:fileId/original',
  summary: 'The original bytes as they were uploaded.',
  params: FileParams,
  query: empty,
  body: none,
  response: file({ mediaType: 'application/octet-stream', attachment: true }),
  errors: [],
  allow: 'weather.original',
  limits: { ...ordinary, perMinute: 60, seconds: 120 },
});
