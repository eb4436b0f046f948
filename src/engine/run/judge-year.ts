import type { Brief } from '../brief/brief.ts';
import { METHOD_VERSION, SLOTS_PER_LEAP_YEAR } from '../conventions.ts';
import { isIndexLimit } from '../hour-classes/index-limit.ts';
import { yearlyMoney } from '../money/yearly-money.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import { coverageOf } from '../score/coverage.ts';
import { exclusionOf, gatesOf } from '../score/gates.ts';
import { countHardLimits } from '../score/hard-limits.ts';
import { rawComponents } from '../score/raw-components.ts';
import { verdictOf } from '../score/verdict.ts';
import { bandWord, weightedScore } from '../score/weighted-score.ts';
import { addPlant, noPlant, type PlantSums, plantOfYear } from '../water-energy/tally-plant.ts';
import { tallyDegreeHours } from '../water-energy/tally-turbine.ts';
import { addHours, type HourCounts, noHours } from './count-hours.ts';
import { cellOfEachSlot, type HourCells, hourCells, monthRows } from './hour-cells.ts';
import { type HourColumns, hourColumns } from './hour-columns.ts';
import { type JudgedYear, type JudgeYearInput, judgeHours } from './judged-year.ts';
import type { RunResult } from './run-result.ts';
import { scaleForMissing } from './scale-for-missing.ts';
import { tallyAloneHours, tallySupplyCurve, tallyWorstSpell } from './tally-hours.ts';
import { tallyLedger } from './tally-ledger.ts';
import { type SuppliedAir, tallyReported } from './tally-reported.ts';

export type { JudgeYearInput } from './judged-year.ts';

/** Columns for years of which single hours are looked at, one after another: nothing of them is left in a result. */
const workspace = hourColumns(SLOTS_PER_LEAP_YEAR);

/**
 * One weather year judged by one brief (method 3 to 7), from the packed columns alone. Same inputs, same result.
 * @throws RangeError when the zone is not known, the columns are no year, or a schedule of daylight hours has no position
 */
export function judgeYear(input: JudgeYearInput): RunResult {
  const { brief, heightM, year } = input;
  const slots = year.packed.dryBulb.length;
  const cellOf = cellOfEachSlot(slots);
  const monthOf = monthOfEachSlot(slots);
  const counts = noHours();
  const plant = noPlant();
  const take = (): void => {
    addHours(cellOf);
    addPlant(monthOf);
  };
  const judged = judgeHours(input, { into: looksAtHours(brief) ? workspace : null, take });
  const cells = hourCells(judged, counts);
  const counted = countHours(judged, { counts, plant, cells }, input);
  const hardLimits = countHardLimits({ brief, heightM, hours: counts.unmet });
  const coverage = coverageOf({ slots: judged.slots, missing: judged.missing, cells });
  const gates = gatesOf({ brief, coverage, hardLimits });
  return {
    methodVersion: METHOD_VERSION,
    clock: judged.clock,
    usable: coverage.usable,
    monthsShort: coverage.monthsShort,
    ...counted,
    ...yearlyMoney(counted, brief),
    gates,
    ...verdictOf({ brief, ledger: counted.ledger, worstSpell: counted.worstSpell, hardLimits }),
    ...scoreOf(counted, { brief, exclusion: exclusionOf(gates) }),
    hourClassCodes: judged.classCodes,
  };
}

/** Whether more is asked of single hours than what is counted of every brief. */
function looksAtHours({ limit, reported, lowerLimits }: Brief): boolean {
  return (
    limit.kind === 'adaptive' || limit.kind === 'turbine' || reported.length > 0 || Object.keys(lowerLimits).length > 0
  );
}

function countHours(
  judged: JudgedYear,
  { counts, plant, cells }: { counts: HourCounts; plant: PlantSums; cells: HourCells },
  { year, brief }: JudgeYearInput,
) {
  return {
    ledger: tallyLedger(judged, counts),
    severityKh: sumOf(counts.unmet.shortfallK, counts.unmet.count),
    worstSpell: tallyWorstSpell(counts.unmet, judged, year),
    aloneHours: tallyAloneHours(counts, judged, brief),
    supplyCurve: tallySupplyCurve(counts),
    demandByMonthHour: monthRows(cells.demand),
    metByMonthHour: monthRows(cells.met),
    scaled: scaleForMissing(cells),
    clampedLimitHours: countClamped(judged),
    degreeHours: tallyDegreeHours(brief, judged.hours),
    recirculatedHours: { all: counts.recirculated, warm: counts.warm },
    reported: tallyReported(brief, () => suppliedAirs(judged.hours)),
    ...plantOfYear(plant, judged.use),
  };
}

function* suppliedAirs(hours: HourColumns): Iterable<SuppliedAir> {
  for (let at = 0; at < hours.count; at++) {
    const ratio = hours.supplyRatio[at] ?? Number.NaN;
    yield {
      supplyC: hours.supplyC[at] ?? Number.NaN,
      supplyRatio: Number.isNaN(ratio) ? null : ratio,
      supplyAimC: hours.supplyAimC[at] ?? Number.NaN,
      loadFraction: hours.loadFraction[at] ?? Number.NaN,
      pressurePa: hours.pressurePa[at] ?? Number.NaN,
    };
  }
}
function sumOf(column: Float64Array, count: number): number {
  let sum = 0;
  for (let at = 0; at < count; at++) sum += column[at] ?? 0;
  return sum;
}

function countClamped({ outsideRange, hours }: JudgedYear): number | null {
  if (outsideRange === null) return null;
  let clamped = 0;
  for (let at = 0; at < hours.count; at++) clamped += outsideRange[hours.slot[at] ?? 0] ?? 0;
  return clamped;
}

function scoreOf(counted: ReturnType<typeof countHours>, input: { brief: Brief; exclusion: string | null }) {
  const { brief, exclusion } = input;
  const indexPoints = isIndexLimit(brief.limit);
  const weighted = weightedScore(brief.score, rawComponents(counted, brief), { indexPoints });
  const noDemand = counted.ledger.demand === 0 ? 'not applicable: no demand' : null;
  const scoreNote = exclusion ?? noDemand;
  const score = scoreNote === null && weighted.scoreExact !== null ? Math.round(weighted.scoreExact) : null;
  return { score, scoreNote, words: score === null ? null : bandWord(score), ...weighted };
}
