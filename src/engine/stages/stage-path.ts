/**
 * What every stage of method 4 answers: the supply air it gives when a share x of its wetting is used. Stages that are not
 * air streams (tower, turbine inlet) are uses of their own and no stage paths.
 */

/** Outdoor air of one hour. */
export interface OutdoorState {
  readonly dryBulbC: number;
  readonly humidityRatio: number;
  readonly pressurePa: number;
  /** m³ per kg of dry air: the volume that fans move, in every stage and in the reference (method 3.1). */
  readonly volumeM3PerKg: number;
}

/** Outdoor air whose wet bulb, °C, has been computed; hours that need none do without. */
export interface WetOutdoorState extends OutdoorState {
  readonly wetBulbC: number;
}

export type SupplyStage = 'air' | 'direct' | 'indirect' | 'dewpoint' | 'twostage';

/** Supply air of a stage. */
export interface SupplyState {
  readonly tempC: number;
  readonly humidityRatio: number;
  /** kg of water evaporated per kg of dry air. */
  readonly evaporatedKgPerKg: number;
  /** x, the share of full wetting, 0..1. */
  readonly share: number;
}

export interface StagePath {
  readonly stage: SupplyStage;
  /** Temperature of the water that it recirculates, °C: the wet bulb of the air that meets it; null without water. */
  readonly waterC: number | null;
  /** Supply air at a share x, 0..1; the temperature never rises and the humidity never falls with x. */
  readonly at: (share: number) => SupplyState;
  /** The least share at which the supply is at most this, °C; 1 when it never is. */
  readonly shareFor: (supplyC: number) => number;
}

/** kJ/(kg K): dry air, in fan rises, airflow and sensible heat alike (method 3.1). */
export const DRY_AIR_KJ_PER_KG_K = 1.006;
/** kJ/kg, constant (method 3.1). */
export const LATENT_HEAT_KJ_PER_KG = 2430;

/** Fan rise, K: fan W per L/s x v / 1.006 (1 W per L/s is 1 kJ per m³). */
export function fanRiseK(fanWPerLs: number, volumeM3PerKg: number): number {
  return (fanWPerLs * volumeM3PerKg) / DRY_AIR_KJ_PER_KG_K;
}

/** The share at which a supply that falls in a straight line from x = 0 to x = 1 just reaches a temperature, °C. */
export function shareOnLine(line: { dryC: number; fullFallK: number; supplyC: number }): number {
  const wantedK = line.dryC - line.supplyC;
  if (wantedK <= 0) return 0;
  return line.fullFallK > 0 ? Math.min(wantedK / line.fullFallK, 1) : 1;
}
