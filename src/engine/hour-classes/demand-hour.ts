import type { OutdoorState, SupplyStage, SupplyState } from '../stages/stage-path.ts';
import type { HourClass } from './hour-class.ts';

/** One hour in schedule, with known weather and with demand, as a use judges it. */
export interface DemandHour {
  readonly outdoor: OutdoorState;
  /** t_set: what the room is to be held at, °C. */
  readonly setC: number;
  /** t_sup = t_set - dT_room phi: what the supply must reach, °C. */
  readonly supplyAimC: number;
  /** phi, 0..1. */
  readonly loadFraction: number;
}

/** The classes that an hour with demand can be. */
export type DemandClass = Exclude<HourClass, 'closed' | 'missing' | 'idle'>;

/** What one demand hour is under a brief, and the plant that runs in it. */
export interface HourJudgement {
  readonly hourClass: DemandClass;
  readonly met: boolean;
  /** Why `damp`: outdoor moisture itself, or cold enough only by too much moisture. */
  readonly dampBy: 'outside' | 'plant' | null;
  /** S, K: how far the lowest supply within the caps stays over what is asked; 0 when met. */
  readonly shortfallK: number;
  /** The same from the lowest supply without caps, for hard limits; 0 when met. */
  readonly uncappedShortfallK: number;
  /** Outdoor air alone meets the hour (the reference's economy). */
  readonly airMeets: boolean;
  /** t + f of outdoor air, °C. */
  readonly airSupplyC: number;
  /** What runs: the stage that meets the hour, in `short` the one that comes nearest, else outdoor air. */
  readonly running: SupplyStage;
  readonly supply: SupplyState;
  /** Permitted stages (outdoor air always) that would meet the hour as the only one installed. */
  readonly aloneMet: readonly SupplyStage[];
}
