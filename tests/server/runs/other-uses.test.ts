/** Briefs of uses other than a room at a temperature, from a brief version in the store to the place that people see. */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { insertBriefVersion } from '../../../server/features/briefs/brief-store.ts';
import { presetBrief } from '../../../server/features/briefs/presets.ts';
import { queueMissingRuns } from '../../../server/features/runs/queue-runs.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let desk: TeamDesk;
const epw = demoEpw(0);

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Growers and generators');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  const { file } = await desk.upload(epw.name, epw.text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  await desk.mapWithoutPending();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

/** Makes a preset the programme's newest brief version and answers the place under it. */
async function placeUnder(preset: string) {
  const { rows } = await road.db.raw<{ rows: { briefId: string; madeBy: string }[] }>(
    'select brief_id as "briefId", made_by as "madeBy" from brief_versions order by version desc limit 1',
  );
  const [newest] = rows;
  if (newest === undefined) throw new Error('the programme begins with a brief');
  await road.db.transaction((transaction) =>
    insertBriefVersion(transaction, { ...newest, teamId: team.teamId, body: presetBrief(preset) }),
  );
  await queueMissingRuns(road.db);
  const { stations } = await desk.mapWithoutPending();
  return desk.place(stations[0]?.id ?? '');
}

describe('a place under another use', () => {
  it('is judged by the daylight of its own position, which is part of the stored clock', async () => {
    const { shown } = await placeUnder('glasshouse');
    const { rows } = await road.db.raw<{ rows: { clock: { daylightAt?: unknown } }[] }>(
      'select clock from runs order by made_at desc limit 1',
    );
    const { latitude, longitude } = epw.station;
    expect(rows[0]?.clock.daylightAt).toEqual({ latitude, longitude });
    // Half of the year is night, give or take the hours in whose middle the sun stands at the horizon.
    expect(Math.abs((shown?.ledger.classes.closed ?? 0) - 4380)).toBeLessThan(120);
  });

  it('says that electricity is not applicable to a turbine inlet', async () => {
    const { shown } = await placeUnder('turbine-inlet');
    expect(shown?.electricity).toBeNull();
    expect(shown?.water.makeUpLitres).toBeGreaterThan(0);
    expect(shown?.verdict).toBe('no tolerance set');
  });

  it('says of a hall who holds its humidity', async () => {
    const { shown } = await placeUnder('hall-recommended');
    expect(shown?.ledger.classes.damp).toBe(0);
    expect(shown?.cautions.filter((caution) => caution.includes('the hall’s own humidity control'))).toHaveLength(1);
  });
});
