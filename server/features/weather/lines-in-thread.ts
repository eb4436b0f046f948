import { packYear } from '#engine/reduction/packed-columns.ts';
import type { PackedYear } from '#engine/reduction/weather-year.ts';
import { readWeatherFileParts } from '#engine/weather-files/read-weather-file-parts.ts';
import type { HourColumns } from '#engine/weather-files/weather-file-reading.ts';
import type { LinesTask } from '../../jobs/year-task.ts';

const MIN_PER_HOUR = 60;

/** Reads an original again as it was read, and takes the lines of its hours where they lead to the year that was stored. */
export function linesInThread({ original, year, zone }: LinesTask): Uint32Array | null {
  const { content, name, options, part } = original;
  const utcOffsetH = year.utcOffsetMin / MIN_PER_HOUR;
  const readings = readWeatherFileParts(content, name, { ...options, zoneAt: () => ({ zone, utcOffsetH }) });
  const reading = readings.find((each) => each.part === part) ?? readings[0];
  if (reading === undefined || reading.status === 'refused' || reading.hours === null) return null;
  return leadsTo(reading.hours, year.packed) ? reading.hours.lines : null;
}

/** Rules may have been switched since: what one of the two does not know says nothing. */
function leadsTo(hours: HourColumns, stored: PackedYear): boolean {
  if (hours.lines.length !== stored.dryBulb.length) return false;
  const { dryBulb } = packYear(hours);
  const missing = packYear({ ...hours, dryBulbC: new Float64Array(1).fill(Number.NaN) }).dryBulb[0];
  return dryBulb.every((value, slot) => {
    const there = stored.dryBulb[slot];
    return value === there || value === missing || there === missing;
  });
}
