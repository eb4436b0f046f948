/**
 * `rescore-1`: 1,000 weather years judged anew under a changed brief, one thread: every class with its shortfall, spells, month x hour
 * tables, water, electricity and score, against the plain program of `plain-modes.ts`, which takes modes alone and runs on a few of the
 * same years. `rescore-2`: the same by two of the web's own threads, messages and all, by the clock; its line also says how long
 * 3,000 years take so.
 */
import type { Brief } from '#engine/brief/brief.ts';
import type { PackedYear, WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { shareColumns } from '../../../server/features/runs/shared-columns.ts';
import type { RescoredStation, StationToRescore } from '../../../server/jobs/web-task.ts';
import { makeWebThreadsOf, type WebThreads } from '../../../server/jobs/web-threads.ts';
import { presetBrief } from '../../support/presets.ts';
import type { Bench } from '../bench.ts';
import { benchYears } from '../bench-years.ts';
import { growthExponent, processorMs, sideBySide } from '../side-by-side.ts';
import { modesApart, plainModes } from './plain-modes.ts';

/** So many different years are made up; the others are copies of them, in memory of their own. */
const DIFFERENT_YEARS = 100;
const OUR_YEARS = 1000;
const MANY_YEARS = 3000;
const PLAIN_YEARS = 5;
/** Most hours in a hundred in which the two programs may disagree. */
const APART_PCT = 0.1;

/** The office brief at every hour of the year, its set-point moved by the caller. */
function everyHour(tempC: number): Brief {
  return presetBrief('office', { hours: '0-24', weekdays: 'all', clock: 'standard', limit: { kind: 'fixed', tempC } });
}

function judge(years: readonly WeatherYear[], brief: Brief): number {
  let met = 0;
  for (const year of years) met += judgeYear({ year, brief, zone: 'UTC', heightM: 100 }).ledger.met;
  return met;
}

function manyYears(count: number): readonly WeatherYear[] {
  const different = benchYears(Math.min(count, DIFFERENT_YEARS));
  return Array.from({ length: count }, (_none, index) => {
    const year = different[index % different.length];
    if (year === undefined) throw new Error('there are no years');
    return index < different.length ? year : { ...year, packed: copyOf(year.packed) };
  });
}

function copyOf({ dryBulb, humidityRatio, pressure, flags }: PackedYear): PackedYear {
  const columns = { dryBulb: dryBulb.slice(), humidityRatio: humidityRatio.slice() };
  return { ...columns, pressure: pressure.slice(), flags: flags.slice() };
}

/** Both programs' modes on the years that the plain one runs on; what is wrong, or null. */
function disagreement(years: readonly WeatherYear[], brief: Brief): string | null {
  let apart = 0;
  let hours = 0;
  for (const year of years) {
    const { hourClassCodes } = judgeYear({ year, brief, zone: 'UTC', heightM: 100 });
    apart += modesApart(plainModes(year, brief), hourClassCodes);
    hours += hourClassCodes.length;
  }
  const pct = (100 * apart) / hours;
  return pct <= APART_PCT ? null : `${pct.toFixed(3)} % of the hours are in another mode`;
}

export const rescoreBench: Bench = {
  name: 'rescore-1',
  about: '1,000 years judged at every hour with water, electricity and score, PsychroLib each hour / ours, one thread',
  gate: 100,
  compare: 'at least',
  run: () => {
    const years = manyYears(OUR_YEARS);
    const plainYears = years.slice(0, PLAIN_YEARS);
    const brief = everyHour(25.5);
    const { plainMs, oursMs } = sideBySide({
      plain: () => {
        for (const year of plainYears) plainModes(year, brief);
      },
      plainUnits: PLAIN_YEARS,
      ours: () => judge(years, brief),
      oursUnits: OUR_YEARS,
    });
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(1)} ms/year`,
      ours: `${oursMs.toFixed(3)} ms/year`,
      fault: disagreement(plainYears, brief),
    };
  },
};

const THREADS = 2;
const STATIONS_PER_PORTION = 32;
const CLOCK_ROUNDS = 4;

/** Stations of one year each, as the web hands them to its threads. */
function stationsOf(years: readonly WeatherYear[]): readonly StationToRescore[] {
  return years.map(({ packed, ...facts }, index) => ({
    stationId: String(index),
    zone: 'UTC',
    heightM: 100,
    adjustedFromM: null,
    position: { latitude: 0, longitude: 0 },
    years: [{ ...facts, weatherYearId: String(index), contentHash: '', columns: sharedOf(packed) }],
  }));
}

function sharedOf({ dryBulb, humidityRatio, pressure, flags }: PackedYear): SharedArrayBuffer {
  const bytes = ({ buffer, byteOffset, byteLength }: Int16Array | Uint16Array) =>
    new Uint8Array(buffer, byteOffset, byteLength);
  return shareColumns({
    dryBulb: bytes(dryBulb),
    humidityRatio: bytes(humidityRatio),
    pressure: bytes(pressure),
    flags,
  });
}

/** Time by the clock, ms, that threads take for all stations, portion by portion, with their answers. */
async function clockMs(threads: WebThreads, stations: readonly StationToRescore[], brief: Brief): Promise<number> {
  const begun = performance.now();
  const portions: Promise<readonly RescoredStation[]>[] = [];
  for (let from = 0; from < stations.length; from += STATIONS_PER_PORTION) {
    const portion = stations.slice(from, from + STATIONS_PER_PORTION);
    const on = { signal: new AbortController().signal, seat: portions.length % THREADS };
    portions.push(threads.rescore({ brief, stations: portion, withHashes: false }, on));
  }
  const judged = (await Promise.all(portions)).flat().length;
  if (judged !== stations.length) throw new Error(`${judged} of ${stations.length} stations were judged`);
  return performance.now() - begun;
}

async function bestClockMs(threads: WebThreads, stations: readonly StationToRescore[]): Promise<number> {
  let best = Number.POSITIVE_INFINITY;
  // A set-point is dragged: every round asks for another.
  for (let round = 0; round <= CLOCK_ROUNDS; round++) {
    const ms = await clockMs(threads, stations, everyHour(25.5 + round / 10));
    if (round > 0) best = Math.min(best, ms);
  }
  return best;
}

export const rescoreThreadsBench: Bench = {
  name: 'rescore-2',
  about: '1,000 years by the clock, PsychroLib each hour / two threads of the web with their messages',
  gate: 150,
  compare: 'at least',
  run: async () => {
    const years = manyYears(MANY_YEARS);
    const brief = everyHour(25.5);
    const stations = stationsOf(years);
    const entry = new URL('../../../server/web-thread.ts', import.meta.url);
    const threads = makeWebThreadsOf({ entry, threads: THREADS });
    try {
      const manyMs = await bestClockMs(threads, stations);
      const oursMs = (await bestClockMs(threads, stations.slice(0, OUR_YEARS))) / OUR_YEARS;
      let plainMs = Number.POSITIVE_INFINITY;
      for (let round = 0; round < CLOCK_ROUNDS; round++) {
        const begun = performance.now();
        for (const year of years.slice(0, PLAIN_YEARS)) plainModes(year, brief);
        plainMs = Math.min(plainMs, (performance.now() - begun) / PLAIN_YEARS);
      }
      return {
        ratio: plainMs / oursMs,
        plain: `${plainMs.toFixed(1)} ms/year`,
        ours: `${oursMs.toFixed(3)} ms/year; ${MANY_YEARS} years in ${(manyMs / 1000).toFixed(2)} s`,
        fault: disagreement(years.slice(0, PLAIN_YEARS), brief),
      };
    } finally {
      await threads.close();
    }
  },
};

const GROWTH_YEARS = [60, 120, 240, 480];
const GROWTH_ROUNDS = 5;

export const growthBench: Bench = {
  name: 'growth',
  about: 'exponent of the time to judge 60 to 480 weather years',
  gate: 1.1,
  compare: 'at most',
  run: () => {
    const years = benchYears(GROWTH_YEARS.at(-1) ?? 0);
    const brief = everyHour(24.5);
    judge(years, brief);
    const best = GROWTH_YEARS.map(() => Number.POSITIVE_INFINITY);
    for (let round = 0; round < GROWTH_ROUNDS; round++) {
      for (const [place, size] of GROWTH_YEARS.entries()) {
        const ms = processorMs(() => judge(years.slice(0, size), brief));
        best[place] = Math.min(best[place] ?? ms, ms);
      }
    }
    const points = GROWTH_YEARS.map((size, place) => ({ size, ms: best[place] ?? 0 }));
    return {
      ratio: growthExponent(points),
      plain: points.map(({ size }) => size).join(' / '),
      ours: `${points.map(({ ms }) => ms.toFixed(0)).join(' / ')} ms`,
      fault: null,
    };
  },
};
