import type { Brief } from '../brief/brief.ts';

/** Water and electricity of one demand hour, method 6, per kW of design load. One hour, so kW and kWh are the same figure. */
export interface PlantHour {
  readonly evaporatedLitres: number;
  /** Evaporation, bleed and drift. */
  readonly makeUpLitres: number;
  readonly coolingKwh: number;
  /** Fans, pumps and the back-up that trims what is left; null where electricity is not applicable (turbine inlets). */
  readonly kwh: number | null;
  readonly referenceKwh: number | null;
  /** Heat that the back-up takes, kW. */
  readonly backUpKw: number;
}

export const SECONDS_PER_HOUR = 3600;

/** M = E + B + D with B = E / (C - 1) (method 6); wetted media lose no drift. */
export function makeUpLitres(evaporatedLitres: number, brief: Pick<Brief, 'cycles'>, driftLitres = 0): number {
  return evaporatedLitres + evaporatedLitres / (brief.cycles - 1) + driftLitres;
}
