import { type AuditEvent, auditActs, type teamAuditKinds } from '../../contract/audit.ts';
import { paths } from '../../lib/paths.ts';

export const kindWords: Readonly<Record<(typeof teamAuditKinds)[number], string>> = {
  people: 'People',
  team: 'The team itself',
  programmes: 'Programmes',
  tokens: 'API tokens',
  weather: 'Weather files',
  stations: 'Stations',
  sites: 'Sites',
  briefs: 'Briefs',
  downloads: 'Downloads',
};

type Subject = AuditEvent['subject'];

/** "Weather file accepted". */
export function actWords(act: string): string {
  return `${act.charAt(0).toUpperCase()}${act.slice(1)}`;
}

const textOf = (subject: Subject, key: string): string | null => {
  const value = subject[key];
  return typeof value === 'string' && value !== '' ? value : null;
};

/** A token that is made or revoked is what such an act is about. */
const ofTokens: readonly string[] = auditActs.tokens;

/** Who did it; of a program, whose token it brought. */
export function whoWords({ person, act, subject }: Pick<AuditEvent, 'person' | 'act' | 'subject'>): string {
  const name = person?.name ?? 'The server';
  return textOf(subject, 'tokenId') === null || ofTokens.includes(act) ? name : `A program, with a token of ${name}`;
}

/** What the act was about: its name where it has one, and its page where there is one. */
export function aboutWords({ subject }: AuditEvent, teamId: string): { name: string | null; to: string | null } {
  const name = textOf(subject, 'name') ?? textOf(subject, 'email') ?? textOf(subject, 'rule');
  const letters = textOf(subject, 'letters');
  return {
    name: letters !== null && name !== null ? `${letters}, ${name}` : (name ?? letters),
    to: pageOf(subject, teamId),
  };
}

function pageOf(subject: Subject, teamId: string): string | null {
  const id = (key: string) => textOf(subject, key);
  const [fileId, stationId, siteId] = [id('fileId'), id('stationId'), id('siteId')];
  const [programmeId, briefId] = [id('programmeId'), id('briefId')];
  if (fileId !== null) return paths.weatherFile.to(teamId, fileId);
  if (stationId !== null) return paths.station.to(teamId, stationId);
  if (siteId !== null && programmeId !== null) return paths.site.to({ teamId, programmeId, siteId });
  if (briefId !== null && programmeId !== null) return paths.brief.to({ teamId, programmeId, briefId });
  return null;
}

export interface SubjectLine {
  readonly label: string;
  readonly text: string;
}

/** Everything that was written down of an act, a line each: "was, latitude: 10". */
export function subjectLines(subject: Subject): readonly SubjectLine[] {
  return linesOf([], subject);
}

function linesOf(path: readonly string[], value: unknown): readonly SubjectLine[] {
  if (Array.isArray(value) && value.every((each) => typeof each !== 'object' || each === null))
    return [{ label: labelOf(path), text: value.length === 0 ? 'none' : value.map(plain).join(', ') }];
  if (typeof value === 'object' && value !== null)
    return Object.entries(value).flatMap(([key, inner]) =>
      linesOf([...path, Array.isArray(value) ? String(Number(key) + 1) : key], inner),
    );
  return [{ label: labelOf(path), text: plain(value) }];
}

function plain(value: unknown): string {
  if (value === null || value === undefined || value === '') return 'none';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return String(value);
}

/** fileId becomes "file id". */
function labelOf(path: readonly string[]): string {
  return path.map((key) => key.replace(/([a-z0-9])([A-Z])/g, (_all, a, b) => `${a} ${b.toLowerCase()}`)).join(', ');
}
