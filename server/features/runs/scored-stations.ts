import type { Knex } from 'knex';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { rawOfParts } from '#engine/score/raw-of-parts.ts';
import type { ProgrammeBrief } from '../briefs/brief-read-model.ts';
import type { NamedStation } from './estimate-place.ts';
import { makeJudgedPlaces } from './judged-places.ts';
import { listAcceptedYears, listRunsInShort, listStationPlaces } from './places-read-model.ts';

/** The stations of the team that have a score under a brief, in the order of the map, with what it was formed of. */
export async function scoredStations(
  db: Knex,
  { teamId, brief }: { teamId: string; brief: ProgrammeBrief },
): Promise<readonly NamedStation[]> {
  const { briefVersionId, body } = brief;
  const [stations, years, runs] = await Promise.all([
    listStationPlaces(db, teamId),
    listAcceptedYears(db, teamId),
    listRunsInShort(db, { teamId, briefVersionId, methodVersion: METHOD_VERSION }),
  ]);
  const places = makeJudgedPlaces({ brief: body, stations, years, runs });
  return stations.flatMap(({ id: stationId, ...station }) => {
    const { score, parts } = places.at(stationId, station.elevationM).figures;
    return score === null ? [] : [{ stationId, ...station, score, raw: rawOfParts(parts) }];
  });
}
