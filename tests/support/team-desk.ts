/** What a person of a team does on the main road, over HTTP. */
import type { Response } from 'supertest';
import type { Place } from '../../src/contract/place.ts';
import type { ProgrammeMap } from '../../src/contract/programme-map.ts';
import type { WeatherFile, WeatherFileRecord } from '../../src/contract/weather.ts';
import { eventually } from './eventually.ts';
import type { Member, RoadTeam } from './open-road.ts';

export interface TeamDesk {
  upload(name: string, content: string | Buffer): Promise<{ file: WeatherFile; known: boolean }>;
  record(fileId: string): Promise<WeatherFileRecord>;
  /** The record once reading has ended, well or not. */
  readToTheEnd(fileId: string): Promise<WeatherFileRecord>;
  accept(fileId: string): Promise<Response>;
  withdraw(fileId: string, reason?: string): Promise<Response>;
  map(): Promise<ProgrammeMap>;
  /** The map once every run is there. */
  mapWithoutPending(): Promise<ProgrammeMap>;
  place(stationId: string): Promise<Place>;
  runHours(runId: string): Promise<Buffer>;
}

export function deskOf({ teamId, programmeId }: RoadTeam, { agent }: Member): TeamDesk {
  const files = `/api/teams/${teamId}/weather-files`;
  const programme = `/api/teams/${teamId}/programmes/${programmeId}`;
  const desk: TeamDesk = {
    async upload(name, content) {
      const { body } = await agent.post(files).attach('file', Buffer.from(content), name).expect(200);
      return body;
    },
    async record(fileId) {
      const { body } = await agent.get(`${files}/${fileId}`).expect(200);
      return body;
    },
    readToTheEnd: (fileId) =>
      eventually('the end of reading', async () => {
        const record = await desk.record(fileId);
        return (record.file.status !== 'reading' || record.file.failure !== null) && record;
      }),
    accept: async (fileId) => await agent.post(`${files}/${fileId}/acceptance`).send(),
    withdraw: async (fileId, reason = 'a test') => await agent.post(`${files}/${fileId}/withdrawal`).send({ reason }),
    async map() {
      const { body } = await agent.get(`${programme}/map`).expect(200);
      return body;
    },
    mapWithoutPending: () =>
      eventually('every run', async () => {
        const map = await desk.map();
        return map.pending === 0 && map;
      }),
    async place(stationId) {
      const { body } = await agent.get(`${programme}/stations/${stationId}`).expect(200);
      return body;
    },
    async runHours(runId) {
      const { body } = await agent.get(`/api/teams/${teamId}/runs/${runId}/hours`).buffer().parse(toBuffer).expect(200);
      return body;
    },
  };
  return desk;
}

type Parser = Parameters<ReturnType<Member['agent']['get']>['parse']>[0];

export const toBuffer: Parser = (response, done) => {
  const chunks: Buffer[] = [];
  response.on('data', (chunk: Buffer) => chunks.push(chunk));
  response.on('end', () => done(null, Buffer.concat(chunks)));
};
