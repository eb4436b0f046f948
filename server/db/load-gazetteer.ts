import { createHash } from 'node:crypto';
import { promises } from 'node:fs';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import pg from 'pg';
import { from as copyFrom } from 'pg-copy-streams';
import { plainName } from './plain-name.ts';

/** Any number, the same for everyone who loads this table. */
const LOAD_LOCK = 7_151_964;
/** Raised when `plainName` or the columns change: the same file is then loaded anew. */
const LOADED_AS = 1;
const LINES_AT_ONCE = 2000;

/**
 * Fills the gazetteer from the file that comes with the program, unless that file is in it already. Two at the same time wait for each
 * other; searches meanwhile see what was there before.
 * @param ownerUrl address with the owner's login: the table is emptied and its index made anew, which is twice as quick
 * @returns whether it was loaded
 */
export async function loadGazetteer(ownerUrl: string, path: string): Promise<boolean> {
  const packed = await promises.readFile(path);
  const fingerprint = `${LOADED_AS} ${createHash('sha256').update(packed).digest('hex')}`;
  const client = new pg.Client({ connectionString: ownerUrl });
  // A lost connection is told by the statement that meets it; told here as well, and heard by nobody, it would end the program.
  client.on('error', () => undefined);
  await client.connect();
  try {
    await client.query('begin');
    await client.query('select pg_advisory_xact_lock($1)', [LOAD_LOCK]);
    const { rowCount } = await client.query('select 1 from gazetteer_loads where fingerprint = $1', [fingerprint]);
    if (rowCount === 0) await replaceAll(client, { packed, fingerprint });
    await client.query('commit');
    return rowCount === 0;
  } finally {
    await client.end();
  }
}

async function replaceAll(client: pg.Client, load: { packed: Buffer; fingerprint: string }): Promise<void> {
  const lines = (await promisify(gunzip)(load.packed)).toString('utf8').split('\n').filter(Boolean);
  await client.query('drop index gazetteer_like; delete from gazetteer; delete from gazetteer_loads');
  await pipeline(Readable.from(portions(lines)), client.query(copyFrom('copy gazetteer from stdin')));
  await client.query(`
    create index gazetteer_like on gazetteer using gin (plain gin_trgm_ops);
    analyze gazetteer;
  `);
  await client.query('insert into gazetteer_loads (fingerprint, places) values ($1, $2)', [
    load.fingerprint,
    lines.length,
  ]);
}

/** Lines of name, country, kind, population, latitude, longitude as COPY takes them, the searched name beside the name. */
function* portions(lines: readonly string[]): Generator<string> {
  for (let start = 0; start < lines.length; start += LINES_AT_ONCE) {
    const rows = lines.slice(start, start + LINES_AT_ONCE).map((line) => {
      const end = line.indexOf('\t');
      const name = line.slice(0, end).replaceAll('\\', '\\\\');
      return `${name}\t${plainName(name)}${line.slice(end)}\n`;
    });
    yield rows.join('');
  }
}
