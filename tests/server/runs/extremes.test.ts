import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { Place } from '../../../src/contract/place.ts';
import type { WeatherFileRecord } from '../../../src/contract/weather.ts';
import { ruleNames } from '../../../src/engine/weather-files/quality/quality-options.ts';
import { type EpwOptions, epwText } from '../../support/epw-text.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  await road.startWorker();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

/** The same weather every day is no weather: the tests of hours are told so, as an engineer would. */
const rulesOff = ruleNames.map((rule) => ({ rule, reason: 'Weather made up for a test.' }));

async function placeOf(options: EpwOptions): Promise<{ record: WeatherFileRecord; place: Place }> {
  const { file } = await desk.upload('made up.epw', epwText(options));
  await desk.readToTheEnd(file.id);
  const answers = `/api/teams/${team.teamId}/weather-files/${file.id}/answers`;
  await engineer.agent.put(answers).send({ rulesOff }).expect(200);
  const record = await desk.readToTheEnd(file.id);
  expect(record.file.status, JSON.stringify(record.findings)).toBe('review');
  const accepted = await desk.accept(file.id);
  await desk.mapWithoutPending();
  return { record, place: await desk.place(accepted.body.stationId) };
}

/** A daily wave between two temperatures, highest at 15:00, so that no column stands still. */
const wave = (hour: number, low: number, high: number): number =>
  Math.round(10 * ((low + high) / 2 + ((high - low) / 2) * Math.cos((2 * Math.PI * (hour - 15)) / 24))) / 10;

describe('the ends of the scale', () => {
  it('a saturated year has no depression hours, all its demand is damp, and no cooling comes from a direct stage', async () => {
    const { record, place } = await placeOf({
      location: 'Wet End,-,Nowhere,Invented,-,13.00,100.50,7.0,10.0',
      hour: ({ hour }) => {
        const dryBulbC = wave(hour, 27, 33);
        return { dryBulbC, dewPointC: dryBulbC, relativeHumidityPct: 100, pressurePa: 101_200 };
      },
    });
    expect(record.facts?.depressionHours.map(({ hours }) => hours)).toEqual(Array.from({ length: 25 }, () => 0));
    const ledger = place.shown?.ledger;
    // Office hours on 261 weekdays of 2029, 10 a day.
    expect(ledger?.demand).toBe(2610);
    expect(ledger?.classes).toMatchObject({ damp: 2610, direct: 0, air: 0, indirect: 0, twostage: 0, closed: 6150 });
    expect(ledger?.met).toBe(0);
    expect(place.shown?.verdict).toBe('does not');
    expect(place.shown?.parts.find(({ component }) => component === 'served')).toMatchObject({ raw: 0, points: 0 });
  });

  it('a dry year of 28 to 32 °C is served by direct evaporation in every hour of demand', async () => {
    const { record, place } = await placeOf({
      location: 'Dry End,-,Nowhere,Invented,-,24.70,46.70,3.0,610.0',
      hour: ({ hour, slot }) => ({
        dryBulbC: wave(hour, 28, 32),
        dewPointC: Math.round(10 * (4 + Math.sin(slot / 50))) / 10,
        pressurePa: 94_200,
      }),
    });
    expect(record.facts?.depressionHours[10]?.hours).toBe(8760);
    expect(place.shown?.ledger).toMatchObject({ demand: 2610, met: 2610 });
    expect(place.shown?.ledger.classes.direct).toBe(2610);
    expect(place.shown?.verdict).toBe('meets the brief');
    expect(place.shown?.worstSpell).toBeNull();
  });
});

describe('a station at sea', () => {
  it('keeps the fixed offset of its file as its zone, and its place says so', async () => {
    const { place } = await placeOf({
      location: 'Ocean Mast,-,Nowhere,Invented,-,-5.00,-25.00,-3.0,5.0',
      hour: () => ({ pressurePa: 101_300 }),
    });
    expect(place.station.zone).toBe('Etc/GMT+3');
    expect(place.shown?.cautions.join(' ')).toContain('No time zone is known at this position');
  });
});
