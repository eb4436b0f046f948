/**
 * `rescore-1`: weather years judged anew under a changed brief, one thread: every class with its shortfall, spells, month x hour
 * tables, water, electricity and score, against PsychroLib asked each hour for the humidity ratio, the wet bulb, the wet bulb
 * after an indirect stage and the humidity ratio of the supply, from which a plain program would take its modes.
 */
import type { Brief } from '#engine/brief/brief.ts';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { presetBrief } from '../../support/presets.ts';
import type { Bench } from '../bench.ts';
import { benchYears } from '../bench-years.ts';
import { growthExponent, processorMs, sideBySide } from '../side-by-side.ts';

const OUR_YEARS = 200;
const PLAIN_YEARS = 5;

/** The office brief at every hour of the year, its set-point moved by the caller. */
function everyHour(tempC: number): Brief {
  return presetBrief('office', { hours: '0-24', weekdays: 'all', clock: 'standard', limit: { kind: 'fixed', tempC } });
}

function judge(years: readonly WeatherYear[], brief: Brief): number {
  let met = 0;
  for (const year of years) met += judgeYear({ year, brief, zone: 'UTC', heightM: 100 }).ledger.met;
  return met;
}

/** What PsychroLib is asked for each hour; what it says is added up so that none of it can be left out. */
function plainYear({ packed }: WeatherYear, brief: Brief): number {
  const { dryBulbC, humidityRatio, pressurePa } = unpackYear(packed);
  let sum = 0;
  for (const [slot, tempC] of dryBulbC.entries()) {
    const ratio = humidityRatio[slot] ?? Number.NaN;
    const pressure = pressurePa[slot] ?? Number.NaN;
    if (Number.isNaN(tempC + ratio + pressure)) continue;
    const relative = Math.min(1, psychrolib.GetRelHumFromHumRatio(tempC, ratio, pressure));
    const found = psychrolib.GetHumRatioFromRelHum(tempC, relative, pressure);
    const wetC = psychrolib.GetTWetBulbFromHumRatio(tempC, found, pressure);
    const betweenC = tempC - brief.effIndirect * (tempC - wetC);
    const secondC = psychrolib.GetTWetBulbFromHumRatio(betweenC, found, pressure);
    const supplyC = betweenC - brief.effDirect * (betweenC - secondC);
    sum += psychrolib.GetHumRatioFromTWetBulb(supplyC, Math.min(secondC, supplyC), pressure);
  }
  return sum;
}

export const rescoreBench: Bench = {
  name: 'rescore-1',
  about: 'every hour of a year judged with water, electricity and score, PsychroLib each hour / one pass, one thread',
  gate: 100,
  compare: 'at least',
  run: () => {
    const years = benchYears(OUR_YEARS);
    const brief = everyHour(25.5);
    let sum = 0;
    const { plainMs, oursMs } = sideBySide({
      plain: () => {
        for (const year of years.slice(0, PLAIN_YEARS)) sum += plainYear(year, brief);
      },
      plainUnits: PLAIN_YEARS,
      ours: () => {
        sum += judge(years, brief);
      },
      oursUnits: OUR_YEARS,
    });
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(1)} ms/year`,
      ours: `${oursMs.toFixed(3)} ms/year`,
      fault: Number.isFinite(sum) ? null : 'a figure is not a number',
    };
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
