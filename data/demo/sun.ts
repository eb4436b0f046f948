import { seasonalShare } from './events.ts';
import type { DemoStation } from './stations.ts';

const RADIANS = Math.PI / 180;
/** How long the lower air keeps the day's warmth, h. */
const MEMORY_H = 7;
/** Of the sun's warmth, what a full cloud keeps out. */
const CLOUD_KEEPS = 0.72;
/** Slots on either side over which means and ranges are taken: a month in all. */
const HALF_WINDOW_SLOTS = 24 * 15;

/** Sine of the sun's height (negative at night) in the middle of a slot; declination by Cooper 1969. */
function sineOfSun(station: DemoStation, slot: number): number {
  const day = Math.floor(slot / 24) + 1;
  const declination = 23.45 * RADIANS * Math.sin((2 * Math.PI * (284 + day)) / 365);
  const solarHour = (slot % 24) + 0.5 - station.utcOffsetH + station.longitude / 15;
  const hourAngle = 15 * RADIANS * (solarHour - 12);
  const latitude = station.latitude * RADIANS;
  return Math.sin(latitude) * Math.sin(declination) + Math.cos(latitude) * Math.cos(declination) * Math.cos(hourAngle);
}

/** Means over a window around each slot, the year taken as a ring. */
function aroundMeans(values: Float64Array): Float64Array {
  const { length } = values;
  const at = (slot: number) => values[((slot % length) + length) % length] ?? 0;
  const window = 2 * HALF_WINDOW_SLOTS + 1;
  let sum = 0;
  for (let slot = -HALF_WINDOW_SLOTS; slot <= HALF_WINDOW_SLOTS; slot += 1) sum += at(slot);
  const means = new Float64Array(length);
  for (let slot = 0; slot < length; slot += 1) {
    means[slot] = sum / window;
    sum += at(slot + HALF_WINDOW_SLOTS + 1) - at(slot - HALF_WINDOW_SLOTS);
  }
  return means;
}

/** Each slot with the range, highest less lowest, of its own day. */
function dayRanges(values: Float64Array): Float64Array {
  const ranges = new Float64Array(values.length);
  for (let start = 0; start < values.length; start += 24) {
    const day = values.subarray(start, start + 24);
    ranges.fill(Math.max(...day) - Math.min(...day), start, start + 24);
  }
  return ranges;
}

/**
 * What sun and night add to the dry bulb, K, by slot: the lower air takes in the sun that cloud lets through and gives it
 * off again with a memory of some hours, so the day is warmest in mid-afternoon, coldest at sunrise, and flat under cloud. Its
 * mean over a month is 0, and its mean daily range that of the station.
 */
export function dayWarmthK(station: DemoStation, cloud: Float64Array): Float64Array {
  const slots = cloud.length;
  const raw = new Float64Array(slots);
  let warmth = 0;
  // Three days before the year begin the memory.
  for (let slot = -72; slot < slots; slot += 1) {
    const clear = 1 - CLOUD_KEEPS * (cloud[slot < 0 ? slot + slots : slot] ?? 0);
    warmth += Math.max(0, sineOfSun(station, slot < 0 ? slot + slots : slot)) * clear - warmth / MEMORY_H;
    if (slot >= 0) raw[slot] = warmth;
  }
  const means = aroundMeans(raw);
  const ranges = aroundMeans(dayRanges(raw));
  return raw.map((value, slot) => {
    const share = seasonalShare(slot);
    const wantedK = station.dailyRangeK[1] + (station.dailyRangeK[0] - station.dailyRangeK[1]) * share;
    return ((value - (means[slot] ?? 0)) * wantedK) / (ranges[slot] ?? 1);
  });
}
