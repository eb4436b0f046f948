import type { Brief, Limit } from '../brief/brief.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { adaptiveLimit } from './adaptive-limit.ts';
import { deratedC } from './derating.ts';
import { runningMeansC } from './running-mean.ts';

/** What the room is to be held at, slot by slot. */
export interface SetPoints {
  /** t_set, °C. */
  readonly setC: Float64Array;
  /** 1 where the running mean of an adaptive limit lay outside its range and was clamped; null for other limits. */
  readonly outsideRange: Uint8Array | null;
}

/**
 * t_set of every slot (method 3 and 4). A limit that moves with the weather answers here too; an index limit sets no
 * temperature and answers NaN. A hall is held at the lower of its limit and its hard limits, after derating (method 3.1).
 * @param input.dryBulbC one value per slot, NaN where missing
 * @param input.wrapped the days before the first are the year's last (typical and derived years)
 * @param input.heightM the height used for the place, m, by which limits are derated
 */
export function setPoints(input: {
  brief: Pick<Brief, 'limit' | 'hardLimits'>;
  dryBulbC: Float64Array;
  wrapped: boolean;
  heightM: number;
}): SetPoints {
  const { limit } = input.brief;
  const slots = input.dryBulbC.length;
  if (limit.kind !== 'adaptive') {
    return { setC: new Float64Array(slots).fill(steadySetC(input.brief, input.heightM)), outsideRange: null };
  }
  const days = adaptiveDays(limit, runningMeansC(input.dryBulbC, input.wrapped));
  const dayOf = (slot: number) => Math.floor(slot / HOURS_PER_DAY);
  return {
    setC: Float64Array.from({ length: slots }, (_none, slot) => days.setC[dayOf(slot)] ?? Number.NaN),
    outsideRange: Uint8Array.from({ length: slots }, (_none, slot) => days.outsideRange[dayOf(slot)] ?? 0),
  };
}

/**
 * What an adaptive limit asks of every day, which is all that it moves by: t_set, °C, and 1 where the running mean was clamped.
 * @param meansC running mean of every day, °C
 */
export function adaptiveDays(
  limit: Extract<Limit, { kind: 'adaptive' }>,
  meansC: Float64Array,
): { readonly setC: Float64Array; readonly outsideRange: Uint8Array } {
  const setC = new Float64Array(meansC.length);
  const outsideRange = new Uint8Array(meansC.length);
  for (let day = 0; day < meansC.length; day++) {
    const { upperC, outsideRange: outside } = adaptiveLimit(limit.model, meansC[day] ?? Number.NaN);
    setC[day] = Math.min(upperC, limit.ceilingC ?? upperC);
    outsideRange[day] = outside ? 1 : 0;
  }
  return { setC, outsideRange };
}

/** The set-point of a limit that holds all year, °C; NaN of an adaptive limit, which moves, and of an index, which sets none. */
export function steadySetC({ limit, hardLimits }: Pick<Brief, 'limit' | 'hardLimits'>, heightM: number): number {
  switch (limit.kind) {
    case 'fixed':
      return limit.tempC;
    case 'inlet':
      return Math.min(deratedC(limit, heightM), ...hardLimits.map((hard) => deratedC(hard, heightM)));
    case 'tower':
      return limit.coldC;
    case 'turbine':
      return limit.targetC;
    default:
      return Number.NaN;
  }
}
