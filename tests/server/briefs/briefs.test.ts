/** Briefs over HTTP on a real database: made from presets, saved as versions, compared, previewed, judged in the background. */
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { BriefPreview, BriefVersionRecord, BriefVersionView } from '../../../src/contract/briefs.ts';
import type { ErrorBody } from '../../../src/contract/errors.ts';
import type { Place } from '../../../src/contract/place.ts';
import type { ProgrammeMap } from '../../../src/contract/programme-map.ts';
import type { Brief } from '../../../src/engine/brief/brief.ts';
import { numberRanges, pricedPreset, withValue } from '../../support/brief-ranges.ts';
import { epwText } from '../../support/epw-text.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';
import { deskOf } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let planner: Member;
let programme: string;
let stationId: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern clinics');
  planner = await team.join('planner');
  programme = `/api/teams/${team.teamId}/programmes/${team.programmeId}`;
  await road.startWorker();
  const desk = deskOf(team, await team.join('engineer'));
  const { file } = await desk.upload(
    'made up.epw',
    epwText({
      location: 'Dry Reach,-,Nowhere,Invented,-,24.70,46.70,3.0,610.0',
      hour: ({ hour, slot }) => ({
        // From day to day it differs, as weather does.
        dryBulbC: Math.round(10 * (26 + 9 * Math.cos((2 * Math.PI * (hour - 15)) / 24) + 2 * Math.sin(slot / 40))) / 10,
        dewPointC: Math.round(10 * (6 + 4 * Math.sin(slot / 500) + Math.sin(slot / 7))) / 10,
        pressurePa: 94_200,
      }),
    }),
  );
  await desk.readToTheEnd(file.id);
  stationId = (await desk.accept(file.id)).body.stationId;
  await desk.mapWithoutPending();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

let made = 0;
async function newBrief(preset: string): Promise<BriefVersionView> {
  made += 1;
  const name = `${preset} ${made}`;
  const { body } = await planner.agent.post(`${programme}/briefs`).send({ name, preset }).expect(200);
  return body;
}

const save = (briefId: string, sent: { basedOn: number; body: unknown }, by: Member = planner) =>
  by.agent.post(`${programme}/briefs/${briefId}/versions`).send(sent);

async function versionsOf(briefId: string): Promise<BriefVersionView[]> {
  const { body } = await planner.agent.get(`${programme}/briefs/${briefId}/versions`).expect(200);
  return body.items;
}

const fixedAt = (brief: Brief, tempC: number): Brief => ({ ...brief, limit: { kind: 'fixed', tempC } });

describe('presets', () => {
  it('are all listed with a name, a source, a sentence and the whole brief', async () => {
    const { body } = await planner.agent.get(`/api/teams/${team.teamId}/presets`).expect(200);
    const items: { id: string; name: string; use: string; source: string; sentence: string; body: Brief }[] =
      body.items;
    expect(items.map(({ id }) => id)).toEqual([...presetNames]);
    expect(items.length).toBe(11);
    for (const preset of items) {
      expect(preset.body).toEqual(presetBrief(preset.id));
      for (const words of [preset.name, preset.use, preset.source, preset.sentence]) expect(words).not.toBe('');
      expect(preset.name).not.toBe(preset.id);
    }
  });
});

describe('a brief made from a preset', () => {
  it('is version 1, says who made it, and is judged for every accepted year', async () => {
    const brief = await newBrief('clinic');
    expect(brief).toMatchObject({ version: 1, preset: 'clinic', presetName: 'Clinic' });
    expect(brief.hash).toMatch(/^[0-9a-f]{64}$/);
    expect(brief.madeBy).toMatch(/^Test planner/);
    const record = await eventually('the clinic is judged', async () => {
      const path = `${programme}/briefs/${brief.briefId}/versions/1`;
      const { body }: { body: BriefVersionRecord } = await planner.agent.get(path).expect(200);
      return body.version.stationsPending === 0 && body;
    });
    expect(record.version.stationsJudged).toBe(1);
    expect(record.stations).toEqual([{ id: stationId, name: 'Dry Reach', judged: true }]);
    expect(record.body).toEqual(presetBrief('clinic'));
  });

  it('needs a preset that ships, and a name that no other brief of the programme has', async () => {
    const brief = await newBrief('office');
    const twice = await planner.agent
      .post(`${programme}/briefs`)
      .send({ name: brief.name.toUpperCase(), preset: 'office' });
    expect(twice.status).toBe(400);
    expect(twice.body.problems).toEqual([{ path: 'body.name', message: expect.stringContaining('has that name') }]);
    const unknown = await planner.agent.post(`${programme}/briefs`).send({ name: 'X', preset: 'constructor' });
    expect(unknown.body.problems).toEqual([
      { path: 'body.preset', message: expect.stringContaining('no such preset') },
    ]);
  });
});

describe('saving a version', () => {
  it('tells every fault at once, each at its path, and keeps nothing', async () => {
    const { briefId } = await newBrief('office');
    const before = await road.countRows();
    const body = {
      ...presetBrief('office'),
      effDirect: 1.4,
      cycles: 1,
      hours: '18-8',
      caps: { roomRhPct: Number.NaN },
      limit: { kind: 'fixed', tempC: 'warm' },
      score: presetBrief('office').score.map((part, index) => (index === 0 ? { ...part, weight: 20 } : part)),
      humidity: 3,
    };
    const refused = await save(briefId, { basedOn: 1, body });
    expect(refused.status).toBe(400);
    const error: ErrorBody = refused.body;
    expect(error.code).toBe('invalid_input');
    const said = Object.fromEntries(error.problems.map(({ path, message }) => [path, message]));
    expect(said).toMatchObject({
      'body.body.effDirect': expect.stringContaining('from 0 to 1'),
      'body.body.cycles': expect.stringContaining('over 1'),
      'body.body.hours': expect.stringContaining('pening and closing'),
      'body.body.limit.tempC': expect.stringContaining('°C'),
      'body.body.score': expect.stringContaining('add up to 100, not 90'),
      'body.body.humidity': expect.stringContaining('such field'),
    });
    expect(await road.countRows()).toEqual(before);
  });

  it('refuses every number out of its range, of every use, all in one answer, and no text or blank in its place', async () => {
    const { briefId } = await newBrief('office');
    let refused = 0;
    for (const preset of new Set(numberRanges.map((range) => range.preset))) {
      const ranges = numberRanges.filter((range) => range.preset === preset);
      for (const wrong of ['below', 'above', 'text'] as const) {
        const body = ranges.reduce(
          (held, range) => withValue(held, range.path, wrong === 'text' ? 'warm' : range[wrong]),
          pricedPreset(preset),
        );
        const { body: error }: { body: ErrorBody } = await save(briefId, { basedOn: 1, body }).expect(400);
        const paths = error.problems.map(({ path }) => path);
        for (const { path } of ranges) expect(paths, `${preset}, ${wrong}`).toContain(`body.body.${path}`);
        for (const { message } of error.problems) expect(message).not.toMatch(/NaN|undefined|null/);
        refused += ranges.length;
      }
    }
    expect(refused).toBe(3 * numberRanges.length);
    expect(await versionsOf(briefId)).toHaveLength(1);
  });

  it('says what contradicts itself across fields, beside what is out of range', async () => {
    const { briefId } = await newBrief('office');
    const body = {
      ...presetBrief('office'),
      caps: { roomRhPct: 40 },
      lowerLimits: { roomRhPct: 50 },
      balanceTempC: 40,
      cycles: 1,
    };
    const { body: error }: { body: ErrorBody } = await save(briefId, { basedOn: 1, body }).expect(400);
    expect(error.problems.map(({ path }) => path)).toEqual([
      'body.body.cycles',
      'body.body.lowerLimits.roomRhPct',
      'body.body.balanceTempC',
    ]);
  });

  it('switches direct cooling on in a clinic only with a written reason, which stays with the version', async () => {
    const { briefId } = await newBrief('clinic');
    const wet: Brief = { ...presetBrief('clinic'), stages: ['direct', 'indirect'] };
    const refused = await save(briefId, { basedOn: 1, body: wet });
    expect(refused.body.problems).toEqual([
      { path: 'body.body.stages', message: expect.stringContaining('written reason') },
    ]);
    // Taking the preset's name off does not take its rule off.
    const renamed = await save(briefId, { basedOn: 1, body: { ...wet, preset: 'office' } });
    expect(renamed.body.problems).toEqual([
      { path: 'body.body.preset', message: expect.stringContaining('keeps its preset') },
    ]);
    await save(briefId, { basedOn: 1, body: { ...wet, stagesReason: 'Waiting hall only, agreed on 3 May' } }).expect(
      200,
    );
    const { body } = await planner.agent.get(`${programme}/briefs/${briefId}/versions/2`).expect(200);
    expect(body.body.stagesReason).toBe('Waiting hall only, agreed on 3 May');
  });

  it('makes none when nothing changed, however often it is sent', async () => {
    const { briefId } = await newBrief('office');
    const first = await save(briefId, { basedOn: 1, body: presetBrief('office') }).expect(200);
    expect(first.body).toMatchObject({ made: false, version: { version: 1 } });
    const changed = fixedAt(presetBrief('office'), 27);
    const one = await save(briefId, { basedOn: 1, body: changed }).expect(200);
    const again = await save(briefId, { basedOn: 1, body: changed }).expect(200);
    expect([one.body.made, again.body.made]).toEqual([true, false]);
    expect(again.body.version.versionId).toBe(one.body.version.versionId);
    expect(await versionsOf(briefId)).toHaveLength(2);
  });

  it('of two at once lets one through and tells the other who saved meanwhile', async () => {
    const { briefId } = await newBrief('office');
    const other = await team.join('planner');
    const answers = await Promise.all([
      save(briefId, { basedOn: 1, body: fixedAt(presetBrief('office'), 25) }),
      save(briefId, { basedOn: 1, body: fixedAt(presetBrief('office'), 27) }, other),
    ]);
    expect(answers.map(({ status }) => status).toSorted()).toEqual([200, 409]);
    const late = answers.find(({ status }) => status === 409)?.body;
    expect(late).toMatchObject({
      code: 'wrong_state',
      message: expect.stringMatching(/^Test planner \d+ saved version 2 meanwhile/),
    });
    expect((await versionsOf(briefId)).map(({ version }) => version)).toEqual([2, 1]);
  });

  it('queues its runs, leaves the runs of older versions, and the map follows', async () => {
    const { briefId } = await newBrief('office');
    const map = async (): Promise<ProgrammeMap> => {
      const { body } = await planner.agent.get(`${programme}/map?brief=${briefId}`).expect(200);
      return body;
    };
    const scored = (version: number) =>
      eventually(`version ${version} on the map`, async () => {
        const found = await map();
        return found.brief.version === version && found.pending === 0 && found;
      });
    const before = await scored(1);
    await save(briefId, { basedOn: 1, body: fixedAt(presetBrief('office'), 20) }).expect(200);
    const after = await scored(2);
    expect(after.stations[0]?.score).toBeLessThan(before.stations[0]?.score ?? 0);
    const { rows } = await road.db.raw<{ rows: { version: number; runs: number }[] }>(
      `select brief_versions.version, count(runs.id)::integer as runs from brief_versions
       left join runs on runs.brief_version_id = brief_versions.id
       where brief_versions.brief_id = ? group by brief_versions.version order by 1`,
      [briefId],
    );
    expect(rows).toEqual([
      { version: 1, runs: 1 },
      { version: 2, runs: 1 },
    ]);
  });

  it('is written into the audit trail', async () => {
    const { briefId } = await newBrief('office');
    await save(briefId, { basedOn: 1, body: fixedAt(presetBrief('office'), 24) }).expect(200);
    const { rows } = await road.db.raw<{ rows: { act: string; by: string }[] }>(
      `select act, person_id as by from audit_events where subject ->> 'briefId' = ? order by act`,
      [briefId],
    );
    expect(rows).toEqual([
      { act: 'brief made', by: planner.personId },
      { act: 'brief version saved', by: planner.personId },
    ]);
  });
});

describe('two versions', () => {
  it('are compared in words with units', async () => {
    const { briefId } = await newBrief('office');
    const body: Brief = { ...fixedAt(presetBrief('office'), 27.5), caps: {}, stages: ['twostage', 'direct'] };
    await save(briefId, { basedOn: 1, body }).expect(200);
    const { body: difference } = await planner.agent
      .get(`${programme}/briefs/${briefId}/difference?from=1&to=2`)
      .expect(200);
    expect(difference.changes).toEqual([
      { path: 'limit.tempC', label: 'Room temperature', before: '26 °C', after: '27.5 °C' },
      { path: 'caps.roomRhPct', label: 'Room humidity, at most', before: '65 % RH', after: 'none' },
      {
        path: 'stages',
        label: 'Stages, in order',
        before: 'direct, indirect, two-stage',
        after: 'two-stage, direct',
      },
    ]);
    await planner.agent.get(`${programme}/briefs/${briefId}/difference?from=1&to=9`).expect(404);
  });
});

describe('a draft beside the form', () => {
  const preview = (body: unknown, by: Member = planner, station = stationId) =>
    by.agent.post(`${programme}/briefs/preview`).send({ stationId: station, body });

  it('comes to the figures and the classes of the run that saving it makes', async () => {
    const { briefId } = await newBrief('clinic');
    const draft = fixedAt(presetBrief('clinic'), 24.5);
    const { body: shown }: { body: BriefPreview } = await preview(draft).expect(200);
    await save(briefId, { basedOn: 1, body: draft }).expect(200);
    const place = await eventually('the run', async () => {
      const { body }: { body: Place } = await planner.agent.get(`${programme}/stations/${stationId}?brief=${briefId}`);
      return body.brief.version === 2 && body.shown !== null && body;
    });
    expect(shown.ledger).toEqual(place.shown?.ledger);
    expect(shown.score).toBe(place.shown?.score);
    expect(shown.verdict).toBe(place.shown?.verdict);
    expect(shown.parts).toEqual(place.shown?.parts);
    const classes = await deskOf(team, planner).runHours(place.shown?.runId ?? '');
    expect(Buffer.from(shown.hourClasses, 'base64').equals(classes)).toBe(true);
    expect(classes).toHaveLength(8760);
  });

  it('is judged under every preset, and stores nothing', async () => {
    const before = await road.countRows();
    for (const preset of presetNames) {
      const { body: shown }: { body: BriefPreview } = await preview(presetBrief(preset)).expect(200);
      expect(
        Object.values(shown.ledger.classes).reduce((sum, count) => sum + count, 0),
        preset,
      ).toBe(8760);
    }
    expect(await road.countRows()).toEqual(before);
  });

  it('that no hour can fulfil is answered honestly: nothing met, no demand, no price', async () => {
    const cold = { ...fixedAt(presetBrief('office'), 2), balanceTempC: -10 };
    const { body: hopeless }: { body: BriefPreview } = await preview(cold).expect(200);
    expect(hopeless.ledger).toMatchObject({ met: 0 });
    expect(hopeless.verdict).toBe('does not');
    const { body: idle }: { body: BriefPreview } = await preview({
      ...presetBrief('office'),
      limit: { kind: 'fixed', tempC: 60 },
      balanceTempC: 60,
    }).expect(200);
    expect(idle).toMatchObject({ score: null, scoreNote: 'not applicable: no demand' });
    expect(idle.parts.map(({ points }) => points)).toEqual(idle.parts.map(() => null));
  });

  it('with faults is answered by them, and for a station of another team by not found', async () => {
    const faulty = await preview({ ...presetBrief('office'), cycles: 1 });
    expect(faulty.body.problems).toEqual([{ path: 'body.body.cycles', message: expect.stringContaining('over 1') }]);
    await preview(presetBrief('office'), planner, team.programmeId).expect(404);
  });
});

describe('another team', () => {
  it('finds none of it, under its own address or ours', async () => {
    const { briefId } = await newBrief('office');
    const theirs = await road.makeTeam('Southern clinics');
    const { agent } = theirs.lead;
    const own = `/api/teams/${theirs.teamId}/programmes`;
    for (const base of [programme, `${own}/${team.programmeId}`, `${own}/${theirs.programmeId}`]) {
      await agent.get(`${base}/briefs/${briefId}/versions`).expect(404);
      await agent.get(`${base}/briefs/${briefId}/versions/1`).expect(404);
      await agent.get(`${base}/briefs/${briefId}/difference?from=1&to=1`).expect(404);
      const body = fixedAt(presetBrief('office'), 25);
      await agent.post(`${base}/briefs/${briefId}/versions`).send({ basedOn: 1, body }).expect(404);
      await agent.post(`${base}/briefs/preview`).send({ stationId, body }).expect(404);
      await agent.get(`${base}/map?brief=${briefId}`).expect(404);
    }
    expect(await versionsOf(briefId)).toHaveLength(1);
  });
});
