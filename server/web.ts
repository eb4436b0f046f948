import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { createApp, makeWebThreads, makeWebYearThread } from './app.ts';
import type { Config } from './config.ts';
import type { Deps } from './deps.ts';
import { deleteExpiredSessions } from './features/accounts/account-store.ts';
import { deleteOldFailures } from './features/accounts/failure-store.ts';
import { UPLOAD_PREFIX } from './http/hashing-storage.ts';
import { deleteRequestCountsBefore } from './http/request-counts-store.ts';
import { deleteKeyMailsBefore } from './mail/mail-store.ts';
import { removeStale } from './storage/remove-stale.ts';

/** Somebody else listens where we should. */
export class PortTakenError extends Error {
  override readonly name = 'PortTakenError';
  readonly port: number;

  constructor({ host, port }: { host: string; port: number }) {
    super(`Port ${port} on ${host} is taken by another program. Set PORT to a free one.`);
    this.port = port;
  }
}

export interface Web {
  /** Where a browser on this machine finds it. */
  readonly url: string;
  /** Takes nothing new, ends event streams, lets running requests finish for a while, then cuts them. */
  close(): Promise<void>;
}

/** Headers that take longer than this to arrive come from nobody who wants an answer. */
const HEADERS_MS = 15_000;
/** Beyond the longest `seconds` of any endpoint (1,800 s for an archive), which answers first. */
const REQUEST_MS = 1_820_000;
/** A connection on which nothing moves for this long is cut; event streams beat more often. */
const SILENT_CONNECTION_MS = 120_000;
const FINISH_WITHIN_MS = 10_000;
const TIDY_EVERY_MS = 10 * 60_000;
/** Counts of minutes, and uploads of requests, that are long over. */
const KEPT_MS = 60 * 60_000;
/** Longer than any key in a mail holds. */
const KEY_MAILS_KEPT_MS = 15 * 24 * 60 * 60_000;

export async function startWeb({
  config,
  deps,
}: {
  config: Omit<Config, 'objectStore' | 'publicUrl' | 'smtp'>;
  deps: Deps;
}): Promise<Web> {
  const closing = new AbortController();
  const threads = makeWebThreads();
  const yearThread = makeWebYearThread();
  const server = createServer(
    { headersTimeout: HEADERS_MS, requestTimeout: REQUEST_MS, keepAliveTimeout: 10_000 },
    createApp(deps, { closing: closing.signal, threads, yearThread }),
  );
  server.setTimeout(SILENT_CONNECTION_MS);
  await listen(server, config);
  threads.warm();
  await tidy(deps);
  const tidying = setInterval(() => void tidy(deps), TIDY_EVERY_MS).unref();
  return {
    url: urlOf(server, config.host),
    async close() {
      clearInterval(tidying);
      closing.abort();
      await closeServer(server);
      await Promise.all([threads.close(), yearThread.close()]);
    },
  };
}

function listen(server: Server, { host, port }: Pick<Config, 'host' | 'port'>): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) =>
      reject(error.code === 'EADDRINUSE' ? new PortTakenError({ host, port }) : error),
    );
    server.listen(port, host, resolve);
  });
}

function urlOf(server: Server, host: string): string {
  const address: AddressInfo | string | null = server.address();
  const port = typeof address === 'object' && address !== null ? address.port : 0;
  const name = host === '0.0.0.0' || host === '::' ? 'localhost' : host;
  return `http://${name.includes(':') ? `[${name}]` : name}:${port}`;
}

async function closeServer(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  // A connection that was busy when we began to close waits for another request that nobody will answer.
  const idle = setInterval(() => server.closeIdleConnections(), 50);
  const cut = setTimeout(() => server.closeAllConnections(), FINISH_WITHIN_MS);
  await closed;
  clearInterval(idle);
  clearTimeout(cut);
}

/** Forgets what has run out; a database that is away now is tidied the next time. */
async function tidy({ db, now, log, uploadsDir }: Deps): Promise<void> {
  const before = new Date(now().getTime() - KEPT_MS);
  try {
    await removeStale(uploadsDir, [UPLOAD_PREFIX], before);
    await deleteExpiredSessions(db, now());
    await deleteRequestCountsBefore(db, before);
    await deleteKeyMailsBefore(db, new Date(now().getTime() - KEY_MAILS_KEPT_MS));
    await deleteOldFailures(db, now());
  } catch (error) {
    log.error({ error }, 'tidying up uploads, sessions and counts failed');
  }
}
