/** The audit trail of a team: who did what to what, and when, so that nobody can change it unseen. */
import * as z from 'zod/mini';
import { endpoint, file, json, none, ordinary } from './endpoint.ts';

/** Every act that the trail knows, by what it concerns; one that is not here cannot be recorded. */
export const auditActs = {
  people: [
    ...['person invited', 'invitation sent again', 'invitation revoked', 'invitation accepted', 'member changed'],
    ...['member removed', 'team left', 'sessions of a member ended'],
  ],
  team: [
    ...['team made', 'team set up', 'team renamed', 'demo seeded', 'team export asked for', 'team export made'],
    ...['team deletion asked for', 'team deletion stopped', 'team deleted'],
  ],
  programmes: ['programme made', 'programme renamed', 'programme opened to'],
  tokens: ['token made', 'token revoked'],
  weather: [
    ...['weather file uploaded', 'weather file answered', 'weather file accepted', 'weather file refused'],
    ...['weather file withdrawn', 'weather file superseded', 'weather file tried again', 'weather year derived'],
    ...['licence of a weather file set', 'weather archive uploaded', 'weather archive tried again'],
    ...['weather batch begun', 'weather batch paused', 'weather batch resumed', 'weather batch cancelled'],
  ],
  stations: ['station moved', 'stations merged', 'rule switched off', 'rule switched on'],
  sites: [
    ...['site made', 'site changed', 'site moved', 'site duty set', 'sites removed', 'sites imported'],
    'site import undone',
  ],
  briefs: ['brief made', 'brief version saved'],
  downloads: [
    ...['original downloaded', 'hours of a run downloaded', 'sites downloaded', 'audit trail downloaded'],
    'team export downloaded',
  ],
  accounts: [
    ...['signed in', 'signed in with a recovery code', 'sign-in refused', 'sign-in code refused', 'signed out'],
    ...['session ended', 'other sessions ended', 'password changed', 'password reset asked', 'password reset'],
    ...['e-mail change asked', 'e-mail changed', 'person renamed', 'notices chosen', 'recovery codes renewed'],
    ...['two-factor sign-in begun', 'two-factor sign-in ended'],
  ],
} as const;

export type AuditKind = keyof typeof auditActs;
export type AuditAct = (typeof auditActs)[AuditKind][number];

/** Kinds that a team's chain holds; what concerns accounts stands in the chain outside of teams. */
export const teamAuditKinds = [
  ...(['people', 'team', 'programmes', 'tokens', 'weather', 'stations', 'sites', 'briefs', 'downloads'] as const),
] as const satisfies readonly AuditKind[];

const TeamParams = z.strictObject({ teamId: z.uuid() });
const Day = z.iso.date('Give a day as year-month-day, such as 2027-03-31.');

const filterFields = {
  /** First and last day, in UTC, both included. */
  from: z.optional(Day),
  until: z.optional(Day),
  personId: z.optional(z.uuid()),
  kind: z.optional(z.enum(teamAuditKinds)),
  /** Part of a name, or an id, of what the act was about. */
  object: z.optional(z.string().check(z.trim(), z.maxLength(200))),
};
export const AuditFilter = z.strictObject(filterFields);
export type AuditFilter = z.infer<typeof AuditFilter>;

export const AuditEvent = z.object({
  /** Place in the chain, counted from 1. */
  position: z.int(),
  at: z.iso.datetime({ precision: 6 }),
  /** null: the server itself, or a person nobody knows. */
  person: z.nullable(z.object({ id: z.uuid(), name: z.string() })),
  act: z.string(),
  subject: z.record(z.string(), z.unknown()),
  requestId: z.nullable(z.string()),
  hash: z.string(),
});
export type AuditEvent = z.infer<typeof AuditEvent>;

export const listAuditEvents = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/audit-events',
  summary: "The team's audit trail, filtered, newest first, a page at a time.",
  params: TeamParams,
  query: z.strictObject({
    ...filterFields,
    /** Events before this place in the chain. */
    before: z.optional(z.coerce.number().check(z.int(), z.gte(1))),
    limit: z._default(z.coerce.number().check(z.int(), z.gte(1), z.lte(200)), 50),
  }),
  body: none,
  response: json(
    z.object({
      items: z.array(AuditEvent),
      /** `before` of the next page; null at the end. */
      next: z.nullable(z.int()),
      /** Everybody who stands in the team's trail, by name. */
      people: z.array(z.object({ id: z.uuid(), name: z.string() })),
      /** Events of the whole chain, and the hash of its last; null while it is empty. */
      chain: z.nullable(z.object({ events: z.int(), hash: z.string() })),
    }),
  ),
  errors: [],
  allow: 'audit.view',
  limits: ordinary,
});

const downloading = { ...ordinary, perMinute: 20, seconds: 300 };

export const exportAuditCsv = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/audit-events.csv',
  summary: "The team's audit trail as CSV, filtered, oldest first.",
  params: TeamParams,
  query: AuditFilter,
  body: none,
  response: file({ mediaType: 'text/csv; charset=utf-8', attachment: true }),
  errors: [],
  allow: 'audit.view',
  limits: downloading,
});

export const exportAuditJson = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/audit-events.json',
  summary: "The team's audit trail as JSON with every hash, filtered, oldest first.",
  params: TeamParams,
  query: AuditFilter,
  body: none,
  response: file({ mediaType: 'application/json', attachment: true }),
  errors: [],
  allow: 'audit.view',
  limits: downloading,
});
