import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import { monthOfEachSlot } from '../../../src/engine/reduction/calendar.ts';
import { wetBulbColumn } from '../../../src/engine/reduction/derived-columns.ts';
import { unpackYear } from '../../../src/engine/reduction/packed-columns.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let ask: (query: string) => Promise<{ status: number; body: { stations: unknown[]; months?: number[] } }>;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  const engineer = await team.join('engineer');
  const desk = deskOf(team, engineer);
  await road.startWorker();
  const { name, text } = demoEpw(0);
  const { file } = await desk.upload(name, text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  ask = async (query) => await engineer.agent.get(`/api/teams/${team.teamId}/depression-hours${query}`);
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

/** Counted hour by hour from the stored columns. */
async function counted(atLeastK: number, months: readonly number[]) {
  const { rows } = await road.db.raw<{ rows: { id: string; stationId: string }[] }>(
    'select id, station_id as "stationId" from weather_years',
  );
  const [row] = rows;
  const year = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId: row?.id ?? '' });
  if (year === null) throw new Error('the year is stored');
  const { dryBulbC } = unpackYear(year.packed);
  const wetBulbC = wetBulbColumn(year.packed);
  const monthOf = monthOfEachSlot(dryBulbC.length);
  let hours = 0;
  let knownHours = 0;
  for (const [slot, dryBulb] of dryBulbC.entries()) {
    const depressionK = dryBulb - (wetBulbC[slot] ?? Number.NaN);
    if (!months.includes(monthOf[slot] ?? 0) || Number.isNaN(depressionK)) continue;
    knownHours += 1;
    if (depressionK >= atLeastK) hours += 1;
  }
  return { stationId: row?.stationId, hours, knownHours, years: 1 };
}

describe('hours of depression on the map', () => {
  it('are those at or over a threshold within the months, as the hours themselves give them', async () => {
    const summer = await ask('?atLeastK=8&months=12,1,2,1');
    expect(summer.body).toEqual({ atLeastK: 8, months: [1, 2, 12], stations: [await counted(8, [1, 2, 12])] });
    const year = await ask('?atLeastK=3');
    expect(year.body.stations).toEqual([await counted(3, [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12])]);
    expect(year.body.stations).toMatchObject([{ knownHours: 8760 }]);
  });

  it('are refused for what is no threshold and no month', async () => {
    for (const query of ['', '?atLeastK=2.5', '?atLeastK=64', '?atLeastK=5&months=0', '?atLeastK=5&months=6;7'])
      expect((await ask(query)).status, query).toBe(400);
  });
});
