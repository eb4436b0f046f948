import type { Brief } from '../brief/brief.ts';

/**
 * t_set of every slot, °C: what the room is to be held at (method 3 and 4). A limit that moves with the weather answers
 * here too; index, tower and turbine limits have none.
 * @throws RangeError for a limit that has no set-point
 */
export function setPointsC(brief: Pick<Brief, 'limit'>, slots: number): Float64Array {
  const { limit } = brief;
  if (limit.kind === 'fixed') return new Float64Array(slots).fill(limit.tempC);
  throw new RangeError(`a limit of kind ${limit.kind} has no set-point`);
}
