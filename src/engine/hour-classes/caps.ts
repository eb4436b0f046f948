import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { dewPointC, relativeHumidityPct } from '../psychrometrics/moist-air.ts';

/** A supply under test, with what the room does to it. */
export interface SupplyUnderTest {
  readonly tempC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
  /** t_sup, °C: a colder supply is mixed or throttled up to it. */
  readonly supplyAimC: number;
  /** dT_room phi, K. */
  readonly roomRiseK: number;
}

/** Above any supply; PsychroLib never answers a dew point above the dry bulb that it is given. */
const HOTTER_THAN_ANY_SUPPLY_C = 150;

/**
 * Whether a supply keeps the brief's humidity caps (method 4): supply caps on (t_e, w_s), room caps on
 * (t_e + dT_room phi, w_s + dw_room), with t_e = max(t_s, t_sup). A tie is kept.
 */
export function capsHold(supply: SupplyUnderTest, brief: Pick<Brief, 'caps' | 'dwRoomKgKg'>): boolean {
  const { roomRhPct, supplyRhPct, supplyDewPointC } = brief.caps;
  const { humidityRatio, pressurePa } = supply;
  const enteringC = Math.max(supply.tempC, supply.supplyAimC);
  if (roomRhPct !== undefined) {
    const roomPct = relativeHumidityPct(enteringC + supply.roomRiseK, humidityRatio + brief.dwRoomKgKg, pressurePa);
    if (hundredths(roomPct) > hundredths(roomRhPct)) return false;
  }
  if (supplyRhPct !== undefined) {
    const supplyPct = relativeHumidityPct(enteringC, humidityRatio, pressurePa);
    if (hundredths(supplyPct) > hundredths(supplyRhPct)) return false;
  }
  if (supplyDewPointC !== undefined) {
    const foundC = dewPointC(HOTTER_THAN_ANY_SUPPLY_C, humidityRatio, pressurePa);
    if (hundredths(foundC) > hundredths(supplyDewPointC)) return false;
  }
  return true;
}
