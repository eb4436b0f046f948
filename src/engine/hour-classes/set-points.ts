import type { Brief } from '../brief/brief.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { adaptiveLimit } from './adaptive-limit.ts';
import { runningMeansC } from './running-mean.ts';

/** What the room is to be held at, slot by slot. */
export interface SetPoints {
  /** t_set, °C. */
  readonly setC: Float64Array;
  /** 1 where the running mean of an adaptive limit lay outside its range and was clamped; null for other limits. */
  readonly outsideRange: Uint8Array | null;
}

/**
 * t_set of every slot (method 3 and 4). A limit that moves with the weather answers here too; index, tower and turbine
 * limits have none.
 * @param input.dryBulbC one value per slot, NaN where missing
 * @param input.wrapped the days before the first are the year's last (typical and derived years)
 * @throws RangeError for a limit that has no set-point
 */
export function setPoints(input: { brief: Pick<Brief, 'limit'>; dryBulbC: Float64Array; wrapped: boolean }): SetPoints {
  const { limit } = input.brief;
  const slots = input.dryBulbC.length;
  if (limit.kind === 'fixed') return { setC: new Float64Array(slots).fill(limit.tempC), outsideRange: null };
  if (limit.kind !== 'adaptive') throw new RangeError(`a limit of kind ${limit.kind} has no set-point`);
  const setC = new Float64Array(slots);
  const outsideRange = new Uint8Array(slots);
  for (const [day, meanC] of runningMeansC(input.dryBulbC, input.wrapped).entries()) {
    const { upperC, outsideRange: outside } = adaptiveLimit(limit.model, meanC);
    const [from, to] = [day * HOURS_PER_DAY, (day + 1) * HOURS_PER_DAY];
    setC.fill(Math.min(upperC, limit.ceilingC ?? upperC), from, to);
    outsideRange.fill(outside ? 1 : 0, from, to);
  }
  return { setC, outsideRange };
}
