import type { Brief, Limit } from '../brief/brief.ts';
import { relativeHumidityPct } from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';

export type IndexLimit = Extract<Limit, { kind: 'thi' | 'shade-heat' }>;

/** Air as people or animals meet it. */
export interface OccupiedAir {
  readonly tempC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
}

/** Whether a limit is an index of warmth and moisture together, which sets no temperature. */
export function isIndexLimit(limit: Limit): limit is IndexLimit {
  return limit.kind === 'thi' || limit.kind === 'shade-heat';
}

/** @throws RangeError for a brief of another limit */
export function indexLimit({ limit }: Pick<Brief, 'limit'>): IndexLimit {
  if (!isIndexLimit(limit)) throw new RangeError(`a limit of kind ${limit.kind} is no index`);
  return limit;
}

/** The index that a limit speaks of, in its points. */
export function indexOf({ kind }: IndexLimit, air: OccupiedAir): number {
  const { tempC, humidityRatio, pressurePa } = air;
  if (kind === 'shade-heat') return shadeHeatFigure(tempC, humidityRatio, pressurePa);
  return temperatureHumidityIndex(tempC, relativeHumidityPct(tempC, humidityRatio, pressurePa));
}

/**
 * Temperature-humidity index of livestock, form of NRC 1971: (1.8 t + 32) - (0.55 - 0.0055 RH) (1.8 t - 26). Other forms
 * in use are not interchangeable with it.
 * @param relativePct relative humidity, %
 */
export function temperatureHumidityIndex(tempC: number, relativePct: number): number {
  return 1.8 * tempC + 32 - (0.55 - 0.0055 * relativePct) * (1.8 * tempC - 26);
}

/** The shade heat figure, ours: 0.7 t_wb + 0.3 t of the occupied zone (method 3). No measured heat-stress index. */
export function shadeHeatFigure(tempC: number, humidityRatio: number, pressurePa: number): number {
  return 0.7 * wetBulbC(tempC, humidityRatio, pressurePa) + 0.3 * tempC;
}
