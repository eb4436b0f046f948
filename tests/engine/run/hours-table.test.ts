/**
 * The export of hours, checked by itself: every class is found again from the cells of a row, the brief and the calendar alone,
 * by the oracle (written apart from the engine, PsychroLib for all moist air).
 */
import { describe, expect, test } from 'vitest';
import { briefSentence } from '#engine/brief/brief-sentence.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import { textCell } from '#engine/csv-cell.ts';
import { hourClasses } from '#engine/hour-classes/hour-class.ts';
import { hoursCsv } from '#engine/run/hours-csv.ts';
import { hoursTable } from '#engine/run/hours-table.ts';
import { judgeHours } from '#engine/run/judged-year.ts';
import { csvRecords, csvRows } from '../../support/csv-rows.ts';
import { presetBrief } from '../../support/presets.ts';
import { samples } from '../../support/sample-size.ts';
import { type Climate, climateHeightM, climates, climateYear } from '../../support/synthetic-climates.ts';
import { checkRow } from './oracle/check-row.ts';
import { rhPct, wetBulbC } from './oracle/oracle-air.ts';

/** A prime, so that every hour of the day is looked at. */
const EVERY_ROWS = samples(13, 1);
const ORIGIN = {
  file: 'here.epw',
  station: 'Here',
  weatherYear: 'typical year',
  licence: null,
  brief: 'a brief',
  briefSentence: 'a sentence',
  zone: 'UTC',
};

const PRESETS = [
  'office',
  'school',
  'clinic',
  'hall-recommended',
  'dairy',
  'warehouse',
  'process-water',
  'turbine-inlet',
];

/** A brief's hours of a climate as a table with the lines of a made-up file, and as its CSV; made once for all tests. */
const made = new Map<string, ReturnType<typeof makeHours>>();

function hoursOf(preset: string, climate: Climate) {
  const key = `${preset} ${climate.name}`;
  const hours = made.get(key) ?? makeHours(preset, climate);
  made.set(key, hours);
  return hours;
}

function makeHours(preset: string, climate: Climate) {
  const place = { year: climateYear(climate), zone: climate.zone, heightM: climateHeightM(climate) };
  const input = { ...place, brief: presetBrief(preset) };
  const lines = Uint32Array.from({ length: 8760 }, (_none, slot) => (slot % 7 === 0 ? 0 : slot + 9));
  const table = hoursTable({ ...input, lines });
  return { input, table, csv: hoursCsv(table, ORIGIN) };
}

/** Records of every nth row of a CSV without line breaks in its cells, from a row on; and how many rows it has. */
function recordsOf(csv: string, { from, every }: { from: number; every: number }) {
  const lines = csv.trimEnd().split('\n');
  const header = lines.findIndex((line) => !line.startsWith('# '));
  const rows = lines.slice(header + 1);
  const chosen = rows.filter((_row, at) => at >= from && (at - from) % every === 0);
  return { count: rows.length, records: csvRecords([lines[header], ...chosen].join('\n')) };
}

const climateOf = (preset: string): Climate => {
  const climate = climates[(10 - PRESETS.indexOf(preset)) % 10];
  if (climate === undefined) throw new Error('ten climates');
  return climate;
};

const numberOf = (cell: string | undefined): number => (cell === undefined || cell === '' ? Number.NaN : Number(cell));

describe('the hours of a year as a table', () => {
  test.each(PRESETS)(
    'says enough that every class under %s can be found again from it',
    (preset) => {
      const brief = presetBrief(preset);
      const classes = new Set<string>();
      const wrong: string[] = [];
      let compared = 0;
      let near = 0;
      // One climate for each preset, all of them in the soak: the oracle's own test has every pair.
      const ofPreset = samples(10, 1) === 1 ? climates : [climateOf(preset)];
      for (const climate of ofPreset) {
        const rows = { from: climates.indexOf(climate), every: EVERY_ROWS };
        const { count, records } = recordsOf(hoursOf(preset, climate).csv, rows);
        if (count !== 8760) wrong.push(`${climate.name}: ${count} rows`);
        for (const row of records) {
          const found = checkRow(brief, row);
          compared += 1;
          classes.add(row.class ?? '');
          if (found === 'near a threshold') near += 1;
          else if (found !== 'same') wrong.push(`${climate.name} ${found}`);
        }
      }
      expect(wrong.slice(0, 10)).toEqual([]);
      expect(compared).toBeGreaterThan((ofPreset.length * 8700) / EVERY_ROWS);
      expect(near).toBeLessThanOrEqual(compared / 500);
      expect(classes.size).toBeGreaterThan(2);
    },
    120_000,
  );

  test('gives wet bulb, humidities and rooms that PsychroLib gives for the cells beside them', () => {
    const brief = presetBrief('office');
    let rooms = 0;
    let wetBulbs = 0;
    for (const climate of climates.filter((_climate, at) => at % samples(3, 1) === 0)) {
      for (const row of recordsOf(hoursOf('office', climate).csv, { from: 11, every: 53 }).records) {
        const [t, w, p] = [row.dry_bulb_C, row.humidity_ratio_kg_kg, row.pressure_Pa].map(numberOf);
        if (t === undefined || w === undefined || p === undefined || Number.isNaN(t + w + p)) {
          expect([row.wet_bulb_C, row.relative_humidity_pct]).toEqual(['', '']);
          continue;
        }
        expect(Math.abs(numberOf(row.relative_humidity_pct) - rhPct(t, w, p))).toBeLessThan(0.006);
        const wet = wetBulbC(t, w, p);
        // Two roots near 0 °C (the method's section 1): compared outside.
        if (Math.abs(wet) >= 1) {
          wetBulbs += 1;
          expect(Math.abs(numberOf(row.wet_bulb_C) - wet)).toBeLessThan(0.003);
        }
        if (row.met === '' || row.room_C === '') continue;
        rooms += 1;
        const supplyC = numberOf(row.supply_C);
        const roomC = Math.max(supplyC, numberOf(row.limit_C) - brief.dTroomK) + brief.dTroomK;
        expect(Math.abs(numberOf(row.room_C) - roomC)).toBeLessThan(0.002);
        const roomPct = rhPct(roomC, numberOf(row.supply_humidity_ratio_kg_kg) + brief.dwRoomKgKg, p);
        expect(Math.abs(numberOf(row.room_relative_humidity_pct) - roomPct)).toBeLessThan(0.02);
      }
    }
    expect(wetBulbs).toBeGreaterThan(500);
    expect(rooms).toBeGreaterThan(80);
  });

  test('has one row for every slot in order, with the run’s classes, the file’s lines and a reason in words', () => {
    for (const preset of PRESETS) {
      const { input, table } = hoursOf(preset, climateOf(preset));
      const judged = judgeHours(input);
      const { rows } = table;
      expect(rows.map(({ hourClass }) => hourClasses.indexOf(hourClass)).join()).toBe(judged.classCodes.join());
      expect(rows).toHaveLength(8760);
      expect(rows.every(({ slot }, at) => slot === at)).toBe(true);
      expect([rows[0]?.line, rows[1]?.line, rows[8]?.line]).toEqual([null, 10, 17]);
      const total = judged.demandHours.reduce((sum, { plant }) => sum + plant.makeUpLitres, 0);
      expect(rows.reduce((sum, { waterLitres }) => sum + (waterLitres ?? 0), 0)).toBeCloseTo(total, 6);
      const odd = rows.filter(({ reason }) => !/^\p{Lu}.*\.$/u.test(reason) || /NaN|undefined|null/.test(reason));
      expect(odd.map(({ reason }) => reason).slice(0, 5)).toEqual([]);
    }
  });

  test('carries civil time beside standard time, also where the schedule is in standard time', () => {
    const [desert] = climates;
    if (desert === undefined) throw new Error('ten climates');
    const input = { year: { ...climateYear(desert), utcOffsetMin: 60 }, zone: 'Europe/Madrid', heightM: 0 };
    for (const preset of ['office', 'dairy']) {
      const rows = hoursCsv(hoursTable({ ...input, brief: presetBrief(preset) }), ORIGIN)
        .trimEnd()
        .split('\n');
      const header = rows.find((row) => !row.startsWith('# '));
      // 2029: summer time from Sunday 25 March 02:00 to Sunday 28 October 03:00 (rule of the European Union).
      const record = (row: string | undefined) => csvRecords([header, row].join('\n'))[0];
      const at = (standard: string) => record(rows.find((row) => row.startsWith(`${standard},`)))?.civil_time;
      expect(at('2029-01-01 01:00')).toBe('2029-01-01 01:00');
      expect(at('2029-03-25 02:00')).toBe('2029-03-25 02:00');
      expect(at('2029-03-25 03:00')).toBe('2029-03-25 04:00');
      expect(at('2029-07-01 00:00')).toBe('2029-07-01 01:00');
      expect(at('2029-10-28 03:00')).toBe('2029-10-28 03:00');
      expect(record(rows.at(-1))?.standard_time).toBe('2030-01-01 00:00');
    }
  });
});

describe('the table as CSV', () => {
  test('says above its columns what it is, with names from files that cannot act as formulas', () => {
    const [desert] = climates;
    if (desert === undefined) throw new Error('ten climates');
    const brief = presetBrief('office');
    const { rows: hours, ...table } = hoursTable({ year: climateYear(desert), brief, zone: desert.zone, heightM: 0 });
    const everyRows = samples(7, 1);
    const text = hoursCsv(
      { ...table, rows: hours.filter((_row, at) => at % everyRows === 0) },
      {
        ...ORIGIN,
        file: '-a,"b".epw',
        station: '=HYPERLINK("x")',
        briefSentence: briefSentence(brief),
        zone: desert.zone,
      },
    );
    const rows = csvRows(text);
    const about = new Map(rows.filter(([name = '']) => name.startsWith('# ')).map(([name, value]) => [name, value]));
    expect(about.get('# method version')).toBe(METHOD_VERSION);
    expect(about.get('# brief')).toBe('a brief');
    expect(about.get('# requirement')).toBe(briefSentence(brief));
    expect(about.get('# file')).toBe(`'-a,"b".epw`);
    expect(about.get('# station')).toBe(`'=HYPERLINK("x")`);
    expect(about.get('# units')).toContain('per kW of design load');
    const width = rows[about.size]?.length;
    expect(new Set(rows.slice(about.size).map(({ length }) => length))).toEqual(new Set([width]));
    // What begins like a formula is a number: no cell of text does.
    const formulas = rows.flat().filter((cell) => /^[=+\-@\t\r]/.test(cell) && !/^-\d+(\.\d+)?$/.test(cell));
    expect(formulas).toEqual([]);
    expect(text).not.toMatch(/NaN|undefined|null|Infinity|(^|,)-0\.?0*(,|$)/m);
  });

  test.each([
    ['=1+1', "'=1+1"],
    ['+1', "'+1"],
    ['-1', "'-1"],
    ['@name', "'@name"],
    ['  =1', "'  =1"],
    ['\ttab', "'\ttab"],
    ['\r=1', '"\'\r=1"'],
    ['A, "B"', '"A, ""B"""'],
    ['two\nlines', '"two\nlines"'],
    ['plain = text', 'plain = text'],
    ['', ''],
  ])('writes the text %j as %j', (text, cell) => {
    expect(textCell(text)).toBe(cell);
  });
});
