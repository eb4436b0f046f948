import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';
import { BriefBasis, Grade, GradeColumn, ProgrammeParams, ScorePart } from './runs.ts';

/** Of the score, points, over all stations, each estimated from the others alone. */
export const LeaveOneOutError = z.object({
  rootMeanSquare: z.number(),
  meanAbsolute: z.number(),
  bias: z.number(),
  stations: z.int(),
});
export type LeaveOneOutError = z.infer<typeof LeaveOneOutError>;

/** How the figures between stations were made. */
const SurfaceMethod = {
  /** Stations that each estimate rests on, and the power of their distance. */
  neighbours: z.int(),
  power: z.number(),
  /** null: no station can be estimated from the others. */
  error: z.nullable(LeaveOneOutError),
  /** Components whose change with height is told by the stations. */
  withHeight: z.array(z.string()),
};

/** Where cells lie; what follows of the stations alone. Columns are bytes of typed arrays, little-endian, in base64. */
export const SurfaceCells = z.object({
  cells: z.int(),
  /** Between the middles of neighbouring cells, on average. */
  spacingKm: z.number(),
  /** Corners within which the columns tell the middles: uint16, 0 at the lesser end, 65535 at the greater. */
  west: z.number(),
  east: z.number(),
  south: z.number(),
  north: z.number(),
  longitudes: z.string(),
  latitudes: z.string(),
  /** uint8: 2 full, 1 pale, 0 no station near enough (the rim). */
  support: z.string(),
  /** uint32: every three cells that touch one another. */
  triangles: z.string(),
});
export type SurfaceCells = z.infer<typeof SurfaceCells>;

export const Surface = z.object({
  /** The same stations have the same cells. */
  cellsKey: z.string(),
  /** null when the asker holds them already. */
  cells: z.nullable(SurfaceCells),
  /** int16, hundredths of a point of the score; -32768 where there is none. */
  scores: z.string(),
  ...SurfaceMethod,
});
export type Surface = z.infer<typeof Surface>;

/** Why there is no surface stands in `off`. */
export const SurfaceAnswer = z.object({ off: z.nullable(z.string()), surface: z.nullable(Surface) });
export type SurfaceAnswer = z.infer<typeof SurfaceAnswer>;

/** `cellsKey` of the cells that the asker holds. */
const HeldCells = z.optional(z.string().check(z.maxLength(40)));

export const getSurface = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/surface',
  summary: 'The score between stations under a brief of the programme, by cells, with its leave-one-out error.',
  params: ProgrammeParams,
  query: z.strictObject({ brief: z.optional(z.uuid()), held: HeldCells }),
  body: none,
  response: json(SurfaceAnswer),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});

export const judgeSurface = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/surface',
  summary: 'The score between stations under a draft brief: every station is judged anew. Nothing is stored.',
  params: ProgrammeParams,
  query: empty,
  body: json(
    z.strictObject({
      /** The draft; the engine reads it whole and answers every fault at once, each at its path. */
      body: z.record(z.string(), z.unknown()),
      held: HeldCells,
    }),
  ),
  response: json(SurfaceAnswer),
  errors: [],
  allow: 'runs.view',
  limits: { bodyBytes: 192 * 1024, perMinute: 600, seconds: 60 },
});

export const EstimateStation = z.object({
  stationId: z.uuid(),
  name: z.string(),
  score: z.int(),
  distanceKm: z.number(),
  /** Station less place, m; about, since the height of the place is read from the relief. */
  heightDifferenceM: z.number(),
  /** Share in the estimate, %. */
  weightPct: z.number(),
});

export const PlaceEstimate = z.object({
  latitude: z.number(),
  longitude: z.number(),
  /** Read from the relief, approximate; at a station the station's own. */
  elevationM: z.number(),
  atSea: z.boolean(),
  invented: z.boolean(),
  brief: BriefBasis,
  support: z.enum(['full', 'pale', 'none']),
  /** null: nothing is estimated here, `scoreNote` says why. */
  score: z.nullable(z.int()),
  scoreExact: z.nullable(z.number()),
  scoreNote: z.nullable(z.string()),
  words: z.nullable(z.string()),
  parts: z.array(ScorePart),
  /** Nearest first. */
  stations: z.array(EstimateStation),
  grade: Grade,
  gradeColumns: z.array(GradeColumn),
  ...SurfaceMethod,
});
export type PlaceEstimate = z.infer<typeof PlaceEstimate>;

export const getEstimate = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/estimate',
  summary: 'An estimate between stations for any position, with everything that it rests on. Nothing is stored.',
  params: ProgrammeParams,
  query: z.strictObject({
    brief: z.optional(z.uuid()),
    latitude: z.coerce.number().check(z.gte(-90), z.lte(90)),
    longitude: z.coerce.number().check(z.gte(-180), z.lte(180)),
  }),
  body: none,
  response: json(PlaceEstimate),
  errors: [],
  allow: 'runs.view',
  limits: ordinary,
});
