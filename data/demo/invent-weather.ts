import { relativeHumidityOfDewPointPct } from '../../src/engine/psychrometrics/moist-air.ts';
import { standardPressurePa } from '../../src/engine/psychrometrics/pressure.ts';
import { climates } from './climates.ts';
import { coolFronts, humidSpells, seasonalShare, thunderstorms } from './events.ts';
import { type SeededRandom, seededRandom } from './seeded-random.ts';
import { slowNoise } from './slow-noise.ts';
import type { DemoStation } from './stations.ts';
import { dayWarmthK } from './sun.ts';

const HOURS = 8760;

/** 8760 values a column, slot i ending at hour i % 24 + 1 of day i / 24, local standard time, as a file would print them. */
export interface InventedYear {
  /** To 0.1 °C. */
  readonly dryBulbC: Float64Array;
  /** To 0.1 °C, over water at any temperature; never above the dry bulb. */
  readonly dewPointC: Float64Array;
  /** To 1 %, from the two before. */
  readonly relativeHumidityPct: Float64Array;
  /** At the station, to 10 Pa. */
  readonly pressurePa: Float64Array;
  /** Tenths, 0 to 10. */
  readonly skyCoverTenths: Float64Array;
}

/**
 * The invented year of a station, the same for the same station every time. Weather is made in the order in which it
 * works: air masses, fronts and humid spells; the cloud they bring; the day's warmth that this cloud lets in; storms; dew point from
 * the air mass alone; dew or fog where the air cools to saturation; pressure from height, season, front and tide.
 */
export function inventWeather(station: DemoStation): InventedYear {
  const random = seededRandom(`Muslin demo 1: ${station.name}`);
  const climate = climates[station.climate];
  const fronts = coolFronts(random, climate, HOURS);
  const spells = humidSpells(random, climate, HOURS);
  const cloud = cloudShare(random, station, { fronts: fronts.cloud, spells: spells.moisture });
  const warmthK = dayWarmthK(station, cloud);

  const storms = thunderstorms(random, climate, cloud);
  const frontK = sum(fronts.dryBulbK, storms.dryBulbK);
  const dewFrontK = sum(fronts.dewPointK, storms.dewPointK);

  const dryBulbC = dryBulb(random, station, { warmthK, frontK, spell: spells.moisture });
  const airMassDewC = airMassDewPoint(random, station, { frontK: dewFrontK, spell: spells.moisture });
  const dewPointC = settleDew(random, { dryBulbC, airMassDewC });
  const pressurePa = stationPressure(random, station, fronts.pressureShare);
  return asPrinted({ dryBulbC, dewPointC, pressurePa, cloud });
}

function fill(valueAt: (slot: number) => number): Float64Array {
  return Float64Array.from({ length: HOURS }, (_, slot) => valueAt(slot));
}

function sum(one: Float64Array, other: Float64Array): Float64Array {
  return one.map((value, slot) => value + (other[slot] ?? 0));
}

function between(pair: readonly [january: number, july: number], slot: number): number {
  return pair[1] + (pair[0] - pair[1]) * seasonalShare(slot);
}

function cloudShare(
  random: SeededRandom,
  station: DemoStation,
  events: { fronts: Float64Array; spells: Float64Array },
): Float64Array {
  const { cloud } = climates[station.climate];
  const noise = slowNoise(random, { length: HOURS, memoryH: 14 });
  return fill((slot) => {
    const usual = between(cloud, slot);
    const lean = Math.log(usual / (1 - usual));
    const push = lean + 1.3 * (noise[slot] ?? 0) + 2.6 * (events.fronts[slot] ?? 0) + 1.8 * (events.spells[slot] ?? 0);
    return 1 / (1 + Math.exp(-push));
  });
}

/** Heat before the rains: a hump of five weeks either side of the end of October. */
function heatBeforeRains(slot: number): number {
  const days = slot / 24 - 300;
  return Math.exp(-0.5 * (days / 24) ** 2);
}

function dryBulb(
  random: SeededRandom,
  station: DemoStation,
  parts: { warmthK: Float64Array; frontK: Float64Array; spell: Float64Array },
): Float64Array {
  const climate = climates[station.climate];
  const airMass = slowNoise(random, { length: HOURS, memoryH: 65 });
  const gusts = slowNoise(random, { length: HOURS, memoryH: 3 });
  return fill(
    (slot) =>
      between(station.dryBulbC, slot) +
      climate.heatBeforeRainsK * heatBeforeRains(slot) +
      (parts.warmthK[slot] ?? 0) +
      between(climate.dryBulbSwingK, slot) * (airMass[slot] ?? 0) +
      (parts.frontK[slot] ?? 0) -
      1.2 * (parts.spell[slot] ?? 0) +
      0.35 * (gusts[slot] ?? 0),
  );
}

/** The dew point of the air mass: it follows season, swings, spells and fronts, and knows nothing of the hour of day. */
function airMassDewPoint(
  random: SeededRandom,
  station: DemoStation,
  parts: { frontK: Float64Array; spell: Float64Array },
): Float64Array {
  const climate = climates[station.climate];
  const airMass = slowNoise(random, { length: HOURS, memoryH: 60 });
  const gusts = slowNoise(random, { length: HOURS, memoryH: 3 });
  // Moisture comes after the heat: its year lags by three weeks.
  const lagH = 24 * 21;
  return fill((slot) => {
    const usual = between(station.dewPointC, slot - lagH) - 0.9 * climate.heatBeforeRainsK * heatBeforeRains(slot);
    const free =
      usual +
      between(climate.dewPointSwingK, slot) * (airMass[slot] ?? 0) +
      (parts.frontK[slot] ?? 0) +
      climate.humidSpellK * (parts.spell[slot] ?? 0) +
      0.45 * (gusts[slot] ?? 0);
    return closeIn(free, climate.dewPointCeilingC);
  });
}

/** A smooth ceiling: far under it nothing changes, near it the value closes in. */
function closeIn(value: number, ceiling: number): number {
  const roomK = (ceiling - value) / 1.5;
  return ceiling - 1.5 * (roomK > 30 ? roomK : Math.log1p(Math.exp(roomK)));
}

/**
 * Where the air would cool under its dew point, condensation gives heat and takes water: the dry bulb falls more slowly and
 * the dew point with it; what fell as dew comes back over the following hours. Changes the dry bulb in place.
 */
function settleDew(random: SeededRandom, air: { dryBulbC: Float64Array; airMassDewC: Float64Array }): Float64Array {
  const dewPointC = new Float64Array(HOURS);
  let fallenK = 0;
  for (let slot = 0; slot < HOURS; slot += 1) {
    const offeredC = (air.airMassDewC[slot] ?? 0) - fallenK;
    const cooledC = air.dryBulbC[slot] ?? 0;
    const nearlyC = offeredC + 0.3;
    const heldC = cooledC < nearlyC ? cooledC + 0.4 * (nearlyC - cooledC) : cooledC;
    const settledC = Math.min(offeredC, heldC - 0.25 * random.uniform());
    air.dryBulbC[slot] = heldC;
    dewPointC[slot] = settledC;
    fallenK = ((air.airMassDewC[slot] ?? 0) - settledC) * 0.8;
  }
  return dewPointC;
}

function stationPressure(random: SeededRandom, station: DemoStation, frontShare: Float64Array): Float64Array {
  const climate = climates[station.climate];
  const usualPa = standardPressurePa(station.elevationM) * 1.002;
  const swing = slowNoise(random, { length: HOURS, memoryH: 75 });
  return fill((slot) => {
    const season = climate.winterHigh * (0.5 - seasonalShare(slot));
    const hour = (slot % 24) + 1;
    // The tide of the atmosphere: highs near 10 and 22 h, about 1.2 hPa at these latitudes, and a weaker daily wave.
    const tide =
      0.0012 * Math.cos((2 * Math.PI * (hour - 10)) / 12) + 0.0005 * Math.cos((2 * Math.PI * (hour - 7)) / 24);
    return usualPa * (1 + season + climate.pressureSwing * (swing[slot] ?? 0) + (frontShare[slot] ?? 0) + tide);
  });
}

function asPrinted(air: {
  dryBulbC: Float64Array;
  dewPointC: Float64Array;
  pressurePa: Float64Array;
  cloud: Float64Array;
}): InventedYear {
  const dryBulbC = air.dryBulbC.map((value) => Math.round(value * 10) / 10);
  const dewPointC = air.dewPointC.map((value, slot) =>
    Math.min(Math.round(value * 10) / 10, dryBulbC[slot] ?? Number.NaN),
  );
  return {
    dryBulbC,
    dewPointC,
    relativeHumidityPct: dewPointC.map((value, slot) =>
      Math.round(relativeHumidityOfDewPointPct(dryBulbC[slot] ?? Number.NaN, value, 'water')),
    ),
    pressurePa: air.pressurePa.map((value) => Math.round(value / 10) * 10),
    skyCoverTenths: air.cloud.map((value) => Math.round(value * 10)),
  };
}
