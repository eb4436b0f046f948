import type { Knex } from 'knex';
import type { TeamFeed } from './jobs/team-feed.ts';
import type { Log } from './log.ts';
import type { OriginalStore } from './storage/original-store.ts';

/** Everything outside the program that the web side stands on; made once at start and handed down. */
export interface Deps {
  readonly db: Knex;
  readonly databaseUrl: string;
  readonly now: () => Date;
  readonly storage: OriginalStore;
  /** Where uploads wait while they are read; emptied of each as its request ends. */
  readonly uploadsDir: string;
  /** Where links in mails lead: scheme and host, without a path. Never taken from a request, which its sender could word. */
  readonly publicUrl: string;
  /** Whether a worker hands mails on; else they wait to be read here. */
  readonly sendsMail: boolean;
  /** The first signs; the others are still believed, so that a secret can be replaced without signing anyone out. */
  readonly sessionSecrets: readonly [string, ...string[]];
  /** Whose X-Forwarded-For counts: an address, a range, or one of Express's names such as `loopback`. */
  readonly trustProxy: string;
  /** Folder of the built client; null when it is served by someone else. */
  readonly clientDir: string | null;
  readonly basemapPath: string;
  readonly feed: TeamFeed;
  readonly log: Log;
}
