import type { Knex } from 'knex';
import { STATION_WITHIN } from './same-station.ts';
import { findStationLike, insertStation, lockStationsOfTeam } from './station-store.ts';
import { zoneOfStation } from './zone-of-station.ts';

/** WMO numbers that stand for "none" in files of common practice. */
const NO_NUMBER = /^(0*|9+|-|unknown|n\/?a)$/i;

export interface StationOfFile {
  readonly teamId: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly utcOffsetH: number;
  readonly wmoNumber: string | null;
}

/** The team's station that a file belongs to, made when there is none yet. */
export async function findOrMakeStation(transaction: Knex.Transaction, declared: StationOfFile): Promise<string> {
  const number = declared.wmoNumber?.trim() ?? '';
  const station = { ...declared, wmoNumber: NO_NUMBER.test(number) ? null : number };
  await lockStationsOfTeam(transaction, station.teamId);
  const found = await findStationLike(transaction, {
    ...station,
    withinDeg: STATION_WITHIN.deg,
    withinM: STATION_WITHIN.heightM,
  });
  if (found !== null) return found;
  return await insertStation(transaction, {
    ...station,
    utcOffsetMin: Math.round(station.utcOffsetH * 60),
    zone: zoneOfStation(station),
  });
}
