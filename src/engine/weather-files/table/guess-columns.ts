/** What columns hold, by their names alone; a guess that a person confirms. */
import type { PressureLevel } from './table-mapping.ts';

/** Not the air at the station: extremes, other media, how it feels, flags about a column. */
const OTHER_TEMPERATURE =
  /\b(dew|wet|soil|ground|surface|skin|sea|water|min|max|minimum|maximum|feels?|apparent|chill|index|sky|roof|radiant|globe|source|uncert\w*|flag|qc|quality)\b|dewp|twb/;
const ABOUT_ANOTHER = /\b(source|uncert\w*|flag|qc|quality|min|max|minimum|maximum|tendency|change|trend)\b/;

const DRY_BULB = [
  /\bdry ?bulb\b|\bdb\b|\bdbt\b|\btdb\b/,
  /\b(t2m|tair|ta|t air|temp air|air temp(erature)?|tas)\b/,
  /^temp(erature)?\b/,
  /\btemp(erature)?\b|\btmp\b/,
  /^t$|\btmpc\b|\btmpf\b/,
];
const DEW_POINT = [/\bdew|\btd\b|\btdew\b|\bd2m\b|\bdpt\b|\bdwp[cf]?\b/];
const RELATIVE_HUMIDITY = [/\brelative hum|\brh\b|\brhum\b|\brelh\b|\bhurs\b/, /^hum(idity)?\b/];
const OTHER_HUMIDITY = /\b(specific|absolute|ratio|mixing)\b/;
const WET_BULB = [/\bwet|\btwb\b|\bwbt?\b/];
const PRESSURE = [
  /\b(station|surface|air|atmospheric|barometric) ?press?|\bsp\b|\bps\b|\bsurf pres/,
  /\bpress?(ure)?\b|\bbaro/,
];
const SEA_LEVEL = /\bslp\b|\bmslp?\b|\bqff\b|\bsea ?level\b|\bsealevel|\bpmsl\b|\bprmsl\b/;
const ALTIMETER = /\bqnh\b|\baltim/;
const STATION = /^(station|station id|station name|site|site id|stationid|usaf|wmo|wban|location id)$/;

export interface GuessedPlaces {
  /** Index of each column; -1 where no name fits. */
  readonly dryBulb: number;
  readonly dewPoint: number;
  readonly relativeHumidity: number;
  readonly wetBulb: number;
  readonly pressure: number;
  readonly pressureLevel: PressureLevel;
  readonly station: number;
}

/** A name without accents, units in brackets and signs: "Temp. à l'air (°C)" becomes "temp a l air". */
export function plainName(name: string): string {
  return name
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[([{].*?[)\]}]/g, ' ')
    .replace(/[^a-z0-9]+/g, ' ')
    .trim();
}

export function guessColumns(names: readonly string[]): GuessedPlaces {
  const plain = names.map(plainName);
  const first = (patterns: readonly RegExp[], not: RegExp = ABOUT_ANOTHER) => {
    for (const pattern of patterns) {
      const index = plain.findIndex((name) => pattern.test(name) && !not.test(name));
      if (index >= 0) return index;
    }
    return -1;
  };
  const station = first(
    PRESSURE,
    new RegExp(`${ABOUT_ANOTHER.source}|${SEA_LEVEL.source}|${ALTIMETER.source}|vapou?r`),
  );
  const seaLevel = first([SEA_LEVEL]);
  const altimeter = first([ALTIMETER]);
  const pressure = station >= 0 ? station : seaLevel >= 0 ? seaLevel : altimeter;
  return {
    dryBulb: first(DRY_BULB, OTHER_TEMPERATURE),
    dewPoint: first(DEW_POINT),
    relativeHumidity: first(RELATIVE_HUMIDITY, new RegExp(`${ABOUT_ANOTHER.source}|${OTHER_HUMIDITY.source}`)),
    wetBulb: first(WET_BULB),
    pressure,
    pressureLevel: station >= 0 || pressure < 0 ? 'station' : seaLevel >= 0 ? 'sea level' : 'altimeter',
    station: plain.findIndex((name) => STATION.test(name)),
  };
}
