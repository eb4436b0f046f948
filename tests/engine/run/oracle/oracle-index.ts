/** Rooms held by an index (livestock THI, shade heat figure), from the method alone. */
import type { Limit } from '#engine/brief/brief.ts';
import { type Air, atMost, mayTry, type OracleAnswer, type OracleHour, supplied } from './oracle.ts';
import { rhPct, wetBulbC } from './oracle-air.ts';

type IndexLimit = Extract<Limit, { kind: 'thi' | 'shade-heat' }>;

function indexOf(hour: OracleHour, limit: IndexLimit, supply: Air): number {
  const tempC = supply.tempC + hour.brief.dTroomK;
  const ratio = supply.ratio + hour.brief.dwRoomKgKg;
  if (limit.kind === 'shade-heat') return 0.7 * wetBulbC(tempC, ratio, hour.pressurePa) + 0.3 * tempC;
  const tempF = 1.8 * tempC + 32;
  return tempF - (0.55 - (0.55 * rhPct(tempC, ratio, hour.pressurePa)) / 100) * (tempF - 58);
}

function capHolds(hour: OracleHour, supply: Air): boolean {
  const cap = hour.brief.caps.roomRhPct;
  if (cap === undefined) return true;
  const ratio = supply.ratio + hour.brief.dwRoomKgKg;
  return atMost(hour, 'rh', rhPct(supply.tempC + hour.brief.dTroomK, ratio, hour.pressurePa), cap);
}

export function judgeByIndex(hour: OracleHour, limit: IndexLimit): OracleAnswer {
  const { brief } = hour;
  const reaches = (supply: Air) => atMost(hour, 'index', indexOf(hour, limit, supply), limit.value);
  const air = supplied(hour, 'air', 0);
  const airMeets = reaches(air) && capHolds(hour, air);
  if (atMost(hour, 'temperature', hour.dryBulbC, brief.freezeLockoutC)) return { hourClass: 'frozen', met: airMeets };
  if (airMeets) return { hourClass: 'air', met: true };
  const shares = brief.control === 'on-off' ? [1] : Array.from({ length: 21 }, (_none, k) => k / 20);
  const stages = mayTry(hour) ? brief.stages : [];
  const states = stages.flatMap((stage) => shares.map((x) => ({ stage, supply: supplied(hour, stage, x) })));
  const good = states.find(({ supply }) => reaches(supply) && capHolds(hour, supply));
  if (good !== undefined) return { hourClass: good.stage, met: true };
  if ([air, ...states.map(({ supply }) => supply)].some(reaches)) return { hourClass: 'damp', met: false };
  const within = [air, ...states.map(({ supply }) => supply)].filter((supply) => capHolds(hour, supply));
  const lowest = Math.min(...within.map((supply) => indexOf(hour, limit, supply)));
  const gained = within.length > 0 && atMost(hour, 'gain', 1, indexOf(hour, limit, air) - lowest);
  return { hourClass: gained ? 'short' : 'beyond', met: false };
}
