/** Halls with a return-air exchanger, cooling towers and turbine inlets, from the method alone. */
import type { Limit } from '#engine/brief/brief.ts';
import { atMost, mayTry, type OracleAnswer, type OracleHour, wetOf } from './oracle.ts';

function frozen(hour: OracleHour): boolean {
  return atMost(hour, 'temperature', hour.dryBulbC, hour.brief.freezeLockoutC);
}

/** No cap is tested: outdoor air does not enter. */
export function judgeHall(hour: OracleHour): OracleAnswer {
  const { brief, dryBulbC, limitC } = hour;
  const returnC = limitC + (brief.dTitK ?? 0);
  const dryC = returnC - brief.effExchanger * (returnC - dryBulbC);
  const wetC = returnC - brief.effIndirect * (returnC - wetOf(hour));
  const byDry = atMost(hour, 'temperature', dryC, limitC);
  if (frozen(hour)) return { hourClass: 'frozen', met: byDry };
  if (byDry) return { hourClass: 'air', met: true };
  if (brief.stages.includes('indirect')) {
    if (atMost(hour, 'temperature', wetC, limitC)) return { hourClass: 'indirect', met: true };
    if (atMost(hour, 'gain', 1, dryC - wetC)) return { hourClass: 'short', met: false };
  }
  return { hourClass: 'beyond', met: false };
}

export function judgeTower(hour: OracleHour, limit: Extract<Limit, { kind: 'tower' }>): OracleAnswer {
  const waterC = wetOf(hour) + limit.approachK + limit.exchangerK;
  if (frozen(hour)) return { hourClass: 'frozen', met: hour.brief.basinHeat };
  if (atMost(hour, 'temperature', waterC, limit.coldC)) return { hourClass: 'direct', met: true };
  // Below the return water, not at it.
  const useless = atMost(hour, 'temperature', limit.coldC + limit.rangeK, waterC);
  return { hourClass: useless ? 'beyond' : 'short', met: false };
}

export function judgeTurbine(hour: OracleHour, limit: Extract<Limit, { kind: 'turbine' }>): OracleAnswer {
  const { brief, dryBulbC } = hour;
  const byAir = atMost(hour, 'temperature', dryBulbC, limit.targetC);
  if (frozen(hour)) return { hourClass: 'frozen', met: byAir };
  if (byAir) return { hourClass: 'air', met: true };
  if (mayTry(hour)) {
    const inletC = Math.max(dryBulbC - brief.effDirect * (dryBulbC - wetOf(hour)), limit.floorC);
    if (atMost(hour, 'temperature', inletC, limit.targetC)) return { hourClass: 'direct', met: true };
    if (atMost(hour, 'gain', 1, dryBulbC - inletC)) return { hourClass: 'short', met: false };
  }
  return { hourClass: 'beyond', met: false };
}
