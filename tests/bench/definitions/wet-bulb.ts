/** `wb` and `wb2`: the wet bulb of twenty years, and the second one after an indirect stage, against PsychroLib's. */
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { wetBulbColumn } from '#engine/psychrometrics/wet-bulb.ts';
import type { YearColumns } from '#engine/reduction/packed-columns.ts';
import type { Bench, BenchFinding } from '../bench.ts';
import { benchYears, knownHours } from '../bench-years.ts';
import { sideBySide } from '../side-by-side.ts';

const YEARS = 20;
/** PsychroLib takes a tenth of the hours; what it takes is multiplied. */
const PLAIN_EVERY = 10;
const EFFECTIVENESS = 0.65;
const NS_PER_MS = 1e6;

function plainWetBulbs({ dryBulbC, humidityRatio, pressurePa }: YearColumns): Float64Array {
  const found = new Float64Array(Math.ceil(dryBulbC.length / PLAIN_EVERY));
  for (let at = 0; at < found.length; at++) {
    const hour = at * PLAIN_EVERY;
    found[at] = psychrolib.GetTWetBulbFromHumRatio(
      dryBulbC[hour] ?? 0,
      humidityRatio[hour] ?? 0,
      pressurePa[hour] ?? 0,
    );
  }
  return found;
}

/** Both sides on the same states, and the largest difference where only one wet bulb is right. */
function compareOn(
  states: YearColumns,
  limits: { differenceK: number; counts: (wetC: number) => boolean },
): BenchFinding {
  const ours = new Float64Array(states.dryBulbC.length);
  let plain: Float64Array = new Float64Array(0);
  const { plainMs, oursMs } = sideBySide({
    plain: () => {
      plain = plainWetBulbs(states);
    },
    plainUnits: Math.ceil(ours.length / PLAIN_EVERY),
    ours: () => wetBulbColumn(states.dryBulbC, states.humidityRatio, states.pressurePa, ours),
    oursUnits: ours.length,
  });
  let worstK = 0;
  for (let at = 0; at < plain.length; at++) {
    const wetC = ours[at * PLAIN_EVERY] ?? Number.NaN;
    if (limits.counts(wetC)) worstK = Math.max(worstK, Math.abs(wetC - (plain[at] ?? Number.NaN)));
  }
  const apart = worstK <= limits.differenceK ? null : `${worstK} K apart`;
  return {
    ratio: plainMs / oursMs,
    plain: `${(plainMs * NS_PER_MS).toFixed(0)} ns/h`,
    ours: `${(oursMs * NS_PER_MS).toFixed(1)} ns/h, ${worstK.toFixed(5)} K apart`,
    fault: apart,
  };
}

function afterIndirect(states: YearColumns): YearColumns {
  const wetC = wetBulbColumn(states.dryBulbC, states.humidityRatio, states.pressurePa);
  const between = states.dryBulbC.map((tempC, at) => tempC - EFFECTIVENESS * (tempC - (wetC[at] ?? 0)));
  return { ...states, dryBulbC: between };
}

export const wetBulbBench: Bench = {
  name: 'wb',
  about: 'wet bulb of 20 years, PsychroLib / kernel',
  gate: 60,
  compare: 'at least',
  run: () => compareOn(knownHours(benchYears(YEARS)), { differenceK: 0.001, counts: (wetC) => Math.abs(wetC) >= 1 }),
};

export const secondWetBulbBench: Bench = {
  name: 'wb2',
  about: 'second wet bulb of 20 years, PsychroLib / kernel',
  gate: 40,
  compare: 'at least',
  run: () => compareOn(afterIndirect(knownHours(benchYears(YEARS))), { differenceK: 0.02, counts: (wetC) => wetC > 1 }),
};
