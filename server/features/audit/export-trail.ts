import { Readable } from 'node:stream';
import type { Knex } from 'knex';
import type { AuditFilter } from '#contract/audit.ts';
import { textCell } from '#engine/csv-cell.ts';
import { recordDownload, type Taker } from '../../db/record-download.ts';
import { type AuditEventView, listEventsFrom } from './audit-read-model.ts';

const AT_ONCE = 500;
/** A byte order mark, by which spreadsheets know UTF-8. */
const MARK = '\uFEFF';
const HEADS = ['Place', 'Time (UTC)', 'Person', 'Act', 'About', 'Request', 'Person id', 'Hash before', 'Hash'];

/**
 * The trail of a team as CSV, or as JSON with everything that is hashed, oldest first, in portions as the reader takes them. That it
 * was taken along is written down first, and is the last event of what leaves.
 */
export async function exportTrail(
  db: Knex,
  asked: { teamId: string; filter: AuditFilter; format: 'csv' | 'json'; taker: Taker },
): Promise<{ body: Readable; fileName: string }> {
  const { teamId, filter, format, taker } = asked;
  await recordDownload(db, { teamId, act: 'audit trail downloaded', subject: { format, ...filter }, taker });
  const portions = portionsOf(db, { teamId, filter });
  const body = Readable.from(format === 'csv' ? csvOf(portions) : jsonOf(portions));
  return { body, fileName: `audit-trail.${format}` };
}

async function* portionsOf(
  db: Knex,
  { teamId, filter }: { teamId: string; filter: AuditFilter },
): AsyncGenerator<readonly AuditEventView[]> {
  let after = 0;
  for (;;) {
    const events = await listEventsFrom(db, { teamId, filter, after, limit: AT_ONCE });
    if (events.length > 0) yield events;
    if (events.length < AT_ONCE) return;
    after = events.at(-1)?.position ?? after;
  }
}

async function* csvOf(portions: AsyncIterable<readonly AuditEventView[]>): AsyncGenerator<string> {
  yield `${MARK}${HEADS.join(',')}\r\n`;
  for await (const events of portions) yield events.map(csvLine).join('');
}

function csvLine(event: AuditEventView): string {
  const { position, at, personName, personId, act, subjectText, requestId, previousHash, hash } = event;
  const texts = [at, personName ?? '', act, subjectText, requestId ?? '', personId ?? '', previousHash, hash];
  return `${[String(position), ...texts.map(textCell)].join(',')}\r\n`;
}

/** The subject goes out as PostgreSQL wrote it, since that is what was hashed. */
async function* jsonOf(portions: AsyncIterable<readonly AuditEventView[]>): AsyncGenerator<string> {
  let before = '[\n';
  for await (const events of portions) {
    yield `${before}${events.map(jsonLine).join(',\n')}`;
    before = ',\n';
  }
  yield before === '[\n' ? '[]\n' : '\n]\n';
}

function jsonLine({ subject: _subject, subjectText, ...event }: AuditEventView): string {
  return `${JSON.stringify(event).slice(0, -1)},"subject":${subjectText}}`;
}
