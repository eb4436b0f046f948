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
import { ratioOnWetBulbLine } from '../../psychrometrics/wet-bulb-line.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../../stages/stage-path.ts';
import { SECONDS_PER_HOUR } from '../../water-energy/plant-hour.ts';
import { block } from '../hour-block.ts';
import { fillWithAir, runningStages } from '../hour-columns.ts';
import { mayAlwaysStart, mayStart } from './may-start.ts';
import { findSaturated, findWetBulb, type Wetting } from './wetting-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const BY_AIR = hourClasses.indexOf('air');
const WETTED = hourClasses.indexOf('direct');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const DIRECT = runningStages.indexOf('direct');
const AIR_BIT = 1 << runningStages.indexOf('air');
const DIRECT_BIT = 1 << DIRECT;

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, classCode, met, airMeets, aloneMet, running, share, waterC } = block;
const { shortfallK, uncappedShortfallK, carriedShare, supplyC, supplyRatio, evaporatedKgPerKg } = block;
const { evaporatedLitres, makeUpLitres, coolingKwh } = block;

/** Judges the hours of `block` as `meetDemandHours` leaves them; the rest is filled in. */
export function judgeTurbineHours(brief: Brief, wetting: Wetting): void {
  fillWithAir(block);
  block.kwh.fill(Number.NaN, 0, block.count);
  block.referenceKwh.fill(Number.NaN, 0, block.count);
  block.backUpKw.fill(0, 0, block.count);
  judgeOutdoorAir(brief);
  if (brief.stages.includes('direct')) judgeWetted(brief, wetting);
  fillPlant(brief);
}

/** The inlet as it is without water. */
function judgeOutdoorAir(brief: Brief): void {
  const { count } = block;
  const { targetC } = turbineLimit(brief);
  // What rounds to at most a limit lies under it and half a hundredth.
  const targetEdge = hundredths(targetC) + 0.5;
  const freezeEdge = hundredths(brief.freezeLockoutC) + 0.5;
  for (let at = 0; at < count; at++) {
    const tempC = dryBulbC[at] ?? 0;
    const reached = 100 * tempC < targetEdge;
    const lackingK = reached ? 0 : Math.max(0, tempC - targetC);
    classCode[at] = 100 * tempC < freezeEdge ? FROZEN : reached ? BY_AIR : BEYOND;
    met[at] = reached ? 1 : 0;
    airMeets[at] = reached ? 1 : 0;
    aloneMet[at] = reached ? AIR_BIT : 0;
    shortfallK[at] = lackingK;
    uncappedShortfallK[at] = lackingK;
    carriedShare[at] = reached ? 1 : 0;
  }
}

/** At full effect down to the floor, wherever the brief lets the stage run. */
function judgeWetted(brief: Brief, wetting: Wetting): void {
  const { count } = block;
  const { targetC, floorC } = turbineLimit(brief);
  const { effDirect } = brief;
  const { wetBulbC: wetBulbs, saturatedRatio } = wetting;
  const targetEdge = hundredths(targetC) + 0.5;
  const cutInHundredths = hundredths(brief.cutInDepressionK);
  const alwaysStarts = mayAlwaysStart(brief);
  for (let at = 0; at < count; at++) {
    if (classCode[at] === FROZEN || !(alwaysStarts || mayStart(brief, at))) continue;
    const from = slot[at] ?? 0;
    const tempC = dryBulbC[at] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    if (Number.isNaN(wetBulbs[from] ?? 0)) findWetBulb(wetting, from, tempC, ratio, pressurePa[at] ?? 0);
    const wetC = wetBulbs[from] ?? 0;
    if (hundredths(tempC) - hundredths(wetC) < cutInHundredths) continue;
    const fullFallK = effDirect * (tempC - wetC);
    const inletC = Math.max(tempC - fullFallK, floorC);
    const reached = 100 * inletC < targetEdge;
    const gains = gainsEnough(tempC, inletC);
    const lackingK = reached ? 0 : Math.max(0, inletC - targetC);
    classCode[at] = reached ? WETTED : gains ? SHORT : BEYOND;
    met[at] = reached ? 1 : 0;
    aloneMet[at] = reached ? (aloneMet[at] ?? 0) | DIRECT_BIT : 0;
    shortfallK[at] = lackingK;
    uncappedShortfallK[at] = lackingK;
    carriedShare[at] = reached ? 1 : 0;
    if (!reached && !gains) continue;
    if (Number.isNaN(saturatedRatio[from] ?? 0)) findSaturated(wetting, from, pressurePa[at] ?? 0);
    const leavingRatio = Math.max(ratio, ratioOnWetBulbLine(saturatedRatio[from] ?? 0, inletC, wetC));
    running[at] = DIRECT;
    supplyC[at] = inletC;
    supplyRatio[at] = leavingRatio;
    evaporatedKgPerKg[at] = leavingRatio - ratio;
    share[at] = withinShare((tempC - inletC) / fullFallK);
    waterC[at] = wetC;
  }
}

function fillPlant({ cycles }: Brief): void {
  const { count } = block;
  const airflowKgPerS = 1 / DRY_AIR_KJ_PER_KG_K;
  for (let at = 0; at < count; at++) {
    const evaporated = airflowKgPerS * (evaporatedKgPerKg[at] ?? 0) * SECONDS_PER_HOUR;
    evaporatedLitres[at] = evaporated;
    makeUpLitres[at] = evaporated + evaporated / (cycles - 1);
    coolingKwh[at] = (dryBulbC[at] ?? 0) - (supplyC[at] ?? 0);
  }
}
