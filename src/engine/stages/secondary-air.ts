import { dewPointC } from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import type { WetOutdoorState } from './stage-path.ts';

/** The air that meets the water of an indirect stage, apart from the air that is supplied. */
export interface SecondaryAir {
  readonly wetBulbC: number;
  /** How far it can cool the supply at most, K: to the dew point of the supply, below which nothing is cooled (method 4). */
  readonly mostFallK: number;
}

/** Outdoor air wets itself: its wet bulb is never under its dew point, so the floor cannot bind. */
export function outdoorSecondary({ wetBulbC: outdoorWetBulbC }: Pick<WetOutdoorState, 'wetBulbC'>): SecondaryAir {
  return { wetBulbC: outdoorWetBulbC, mostFallK: Number.POSITIVE_INFINITY };
}

/** A room as its exhaust leaves it. */
export interface RoomExhaust {
  /** t_set, °C. */
  readonly setC: number;
  /** kg/kg that the room adds. */
  readonly dwRoomKgKg: number;
}

/**
 * Exhaust of the room: held at t_set with the moisture of the supply and of the room, w_s + dw_room. The method names the
 * source and no state; this one is ours.
 * @param supplyHumidityRatio w_s, kg/kg
 */
export function exhaustSecondary(
  outdoor: WetOutdoorState,
  { setC, dwRoomKgKg }: RoomExhaust,
  supplyHumidityRatio: number,
): SecondaryAir {
  const { dryBulbC, humidityRatio, pressurePa } = outdoor;
  return {
    wetBulbC: wetBulbC(setC, supplyHumidityRatio + dwRoomKgKg, pressurePa),
    mostFallK: Math.max(0, dryBulbC - dewPointC(dryBulbC, humidityRatio, pressurePa)),
  };
}
