import { once } from 'node:events';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { connect, createServer, type Socket } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { gzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { loadGazetteer } from '../../../server/db/load-gazetteer.ts';
import { plainName } from '../../../server/db/plain-name.ts';
import type { FoundPlace } from '../../../src/contract/places.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';

/** Rows as data/gazetteer has them; names, countries and positions of real places, figures rounded. */
const LINES = [
  'Paris\tFrance\tcapital\t2138551\t48.8534\t2.3488',
  'Cape Town\tSouth Africa\tseat\t3433441\t-33.9258\t18.4232',
  'Gaborone\tBotswana\tcapital\t208411\t-24.6545\t25.9086',
  'Paris\tUnited States\tseat\t24912\t33.6609\t-95.5555',
  'São João\tBrazil\tplace\t5000\t-7.0000\t-37.0000',
  'Parishville\tUnited States\tplace\t2153\t44.6276\t-74.8138',
  'Back\\slash\tNowhere\tplace\t1000\t1.0000\t1.0000',
  'Å\tNorway\tplace\t1000\t67.8794\t12.9826',
];

let road: Road;
let team: RoadTeam;
let viewer: Member;
let folder: string;
let file: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  viewer = await team.join('viewer');
  folder = await mkdtemp(path.join(tmpdir(), 'muslin-gazetteer-'));
  file = path.join(folder, 'gazetteer.tsv.gz');
  await writeFile(file, gzipSync(`${LINES.join('\n')}\n`));
  await loadGazetteer(road.database.ownerUrl, file);
  await road.db('stations').insert({
    team_id: team.teamId,
    name: 'Gaborone airfield',
    latitude: -24.55,
    longitude: 25.92,
    elevation_m: 1005,
    utc_offset_min: 120,
    zone: 'Africa/Gaborone',
  });
});
afterAll(async () => {
  await road.close();
  await rm(folder, { recursive: true, force: true });
});

async function found(text: string): Promise<FoundPlace[]> {
  const answer = await viewer.agent.get(`/api/teams/${team.teamId}/places`).query({ text }).expect(200);
  return answer.body.places;
}
const names = async (text: string) => (await found(text)).map(({ name, country }) => `${name}, ${country}`);

describe('places by name', () => {
  it('come the likest and largest first, whatever their marks and however they are spelled', async () => {
    expect(await names('Paris')).toEqual(['Paris, France', 'Paris, United States', 'Parishville, United States']);
    expect(await names('sao joao')).toEqual(['São João, Brazil']);
    expect(await names('Gaboronne')).toEqual(['Gaborone, Botswana']);
    expect(await names('town')).toEqual(['Cape Town, South Africa']);
    expect(await names('å')).toEqual(['Å, Norway']);
    expect(await names('Back\\slash')).toEqual(['Back\\slash, Nowhere']);
  });

  it('are narrowed by a country behind a comma', async () => {
    expect(await names('Paris, united')).toEqual(['Paris, United States', 'Parishville, United States']);
    expect(await names('Paris, Nowhere')).toEqual([]);
  });

  it('have the team’s own stations before them, and nobody else’s', async () => {
    expect((await found('gaborone')).map(({ kind, name }) => `${kind} ${name}`)).toEqual([
      'station Gaborone airfield',
      'capital Gaborone',
    ]);
    const other = await road.makeTeam('Another');
    const answer = await other.lead.agent.get(`/api/teams/${other.teamId}/places`).query({ text: 'gabor' }).expect(200);
    expect(answer.body.places.map(({ kind }: FoundPlace) => kind)).toEqual(['capital']);
  });

  it.each(['%', '_', '\\', '?', "'; drop table gazetteer; --", '🙂', '-24.6, 25.9'])(
    '“%s” finds nothing and breaks nothing',
    async (text) => {
      expect(await found(text)).toEqual([]);
    },
  );

  it('are asked for by some text, of at most 100 signs', async () => {
    const places = `/api/teams/${team.teamId}/places`;
    await viewer.agent.get(places).expect(400);
    await viewer.agent.get(places).query({ text: '  ' }).expect(400);
    await viewer.agent
      .get(places)
      .query({ text: 'x'.repeat(101) })
      .expect(400);
  });
});

describe('the gazetteer', () => {
  it('is loaded once for a version of its file, and another version takes its place', async () => {
    const { ownerUrl } = road.database;
    expect(await loadGazetteer(ownerUrl, file)).toBe(false);
    const other = path.join(folder, 'other.tsv.gz');
    await writeFile(other, gzipSync(`${LINES[0]}\n`));
    const both = await Promise.all([loadGazetteer(ownerUrl, other), loadGazetteer(ownerUrl, other)]);
    expect(both.toSorted()).toEqual([false, true]);
    expect(await names('Paris')).toEqual(['Paris, France']);
    expect(await names('Gaborone')).toEqual([`Gaborone airfield, null`]);
  });

  it('fails alone, and does not end the program, when its connection is cut without a word', async () => {
    const { ownerUrl, ownerDb } = road.database;
    const { hostname, port } = new URL(ownerUrl);
    const sockets: Socket[] = [];
    const between = createServer((client) => {
      const server = connect(Number(port), hostname);
      sockets.push(client, server);
      for (const socket of [client, server]) socket.on('error', () => undefined);
      client.pipe(server).pipe(client);
    }).listen(0, '127.0.0.1');
    await once(between, 'listening');
    const address = between.address();
    const cutUrl = new URL(ownerUrl);
    cutUrl.port = String(typeof address === 'object' ? address?.port : 0);
    await ownerDb.transaction(async (holder) => {
      // The lock of whoever loads: the loading below waits for it, and is cut off there.
      await holder.raw('select pg_advisory_xact_lock(7151964)');
      const cutOff = expect(loadGazetteer(cutUrl.href, file)).rejects.toThrow(/terminat/i);
      await eventually('its wait for the lock', async () => {
        const { rows } = await ownerDb.raw<{ rows: unknown[] }>(
          `select 1 from pg_locks where locktype = 'advisory' and objid = 7151964 and not granted`,
        );
        return rows.length > 0;
      });
      for (const socket of sockets) socket.destroy();
      await cutOff;
    });
    between.close();
    expect(await names('Paris')).not.toEqual([]);
  });

  it('stays as it was when a file cannot be read', async () => {
    const broken = path.join(folder, 'broken.tsv.gz');
    await writeFile(broken, gzipSync('Half a line\n'));
    await expect(loadGazetteer(road.database.ownerUrl, broken)).rejects.toThrow();
    expect(await names('Paris')).toEqual(['Paris, France']);
  });
});

it('a name is searched without marks, signs and capitals', () => {
  expect(plainName('  Łódź–Straße, ØRSTED ')).toBe('lodz strasse orsted');
  expect(plainName('東京')).toBe('東京');
});
