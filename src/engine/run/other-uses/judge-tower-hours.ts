/**
 * Method 5 and 6 for many demand hours of process water from a cooling tower: `judgeTowerHour` and `towerPlantHour` in columns, figure
 * by figure; a test holds them together.
 */
import type { Brief } from '../../brief/brief.ts';
import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { towerLimit } from '../../hour-classes/judge-tower-hour.ts';
import { towerPlant } from '../../water-energy/tower-plant-hour.ts';
import { block } from '../hour-block.ts';
import { fillWithAir, runningStages } from '../hour-columns.ts';
import { findWetBulb, type Wetting } from './wetting-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const MET = hourClasses.indexOf('direct');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const TOWER = runningStages.indexOf('tower');
const DIRECT_BIT = 1 << runningStages.indexOf('direct');

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, classCode, met, aloneMet, running, share, waterC } = block;
const { shortfallK, uncappedShortfallK, carriedShare, supplyC, loadFraction } = block;
const { evaporatedLitres, makeUpLitres, coolingKwh, kwh, referenceKwh, backUpKw } = block;

/** Judges the hours of `block` as `meetDemandHours` leaves them; the rest is filled in. */
export function judgeTowerHours(brief: Brief, wetting: Wetting): void {
  const { count } = block;
  fillWithAir(block);
  block.supplyRatio.fill(Number.NaN, 0, count);
  const { coldC, rangeK } = towerLimit(brief);
  block.airSupplyC.fill(coldC + rangeK, 0, count);
  block.airMeets.fill(0, 0, count);
  judgeTower(brief, wetting);
  fillPlant(brief);
}

function judgeTower(brief: Brief, wetting: Wetting): void {
  const { count } = block;
  const { coldC, rangeK, approachK, exchangerK } = towerLimit(brief);
  const { basinHeat } = brief;
  const { wetBulbC: wetBulbs } = wetting;
  // What rounds to at most a limit lies under it and half a hundredth.
  const freezeEdge = hundredths(brief.freezeLockoutC) + 0.5;
  const coldEdge = hundredths(coldC) + 0.5;
  const returnHundredths = hundredths(coldC + rangeK);
  const modulating = brief.control === 'modulating';
  for (let at = 0; at < count; at++) {
    const tempC = dryBulbC[at] ?? 0;
    const frozen = 100 * tempC < freezeEdge;
    const from = slot[at] ?? 0;
    if (!frozen && Number.isNaN(wetBulbs[from] ?? 0)) {
      findWetBulb(wetting, from, tempC, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
    }
    // A drained tower sends the water back as warm as it came.
    const reachedC = frozen ? coldC + (basinHeat ? 0 : rangeK) : (wetBulbs[from] ?? 0) + approachK + exchangerK;
    const isMet = frozen ? basinHeat : 100 * reachedC < coldEdge;
    const short = !isMet && !frozen && hundredths(reachedC) < returnHundredths;
    const runs = isMet || short;
    const suppliedC = !runs ? coldC + rangeK : isMet && (frozen || modulating) ? coldC : reachedC;
    const lackingK = isMet ? 0 : frozen ? rangeK : short ? Math.max(0, suppliedC - coldC) : reachedC - coldC;
    classCode[at] = frozen ? FROZEN : isMet ? MET : short ? SHORT : BEYOND;
    met[at] = isMet ? 1 : 0;
    aloneMet[at] = isMet ? DIRECT_BIT : 0;
    running[at] = runs ? TOWER : 0;
    shortfallK[at] = lackingK;
    uncappedShortfallK[at] = lackingK;
    supplyC[at] = suppliedC;
    share[at] = runs ? 1 : 0;
    carriedShare[at] = isMet ? 1 : short ? withinShare((coldC + rangeK - suppliedC) / rangeK) : 0;
    waterC[at] = runs ? suppliedC - exchangerK : Number.NaN;
  }
}

function fillPlant(brief: Brief): void {
  const { count } = block;
  const { latentShare, latentHeatKJPerKg, secondsPerHour, kwPerKgPerS, driftShare, fanPumpKw } = towerPlant(brief);
  const { cycles } = brief;
  const { cop } = brief.reference;
  for (let at = 0; at < count; at++) {
    const load = loadFraction[at] ?? 0;
    const runs = running[at] === TOWER;
    const rejectedKw = load * (carriedShare[at] ?? 0);
    const evaporated = ((rejectedKw * latentShare) / latentHeatKJPerKg) * secondsPerHour;
    const circulationKgPerS = load / kwPerKgPerS;
    const drift = runs ? driftShare * circulationKgPerS * secondsPerHour : 0;
    const leftKw = load - rejectedKw;
    evaporatedLitres[at] = evaporated;
    makeUpLitres[at] = evaporated + evaporated / (cycles - 1) + drift;
    coolingKwh[at] = rejectedKw;
    kwh[at] = (runs ? fanPumpKw : 0) + leftKw / cop;
    referenceKwh[at] = load / cop;
    backUpKw[at] = leftKw;
  }
}
