/**
 * The server under load, in a process of its own: the product's web application, and beside it the plain route that it is measured
 * against, which asks one indexed query over the same kind of pool. Told by its parent what to serve; says its ports and what it used.
 */
import http from 'node:http';
import path from 'node:path';
import express from 'express';
import { createApp } from '../../server/app.ts';
import { connect } from '../../server/db/connection.ts';
import { openTeamFeed } from '../../server/jobs/team-feed.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import { keepLog } from '../support/quiet-log.ts';

/** Fifty people who never rest would meet the limit of requests a minute, which is there for such as they: a minute passes in a second. */
const MINUTES_A_SECOND = 60;

const [databaseUrl = '', home = ''] = process.argv.slice(2);
const began = Date.now();
const log = keepLog();
const db = connect({ databaseUrl, applicationName: 'muslin under load' });
const feed = await openTeamFeed({ databaseUrl, log });
const app = createApp({
  ...{ db, databaseUrl, feed, log, uploadsDir: home, clientDir: null, trustProxy: 'loopback', sendsMail: false },
  now: () => new Date(began + (Date.now() - began) * MINUTES_A_SECOND),
  storage: createFolderStore(path.join(home, 'originals')),
  sessionSecrets: ['a session secret for measuring'],
  publicUrl: 'http://127.0.0.1',
  basemapPath: path.resolve(import.meta.dirname, '../../data/basemap/basemap.pmtiles'),
});
const plain = express();
plain.get('/stations/:id', async (request, response) => {
  const { rows } = await db.raw<{ rows: unknown[] }>(
    'select id, name, latitude, longitude from stations where id = ?',
    [request.params.id],
  );
  response.json(rows[0]);
});

async function listen(handler: http.RequestListener): Promise<number> {
  const server = http.createServer(handler).listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const address = server.address();
  return typeof address === 'object' && address !== null ? address.port : 0;
}

const ports = { product: await listen(app), plain: await listen(plain) };
process.send?.(ports);
process.on('message', () => {
  const { user, system } = process.cpuUsage();
  process.send?.({ processorMs: (user + system) / 1000, errors: log.errors.slice(-3) });
});
process.on('disconnect', () => process.exit(0));
