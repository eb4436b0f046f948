import type { Brief } from '#engine/brief/brief.ts';
import type { DemandHour, HourJudgement } from '#engine/hour-classes/demand-hour.ts';
import { setPoints } from '#engine/hour-classes/set-points.ts';
import { volumeM3PerKg } from '#engine/psychrometrics/moist-air.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { findUse } from '#engine/run/find-use.ts';
import type { PlantHour } from '#engine/water-energy/plant-hour.ts';

/** A demand hour under any brief whose limit does not move with the weather, by its dry and wet bulb, °C. */
export function hourAt(
  brief: Brief,
  air: { dryBulbC: number; wetBulbC: number; pressurePa?: number; heightM?: number },
): DemandHour {
  const { dryBulbC, wetBulbC, pressurePa = 101325, heightM = 0 } = air;
  const humidityRatio = humidityRatioOnWetBulbLine(dryBulbC, wetBulbC, pressurePa);
  const { setC } = setPoints({ brief, dryBulbC: new Float64Array(24), wrapped: true, heightM });
  const set = setC[0] ?? Number.NaN;
  return {
    outdoor: { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volumeM3PerKg(dryBulbC, humidityRatio, pressurePa) },
    setC: set,
    supplyAimC: set - brief.dTroomK,
    loadFraction: 1,
  };
}

/** The hour as the brief's own use judges it, with its plant. */
export function judgedAt(
  brief: Brief,
  air: Parameters<typeof hourAt>[1],
): HourJudgement & { hour: DemandHour; plant: PlantHour } {
  const use = findUse(brief);
  const hour = hourAt(brief, air);
  const judgement = use.judgeHour(hour, brief);
  return { ...judgement, hour, plant: use.plantHour(hour, judgement, brief) };
}
