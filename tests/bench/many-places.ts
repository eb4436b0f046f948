/**
 * Many stations and sites for measuring: rows straight into a database, beside a few stations of a team that came by the main road and
 * have been judged. Positions are spread evenly over the globe and say nothing; a clone's results are those of the year that it copies.
 */
import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { heightUsed } from '../../server/features/runs/height-used.ts';
import { listYearsAtStations } from '../../server/features/runs/site-runs-read-model.ts';
import { sitesOfProgramme } from '../../server/features/sites/resolved-sites-read-model.ts';
import { siteLetters } from '../../server/features/sites/site-letters.ts';
import { cloneStationYears } from '../support/station-years.ts';

export interface ManyPlaces {
  readonly teamId: string;
  readonly programmeId: string;
  /** So many stations beside those that are there. */
  readonly stations: number;
  readonly sites: number;
}

/** @returns how many heights of stations the sites are judged at beside the stations' own */
export async function makeManyPlaces(ownerDb: Knex, places: ManyPlaces): Promise<{ heights: number }> {
  await cloneStationYears(ownerDb, places);
  await spreadClones(ownerDb, places);
  await copyRunsOfClones(ownerDb, places);
  await insertSites(ownerDb, places);
  const heights = await copyRunsOfSites(ownerDb, places);
  await ownerDb.raw('analyze');
  return { heights };
}

/** Fractions of the plastic number fill a square evenly (M. Roberts, "The Unreasonable Effectiveness of Quasirandom Sequences", 2018). */
const SPREAD = { first: 0.7548776662466927, second: 0.5698402909980532 };

async function spreadClones(ownerDb: Knex, { teamId }: ManyPlaces): Promise<void> {
  await ownerDb.raw(
    `with numbered as (
       select id, substring(name from 7)::double precision as number from stations
       where team_id = :teamId and name like 'Clone %'
     )
     update stations set latitude = -45 + 100 * (number * :first - floor(number * :first)),
       longitude = -170 + 340 * (number * :second - floor(number * :second)),
       elevation_m = round((1500 * (number * 0.618 - floor(number * 0.618)))::numeric)
     from numbered where numbered.id = stations.id`,
    { teamId, ...SPREAD },
  );
}

const COPIED = 'method_version, clock, result, hour_classes, result_hash';

async function copyRunsOfClones(ownerDb: Knex, { teamId }: ManyPlaces): Promise<void> {
  await ownerDb.raw(
    `insert into runs (team_id, weather_year_id, brief_version_id, height_m, key_hash, ${COPIED})
     select clones.team_id, clones.id, runs.brief_version_id, stations.elevation_m,
       encode(sha256((clones.id::text || runs.id::text)::bytea), 'hex'), ${COPIED}
     from weather_years as clones
     join stations on stations.id = clones.station_id and stations.name like 'Clone %'
     join weather_years as templates on templates.team_id = clones.team_id
       and templates.content_hash = split_part(clones.content_hash, ' ', 1)
     join runs on runs.weather_year_id = templates.id and runs.adjusted_from_m is null
     where clones.team_id = ?`,
    [teamId],
  );
}

/** Within half a degree and 200 m of a station; of every five heights one is read from the relief. */
async function insertSites(ownerDb: Knex, { teamId, programmeId, sites }: ManyPlaces): Promise<void> {
  const numbers = Array.from({ length: sites }, (_none, at) => at + 1);
  await ownerDb.raw(
    `with numbered as (
       select *, row_number() over (order by id) - 1 as place, count(*) over () as total
       from stations where team_id = :teamId
     ), given as (
       select number::integer as number, letters from unnest(cast(:letters as text[])) with ordinality as given (letters, number)
     )
     insert into sites (team_id, programme_id, letters, name, latitude, longitude, elevation_m, elevation_source,
       design_load_kw, made_by, changed_by)
     select :teamId, :programmeId, letters, 'Site ' || number,
       least(greatest(latitude + 0.5 * ((number * 37) % 100 - 50) / 50.0, -90), 90),
       longitude + 0.5 * ((number * 61) % 100 - 50) / 50.0,
       elevation_m + ((number * 53) % 400) - 200, case when number % 5 = 0 then 'relief' else 'person' end,
       50 + (number * 7) % 900, person_id, person_id
     from given
     join numbered on numbered.place = given.number % numbered.total
     cross join (select person_id from memberships where team_id = :teamId limit 1) as someone`,
    { teamId, programmeId, letters: numbers.map(siteLetters) },
  );
  await ownerDb.raw('update programmes set site_letters_given = ? where id = ?', [sites, programmeId]);
}

/** A run of the station's own height stands for each other height: what it took is the same. */
async function copyRunsOfSites(ownerDb: Knex, key: ManyPlaces): Promise<number> {
  const [sites, years] = await Promise.all([sitesOfProgramme(ownerDb, key), listYearsAtStations(ownerDb, key.teamId)]);
  const elevations = new Map(years.map(({ stationId, elevationM }) => [stationId, elevationM]));
  const heights = new Map<string, { stationId: string; heightM: number }>();
  for (const site of sites) {
    const stationId = site.station?.id ?? '';
    const elevationM = elevations.get(stationId);
    if (elevationM === undefined) continue;
    const { heightM, adjusted } = heightUsed(site, elevationM);
    if (adjusted) heights.set(`${stationId} ${heightM}`, { stationId, heightM });
  }
  const needed = [...heights.values()];
  await ownerDb.raw(
    `insert into runs (team_id, weather_year_id, brief_version_id, height_m, adjusted_from_m, key_hash, ${COPIED})
     select runs.team_id, runs.weather_year_id, runs.brief_version_id, needed.height_m, runs.height_m,
       encode(sha256((runs.id::text || needed.height_m::text || :salt)::bytea), 'hex'), ${COPIED}
     from unnest(cast(:stationIds as uuid[]), cast(:heightsM as double precision[])) as needed (station_id, height_m)
     join weather_years on weather_years.station_id = needed.station_id
     join runs on runs.weather_year_id = weather_years.id and runs.adjusted_from_m is null`,
    {
      stationIds: needed.map(({ stationId }) => stationId),
      heightsM: needed.map(({ heightM }) => heightM),
      salt: randomUUID(),
    },
  );
  return needed.length;
}
