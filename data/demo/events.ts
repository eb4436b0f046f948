import type { Climate } from './climates.ts';
import type { SeededRandom } from './seeded-random.ts';

const HOURS_PER_YEAR = 8760;
const HOURS_PER_MONTH = HOURS_PER_YEAR / 12;
/** Day of the year on which a southern summer is at its height. */
const HEIGHT_OF_SUMMER_DAY = 18;

/** 1 at the height of the southern summer, 0 half a year later. */
export function seasonalShare(slot: number): number {
  const turn = (2 * Math.PI * (slot / 24 - HEIGHT_OF_SUMMER_DAY)) / 365;
  return (1 + Math.cos(turn)) / 2;
}

/** Times at which something with a seasonal rate happens, each with a strength between 0.5 and 1.5. */
function happenings(
  random: SeededRandom,
  perMonth: readonly [january: number, july: number],
  hours: number,
): { slot: number; strength: number }[] {
  const found: { slot: number; strength: number }[] = [];
  for (let slot = 0; slot < hours; slot += 1) {
    const rate = (perMonth[1] + (perMonth[0] - perMonth[1]) * seasonalShare(slot)) / HOURS_PER_MONTH;
    if (random.uniform() < rate) found.push({ slot, strength: 0.5 + random.uniform() });
  }
  return found;
}

/** Hours for which a front is followed before and after it passes. */
const BEFORE_FRONT_H = 60;
const AFTER_FRONT_H = 200;

/**
 * Cool fronts: the air warms and the pressure falls for a day before, then the pressure rises and cool air comes in within
 * hours and wears off over days.
 * @returns changes by slot: dry bulb and dew point, K; pressure, share of the pressure; cloud, 0 to about 1
 */
export function coolFronts(random: SeededRandom, climate: Climate, hours: number) {
  const dryBulbK = new Float64Array(hours);
  const dewPointK = new Float64Array(hours);
  const pressureShare = new Float64Array(hours);
  const cloud = new Float64Array(hours);
  for (const { slot, strength } of happenings(random, climate.frontsPerMonth, hours)) {
    const first = Math.max(0, slot - BEFORE_FRONT_H);
    const last = Math.min(hours, slot + AFTER_FRONT_H);
    for (let at = first; at < last; at += 1) {
      const h = at - slot;
      const ahead = h < 0 ? Math.exp(h / 18) : Math.exp(-h / 3);
      const behind = h < 0 ? 0 : (1 - Math.exp(-h / 3)) * Math.exp(-h / 45);
      dryBulbK[at] = (dryBulbK[at] ?? 0) + strength * (1.8 * ahead - climate.frontCoolingK * behind);
      dewPointK[at] = (dewPointK[at] ?? 0) + strength * (0.8 * ahead - climate.frontDryingK * behind);
      pressureShare[at] = (pressureShare[at] ?? 0) + strength * (0.006 * behind - 0.005 * ahead);
      cloud[at] = (cloud[at] ?? 0) + strength * Math.exp(-0.5 * ((h - 2) / 9) ** 2);
    }
  }
  return { dryBulbK, dewPointK, pressureShare, cloud };
}

/** How quickly a humid spell comes and goes, h. */
const SPELL_EDGE_H = 9;

/** Humid spells: 0 outside, about 1 within, with soft edges; overlapping spells do not add up beyond 1.5. */
export function humidSpells(random: SeededRandom, climate: Climate, hours: number): { moisture: Float64Array } {
  const moisture = new Float64Array(hours);
  for (const { slot, strength } of happenings(random, climate.humidSpellsPerMonth, hours)) {
    const lengthH = climate.humidSpellH * (0.5 + random.uniform());
    for (let at = Math.max(0, slot - 40); at < Math.min(hours, slot + lengthH + 40); at += 1) {
      const rise = 1 / (1 + Math.exp(-(at - slot) / SPELL_EDGE_H));
      const fall = 1 / (1 + Math.exp((at - slot - lengthH) / SPELL_EDGE_H));
      moisture[at] = Math.min(1.5, (moisture[at] ?? 0) + strength * rise * fall);
    }
  }
  return { moisture };
}

/** How long the air stays cool after a storm, h. */
const AFTER_STORM_H = 5;

/**
 * Afternoon thunderstorms on some cloudy summer days: within the hour the outflow cools the air and makes it moister, and
 * the change wears off through the evening.
 * @param cloud share, 0 to 1, by slot
 * @returns changes by slot: dry bulb and dew point, K
 */
export function thunderstorms(random: SeededRandom, climate: Climate, cloud: Float64Array) {
  const dryBulbK = new Float64Array(cloud.length);
  const dewPointK = new Float64Array(cloud.length);
  for (let day = 0; day < cloud.length / 24; day += 1) {
    const start = day * 24 + 14 + Math.floor(random.uniform() * 4);
    const strength = 0.4 + random.uniform();
    const chance = climate.storminess * seasonalShare(start) ** 2 * (cloud[start] ?? 0);
    if (random.uniform() >= chance) continue;
    for (let slot = start; slot < Math.min(cloud.length, start + 30); slot += 1) {
      const left = strength * Math.exp(-(slot - start) / AFTER_STORM_H);
      dryBulbK[slot] = (dryBulbK[slot] ?? 0) - 6 * left;
      dewPointK[slot] = (dewPointK[slot] ?? 0) + 1.5 * left;
    }
  }
  return { dryBulbK, dewPointK };
}
