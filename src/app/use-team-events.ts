import { type QueryClient, useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { getSession } from '../contract/accounts.ts';
import { getBriefVersion, listBriefs, listBriefVersions } from '../contract/briefs.ts';
import { listInvitations } from '../contract/invitations.ts';
import { listMembers } from '../contract/members.ts';
import { getSitePlace, getStationPlace } from '../contract/place.ts';
import { getMap } from '../contract/programme-map.ts';
import { listSiteImports } from '../contract/site-imports.ts';
import { getSite } from '../contract/site-record.ts';
import { listSites } from '../contract/sites.ts';
import { getStation, listStations } from '../contract/stations.ts';
import { type TeamEvent, watchTeam } from '../contract/team-events.ts';
import { getWeatherFile } from '../contract/weather.ts';
import { getWeatherBatch, listWeatherBatches } from '../contract/weather-batches.ts';
import { listWeatherFiles } from '../contract/weather-library.ts';
import { type StreamState, subscribe } from '../lib/api-client.ts';
import { sessionQuery } from '../lib/session-query.ts';

/** Many events in a row (a batch of files, its runs) cause one look at the server, not one each. */
const GATHER_MS = 300;

const affected = {
  'weather-file': [listWeatherFiles, getWeatherFile, listWeatherBatches, getWeatherBatch, listStations, getStation],
  'weather-batch': [listWeatherBatches, getWeatherBatch, listWeatherFiles],
  run: [getMap, getStationPlace, getSitePlace, listBriefs, listBriefVersions, getBriefVersion],
  people: [listMembers, listInvitations, getSession],
  sites: [listSites, getSite, listSiteImports, getMap, getSitePlace],
  brief: [getMap, getStationPlace, getSitePlace, listBriefs, listBriefVersions, getBriefVersion],
} as const satisfies Record<TeamEvent['kind'], readonly { path: string }[]>;

/** Follows what happens in a team and marks the answers that it makes stale. `lost`: what is shown may be behind. */
export function useTeamEvents(teamId: string | undefined): StreamState {
  const client = useQueryClient();
  const [state, setState] = useState<StreamState>('connecting');
  useEffect(() => {
    if (teamId === undefined) return;
    const stop = new AbortController();
    const kinds = new Set<TeamEvent['kind']>();
    let timer: ReturnType<typeof setTimeout> | undefined;
    let wasLost = false;
    const refresh = () => {
      timer = undefined;
      for (const kind of kinds) for (const { path } of affected[kind]) client.invalidateQueries({ queryKey: [path] });
      kinds.clear();
    };
    const gather = (kind: TeamEvent['kind']) => {
      kinds.add(kind);
      timer ??= setTimeout(refresh, GATHER_MS);
    };
    subscribe(
      watchTeam,
      { params: { teamId }, query: {} },
      {
        signal: stop.signal,
        onEvent: (event) => {
          if (event.kind === 'weather-file') showStep(client, event);
          // An accepted file may bring a station that waits for its first run.
          if (event.kind === 'weather-file' && event.status !== 'reading') gather('run');
          gather(event.kind);
        },
        onState: (next) => {
          setState(next);
          if (next === 'lost' || next === 'refused') wasLost = true;
          // Perhaps the session has ended: the answer leads to signing in.
          if (next === 'refused') client.invalidateQueries({ queryKey: sessionQuery.queryKey });
          if (next === 'open' && wasLost) {
            wasLost = false;
            gather('weather-file');
            gather('run');
            gather('people');
          }
        },
      },
    );
    return () => {
      stop.abort();
      clearTimeout(timer);
    };
  }, [client, teamId]);
  return state;
}

/** Shows a step at once in the answers that are held; the look at the server that follows brings the rest. */
function showStep(client: QueryClient, event: Extract<TeamEvent, { kind: 'weather-file' }>): void {
  const patch = <T extends { id: string }>(file: T): T =>
    file.id === event.fileId ? { ...file, status: event.status, step: event.step } : file;
  client.setQueriesData<{ items: { id: string }[] }>({ queryKey: [listWeatherFiles.path] }, (held) =>
    held ? { ...held, items: held.items.map(patch) } : held,
  );
  client.setQueriesData<{ file: { id: string } }>({ queryKey: [getWeatherFile.path] }, (held) =>
    held ? { ...held, file: patch(held.file) } : held,
  );
}
