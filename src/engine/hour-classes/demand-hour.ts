import type { OutdoorState, SupplyStage } from '../stages/stage-path.ts';
import type { HourClass } from './hour-class.ts';

/** One hour in schedule, with known weather and with demand, as a use judges it. */
export interface DemandHour {
  readonly outdoor: OutdoorState;
  /**
   * t_set, °C: what the room, the inlet of a hall, the process water or the turbine inlet is to be held at. NaN under an
   * index limit, which sets no temperature and is judged by none.
   */
  readonly setC: number;
  /** t_sup = t_set - dT_room phi: what the supply must reach, °C. */
  readonly supplyAimC: number;
  /** phi, 0..1. */
  readonly loadFraction: number;
}

/** The classes that an hour with demand can be. */
export type DemandClass = Exclude<HourClass, 'closed' | 'missing' | 'idle'>;

/** What is supplied in an hour: air, or of a tower the process water. */
export interface Supplied {
  readonly tempC: number;
  /** kg/kg; null where it is not that of outdoor air (the air of a hall) and for water. */
  readonly humidityRatio: number | null;
  /** kg of water evaporated per kg of dry air; 0 for a tower, whose water follows from the heat that it rejects. */
  readonly evaporatedKgPerKg: number;
  /** x, the share of full wetting, 0..1. */
  readonly share: number;
}

/** What one demand hour is under a brief, and the plant that runs in it. */
export interface HourJudgement {
  readonly hourClass: DemandClass;
  readonly met: boolean;
  /** Why `damp`: outdoor moisture itself, or cold enough only by too much moisture. */
  readonly dampBy: 'outside' | 'plant' | null;
  /** S, K (index points under an index limit): how far the lowest supply within the caps stays over what is asked; 0 when met. */
  readonly shortfallK: number;
  /** The same from the lowest supply without caps, for hard limits; 0 when met. */
  readonly uncappedShortfallK: number;
  /** Outdoor air (of a hall the dry exchanger) alone meets the hour: the reference's economy. */
  readonly airMeets: boolean;
  /** What is supplied without water, °C: t + f of outdoor air, by the dry exchanger of a hall, the return of a tower. */
  readonly airSupplyC: number;
  /** What runs: the stage that meets the hour, in `short` the one that comes nearest, else air; null when a tower stands. */
  readonly running: SupplyStage | 'tower' | null;
  readonly supply: Supplied;
  /** Share of the load that is carried without back-up, 0..1 (method 6). */
  readonly carriedShare: number;
  /** Temperature of the water that is recirculated, °C; null in an hour without water. */
  readonly waterC: number | null;
  /** Stages (outdoor air always) that would meet the hour as the only one installed, by the class it would have. */
  readonly aloneMet: readonly SupplyStage[];
}

/** A share within 0..1; 0 for what has no denominator. */
export function withinShare(share: number): number {
  return share > 0 ? Math.min(share, 1) : 0;
}
