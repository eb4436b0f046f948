/**
 * Examples of what a program sends, shown in the description of the API and sent to a server by a test. Ids stand for those of the
 * reader's own team. Loaded by the server alone.
 */
import type { InputOf } from './endpoint.ts';
import type { EndpointName, endpoints } from './endpoints.ts';

/** By the name of the parameter, in whichever path it stands. */
export const exampleParameters: Readonly<Record<string, string>> = {
  teamId: 'f3a1c6de-52b8-4f0e-9a57-1f0d3c9b7e21',
  programmeId: '0c7e8a44-6b1d-4c2f-8f35-9a4be2d6c013',
  fileId: '7d92f1b0-3e5a-4b68-a1c4-5be08d7f2a96',
  stationId: '5a0e4c3b-8f7d-4e19-b2d6-c4f1a9830e57',
  batchId: 'b81d5f6a-2c94-4a07-9e3b-60d7c8f4125e',
  archiveId: '29c4e7f8-d1a6-4035-8b9c-7e5f0a3d6b14',
  siteId: 'e6b03d92-7f48-4c5a-a0d1-3c8e9f25b760',
  runId: '91f7a2c5-4d0e-4b83-9c6f-d25e8b1a7034',
  briefId: '4e8c1d07-a96b-4f32-85de-0b7fc3a9d618',
  version: '1',
  placeKind: 'stations',
  placeId: '5a0e4c3b-8f7d-4e19-b2d6-c4f1a9830e57',
};

/** What a brief leaves out takes the default of the method. */
const draft = {
  id: 'office',
  source: 'our own',
  hours: '8-18',
  weekdays: 'mon-fri',
  limit: { kind: 'fixed', tempC: 26 },
  dTroomK: 5,
  stages: ['direct', 'indirect'],
  caps: { roomRhPct: 65 },
  tolerance: { sharePct: 3 },
};

type Example<N extends EndpointName> = Partial<Pick<InputOf<(typeof endpoints)[N]>, 'query'>> &
  (InputOf<(typeof endpoints)[N]> extends { body: infer B } ? { body?: B } : unknown);

/** Beyond the parameters of the path: a query that is needed or tells something, and bodies. */
export const examples: { readonly [N in EndpointName]?: Example<N> } = {
  listWeatherFiles: { query: { status: 'accepted', limit: 50 } },
  startWeatherBatch: { body: { name: 'Masts of the north, March' } },
  changeWeatherBatch: { body: { state: 'paused' } },
  findPlaces: { query: { text: 'harbour' } },
  getDepressionMap: { query: { atLeastK: 5, months: '6,7,8' } },
  getEstimate: { query: { latitude: -24.5, longitude: 25.5 } },
  getGround: { query: { latitude: -24.5, longitude: 25.5 } },
  listSites: { query: { sort: 'score', order: 'desc', limit: 20 } },
  compareBriefVersions: { query: { from: 1, to: 1 } },
  rescore: { body: { body: draft } },
  judgeSurface: { body: { body: draft } },
  previewBrief: { body: { stationId: exampleParameters.stationId ?? '', body: draft } },
  judgeRange: { body: {} },
  findWhatWouldPass: { body: {} },
  rankPlaces: { body: {} },
};
