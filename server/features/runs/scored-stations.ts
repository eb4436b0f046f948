import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { rawOfParts } from '#engine/score/raw-of-parts.ts';
import type { ProgrammeBrief } from '../briefs/brief-read-model.ts';
import type { NamedStation } from './estimate-place.ts';
import { byStation, judgeStation } from './judge-station.ts';
import { listStationYears } from './station-years-read-model.ts';

/** The stations of the team that have a score under a brief, in the order of the map, with what it was formed of. */
export async function scoredStations(
  db: Knex,
  { teamId, brief }: { teamId: string; brief: ProgrammeBrief },
): Promise<readonly NamedStation[]> {
  const { briefVersionId, body } = brief;
  const years = await listStationYears(db, { teamId, briefVersionId, methodVersion: METHOD_VERSION });
  return byStation(years).flatMap((group) => {
    const { station, figures } = judgeStation(body, group);
    if (figures.score === null) return [];
    const { stationId, stationName: name, latitude, longitude, elevationM } = station;
    return [{ stationId, name, latitude, longitude, elevationM, score: figures.score, raw: rawOfParts(figures.parts) }];
  });
}
