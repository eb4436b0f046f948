/**
 * Method 5 and 6 for many demand hours of a turbine inlet: `judgeTurbineHour` and `turbinePlantHour` in columns, figure by figure; a
 * test holds them together.
 */
import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { turbineLimit } from '../../hour-classes/judge-turbine-hour.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '../../psychrometrics/wet-bulb-line.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../../stages/stage-path.ts';
import { SECONDS_PER_HOUR } from '../../water-energy/plant-hour.ts';
import { fillWithAir, type HourColumns, runningStages } from '../hour-columns.ts';
import { mayStart } from './may-start.ts';

const FROZEN = hourClasses.indexOf('frozen');
const BY_AIR = hourClasses.indexOf('air');
const WETTED = hourClasses.indexOf('direct');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const DIRECT = runningStages.indexOf('direct');
const AIR_BIT = 1 << runningStages.indexOf('air');
const DIRECT_BIT = 1 << DIRECT;

export function judgeTurbineHours(brief: Brief, hours: HourColumns): void {
  fillWithAir(hours);
  hours.kwh.fill(Number.NaN, 0, hours.count);
  hours.referenceKwh.fill(Number.NaN, 0, hours.count);
  hours.backUpKw.fill(0, 0, hours.count);
  judgeOutdoorAir(brief, hours);
  if (brief.stages.includes('direct')) judgeWetted(brief, hours);
  fillPlant(brief, hours);
}

/** The inlet as it is without water. */
function judgeOutdoorAir(brief: Brief, hours: HourColumns): void {
  const { targetC } = turbineLimit(brief);
  const freezeHundredths = hundredths(brief.freezeLockoutC);
  for (let at = 0; at < hours.count; at++) {
    const tempC = hours.dryBulbC[at] ?? 0;
    const reached = hundredths(tempC) <= hundredths(targetC);
    const shortfallK = reached ? 0 : Math.max(0, tempC - targetC);
    hours.classCode[at] = hundredths(tempC) <= freezeHundredths ? FROZEN : reached ? BY_AIR : BEYOND;
    hours.met[at] = reached ? 1 : 0;
    hours.airMeets[at] = reached ? 1 : 0;
    hours.aloneMet[at] = reached ? AIR_BIT : 0;
    hours.shortfallK[at] = shortfallK;
    hours.uncappedShortfallK[at] = shortfallK;
    hours.carriedShare[at] = reached ? 1 : 0;
  }
}

/** At full effect down to the floor, wherever the brief lets the stage run. */
function judgeWetted(brief: Brief, hours: HourColumns): void {
  const { targetC, floorC } = turbineLimit(brief);
  for (let at = 0; at < hours.count; at++) {
    if (hours.classCode[at] === FROZEN) continue;
    const tempC = hours.dryBulbC[at] ?? 0;
    const ratio = hours.humidityRatio[at] ?? 0;
    const pressurePa = hours.pressurePa[at] ?? 0;
    if (!mayStart(brief, hours, at)) continue;
    const wetC = wetBulbC(tempC, ratio, pressurePa);
    if (hundredths(tempC) - hundredths(wetC) < hundredths(brief.cutInDepressionK)) continue;
    const fullFallK = brief.effDirect * (tempC - wetC);
    const inletC = Math.max(tempC - fullFallK, floorC);
    const reached = hundredths(inletC) <= hundredths(targetC);
    const gains = gainsEnough(tempC, inletC);
    const shortfallK = reached ? 0 : Math.max(0, inletC - targetC);
    hours.classCode[at] = reached ? WETTED : gains ? SHORT : BEYOND;
    hours.met[at] = reached ? 1 : 0;
    hours.aloneMet[at] = reached ? (hours.aloneMet[at] ?? 0) | DIRECT_BIT : 0;
    hours.shortfallK[at] = shortfallK;
    hours.uncappedShortfallK[at] = shortfallK;
    hours.carriedShare[at] = reached ? 1 : 0;
    if (!reached && !gains) continue;
    const leavingRatio = Math.max(ratio, humidityRatioOnWetBulbLine(inletC, wetC, pressurePa));
    hours.running[at] = DIRECT;
    hours.supplyC[at] = inletC;
    hours.supplyRatio[at] = leavingRatio;
    hours.evaporatedKgPerKg[at] = leavingRatio - ratio;
    hours.share[at] = withinShare((tempC - inletC) / fullFallK);
    hours.waterC[at] = wetC;
  }
}

function fillPlant(brief: Brief, hours: HourColumns): void {
  const airflowKgPerS = 1 / DRY_AIR_KJ_PER_KG_K;
  for (let at = 0; at < hours.count; at++) {
    const evaporated = airflowKgPerS * (hours.evaporatedKgPerKg[at] ?? 0) * SECONDS_PER_HOUR;
    hours.evaporatedLitres[at] = evaporated;
    hours.makeUpLitres[at] = evaporated + evaporated / (brief.cycles - 1);
    hours.coolingKwh[at] = (hours.dryBulbC[at] ?? 0) - (hours.supplyC[at] ?? 0);
  }
}
