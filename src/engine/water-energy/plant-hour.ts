/**
 * Water and electricity of one demand hour, method 6, per kW of design load, for uses served by a constant stream of
 * outdoor air: m_dry = design load / (cp dT_room).
 */
import type { Brief } from '../brief/brief.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../stages/stage-path.ts';

/** One hour, so kW and kWh are the same figure. */
export interface PlantHour {
  readonly evaporatedLitres: number;
  /** Evaporation, bleed and drift. */
  readonly makeUpLitres: number;
  readonly coolingKwh: number;
  /** Fans, pumps and the back-up that trims what is left. */
  readonly kwh: number;
  readonly referenceKwh: number;
}

const SECONDS_PER_HOUR = 3600;

export function supplyAirPlantHour(hour: DemandHour, judgement: HourJudgement, brief: Brief): PlantHour {
  const airflowKgPerS = 1 / (DRY_AIR_KJ_PER_KG_K * brief.dTroomK);
  const airflowLPerS = airflowKgPerS * hour.outdoor.volumeM3PerKg * 1000;
  const fanKw = (stage: keyof Brief['fanWPerLs']): number => (brief.fanWPerLs[stage] * airflowLPerS) / 1000;
  const loadKw = hour.loadFraction;
  const evaporatedLitres = airflowKgPerS * judgement.supply.evaporatedKgPerKg * SECONDS_PER_HOUR;
  const bleedLitres = evaporatedLitres / (brief.cycles - 1);
  const pumpKw = judgement.running === 'air' ? 0 : brief.pumpKwPerKw * loadKw;
  const trimKw = backUpKw(hour, judgement, brief) / brief.reference.cop;
  const referenceIdles = brief.reference.economy && judgement.airMeets;
  return {
    evaporatedLitres,
    // Wetted media lose no drift (method 6).
    makeUpLitres: evaporatedLitres + bleedLitres,
    coolingKwh: deliveredKw(hour, judgement, brief),
    kwh: fanKw(judgement.running) + pumpKw + trimKw,
    referenceKwh: fanKw('air') + (referenceIdles ? 0 : loadKw / brief.reference.cop),
  };
}

/** Design load x phi x share; the share is 1 when met, 0 in `damp`, else (t_set - t_s) / (dT_room phi) within 0..1. */
function deliveredKw(hour: DemandHour, judgement: HourJudgement, brief: Brief): number {
  if (judgement.met) return hour.loadFraction;
  if (judgement.hourClass === 'damp') return 0;
  const carriedKw = (hour.setC - judgement.supply.tempC) / brief.dTroomK;
  return Math.min(Math.max(carriedKw, 0), hour.loadFraction);
}

/**
 * Heat that the back-up takes in an unmet hour, kW: in `short` and `beyond` (and an unmet `frozen` hour) m_dry cp S with S
 * from the supply that runs, at most the load; in `damp` the whole load.
 */
function backUpKw(hour: DemandHour, judgement: HourJudgement, brief: Brief): number {
  if (judgement.met) return 0;
  if (judgement.hourClass === 'damp') return hour.loadFraction;
  const shortKw = Math.max(0, judgement.supply.tempC - hour.supplyAimC) / brief.dTroomK;
  return Math.min(shortKw, hour.loadFraction);
}
