import { gzipSync } from 'node:zlib';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { WeatherFileRecord } from '../../../src/contract/weather.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk, toBuffer } from '../../support/team-desk.ts';

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
afterEach(async () => {
  expect(road.log.errors).toEqual([]);
  expect(await road.waitingUploads()).toEqual([]);
});
afterAll(() => road.close());

const good = demoEpw(0).text;
const lines = good.split('\r\n');
const HEADER_LINES = 8;

/** The good file with one line changed; lines are counted from 1. */
function withLine(line: number, change: (text: string) => string): string {
  return lines.map((text, index) => (index === line - 1 ? change(text) : text)).join('\r\n');
}

function withField(line: number, field: number, value: string): string {
  return withLine(line, (text) =>
    text
      .split(',')
      .with(field - 1, value)
      .join(','),
  );
}

interface Bad {
  readonly what: string;
  readonly content: string | Buffer;
  readonly code: string;
  readonly line?: number;
  readonly says?: RegExp;
}

const MIB = 1024 * 1024;
const cases: readonly Bad[] = [
  { what: 'a letter', content: 'Dear colleague,\nplease find the weather below.\n', code: 'header' },
  { what: 'an empty file', content: '', code: 'too-few-rows' },
  { what: '8760 lines of nothing', content: '\n'.repeat(8760), code: 'too-few-rows' },
  { what: '8760 lines of commas', content: `${','.repeat(34)}\n`.repeat(8760), code: 'header' },
  { what: 'a header without hours', content: lines.slice(0, HEADER_LINES).join('\r\n'), code: 'too-few-rows' },
  { what: 'letters for a number', content: withField(500, 7, 'warm'), code: 'not-a-number', line: 500 },
  {
    what: 'a line of five fields',
    content: withLine(600, (text) => text.split(',').slice(0, 5).join(',')),
    code: 'field-count',
    line: 600,
  },
  { what: 'a gzip bomb', content: gzipSync(Buffer.alloc(200 * MIB)), code: 'binary', says: /200 times/ },
  { what: 'a picture', content: Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex'), code: 'binary' },
];

describe('a file that cannot be read', () => {
  it.each(cases)('is refused with what is wrong and where: $what', async ({ content, code, line, says }) => {
    const before = await road.countRows();
    const { file } = await desk.upload('bad.epw', content);
    const record = await desk.readToTheEnd(file.id);
    expect(record.file).toMatchObject({ status: 'refused', step: null, failure: null, kind: null, completePct: null });
    expect(record.facts).toBeNull();
    const refusals = record.findings.filter(({ severity }) => severity === 'refuse');
    const found = refusals.find((finding) => finding.code === code);
    expect(found, JSON.stringify(refusals)).toBeDefined();
    if (line !== undefined) {
      expect(found?.line).toBe(line);
      expect(found?.message).toMatch(new RegExp(`\\b${line}\\b`));
    }
    if (says !== undefined) expect(found?.message).toMatch(says);
    expect(record.file.findingCounts.refuse).toBe(refusals.length);
    await expectNothingHalfStored(before, record);
    expect((await desk.accept(file.id)).body).toMatchObject({
      code: 'wrong_state',
      message: expect.stringMatching(/refused/),
    });
  });

  it('is refused when it is cut off anywhere before its hours are many enough', async () => {
    const bytes = Buffer.from(good);
    const cuts = [1, 9, 100, 700, 2000, 5000, 60_000];
    for (const cut of cuts) {
      const { file } = await desk.upload(`cut at ${cut}.epw`, bytes.subarray(0, cut));
      const record = await desk.readToTheEnd(file.id);
      expect(record.file.status, `cut at byte ${cut}`).toBe('refused');
      expect(record.findings.some(({ severity }) => severity === 'refuse')).toBe(true);
    }
    expect(cuts).toHaveLength(7);
  });

  it('keeps its original, so that it can be looked at again', async () => {
    const content = 'Not weather at all.\n';
    const { file } = await desk.upload('note.txt', content);
    await desk.readToTheEnd(file.id);
    const original = await engineer.agent
      .get(`/api/teams/${team.teamId}/weather-files/${file.id}/original`)
      .buffer()
      .parse(toBuffer)
      .expect(200)
      .expect('Content-Disposition', /attachment; filename=note\.txt/);
    expect(original.body.toString()).toBe(content);
  });

  /** One row for the file, one for each finding, one for the audit trail, and no job left over. */
  async function expectNothingHalfStored(before: Readonly<Record<string, number>>, record: WeatherFileRecord) {
    const after = await road.countRows();
    const more = Object.fromEntries(
      Object.entries(after)
        .map(([table, count]) => [table, count - (before[table] ?? 0)] as const)
        .filter(([, count]) => count !== 0),
    );
    expect(more).toEqual({
      'public.audit_events': 1,
      'public.findings': record.findings.length,
      'public.weather_files': 1,
    });
  }
});

describe('a name that means harm', () => {
  it('is shown without folders and control characters, and is never a path of the store', async () => {
    const body = (fileName: string) =>
      [
        '--border',
        `Content-Disposition: form-data; name="file"; filename="${fileName}"`,
        '',
        `${fileName} is no weather`,
        '--border--',
        '',
      ].join('\r\n');
    const names = [
      '../../../../tmp/x.epw',
      '..\\\\..\\\\x.epw',
      'a%0Ab.epw',
      'x\u0000y.epw',
      '<script>alert(1)</script>.epw',
      `${'n'.repeat(5000)}.epw`,
    ];
    let taken = 0;
    for (const name of names) {
      const response = await engineer.agent
        .post(`/api/teams/${team.teamId}/weather-files`)
        .set('Content-Type', 'multipart/form-data; boundary=border')
        .send(body(name));
      if (response.status === 400) continue;
      expect(response.status).toBe(200);
      taken += 1;
      expect(response.body.file.name).not.toMatch(/[/\\]|\p{Cc}/u);
      expect([...response.body.file.name].length).toBeLessThanOrEqual(200);
      await desk.readToTheEnd(response.body.file.id);
    }
    expect(taken).toBeGreaterThanOrEqual(4);
  });
});

describe('an upload that is no upload', () => {
  it('is refused before anything is stored', async () => {
    const before = await road.countRows();
    const path = `/api/teams/${team.teamId}/weather-files`;
    await engineer.agent.post(path).send({ file: 'x' }).expect(400);
    await engineer.agent.post(path).attach('other', Buffer.from('x'), 'x.epw').expect(400);
    await engineer.agent.post(path).field('file', 'text, not a file').expect(400);
    await engineer.agent
      .post(path)
      .attach('file', Buffer.from('x'), 'x.epw')
      .attach('file', Buffer.from('y'), 'y.epw')
      .expect(400);
    expect(await road.countRows()).toEqual(before);
  });
});
