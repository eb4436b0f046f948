/**
 * Answers that were made once and are sent again while the team's revision is the same: packed, as they go over the wire. Whether the
 * person may see them is decided before, request by request; the revision is read with the person's standing, before any row of the
 * team, so that an answer is never older than its revision.
 */
import { promisify } from 'node:util';
import { gzip } from 'node:zlib';
import type { Request, Response } from 'express';
import type { Endpoint } from '#contract/endpoint.ts';
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
  return {
    get(key, revision, make) {
      const found = kept.get(key);
      if (found?.revision === revision) {
        kept.delete(key);
        kept.set(key, found);
        return found.packed;
      }
      drop(key, found);
      const one: Kept = { revision, bytes: 0, packed: make().then((text) => pack(text)) };
      kept.set(key, one);
      one.packed.then(
        ({ length }) => {
          if (kept.get(key) !== one) return;
          one.bytes = length;
          held += length;
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

/** Sends the answer that is kept, or makes it. @returns false where it is to be made and sent as any other */
export async function sendKept(
  passage: {
    readonly kept: KeptAnswers | null;
    readonly endpoint: Endpoint;
    readonly request: Request;
    readonly response: Response;
    readonly identity: Identity;
    readonly signal: AbortSignal;
  },
  { input, text }: { input: unknown; text: () => Promise<string> },
): Promise<boolean> {
  const { kept, endpoint, request, response, identity, signal } = passage;
  const { actor } = identity;
  if (kept === null || actor.kind !== 'person' || !takesGzip(request)) return false;
  const teamId = String(request.params.teamId).toLowerCase();
  const revision = actor.revisions.get(teamId);
  if (revision === undefined) return false;
  const packed = await kept.get(`${endpoint.path} ${JSON.stringify(input)}`, revision, text);
  if (response.headersSent || signal.aborted) return true;
  for (const [name, value] of HEADERS) response.setHeader(name, value);
  response.setHeader('Content-Length', packed.length);
  response.end(packed);
  return true;
}
