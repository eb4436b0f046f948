import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { readPackedYear } from '../../../server/features/weather/packed-year-read-model.ts';
import type { DesignPoints } from '../../../src/contract/design-points.ts';
import type { HourList } from '../../../src/contract/hour-list.ts';
import type { Place } from '../../../src/contract/place.ts';
import type { TurningChange, WhatWouldPass } from '../../../src/contract/place-doubts.ts';
import type { Brief } from '../../../src/engine/brief/brief.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import type { DesignValues } from '../../../src/engine/reduction/design-values.ts';
import { judgeYear } from '../../../src/engine/run/judge-year.ts';
import { scoreRange } from '../../../src/engine/score/score-range.ts';
import { designOfYear, sizeAtDesignPoints } from '../../../src/engine/sizing/design-points.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let viewer: Member;
let desk: TeamDesk;
let stationId: string;
let place: Place;
let epwLines: readonly string[];

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  viewer = await team.join('viewer');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
  const { name, text } = demoEpw(0);
  epwLines = text.split(/\r?\n/);
  const { file } = await desk.upload(name, text);
  await desk.readToTheEnd(file.id);
  await desk.accept(file.id);
  stationId = (await desk.mapWithoutPending()).stations[0]?.id ?? '';
  place = await desk.place(stationId);
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

async function ask(what: 'range' | 'what-would-pass', body?: Brief) {
  const path = `/api/teams/${team.teamId}/programmes/${team.programmeId}/places/stations/${stationId}/${what}`;
  const answer = await viewer.agent
    .post(path)
    .send(body === undefined ? {} : { body })
    .expect(200);
  return answer.body;
}

async function storedYear() {
  const { rows } = await road.db.raw<{ rows: { id: string }[] }>('select id from weather_years');
  const year = await readPackedYear(road.db, { teamId: team.teamId, weatherYearId: rows[0]?.id ?? '' });
  if (year === null) throw new Error('the year is stored');
  const { zone, elevationM: heightM, latitude, longitude } = place.station;
  return { year, zone, heightM, position: { latitude, longitude } };
}

describe('the range of a place', () => {
  it('is the engine’s own of the year that stands for it, each doubt a pair', async () => {
    const range = await ask('range');
    const expected = scoreRange({ ...(await storedYear()), brief: officeBrief(), humidityFrom: 'dew point' });
    const whole = (score: number | null) => (score === null ? null : Math.round(score));
    expect(range.pairs).toEqual(
      expected.pairs.map(({ doubt, minus, plus }) => ({
        doubt,
        minus: { label: minus.label, score: whole(minus.scoreExact) },
        plus: { label: plus.label, score: whole(plus.scoreExact) },
      })),
    );
    expect(range).toMatchObject({ score: place.shown?.score, years: null, largest: expected.largest });
    expect(range.pairs.length).toBeGreaterThan(2);
  });
});

/** The brief with one change made by hand. */
function changed(brief: Brief, { path, to, stage }: TurningChange, less = 0): Brief {
  const value = (to ?? 0) - less;
  if (path === 'stages') return { ...brief, stages: [...brief.stages, stage as Brief['stages'][number]] };
  if (path === 'caps.roomRhPct') return { ...brief, caps: { ...brief.caps, roomRhPct: value } };
  if (path === 'limit.tempC') return { ...brief, limit: { kind: 'fixed', tempC: value } };
  return { ...brief, [path]: value };
}

describe('what would make a place pass', () => {
  it('is, of each lever, the least change under which the place passes and a step less does not', async () => {
    const input = await storedYear();
    const verdictUnder = (brief: Brief) => judgeYear({ ...input, brief }).verdict;
    // A tolerance that the place fails by a little: a tenth of its unmet hours less.
    const base = { ...officeBrief(), effDirect: 0.75, stages: ['direct'] as const };
    const { ledger } = judgeYear({ ...input, brief: base });
    const brief: Brief = { ...base, tolerance: { hours: Math.floor(0.9 * (ledger.demand - ledger.met)) } };
    expect(verdictUnder(brief)).toBe('does not');
    const answer: WhatWouldPass = await ask('what-would-pass', brief);
    expect(answer).toMatchObject({ verdict: 'does not', failed: ['unmet demand hours'], note: null });
    expect(answer.changes.length).toBeGreaterThan(1);
    const STEPS: Readonly<Record<string, number>> = { 'limit.tempC': 0.1, 'caps.roomRhPct': 1, effDirect: 0.01 };
    for (const change of answer.changes) {
      const step = STEPS[change.path];
      if (step !== undefined) expect(verdictUnder(changed(brief, change, step)), change.path).toBe('does not');
      if (change.lever !== 'stage') expect(verdictUnder(changed(brief, change)), change.path).toBe('meets the brief');
    }
    const sizes = answer.changes.flatMap(({ size }) => size ?? []);
    expect(sizes).toEqual(sizes.toSorted((one, other) => one - other));
    expect(answer.bounds).toContain('Set-point up to 31 °C');
  });

  it('says so where nothing fails, where there is no tolerance, and where no single change is enough', async () => {
    const { tolerance: _none, ...brief } = officeBrief();
    expect(await ask('what-would-pass', { ...brief, tolerance: { hours: 8760 } })).toMatchObject({
      changes: [],
      note: 'It meets the brief as it is.',
    });
    expect(await ask('what-would-pass', { ...brief, tolerance: {} })).toMatchObject({
      verdict: 'no tolerance set',
      note: 'The brief sets no tolerance to pass.',
    });
    const impossible: Brief = { ...brief, limit: { kind: 'fixed', tempC: 15 }, tolerance: { hours: 0 } };
    expect(await ask('what-would-pass', impossible)).toMatchObject({
      verdict: 'does not',
      changes: [],
      note: 'No single change within these bounds turns the verdict.',
    });
  });
});

describe('the hours behind a bar', () => {
  const list = async (query: string): Promise<HourList> => {
    const runId = place.shown?.runId ?? '';
    const { body } = await viewer.agent.get(`/api/teams/${team.teamId}/runs/${runId}/hour-list${query}`).expect(200);
    return body;
  };

  it('are as many as the bar counts, each with the line of the file that holds it', async () => {
    const classes = place.shown?.ledger.classes;
    for (const hourClass of hourClasses) {
      const { total, items } = await list(`?hourClass=${hourClass}&limit=3`);
      expect(total, hourClass).toBe(classes?.[hourClass]);
      for (const hour of items) {
        expect(hour.hourClass).toBe(hourClass);
        const cells = epwLines[(hour.line ?? 0) - 1]?.split(',') ?? [];
        expect(Number(cells[6])).toBeCloseTo(hour.dryBulbC ?? Number.NaN, 2);
        const date = new Date(Date.UTC(2023, 0, 1 + Math.floor(hour.slot / 24)));
        const expected = [date.getUTCMonth() + 1, date.getUTCDate(), (hour.slot % 24) + 1];
        expect(cells.slice(1, 4).map(Number)).toEqual(expected);
      }
    }
  });

  it('are those of a month and hour of day, of a day, met or not, a page at a time', async () => {
    const unmet = await list('?met=no&month=7&hour=15');
    expect(unmet.items.every(({ met, slot }) => met === false && slot % 24 === 14)).toBe(true);
    const day = await list('?day=200&limit=10&page=3');
    expect(day).toMatchObject({ total: 24, pages: 3, page: 3, adjusted: false, limitUnit: '°C' });
    expect(day.items.map(({ slot }) => slot)).toEqual([4796, 4797, 4798, 4799]);
    const ledger = place.shown?.ledger;
    expect((await list('?met=yes&limit=1')).total).toBe(ledger?.met);
    expect((await list('?met=no&limit=1')).total).toBe((ledger?.demand ?? 0) - (ledger?.met ?? 0));
  });
});

describe('the design points of a run', () => {
  it('are those of the record of its file, with the plant that the engine finds there', async () => {
    const answer = await viewer.agent
      .get(`/api/teams/${team.teamId}/runs/${place.shown?.runId}/design-points`)
      .expect(200);
    const design = answer.body as DesignPoints;
    const { year, heightM } = await storedYear();
    const sized = sizeAtDesignPoints({ year, design: designOfYear(year), brief: officeBrief(), heightM });
    expect(design).toEqual({ follows: 'dry bulb', ...sized });
    const { rows } = await road.db.raw<{ rows: { design: DesignValues }[] }>(
      `select facts->'design' as design from weather_years`,
    );
    const recorded = rows[0]?.design.dryBulb ?? [];
    expect(design.points.map(({ percent }) => percent)).toEqual([0.4, 1, 2, 5, 10]);
    for (const [at, { valueC, coincidentC }] of recorded.entries()) {
      expect(design.points[at]?.dryBulbC).toBeCloseTo(valueC, 6);
      // Packing the humidity ratio moves a wet bulb by less than this.
      expect(Math.abs((design.points[at]?.wetBulbC ?? Number.NaN) - coincidentC)).toBeLessThanOrEqual(0.011);
    }
    expect(design.caution).toContain('not for sizing');
  });
});
