import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { findOrMakeStation, type StationOfFile } from '../../../server/features/stations/find-or-make-station.ts';
import { zoneOfStation } from '../../../server/features/stations/zone-of-station.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

let database: TestDatabase;

beforeAll(async () => {
  database = await makeTestDatabase();
});
afterAll(() => database.drop());

async function newTeam(): Promise<string> {
  const { rows } = await database.db.raw<{ rows: [{ id: string }] }>(
    'insert into teams (name) values (?) returning id',
    [`Team ${randomUUID()}`],
  );
  return rows[0].id;
}

const phoenix: Omit<StationOfFile, 'teamId'> = {
  name: 'Phoenix Sky Harbor',
  latitude: 33.45,
  longitude: -111.98,
  elevationM: 337,
  utcOffsetH: -7,
  wmoNumber: '722780',
};

const findOrMake = (station: StationOfFile): Promise<string> =>
  inTransaction(database.db, (transaction) => findOrMakeStation(transaction, station));

const stationRow = async (id: string) => {
  const { rows } = await database.db.raw<{
    rows: { zone: string; wmo_number: string | null; utc_offset_min: number }[];
  }>('select zone, wmo_number, utc_offset_min from stations where id = ?', [id]);
  return rows[0];
};

describe('the station of a file', () => {
  it('is made with its zone when there is none yet', async () => {
    const id = await findOrMake({ ...phoenix, teamId: await newTeam() });
    expect(await stationRow(id)).toEqual({ zone: 'America/Phoenix', wmo_number: '722780', utc_offset_min: -420 });
  });

  it('is the one of the same number, or of the same name, within 0.02° and 50 m', async () => {
    const teamId = await newTeam();
    const id = await findOrMake({ ...phoenix, teamId });
    const same: Partial<StationOfFile>[] = [
      {},
      { name: 'PHOENIX SKY HARBOR', wmoNumber: null },
      { name: 'Phoenix Intl' },
      { latitude: 33.469, longitude: -111.961 },
      { elevationM: 386 },
    ];
    for (const change of same)
      expect(await findOrMake({ ...phoenix, teamId, ...change }), JSON.stringify(change)).toBe(id);
    const others: Partial<StationOfFile>[] = [
      { name: 'Phoenix Intl', wmoNumber: '722781' },
      { latitude: 33.475 },
      { longitude: -112.005 },
      { elevationM: 400 },
    ];
    for (const change of others) {
      expect(await findOrMake({ ...phoenix, teamId, ...change }), JSON.stringify(change)).not.toBe(id);
    }
    expect(await findOrMake({ ...phoenix, teamId: await newTeam() })).not.toBe(id);
  });

  it('is found across the line where longitude changes its sign', async () => {
    const teamId = await newTeam();
    const east = { ...phoenix, teamId, latitude: -16.8, longitude: 179.995, utcOffsetH: 12 };
    expect(await findOrMake({ ...east, longitude: -179.995 })).toBe(await findOrMake(east));
  });

  it('is not matched by a number that stands for none', async () => {
    const teamId = await newTeam();
    const none = ['999999', '-', 'unknown', '0', ''];
    const ids = await Promise.all(
      none.map((wmoNumber, index) => findOrMake({ ...phoenix, teamId, name: `Field ${index}`, wmoNumber })),
    );
    expect(new Set(ids).size).toBe(5);
    expect((await stationRow(ids[0] ?? ''))?.wmo_number).toBeNull();
  });

  it('is made once when two files are accepted at the same time', async () => {
    const teamId = await newTeam();
    const ids = await Promise.all([1, 2, 3, 4].map(() => findOrMake({ ...phoenix, teamId })));
    expect(new Set(ids).size).toBe(1);
  });
});

describe('the zone of a station', () => {
  it('follows from its position on land', () => {
    expect(zoneOfStation({ latitude: 14.6, longitude: 121, utcOffsetH: 8 })).toBe('Asia/Manila');
    expect(zoneOfStation({ latitude: 27.7, longitude: 85.3, utcOffsetH: 5.75 })).toBe('Asia/Kathmandu');
  });

  it('is the fixed offset of the file where none is known, with the signs of POSIX', () => {
    const atSea = { latitude: -5, longitude: -25 };
    expect(zoneOfStation({ ...atSea, utcOffsetH: -2 })).toBe('Etc/GMT+2');
    expect(zoneOfStation({ ...atSea, utcOffsetH: 0 })).toBe('Etc/GMT');
    expect(zoneOfStation({ ...atSea, utcOffsetH: 10 })).toBe('Etc/GMT-10');
  });
});
