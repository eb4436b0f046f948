import { HOURS_PER_DAY } from '../conventions.ts';
import { monthHourOfEachSlot, monthStartSlots } from './calendar.ts';

const MONTHS = 12;
const CELLS = MONTHS * HOURS_PER_DAY;

/** Means of the known values of a year, null where none is known; months January first. */
export interface YearMeans {
  readonly dryBulbC: number | null;
  readonly wetBulbC: number | null;
  readonly monthlyDryBulbC: readonly (number | null)[];
  readonly monthlyWetBulbC: readonly (number | null)[];
  readonly monthlyDepressionK: readonly (number | null)[];
  /** By month (12) and hour of day (24). */
  readonly depressionByHourK: readonly (readonly (number | null)[])[];
}

/**
 * Every mean of a year in one pass: sums that wait for each other one by one take several times as long. Columns in slot order, NaN
 * where missing; the depression is known where the wet bulb is.
 */
export function yearMeans(columns: {
  dryBulbC: Float64Array;
  wetBulbC: Float64Array;
  depressionK: Float64Array;
}): YearMeans {
  const { depressionK, dryBulbC, wetBulbC } = columns;
  const starts = monthStartSlots(dryBulbC.length);
  const cells = monthHourOfEachSlot(dryBulbC.length);
  const cellSums = new Float64Array(CELLS);
  const cellCounts = new Uint16Array(CELLS);
  const months: { dryBulbC: number | null; wetBulbC: number | null; depressionK: number | null }[] = [];
  let yearDryKnown = 0;
  let yearWetKnown = 0;
  let yearDry = 0;
  let yearWet = 0;
  for (let month = 0; month < MONTHS; month++) {
    let dry = 0;
    let wet = 0;
    let depression = 0;
    let dryKnown = 0;
    let wetKnown = 0;
    const end = starts[month + 1] ?? 0;
    for (let slot = starts[month] ?? 0; slot < end; slot++) {
      const dryC = dryBulbC[slot] ?? Number.NaN;
      const wetC = wetBulbC[slot] ?? Number.NaN;
      const apartK = depressionK[slot] ?? Number.NaN;
      if (!Number.isNaN(dryC)) {
        dryKnown++;
        dry += dryC;
        yearDry += dryC;
      }
      if (Number.isNaN(wetC)) continue;
      wetKnown++;
      wet += wetC;
      yearWet += wetC;
      depression += apartK;
      const cell = cells[slot] ?? 0;
      cellSums[cell] = (cellSums[cell] ?? 0) + apartK;
      cellCounts[cell] = (cellCounts[cell] ?? 0) + 1;
    }
    yearDryKnown += dryKnown;
    yearWetKnown += wetKnown;
    months.push({
      dryBulbC: mean(dry, dryKnown),
      wetBulbC: mean(wet, wetKnown),
      depressionK: mean(depression, wetKnown),
    });
  }
  return {
    dryBulbC: mean(yearDry, yearDryKnown),
    wetBulbC: mean(yearWet, yearWetKnown),
    monthlyDryBulbC: months.map((month) => month.dryBulbC),
    monthlyWetBulbC: months.map((month) => month.wetBulbC),
    monthlyDepressionK: months.map((month) => month.depressionK),
    depressionByHourK: Array.from({ length: MONTHS }, (_month, month) =>
      Array.from({ length: HOURS_PER_DAY }, (_hour, hour) => {
        const cell = month * HOURS_PER_DAY + hour;
        return mean(cellSums[cell] ?? 0, cellCounts[cell] ?? 0);
      }),
    ),
  };
}

function mean(sum: number, count: number): number | null {
  return count === 0 ? null : sum / count;
}
