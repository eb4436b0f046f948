/**
 * Answers that were made once and are sent again while the team's revision is the same: packed, as they go over the wire. Whether the
 * person may see them is decided before, request by request; the revision is read with the person's standing, before any row of the
 * team, so that an answer is never older than its revision.
 */
import { promisify } from 'node:util';
import { gzip } from 'node:zlib';
import type { Request, Response } from 'express';
import type { Identity } from './request-state.ts';

const pack = promisify(gzip);

/** Some forty maps of ten thousand sites, or thousands of ordinary ones. */
const KEPT_BYTES = 64 * 1024 * 1024;

interface Kept {
  readonly revision: string;
  /** One that is still being made serves whoever asks meanwhile. */
  readonly packed: Promise<Buffer>;
  bytes: number;
}

export interface KeptAnswers {
  /** Null where there is none of this revision. */
  find(key: string, revision: string): Promise<Buffer> | null;
  get(key: string, revision: string, make: () => Promise<string>): Promise<Buffer>;
}

/** @param most bytes that are held; those that were not asked for the longest go first */
export function makeKeptAnswers(most = KEPT_BYTES): KeptAnswers {
  const kept = new Map<string, Kept>();
  let held = 0;
  const drop = (key: string, one: Kept | undefined) => {
    if (one === undefined || kept.get(key) !== one) return;
    kept.delete(key);
    held -= one.bytes;
  };
  const find = (key: string, revision: string) => {
    const found = kept.get(key);
    if (found?.revision !== revision) return null;
    kept.delete(key);
    kept.set(key, found);
    return found.packed;
  };
  return {
    find,
    get(key, revision, make) {
      const found = find(key, revision);
      if (found !== null) return found;
      drop(key, kept.get(key));
      const one: Kept = { revision, bytes: 0, packed: make().then((text) => pack(text)) };
      kept.set(key, one);
      one.packed.then(
        ({ length }) => {
          if (kept.get(key) !== one) return;
          one.bytes = length + key.length;
          held += one.bytes;
          for (const [oldest, other] of kept) if (held > most) drop(oldest, other);
        },
        () => drop(key, one),
      );
      return one.packed;
    },
  };
}

const HEADERS = Object.entries({
  'Cache-Control': 'no-store',
  'Content-Type': 'application/json; charset=utf-8',
  'Content-Encoding': 'gzip',
  Vary: 'Accept-Encoding',
});

/** As every browser says it; whoever is choosier is answered in the ordinary way. */
function takesGzip({ headers }: Request): boolean {
  return /(^|[,\s])gzip\s*(,|$)/.test(String(headers['accept-encoding'] ?? ''));
}

interface Asked {
  readonly request: Request;
  readonly identity: Identity;
}

/** The answer to a request that is kept, or being made; null where it is to be made. */
export function keptFor(kept: KeptAnswers, asked: Asked): Promise<Buffer> | null {
  const revision = revisionFor(asked);
  return revision === null ? null : kept.find(asked.request.originalUrl, revision);
}

/** Makes an answer that is kept from then on; null where this one is made and sent as any other. */
export function keep(kept: KeptAnswers, asked: Asked, make: () => Promise<string>): Promise<Buffer> | null {
  const revision = revisionFor(asked);
  return revision === null ? null : kept.get(asked.request.originalUrl, revision, make);
}

/** Of the team that the path names; null for a program and for a client that does not take it packed. */
function revisionFor({ request, identity: { actor } }: Asked): string | null {
  if (actor.kind !== 'person' || !takesGzip(request)) return null;
  return actor.revisions.get(String(request.params.teamId).toLowerCase()) ?? null;
}

export function sendPacked(response: Response, packed: Buffer): void {
  for (const [name, value] of HEADERS) response.setHeader(name, value);
  response.setHeader('Content-Length', packed.length);
  response.end(packed);
}
