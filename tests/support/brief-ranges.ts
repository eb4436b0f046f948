/**
 * Where every number of a brief may lie: what is refused just below, the least and the most that is taken, what is refused just
 * above. Physical ranges and policy (ours), written down apart from the engine.
 */
import { rawPreset } from './presets.ts';

export interface NumberRange {
  /** A preset whose use has the field. */
  readonly preset: string;
  readonly path: string;
  readonly below: number;
  readonly least: number;
  readonly most: number;
  readonly above: number;
}

const row = (preset: string, path: string, [below, least, most, above]: readonly [number, number, number, number]) => ({
  preset,
  path,
  below,
  least,
  most,
  above,
});

const ROOM_C = [-50.01, -50, 60, 60.01] as const;
const SHARE = [-0.001, 0, 1, 1.001] as const;
const FAN = [-0.01, 0, 10, 10.01] as const;
const HUMIDITY_PCT = [0, 0.1, 100, 100.1] as const;
const HOURS = [-1, 0, 8784, 8785] as const;
const DEW_POINT_C = [-40.1, -40, 40, 40.1] as const;
const INDEX = [-0.1, 0, 120, 120.1] as const;
const TOWER_K = [0.09, 0.1, 30, 30.1] as const;
const ANCHOR = [-1e6 - 1, -1e6, 1e6, 1e6 + 1] as const;
const PRICE = [-0.01, 0, 1e7, 1e7 + 1] as const;
const EXTRA = [-1e10 - 10, -1e10, 1e10, 1e10 + 10] as const;

export const numberRanges: readonly NumberRange[] = [
  row('office', 'limit.tempC', ROOM_C),
  row('school', 'limit.ceilingC', ROOM_C),
  row('hall-recommended', 'limit.tempC', ROOM_C),
  row('dairy', 'limit.value', INDEX),
  row('warehouse', 'limit.value', INDEX),
  row('process-water', 'limit.coldC', [-0.1, 0, 60, 60.1]),
  row('process-water', 'limit.rangeK', TOWER_K),
  row('process-water', 'limit.approachK', TOWER_K),
  row('process-water', 'limit.exchangerK', [-0.1, 0, 30, 30.1]),
  row('turbine-inlet', 'limit.targetC', ROOM_C),
  row('turbine-inlet', 'limit.floorC', ROOM_C),
  row('office', 'dTroomK', [0.09, 0.1, 40, 40.1]),
  row('hall-recommended', 'dTitK', [0.09, 0.1, 60, 60.1]),
  row('office', 'dwRoomKgKg', [-1e-4, 0, 0.02, 0.0201]),
  row('office', 'balanceTempC', ROOM_C),
  row('office', 'caps.roomRhPct', HUMIDITY_PCT),
  row('office', 'caps.supplyRhPct', HUMIDITY_PCT),
  row('office', 'caps.supplyDewPointC', DEW_POINT_C),
  row('office', 'lowerLimits.roomRhPct', HUMIDITY_PCT),
  row('office', 'lowerLimits.supplyRhPct', HUMIDITY_PCT),
  row('office', 'lowerLimits.supplyDewPointC', DEW_POINT_C),
  row('office', 'effDirect', SHARE),
  row('office', 'effIndirect', SHARE),
  row('office', 'effDewPoint', SHARE),
  row('hall-recommended', 'effExchanger', SHARE),
  row('office', 'cutInDepressionK', [-0.1, 0, 40, 40.1]),
  row('office', 'startRoomTempC', ROOM_C),
  row('office', 'maxOutdoorRhPct', [-0.1, 0, 100, 100.1]),
  row('office', 'freezeLockoutC', [-50.1, -50, 30, 30.1]),
  ...['air', 'direct', 'indirect', 'dewpoint', 'twostage'].map((stage) => row('office', `fanWPerLs.${stage}`, FAN)),
  row('hall-recommended', 'fanWPerLs.returnAir', FAN),
  row('office', 'pumpKwPerKw', SHARE),
  row('process-water', 'towerFanPumpWPerKw', [-1, 0, 500, 501]),
  row('office', 'cycles', [1, 1.01, 20, 20.1]),
  row('office', 'k', [0.49, 0.5, 2, 2.01]),
  row('process-water', 'driftPctOfCirculation', SHARE),
  row('process-water', 'towerLatentShare', SHARE),
  row('office', 'reference.cop', [0.09, 0.1, 20, 20.1]),
  row('office', 'prices.electricityPerKwh', PRICE),
  row('office', 'prices.waterPerM3', PRICE),
  row('office', 'prices.extraCapitalPerKw', EXTRA),
  row('office', 'prices.extraUpkeepPerKwYear', EXTRA),
  row('office', 'grid.kgCo2PerKwh', [-0.01, 0, 3, 3.01]),
  row('office', 'tolerance.sharePct', [-0.1, 0, 100, 100.1]),
  row('office', 'tolerance.hours', HOURS),
  row('office', 'tolerance.spellH', HOURS),
  row('glasshouse', 'hardLimits.0.tempC', ROOM_C),
  row('glasshouse', 'hardLimits.0.hours', HOURS),
  row('office', 'score.0.weight', [-0.1, 0, 100, 100.1]),
  row('office', 'score.0.a0', ANCHOR),
  row('office', 'score.0.a100', ANCHOR),
];

/** A preset with prices and a grid factor, so that every field of its use is there to be changed. */
export function pricedPreset(name: string): Record<string, unknown> {
  return structuredClone({
    ...rawPreset(name),
    prices: { currency: 'EUR', electricityPerKwh: 0.2, waterPerM3: 4, extraCapitalPerKw: 100, extraUpkeepPerKwYear: 5 },
    grid: { kgCo2PerKwh: 0.4, source: 'a table of 2024' },
    score: SCORE,
  });
}

/** As method 7.3; anchors that are changed in turn. */
const SCORE = [
  { component: 'served', weight: 60, a0: 70, a100: 99 },
  { component: 'water', weight: 40, a0: 5, a100: 0.5 },
];

/** A copy with the value at a path such as `hardLimits.0.tempC`. */
export function withValue(body: Record<string, unknown>, path: string, value: unknown): Record<string, unknown> {
  const copy = structuredClone(body);
  const keys = path.split('.');
  const last = keys.pop() ?? '';
  let held: unknown = copy;
  for (const key of keys) held = entriesOf(held)[key];
  entriesOf(held)[last] = value;
  return copy;
}

function entriesOf(value: unknown): Record<string, unknown> {
  if (!isHolder(value)) throw new Error('there is nothing at this path to change');
  return value;
}

function isHolder(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null;
}
