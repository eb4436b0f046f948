import * as z from 'zod/mini';
import { empty, endpoint, file, json, none, ordinary } from './endpoint.ts';
import { ProgrammeParams } from './runs.ts';
import { SiteFilter } from './sites.ts';

/** Rows of one table of sites. */
export const MOST_SITE_ROWS = 50_000;
/** Rows that are sent at once; a table goes in portions. */
export const MOST_ROWS_AT_ONCE = 2_000;
/** Bytes of a portion. */
export const MOST_PORTION_BYTES = 4 * 1024 * 1024;
/** Faults, doubts and duplicates are told up to so many of each, and counted beyond. */
export const MOST_TOLD = 1_000;

const ImportParams = z.strictObject({ teamId: z.uuid(), programmeId: z.uuid(), importId: z.uuid() });

const Cell = z.optional(z.string().check(z.maxLength(6000, 'Use 6,000 characters or fewer in a cell.')));
/** Cells as they are written in the table, by what their column is. */
export const SiteRowCells = z.strictObject({
  name: Cell,
  position: Cell,
  latitude: Cell,
  longitude: Cell,
  elevation: Cell,
  'elevation source': Cell,
  load: Cell,
  station: Cell,
  reason: Cell,
  notes: Cell,
});

export const SiteColumnName = z.keyof(SiteRowCells);

export const SiteImport = z.object({
  id: z.uuid(),
  /** Of the file. */
  name: z.string(),
  status: z.enum(['done', 'undone']),
  sites: z.int(),
  /** Those of its sites that were changed since. */
  changed: z.int(),
  madeBy: z.string(),
  madeAt: z.iso.datetime(),
  undoneBy: z.nullable(z.string()),
  undoneAt: z.nullable(z.iso.datetime()),
});
export type SiteImport = z.infer<typeof SiteImport>;

const RowRemark = z.object({ line: z.int(), column: SiteColumnName, message: z.string() });

export const SiteImportCheck = z.object({
  rows: z.int(),
  /** While there is one, nothing can be imported. */
  faults: z.object({ count: z.int(), told: z.array(RowRemark) }),
  /** At sea, or a height that the relief does not have: imported all the same, and flagged. */
  doubts: z.object({ count: z.int(), told: z.array(RowRemark) }),
  duplicates: z.object({
    count: z.int(),
    told: z.array(
      z.object({
        line: z.int(),
        name: z.string(),
        by: z.enum(['name', 'place']),
        /** "line 12", or "site c, Harbour school". */
        of: z.string(),
      }),
    ),
  }),
  /** Most rows at sea would stand on land with latitude and longitude the other way round. */
  seemsSwapped: z.boolean(),
});
export type SiteImportCheck = z.infer<typeof SiteImportCheck>;

export const startSiteImport = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/site-imports',
  summary: 'Begin to import a table of sites. Nothing of it is a site before it is finished.',
  params: ProgrammeParams,
  query: empty,
  body: json(z.strictObject({ name: z.string().check(z.trim(), z.minLength(1, 'Name the table.'), z.maxLength(200)) })),
  response: json(z.object({ id: z.uuid() })),
  errors: [],
  allow: 'sites.change',
  limits: ordinary,
});

export const addSiteImportRows = endpoint({
  method: 'PUT',
  path: '/api/teams/:teamId/programmes/:programmeId/site-imports/:importId/rows',
  summary: 'Send a portion of the rows; a line that is sent again takes the place of the one before.',
  params: ImportParams,
  query: empty,
  body: json(
    z.strictObject({
      rows: z
        .array(z.strictObject({ line: z.int().check(z.gte(1), z.lte(10_000_000)), cells: SiteRowCells }))
        .check(z.minLength(1, 'Send a row.'), z.maxLength(MOST_ROWS_AT_ONCE, 'Send 2,000 rows at most at once.')),
    }),
  ),
  response: json(z.object({ rows: z.int() })),
  errors: ['wrong_state', 'too_large'],
  allow: 'sites.change',
  limits: { ...ordinary, bodyBytes: MOST_PORTION_BYTES },
});

export const checkSiteImport = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/site-imports/:importId/check',
  summary: 'Check the whole table: every fault, doubt and duplicate, by line and column.',
  params: ImportParams,
  query: empty,
  body: none,
  response: json(SiteImportCheck),
  errors: ['wrong_state'],
  allow: 'sites.change',
  limits: { ...ordinary, perMinute: 120, seconds: 120 },
});

export const finishSiteImport = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/site-imports/:importId/finish',
  summary: 'Make the rows sites, all of them or none.',
  params: ImportParams,
  query: empty,
  body: json(z.strictObject({ duplicates: z.enum(['skip', 'keep']) })),
  response: json(SiteImport),
  errors: ['wrong_state'],
  allow: 'sites.change',
  limits: { ...ordinary, perMinute: 120, seconds: 120 },
});

export const listSiteImports = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/site-imports',
  summary: 'The newest imports of the programme.',
  params: ProgrammeParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(SiteImport) })),
  errors: [],
  allow: 'sites.view',
  limits: ordinary,
});

export const undoSiteImport = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/site-imports/:importId/undo',
  summary: 'Take every site of an import off the programme again.',
  params: ImportParams,
  query: empty,
  body: none,
  response: json(SiteImport),
  errors: ['wrong_state'],
  allow: 'sites.change',
  limits: ordinary,
});

export const exportSites = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/programmes/:programmeId/sites.csv',
  summary: 'The sites as a table that can be imported again, guarded against formulas.',
  params: ProgrammeParams,
  query: z.strictObject({
    text: z.optional(z.string().check(z.trim(), z.maxLength(100))),
    filter: z.optional(SiteFilter),
  }),
  body: none,
  response: file({ mediaType: 'text/csv; charset=utf-8', attachment: true }),
  errors: [],
  allow: 'sites.export',
  limits: { ...ordinary, perMinute: 120 },
});
