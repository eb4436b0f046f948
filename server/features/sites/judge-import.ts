import { setImmediate as breathe } from 'node:timers/promises';
import type { Knex } from 'knex';
import { type Duplicate, findDuplicates } from '#engine/sites/find-duplicates.ts';
import { readSiteRow, type SiteOfRow } from '#engine/sites/read-site-row.ts';
import type { SiteColumn } from '#engine/sites/site-columns.ts';
import { siteFlags } from '#engine/sites/site-flags.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import { defaultStations } from './default-stations.ts';
import { hasYears } from './resolved-sites-read-model.ts';
import { elevationOf, groundAt, type SiteGround } from './site-ground.ts';
import { listImportRows } from './site-import-read-model.ts';
import type { ImportKey } from './site-import-store.ts';
import { listSiteRows, listStationsOfTeam, type SiteRow, type StationOfTeam } from './site-read-model.ts';

export interface RowRemark {
  readonly line: number;
  readonly column: SiteColumn;
  readonly message: string;
}

/** A row that can become a site. */
export interface RowToImport extends SiteOfRow {
  readonly line: number;
  readonly ground: SiteGround;
  readonly stationId: string | null;
}

/** A whole table as it was sent, with all that can be said against it. */
export interface JudgedImport {
  readonly rows: number;
  readonly ready: readonly RowToImport[];
  readonly faults: readonly RowRemark[];
  readonly doubts: readonly RowRemark[];
  readonly duplicates: readonly (Omit<Duplicate, 'index'> & { readonly row: RowToImport })[];
  readonly standing: readonly SiteRow[];
  readonly seemsSwapped: boolean;
}

/** Rows after which other requests get their turn. */
const AT_ONCE = 1_000;
/** Coasts are as coarse as the relief, a point every 9 km. */
const NEAR_LAND_KM = 9;
/** Swapped columns are suspected from so many rows on, when they are most of the table. */
const LEAST_SWAPPED = 3;

/** Reads every waiting row of an import, whatever the browser made of it. */
export async function judgeImport({ db, relief }: { db: Knex; relief: Relief }, key: ImportKey): Promise<JudgedImport> {
  // One after the other: within a transaction there is one connection.
  const rows = await listImportRows(db, key);
  const stations = await listStationsOfTeam(db, key.teamId);
  const standing = await listSiteRows(db, key);
  const stationOf = makeStationLookup(stations);
  const faults: RowRemark[] = [];
  const read: (SiteOfRow & { line: number; stationId: string | null })[] = [];
  for (const [index, { line, cells }] of rows.entries()) {
    if (index % AT_ONCE === AT_ONCE - 1) await breathe();
    const { site, faults: found } = readSiteRow(cells);
    faults.push(...found.map((fault) => ({ line, ...fault })));
    if (site === null) continue;
    const chosen = stationOf(site);
    if ('fault' in chosen) faults.push({ line, column: chosen.column, message: chosen.fault });
    else read.push({ ...site, line, stationId: chosen.id });
  }
  const ready = await withGround(read, relief);
  const duplicates = findDuplicates(ready, standing).flatMap(({ index, ...rest }) => {
    const row = ready[index];
    return row === undefined ? [] : [{ ...rest, row }];
  });
  return {
    ...{ rows: rows.length, ready, faults, duplicates, standing },
    doubts: ready.flatMap(doubtsOf),
    seemsSwapped: seemsSwapped(ready, relief),
  };
}

/** Grounds in the order of place, since the relief keeps only a few of its tiles unpacked; answered in the order of lines. */
async function withGround<R extends SiteOfRow>(
  rows: readonly R[],
  relief: Relief,
): Promise<readonly (R & { ground: SiteGround })[]> {
  const bandOf = ({ latitude, longitude }: R): number => Math.floor(latitude / 5) * 1000 + Math.floor(longitude / 5);
  const grounds = new Map<R, SiteGround>();
  for (const [index, row] of rows.toSorted((one, other) => bandOf(one) - bandOf(other)).entries()) {
    if (index % AT_ONCE === AT_ONCE - 1) await breathe();
    grounds.set(row, groundAt(relief, row));
  }
  return rows.map((row) => ({ ...row, ground: grounds.get(row) ?? groundAt(relief, row) }));
}

function doubtsOf({ line, ground, elevationM }: RowToImport): RowRemark[] {
  const flags = siteFlags({ ...ground, ...elevationOf(elevationM, ground, 'file'), station: null });
  return flags.flatMap((flag): RowRemark[] => {
    if (flag === 'sea') return [{ line, column: 'latitude', message: 'This lies in the sea, over 20 km from land.' }];
    if (flag !== 'relief') return [];
    const message = `${elevationM} m is given; the relief, a point every 9 km, has ${ground.reliefM} m there.`;
    return [{ line, column: 'elevation', message }];
  });
}

function seemsSwapped(rows: readonly RowToImport[], relief: Relief): boolean {
  const atSea = rows.filter(({ ground }) => ground.kmFromLand > NEAR_LAND_KM);
  if (atSea.length < LEAST_SWAPPED || atSea.length * 2 < rows.length) return false;
  const turned = atSea.filter(
    ({ latitude, longitude }) => Math.abs(longitude) <= 90 && relief.kmFromLand(longitude, latitude) <= NEAR_LAND_KM,
  );
  return turned.length * 2 > atSea.length;
}

type Chosen = { readonly id: string | null } | { readonly column: 'station' | 'reason'; readonly fault: string };

/** The station that a row names, under the same rule as one that is chosen by hand. */
function makeStationLookup(stations: readonly StationOfTeam[]): (site: SiteOfRow) => Chosen {
  const usable = stations.filter(hasYears);
  const first = defaultStations(usable);
  const byName = new Map<string, StationOfTeam[]>();
  for (const station of usable) {
    const name = station.name.toLowerCase();
    byName.set(name, [...(byName.get(name) ?? []), station]);
  }
  return (site) => {
    if (site.stationName === null) return { id: null };
    const named = byName.get(site.stationName.toLowerCase()) ?? [];
    const [station] = named;
    if (station === undefined)
      return { column: 'station', fault: `No station with an accepted year is called “${site.stationName}”.` };
    if (named.length > 1)
      return {
        column: 'station',
        fault: `${named.length} stations are called “${site.stationName}”; choose after the import.`,
      };
    if (site.stationReason === null && first(site)?.id !== station.id)
      return {
        column: 'reason',
        fault: `“${site.stationName}” does not stand first in the ranking here; give the reason.`,
      };
    return { id: station.id };
  };
}
