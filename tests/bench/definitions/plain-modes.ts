/**
 * The plain side of the re-scoring benchmarks: what a straightforward program does for the mode of every hour of an office, PsychroLib
 * asked each time for the humidity ratio, the wet bulb, the wet bulb after an indirect stage and the humidity ratio of the supply. No
 * shortfall, spell, water or electricity.
 */
import type { Brief } from '#engine/brief/brief.ts';
import { type HourClass, hourClasses } from '#engine/hour-classes/hour-class.ts';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';

/** The classes that tell modes apart; `short` and `beyond` are both unmet. */
type Mode = Exclude<HourClass, 'short' | 'dewpoint' | 'frozen'>;

const CP_KJ_PER_KG_K = 1.006;

/** The mode of every slot under a brief of an office at every hour: fixed limit, constant load, a cap on the room. */
export function plainModes({ packed }: WeatherYear, brief: Brief): Mode[] {
  const { dryBulbC, humidityRatio, pressurePa } = unpackYear(packed);
  return Array.from(dryBulbC, (tempC, slot) => {
    const ratio = humidityRatio[slot] ?? Number.NaN;
    const pressure = pressurePa[slot] ?? Number.NaN;
    if (Number.isNaN(tempC + ratio + pressure)) return 'missing';
    const relative = Math.min(1, psychrolib.GetRelHumFromHumRatio(tempC, ratio, pressure));
    return modeOf({ tempC, relative, pressure }, brief);
  });
}

/** As files give an hour: dry bulb, °C, relative humidity, 0..1, pressure, Pa. */
function modeOf({ tempC, relative, pressure }: { tempC: number; relative: number; pressure: number }, brief: Brief) {
  if (brief.limit.kind !== 'fixed') throw new Error('the plain program knows fixed limits alone');
  const setC = brief.limit.tempC;
  const aimC = setC - brief.dTroomK;
  const ratio = psychrolib.GetHumRatioFromRelHum(tempC, relative, pressure);
  const wetC = psychrolib.GetTWetBulbFromHumRatio(tempC, ratio, pressure);
  const betweenC = tempC - brief.effIndirect * (tempC - wetC);
  const secondC = psychrolib.GetTWetBulbFromHumRatio(betweenC, ratio, pressure);
  if (tempC <= (brief.balanceTempC ?? Number.NEGATIVE_INFINITY)) return 'idle';
  const volume = psychrolib.GetMoistAirVolume(tempC, ratio, pressure);
  const rise = (fanWPerLs: number) => (fanWPerLs * volume) / CP_KJ_PER_KG_K;
  const { air, direct, indirect, twostage } = brief.fanWPerLs;
  const tooDamp = (supplyRatio: number) =>
    rounded(100 * psychrolib.GetRelHumFromHumRatio(setC, supplyRatio + brief.dwRoomKgKg, pressure)) >
    (brief.caps.roomRhPct ?? Number.POSITIVE_INFINITY);
  const onLine = (fanWPerLs: number, entersC: number, mediumWetC: number) => {
    const leavingC = Math.min(entersC, aimC - rise(fanWPerLs));
    return psychrolib.GetHumRatioFromTWetBulb(leavingC, Math.min(mediumWetC, leavingC), pressure);
  };
  const reaches = (supplyC: number) => rounded(supplyC) <= rounded(aimC);
  if (tooDamp(ratio)) return 'damp';
  if (reaches(tempC + rise(air))) return 'air';
  if (rounded(tempC) - rounded(wetC) < brief.cutInDepressionK - 1e-9) return 'beyond';
  const byDirect = reaches(tempC - brief.effDirect * (tempC - wetC) + rise(direct));
  if (byDirect && !tooDamp(onLine(direct, tempC, wetC))) return 'direct';
  if (reaches(betweenC + rise(indirect))) return 'indirect';
  const byTwoStage = reaches(betweenC - brief.effDirect * (betweenC - secondC) + rise(twostage));
  if (byTwoStage && !tooDamp(onLine(twostage, betweenC, secondC))) return 'twostage';
  return byDirect || byTwoStage ? 'damp' : 'beyond';
}

function rounded(value: number): number {
  return Math.round(100 * value) / 100;
}

/** In how many slots a class is not the mode. */
export function modesApart(modes: readonly Mode[], classCodes: Uint8Array): number {
  return modes.filter((mode, slot) => {
    const hourClass = hourClasses[classCodes[slot] ?? 0];
    return mode !== (hourClass === 'short' ? 'beyond' : hourClass);
  }).length;
}
