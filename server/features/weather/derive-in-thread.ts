import { climateDifference } from '#engine/climate/climate-difference.ts';
import { deriveYear, ImpossibleChange } from '#engine/climate/derive-year.ts';
import { reducePackedYear } from '#engine/reduction/reduce-year.ts';
import type { Derived, DeriveTask } from '../../jobs/year-task.ts';

/** The derived year, reduced as a read one is, and what sets it apart from its parent. */
export function deriveInThread({ parent, belowZero, monthly, humidityRule }: DeriveTask): Derived {
  try {
    const { year, cappedHours } = deriveYear({ parent, monthly, humidityRule });
    const reduced = reducePackedYear(year, belowZero);
    return {
      ok: true,
      reduced,
      cappedHours,
      difference: climateDifference(reducePackedYear(parent, belowZero), reduced),
    };
  } catch (error) {
    if (error instanceof ImpossibleChange) return { ok: false, faults: error.faults };
    throw error;
  }
}
