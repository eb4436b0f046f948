import path from 'node:path';
import { standardZoneAt } from '../features/stations/standard-zone-at.ts';
import type { ReadingKnowledge } from '../features/weather/read-options.ts';
import { openRelief } from '../tiles/relief.ts';

/** What data/relief/build.ts makes. */
const RELIEF = path.resolve(import.meta.dirname, '../../data/relief/relief.bin');

/** What reading knows beside a file: zones by position, and the approximate relief that ships with the program. */
export function readingKnowledge(): ReadingKnowledge {
  return { zoneAt: standardZoneAt, relief: openRelief(RELIEF) };
}
