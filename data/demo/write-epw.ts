import type { RecordedYear } from './recording-faults.ts';
import { seededRandom } from './seeded-random.ts';
import type { DemoStation } from './stations.ts';

/** The sentence that every file carries. */
export const INVENTED_NOTE = 'Invented places and weather, made by Muslin for demonstration';

const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
/** The missing codes of the fields that are used, in file order. */
const MISSING = { dryBulbC: '99.9', dewPointC: '99.9', relativeHumidityPct: '999', pressurePa: '999999' } as const;
/** Source and uncertainty of each field; only the first four pairs differ: as received, or filled by the source. */
const REST_OF_FLAGS = '?9?0?0?0?0?0?0?0?0?0?9?0?0?0?0?0?0?0';
const AS_RECEIVED = `A7A7A7A7${REST_OF_FLAGS}`;
const INTERPOLATED = `B8B8B8B8${REST_OF_FLAGS}`;

/** A valid EPW text of 8760 hours, CRLF, months of several years or one year. Only what was made is written; the rest is missing. */
export function writeEpw(station: DemoStation, recorded: RecordedYear): string {
  const years = monthYears(station);
  const lines = header(station);
  let slot = 0;
  for (const [index, days] of MONTH_DAYS.entries()) {
    for (let day = 1; day <= days; day += 1) {
      for (let hour = 1; hour <= 24; hour += 1) {
        lines.push(`${years[index]},${index + 1},${day},${hour},0,${dataFields(recorded, slot)}`);
        slot += 1;
      }
    }
  }
  return `${lines.join('\r\n')}\r\n`;
}

/** The year that each month claims to come from. */
function monthYears(station: DemoStation): readonly number[] {
  if (station.year !== null) return MONTH_DAYS.map(() => station.year ?? Number.NaN);
  const random = seededRandom(`Muslin demo 1, years: ${station.name}`);
  return MONTH_DAYS.map(() => 2009 + Math.floor(random.uniform() * 15));
}

function header(station: DemoStation): string[] {
  const place = [
    station.name,
    'Veldway',
    'Invented',
    'Invented',
    '-',
    station.latitude.toFixed(2),
    station.longitude.toFixed(2),
    station.utcOffsetH.toFixed(1),
    station.elevationM.toFixed(1),
  ];
  const firstDay = new Intl.DateTimeFormat('en', { weekday: 'long', timeZone: 'UTC' }).format(
    Date.UTC(station.year ?? 2017, 0, 1),
  );
  return [
    `LOCATION,${place.join(',')}`,
    'DESIGN CONDITIONS,0',
    'TYPICAL/EXTREME PERIODS,0',
    'GROUND TEMPERATURES,0',
    'HOLIDAYS/DAYLIGHT SAVINGS,No,0,0,0',
    `COMMENTS 1,${INVENTED_NOTE}`,
    'COMMENTS 2,Nobody measured this weather: never design anything from it',
    `DATA PERIODS,1,1,Data,${firstDay}, 1/ 1,12/31`,
  ];
}

function dataFields(recorded: RecordedYear, slot: number): string {
  const print = (column: keyof typeof MISSING, decimals: number) => {
    const value = recorded[column][slot] ?? Number.NaN;
    return Number.isNaN(value) ? MISSING[column] : value.toFixed(decimals);
  };
  const sky = recorded.skyCoverTenths[slot] ?? 99;
  return [
    recorded.interpolated[slot] === 1 ? INTERPOLATED : AS_RECEIVED,
    print('dryBulbC', 1),
    print('dewPointC', 1),
    print('relativeHumidityPct', 0),
    print('pressurePa', 0),
    // Radiation, illuminance and luminance.
    '9999,9999,9999,9999,9999,9999,999999,999999,999999,9999',
    // Wind, sky, visibility, ceiling, present weather.
    `999,999,${sky},99,9999,99999,9,999999999`,
    // Water in the air, haze, snow, albedo, rain.
    '999,.999,999,99,999,999,99',
  ].join(',');
}
