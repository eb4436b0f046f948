/**
 * An oracle for the hour classes, written from the method's sections 3.1, 4 and 5 alone, apart from the engine's judging code and
 * with PsychroLib for all moist air. Slow and plain on purpose: each state is formed, each comparison is made, nothing is cached.
 * Load is constant, as in every preset, and secondary air is outdoor air.
 */
import type { Brief, Stage } from '#engine/brief/brief.ts';
import { dewPointC, ratioOnLine, rhPct, volume, wetBulbC } from './oracle-air.ts';
import { judgeByIndex } from './oracle-index.ts';
import { judgeHall, judgeTower, judgeTurbine } from './oracle-plants.ts';

/** The kinds of comparison that the method makes. */
export type Threshold = 'temperature' | 'cut-in' | 'gain' | 'dew-point' | 'rh' | 'index';

export interface OracleHour {
  readonly brief: Brief;
  readonly open: boolean;
  readonly dryBulbC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
  /** Limit of this slot, °C; NaN where the limit is no temperature. */
  readonly limitC: number;
  /** One kind of threshold moved by so much, to see how close an hour stands to it. */
  readonly moved: { readonly threshold: Threshold; readonly by: number } | null;
}

export interface OracleAnswer {
  readonly hourClass: string;
  readonly met: boolean | null;
}

export interface Air {
  readonly tempC: number;
  readonly ratio: number;
}

/** On whole hundredths, a tie is met. */
export function atMost(hour: OracleHour, threshold: Threshold, value: number, limit: number): boolean {
  const moved = hour.moved?.threshold === threshold ? hour.moved.by : 0;
  return Math.round(100 * value) <= Math.round(100 * (limit + moved));
}

export function wetOf(hour: OracleHour): number {
  return wetBulbC(hour.dryBulbC, hour.humidityRatio, hour.pressurePa);
}

/** Fan rise, K, of a figure in W per L/s. */
export function riseK(hour: OracleHour, fan: keyof Brief['fanWPerLs']): number {
  return (hour.brief.fanWPerLs[fan] * volume(hour.dryBulbC, hour.humidityRatio, hour.pressurePa)) / 1.006;
}

/** Whether a wet stage may be tried at all in this hour. */
export function mayTry(hour: OracleHour): boolean {
  const { brief, dryBulbC } = hour;
  const roomByAirC = dryBulbC + riseK(hour, 'air') + brief.dTroomK;
  const rh = rhPct(dryBulbC, hour.humidityRatio, hour.pressurePa);
  return (
    atMost(hour, 'cut-in', brief.cutInDepressionK, dryBulbC - wetOf(hour)) &&
    (brief.startRoomTempC === null || atMost(hour, 'temperature', brief.startRoomTempC, roomByAirC)) &&
    (brief.maxOutdoorRhPct === null || atMost(hour, 'rh', rh, brief.maxOutdoorRhPct)) &&
    !atMost(hour, 'temperature', dryBulbC, brief.freezeLockoutC)
  );
}

/** What a stage supplies at a share x of full wetting. */
export function supplied(hour: OracleHour, stage: Stage | 'air', x: number): Air {
  const { brief, dryBulbC: t, humidityRatio: w, pressurePa: p } = hour;
  if (stage === 'air') return { tempC: t + riseK(hour, 'air'), ratio: w };
  if (stage === 'tower') throw new Error('a tower supplies no air');
  const fan = riseK(hour, stage);
  const wet = wetOf(hour);
  if (stage === 'dewpoint') return { tempC: t - x * brief.effDewPoint * (t - dewPointC(w, p)) + fan, ratio: w };
  const indirectC = (share: number) =>
    Math.max(t - share * brief.effIndirect * (t - wet), Math.min(t, dewPointC(w, p)));
  if (stage === 'indirect') return { tempC: indirectC(x) + fan, ratio: w };
  const entersC = stage === 'twostage' ? indirectC(1) : t;
  const wetInsideC = stage === 'twostage' ? wetBulbC(entersC, w, p) : wet;
  const leavesC = entersC - x * brief.effDirect * (entersC - wetInsideC);
  return { tempC: leavesC + fan, ratio: x === 0 ? w : ratioOnLine(leavesC, wetInsideC, p) };
}

/** Whether a room fed so keeps every cap; supply no colder than it need be. */
export function capsHold(hour: OracleHour, supply: Air, supplySetC: number): boolean {
  const { caps, dTroomK, dwRoomKgKg } = hour.brief;
  const { pressurePa: p } = hour;
  const entersC = Math.max(supply.tempC, supplySetC);
  const room = rhPct(entersC + dTroomK, supply.ratio + dwRoomKgKg, p);
  return (
    (caps.roomRhPct === undefined || atMost(hour, 'rh', room, caps.roomRhPct)) &&
    (caps.supplyRhPct === undefined || atMost(hour, 'rh', rhPct(entersC, supply.ratio, p), caps.supplyRhPct)) &&
    (caps.supplyDewPointC === undefined || atMost(hour, 'dew-point', dewPointC(supply.ratio, p), caps.supplyDewPointC))
  );
}

/** The share x that just reaches a temperature, 0 when none is needed, 1 when all is too little. */
function shareFor(hour: OracleHour, stage: Stage, supplySetC: number): number {
  if (hour.brief.control === 'on-off') return 1;
  if (supplied(hour, stage, 0).tempC <= supplySetC) return 0;
  return bisected((x) => supplied(hour, stage, x).tempC > supplySetC);
}

/** The largest x in 0..1 up to which something holds; it holds at 0. */
function bisected(holds: (x: number) => boolean): number {
  if (holds(1)) return 1;
  let low = 0;
  let high = 1;
  for (let step = 0; step < 25; step++) {
    const middle = (low + high) / 2;
    if (holds(middle)) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** The lowest supply temperature of a stage at which the caps hold; infinite when they hold at no x. */
function lowestWithinCaps(hour: OracleHour, stage: Stage | 'air', supplySetC: number): number {
  const holds = (x: number) => capsHold(hour, supplied(hour, stage, x), supplySetC);
  if (stage === 'air' || hour.brief.control === 'on-off') {
    return holds(1) ? supplied(hour, stage, 1).tempC : Number.POSITIVE_INFINITY;
  }
  return holds(0) ? supplied(hour, stage, bisected(holds)).tempC : Number.POSITIVE_INFINITY;
}

function judgeRoom(hour: OracleHour): OracleAnswer {
  const { brief, dryBulbC, humidityRatio, pressurePa } = hour;
  const supplySetC = hour.limitC - brief.dTroomK;
  const reaches = (air: Air) => atMost(hour, 'temperature', air.tempC, supplySetC);
  const air = supplied(hour, 'air', 0);
  const airMeets = reaches(air) && capsHold(hour, air, supplySetC);
  if (atMost(hour, 'temperature', dryBulbC, brief.freezeLockoutC)) return { hourClass: 'frozen', met: airMeets };
  if (!capsHold({ ...hour, pressurePa }, { tempC: supplySetC, ratio: humidityRatio }, supplySetC)) {
    return { hourClass: 'damp', met: false };
  }
  if (airMeets) return { hourClass: 'air', met: true };
  const stages = mayTry(hour) ? brief.stages : [];
  const coldEnough = stages.filter((stage) => reaches(supplied(hour, stage, 1)));
  for (const stage of coldEnough) {
    const x = shareFor(hour, stage, supplySetC);
    if (capsHold(hour, supplied(hour, stage, x), supplySetC)) return { hourClass: stage, met: true };
  }
  if (coldEnough.length > 0 || reaches(air)) return { hourClass: 'damp', met: false };
  const lowestC = Math.min(...(['air', ...stages] as const).map((stage) => lowestWithinCaps(hour, stage, supplySetC)));
  const gained = Number.isFinite(lowestC) && atMost(hour, 'gain', 1, air.tempC - lowestC);
  return { hourClass: gained ? 'short' : 'beyond', met: false };
}

/** The class of one hour. */
export function judgeByOracle(hour: OracleHour): OracleAnswer {
  const { brief, dryBulbC, humidityRatio, pressurePa } = hour;
  if (!hour.open) return { hourClass: 'closed', met: null };
  if (Number.isNaN(dryBulbC + humidityRatio + pressurePa)) return { hourClass: 'missing', met: null };
  const idleC = brief.limit.kind === 'turbine' ? brief.limit.floorC : brief.balanceTempC;
  if (idleC !== null && atMost(hour, 'temperature', dryBulbC, idleC)) return { hourClass: 'idle', met: null };
  switch (brief.limit.kind) {
    case 'fixed':
    case 'adaptive':
      return judgeRoom(hour);
    case 'inlet':
      return judgeHall(hour);
    case 'tower':
      return judgeTower(hour, brief.limit);
    case 'turbine':
      return judgeTurbine(hour, brief.limit);
    case 'thi':
    case 'shade-heat':
      return judgeByIndex(hour, brief.limit);
  }
}
