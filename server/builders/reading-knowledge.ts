import { standardZoneAt } from '../features/stations/standard-zone-at.ts';
import type { ReadingKnowledge } from '../features/weather/read-options.ts';
import { shippedRelief } from '../tiles/relief.ts';

/** What reading knows beside a file: zones by position, and the approximate relief that ships with the program. */
export function readingKnowledge(): ReadingKnowledge {
  return { zoneAt: standardZoneAt, relief: shippedRelief() };
}
