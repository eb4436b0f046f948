/**
 * Ledgers worked out from the method's text alone, twice and by programs written apart, for nine real typical years: the
 * outside truth for everything between a file's bytes and its score. At most 0.5 % of the hours in another class, the score
 * within 1 point. Those programs applied no quality rules beyond missing codes, clamping, gaps and the pressure repair.
 */
import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { type HourClass, hourClasses } from '#engine/hour-classes/hour-class.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import type { RunResult } from '#engine/run/run-result.ts';
import { ruleNames } from '#engine/weather-files/quality/quality-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';
import { realFile, sharedFolder, WITHOUT_SHARED } from '../../support/shared.ts';

/** The zone of each file's place; a file gives an offset only. */
const ZONES: Readonly<Record<string, string>> = {
  'addisababa-swera-2355m': 'Africa/Addis_Ababa',
  'hangzhou-swera': 'Asia/Shanghai',
  'houston-tx-tmy3': 'America/Chicago',
  'leadville-co-tmy3-3026m': 'America/Denver',
  'miami-fl-tmy3': 'America/New_York',
  'phoenix-az-tmy3': 'America/Phoenix',
  'piedmont-it-pvgis': 'Europe/Rome',
  'seattle-wa-tmy3': 'America/Los_Angeles',
  'thermal-ca-tmy3-below-sea-level': 'America/Los_Angeles',
};

const HOURS_APART_SHARE = 0.005;
const SCORE_POINTS = 1;
const SPELL_H = 10;
const WATER_L_PER_KWH = 0.05;
const SAVED_PCT = 1;

type Row = Readonly<Record<string, string>>;

function publishedRows(): Row[] {
  if (sharedFolder === null) return [];
  const [head = '', ...lines] = readFileSync(`${sharedFolder}presets/ledgers.csv`, 'utf8').trim().split(/\r?\n/);
  const names = head.split(',');
  return lines.map((line) => Object.fromEntries(line.split(',').map((value, column) => [names[column] ?? '', value])));
}

interface RealYear {
  readonly year: WeatherYear;
  readonly heightM: number;
  readonly position: { readonly latitude: number; readonly longitude: number };
}

/** The rules that those programs did not have. */
const rulesOff = ruleNames.filter((rule) => rule !== 'pressure-range');

function readRealYear(file: string): RealYear {
  const reading = readWeatherFile(realFile(file), file, { rulesOff });
  if (reading.status === 'refused' || reading.hours === null) throw new Error(`${file} was refused`);
  const { latitude, longitude, elevationM } = reading.station;
  if (latitude === null || longitude === null || elevationM === null)
    throw new Error(`${file} does not say where it is`);
  return { year: reduceYear(reading).year, heightM: elevationM, position: { latitude, longitude } };
}

/** Hours that would have to move for the two ledgers to agree. */
function hoursApart(result: RunResult, row: Row): number {
  const apart = (hourClass: HourClass): number => Math.abs(result.ledger.classes[hourClass] - Number(row[hourClass]));
  return hourClasses.reduce((sum, hourClass) => sum + apart(hourClass), 0) / 2;
}

const rows = publishedRows();

/** What differs in the digits that the row prints, as "found (row)"; a figure that a row leaves out is not looked at. */
function differencesOf(result: RunResult, row: Row): string[] {
  const found: readonly (readonly [column: string, value: string])[] = [
    ...hourClasses.map((hourClass) => [hourClass, String(result.ledger.classes[hourClass])] as const),
    ['demand', String(result.ledger.demand)],
    ['met', String(result.ledger.met)],
    ['worst_spell_h', String(result.worstSpell?.hours ?? 0)],
    ['severity', result.severityKh.toFixed(2)],
    ['water_L_per_kWh', (result.water.litresPerKwh ?? 0).toFixed(3)],
    ['saved_pct', (result.electricity?.savedPct ?? 0).toFixed(2)],
    ['score_exact', (result.scoreExact ?? 0).toFixed(2)],
  ];
  return found.flatMap(([column, value]) =>
    row[column] === '' || row[column] === value ? [] : [`${column} ${value} (${row[column]})`],
  );
}

describe.skipIf(sharedFolder === null)(`published ledgers (skipped where ${WITHOUT_SHARED})`, () => {
  const years = new Map<string, RealYear>();

  beforeAll(() => {
    for (const { file = '' } of rows) if (!years.has(file)) years.set(file, readRealYear(file));
  }, 60_000);

  test('cover nine files under every preset that ships', () => {
    expect(years.size).toBe(9);
    expect(rows).toHaveLength(9 * presetNames.length);
    expect(new Set(rows.map(({ preset }) => preset))).toEqual(new Set(presetNames));
  });

  test.each(rows)('$file under $preset', (row) => {
    const { file = '', preset = '' } = row;
    const real = years.get(file);
    const zone = ZONES[file.replace(/^epw\/|\.epw$/g, '')];
    if (real === undefined || zone === undefined) throw new Error(`no year or zone of ${file}`);
    const result = judgeYear({ ...real, zone, brief: presetBrief(preset) });
    const apart = hoursApart(result, row);
    const scoreApart = Math.abs((result.scoreExact ?? 0) - Number(row.score_exact));
    const differences = differencesOf(result, row).join(', ');
    expect(apart, differences).toBeLessThanOrEqual(HOURS_APART_SHARE * result.ledger.hours);
    expect(scoreApart, differences).toBeLessThanOrEqual(SCORE_POINTS);
    expect(result.verdict, differences).toBe(row.verdict);
    expect(Math.abs((result.worstSpell?.hours ?? 0) - Number(row.worst_spell_h))).toBeLessThanOrEqual(SPELL_H);
    expect(Math.abs((result.water.litresPerKwh ?? 0) - Number(row.water_L_per_kWh))).toBeLessThanOrEqual(
      WATER_L_PER_KWH,
    );
    expect(Math.abs((result.electricity?.savedPct ?? 0) - Number(row.saved_pct))).toBeLessThanOrEqual(SAVED_PCT);
    expect(result.gates.filter(({ answer }) => answer === 'fail')).toHaveLength(row.gates_failed === '' ? 0 : 1);
  });
});
