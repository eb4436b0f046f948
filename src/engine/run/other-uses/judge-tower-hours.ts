/**
 * Method 5 and 6 for many demand hours of process water from a cooling tower: `judgeTowerHour` and `towerPlantHour` in columns, figure
 * by figure; a test holds them together.
 */
import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { towerLimit } from '../../hour-classes/judge-tower-hour.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { towerPlant } from '../../water-energy/tower-plant-hour.ts';
import { fillWithAir, type HourColumns, runningStages } from '../hour-columns.ts';

const FROZEN = hourClasses.indexOf('frozen');
const MET = hourClasses.indexOf('direct');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const TOWER = runningStages.indexOf('tower');
const DIRECT_BIT = 1 << runningStages.indexOf('direct');

export function judgeTowerHours(brief: Brief, hours: HourColumns): void {
  fillWithAir(hours);
  hours.supplyRatio.fill(Number.NaN, 0, hours.count);
  const { coldC, rangeK } = towerLimit(brief);
  hours.airSupplyC.fill(coldC + rangeK, 0, hours.count);
  hours.airMeets.fill(0, 0, hours.count);
  judgeTower(brief, hours);
  fillPlant(brief, hours);
}

function judgeTower(brief: Brief, hours: HourColumns): void {
  const { coldC, rangeK, approachK, exchangerK } = towerLimit(brief);
  const freezeHundredths = hundredths(brief.freezeLockoutC);
  const modulating = brief.control === 'modulating';
  for (let at = 0; at < hours.count; at++) {
    const tempC = hours.dryBulbC[at] ?? 0;
    const frozen = hundredths(tempC) <= freezeHundredths;
    // A drained tower sends the water back as warm as it came.
    const wetC = frozen ? Number.NaN : wetBulbC(tempC, hours.humidityRatio[at] ?? 0, hours.pressurePa[at] ?? 0);
    const reachedC = frozen ? coldC + (brief.basinHeat ? 0 : rangeK) : wetC + approachK + exchangerK;
    const met = frozen ? brief.basinHeat : hundredths(reachedC) <= hundredths(coldC);
    const short = !met && !frozen && hundredths(reachedC) < hundredths(coldC + rangeK);
    const runs = met || short;
    const suppliedC = !runs ? coldC + rangeK : met && (frozen || modulating) ? coldC : reachedC;
    const shortfallK = met ? 0 : frozen ? rangeK : short ? Math.max(0, suppliedC - coldC) : reachedC - coldC;
    hours.classCode[at] = frozen ? FROZEN : met ? MET : short ? SHORT : BEYOND;
    hours.met[at] = met ? 1 : 0;
    hours.aloneMet[at] = met ? DIRECT_BIT : 0;
    hours.running[at] = runs ? TOWER : 0;
    hours.shortfallK[at] = shortfallK;
    hours.uncappedShortfallK[at] = shortfallK;
    hours.supplyC[at] = suppliedC;
    hours.share[at] = runs ? 1 : 0;
    hours.carriedShare[at] = met ? 1 : short ? withinShare((coldC + rangeK - suppliedC) / rangeK) : 0;
    hours.waterC[at] = runs ? suppliedC - exchangerK : Number.NaN;
  }
}

function fillPlant(brief: Brief, hours: HourColumns): void {
  const plan = towerPlant(brief);
  const { cop } = brief.reference;
  for (let at = 0; at < hours.count; at++) {
    const load = hours.loadFraction[at] ?? 0;
    const runs = hours.running[at] === TOWER;
    const rejectedKw = load * (hours.carriedShare[at] ?? 0);
    const evaporated = ((rejectedKw * plan.latentShare) / plan.latentHeatKJPerKg) * plan.secondsPerHour;
    const circulationKgPerS = load / plan.kwPerKgPerS;
    const drift = runs ? plan.driftShare * circulationKgPerS * plan.secondsPerHour : 0;
    const backUpKw = load - rejectedKw;
    hours.evaporatedLitres[at] = evaporated;
    hours.makeUpLitres[at] = evaporated + evaporated / (brief.cycles - 1) + drift;
    hours.coolingKwh[at] = rejectedKw;
    hours.kwh[at] = (runs ? plan.fanPumpKw : 0) + backUpKw / cop;
    hours.referenceKwh[at] = load / cop;
    hours.backUpKw[at] = backUpKw;
  }
}
