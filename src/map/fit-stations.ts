type Positioned = { readonly latitude: number; readonly longitude: number };

/** [west, south, east, north] in degrees; `east` runs on past 180 where the box crosses it. */
export type Box = readonly [west: number, south: number, east: number, north: number];

/** Around a single station, or several close together, so much of its surroundings is shown. */
const LEAST_SPAN_DEGREES = 3;

/** The smallest box around the stations, over the date line where that is the shorter way; null without stations. */
export function boxAround(stations: readonly Positioned[]): Box | null {
  if (stations.length === 0) return null;
  const latitudes = stations.map((station) => station.latitude);
  const [south, north] = atLeast(Math.min(...latitudes), Math.max(...latitudes));
  const [west, east] = atLeast(...shortestArc(stations.map((station) => station.longitude)));
  return [west, Math.max(-85, south), east, Math.min(85, north)];
}

/** The whole circle less the widest gap between neighbours. */
function shortestArc(longitudes: readonly number[]): [west: number, east: number] {
  const sorted = [...longitudes].sort((a, b) => a - b);
  const first = sorted[0] ?? 0;
  const last = sorted.at(-1) ?? 0;
  let gap = first + 360 - last;
  let arc: [number, number] = [first, last];
  for (const [index, longitude] of sorted.entries()) {
    const previous = sorted[index - 1];
    if (previous === undefined || longitude - previous <= gap) continue;
    gap = longitude - previous;
    arc = [longitude, previous + 360];
  }
  return arc;
}

function atLeast(from: number, to: number): [number, number] {
  const lack = Math.max(0, LEAST_SPAN_DEGREES - (to - from)) / 2;
  return [from - lack, to + lack];
}
