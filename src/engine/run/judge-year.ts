import type { Brief } from '../brief/brief.ts';
import { HOURS_PER_DAY, METHOD_VERSION } from '../conventions.ts';
import { isIndexLimit } from '../hour-classes/index-limit.ts';
import { yearlyMoney } from '../money/yearly-money.ts';
import { monthHourOfEachSlot } from '../reduction/calendar.ts';
import { coverageOf } from '../score/coverage.ts';
import { exclusionOf, gatesOf } from '../score/gates.ts';
import { countHardLimits } from '../score/hard-limits.ts';
import { rawComponents } from '../score/raw-components.ts';
import { verdictOf } from '../score/verdict.ts';
import { bandWord, weightedScore } from '../score/weighted-score.ts';
import { type PlantSums, plantOfYear, plantSums } from '../water-energy/tally-plant.ts';
import { tallyDegreeHours } from '../water-energy/tally-turbine.ts';
import { addHours, countedHours, type HourCounts, noHours } from './count-hours.ts';
import { block } from './hour-block.ts';
import { type HourCells, hourCells, monthRows } from './hour-cells.ts';
import { type JudgedYear, type JudgeYearInput, judgeHours } from './judged-year.ts';
import type { RunResult } from './run-result.ts';
import { scaleForMissing } from './scale-for-missing.ts';
import { tallyAloneHours, tallySupplyCurve, tallyWorstSpell } from './tally-hours.ts';
import { tallyLedger } from './tally-ledger.ts';
import { type ReportCounts, startReports } from './tally-reported.ts';

export type { JudgeYearInput } from './judged-year.ts';

/**
 * One weather year judged by one brief (method 3 to 7), from the packed columns alone. Same inputs, same result.
 * @throws RangeError when the zone is not known, the columns are no year, or a schedule of daylight hours has no position
 */
export function judgeYear(input: JudgeYearInput): RunResult {
  const { brief, heightM, year } = input;
  const cellOf = monthHourOfEachSlot(year.packed.dryBulb.length);
  noHours();
  const reports = startReports(brief);
  let degreeHours = brief.limit.kind === 'turbine' ? 0 : null;
  const take = (): void => {
    addHours(cellOf);
    reports?.add(block);
    if (degreeHours !== null) degreeHours = tallyDegreeHours(brief, block, degreeHours);
  };
  const judged = judgeHours(input, { keepsHours: false, take });
  const counts = countedHours();
  const cells = hourCells(judged, counts);
  const counted = countHours(judged, { counts, plant: plantSums, cells, reports, degreeHours }, input);
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

function countHours(
  judged: JudgedYear,
  found: {
    counts: HourCounts;
    plant: PlantSums;
    cells: HourCells;
    reports: ReportCounts | null;
    degreeHours: number | null;
  },
  { year, brief }: JudgeYearInput,
) {
  const { counts, plant, cells, reports, degreeHours } = found;
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
    degreeHours,
    recirculatedHours: { all: counts.recirculated, warm: counts.warm },
    reported: reports?.ofYear() ?? [],
    ...plantOfYear(plant, judged.use),
  };
}

function sumOf(column: Float64Array, count: number): number {
  let sum = 0;
  for (let at = 0; at < count; at++) sum += column[at] ?? 0;
  return sum;
}

function countClamped({ outsideRangeOfDay, demandSlots }: JudgedYear): number | null {
  if (outsideRangeOfDay === null) return null;
  let clamped = 0;
  for (let nth = 0; nth < demandSlots.length; nth++) {
    clamped += outsideRangeOfDay[((demandSlots[nth] ?? 0) / HOURS_PER_DAY) | 0] ?? 0;
  }
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
