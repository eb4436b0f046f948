/** A made-up year, written out in every format that is read: what the reader gives must be what was written. */
import { civilMinutes, civilTime } from '#engine/weather-files/time/civil-minutes.ts';

export interface WrittenHour {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  /** Hour that ends, 1 to 24, local standard time. */
  readonly hour: number;
  /** Tenths. */
  readonly dryBulbC: number;
  readonly dewPointC: number;
  readonly relativeHumidityPct: number;
  /** Whole hectopascals. */
  readonly pressurePa: number;
}

export interface WrittenPlace {
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly utcOffsetH: number;
}

export const WRITTEN_PLACE: WrittenPlace = {
  name: 'Made-up Field',
  latitude: 38.5,
  longitude: -105.25,
  elevationM: 500,
  utcOffsetH: -7,
};

/** Local hours of a common year: warm enough that no dew point lies below 0 °C, uneven enough that no value is stuck. */
export function writtenYear(seed = 1, year = 2015): readonly WrittenHour[] {
  let state = (seed * 2_654_435_761) >>> 0;
  const random = () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0;
    return state / 2 ** 32;
  };
  const first = civilMinutes({ year, month: 1, day: 1, hour: 0, minute: 0 });
  return Array.from({ length: 8760 }, (_none, slot) => {
    const begin = civilTime(first + 60 * slot);
    const season = Math.cos((2 * Math.PI * (slot / 24 - 200)) / 365);
    const day = Math.cos((2 * Math.PI * (begin.hour - 14)) / 24);
    const dryBulbC = tenths(22 + 8 * season + 5 * day + 1.4 * random());
    const dewPointC = tenths(8 + 3 * season + 2 * random());
    return {
      year: begin.year,
      month: begin.month,
      day: begin.day,
      hour: begin.hour + 1,
      dryBulbC,
      dewPointC,
      relativeHumidityPct: relativeHumidityPct(dryBulbC, dewPointC),
      pressurePa: 100 * Math.round(953 + 5 * Math.sin(slot / 61) + random()),
    };
  });
}

function tenths(value: number): number {
  return Math.round(value * 10) / 10;
}

/** Magnus formula over water; within half a point of the engine's, which is all that the files' columns must agree to. */
function relativeHumidityPct(dryBulbC: number, dewPointC: number): number {
  const pressure = (tempC: number) => Math.exp((17.625 * tempC) / (243.04 + tempC));
  return Math.round((1000 * pressure(dewPointC)) / pressure(dryBulbC)) / 10;
}

const two = (value: number) => String(value).padStart(2, '0');
const fixed = (value: number, width: number) => String(Math.round(value)).padStart(width);
const signed = (value: number, digits: number) =>
  `${value < 0 ? '-' : '+'}${String(Math.abs(Math.round(value))).padStart(digits, '0')}`;

/** Minutes since 1970 of the end of a local hour, UTC. */
export function utcMinutes({ day, hour, month, year }: WrittenHour, place: WrittenPlace): number {
  return civilMinutes({ year, month, day, hour, minute: 0 }) - 60 * place.utcOffsetH;
}

/** Pressure at sea level, Pa, of which the station's is the reduction (method.md 1, solved for the other). */
export function seaLevelPa({ dryBulbC, pressurePa }: WrittenHour, elevationM: number): number {
  const kelvin = dryBulbC + 273.15;
  return pressurePa * ((kelvin + 0.0065 * elevationM) / kelvin) ** 5.2559;
}

export const TMY3_NAMES = [
  ...['Date (MM/DD/YYYY)', 'Time (HH:MM)', 'GHI (W/m^2)'],
  ...['Dry-bulb (C)', 'Dry-bulb source', 'Dry-bulb uncert (code)'],
  ...['Dew-point (C)', 'Dew-point source', 'Dew-point uncert (code)'],
  ...['RHum (%)', 'RHum source', 'RHum uncert (code)'],
  ...['Pressure (mbar)', 'Pressure source', 'Pressure uncert (code)', 'Visibility (m)'],
];

export function tmy3Lines(hours: readonly WrittenHour[], place = WRITTEN_PLACE): string[] {
  const station = `724666,"${place.name}",CO,${place.utcOffsetH.toFixed(1)},${place.latitude},${place.longitude},${place.elevationM}`;
  const rows = hours.map((hour) => {
    const time = `${two(hour.month)}/${two(hour.day)}/${hour.year},${two(hour.hour)}:00`;
    const values = `${hour.dryBulbC},A,7,${hour.dewPointC},A,7,${hour.relativeHumidityPct},A,7`;
    return `${time},0,${values},${hour.pressurePa / 100},A,7,-9900`;
  });
  return [station, TMY3_NAMES.join(','), ...rows];
}

export function tmy2Lines(hours: readonly WrittenHour[], place = WRITTEN_PLACE): string[] {
  const degrees = (value: number, width: number) => {
    const whole = Math.floor(Math.abs(value));
    return `${fixed(whole, width)} ${fixed((Math.abs(value) - whole) * 60, 2)}`;
  };
  const header = ` 12345 ${place.name.padEnd(22)} CO ${fixed(place.utcOffsetH, 3)} N ${degrees(place.latitude, 2)} W ${degrees(place.longitude, 3)} ${fixed(place.elevationM, 5)}`;
  const value = (number: number, digits: number) =>
    number < 0
      ? `-${String(Math.round(-number)).padStart(digits - 1, '0')}`
      : String(Math.round(number)).padStart(digits, '0');
  const rows = hours.map((hour) => {
    const time = ` ${two(hour.year % 100)}${two(hour.month)}${two(hour.day)}${two(hour.hour)}`;
    const air = `${value(hour.dryBulbC * 10, 4)}A7${value(hour.dewPointC * 10, 4)}A7${value(hour.relativeHumidityPct, 3)}A7${value(hour.pressurePa / 100, 4)}A7`;
    return `${time.padEnd(67, '0')}${air}`.padEnd(142, '0');
  });
  return [header, ...rows];
}

export function isdLiteLines(hours: readonly WrittenHour[], place = WRITTEN_PLACE): string[] {
  return hours.map((hour) => {
    const { day, hour: hourOfDay, month, year } = civilTime(utcMinutes(hour, place));
    const values = [hour.dryBulbC * 10, hour.dewPointC * 10, seaLevelPa(hour, place.elevationM) / 10, 210, 26];
    const time = `${year} ${two(month)} ${two(day)} ${two(hourOfDay)}`;
    return `${time}${[...values, -9999, -9999, -9999].map((number) => fixed(number, 6)).join('')}`;
  });
}

export interface WrittenReport {
  readonly minutes?: number;
  readonly type?: string;
  readonly code?: string;
  readonly station?: string;
}

/** One report as a record of the integrated surface data. */
export function isdRecord(hour: WrittenHour, report: WrittenReport = {}, place = WRITTEN_PLACE): string {
  const { code = '1', minutes = utcMinutes(hour, place), station = '72466693067', type = 'FM-15' } = report;
  const { day, hour: hourOfDay, minute, month, year } = civilTime(minutes);
  const time = `${year}${two(month)}${two(day)}${two(hourOfDay)}${two(minute)}`;
  const where = `4${signed(place.latitude * 1000, 5)}${signed(place.longitude * 1000, 6)}${type.padEnd(5)}${signed(place.elevationM, 4)}`;
  const sky = `${'KAPA'.padEnd(5)}V0309999C000052200059N0112655N5`;
  const air = `${signed(hour.dryBulbC * 10, 4)}${code}${signed(hour.dewPointC * 10, 4)}${code}`;
  const sea = String(Math.round(seaLevelPa(hour, place.elevationM) / 10)).padStart(5, '0');
  const group = `ADDMA1999999${String(Math.round(hour.pressurePa / 10)).padStart(5, '0')}1REMMET MA1`;
  return `0158${station}${time}${where}${sky}${air}${sea}1${group}`;
}

export function isdLines(hours: readonly WrittenHour[], place = WRITTEN_PLACE): string[] {
  return hours.map((hour) => isdRecord(hour, {}, place));
}

export const GLOBAL_HOURLY_HEADER =
  '"STATION","DATE","SOURCE","LATITUDE","LONGITUDE","ELEVATION","NAME","REPORT_TYPE","TMP","DEW","SLP","MA1"';

export function globalHourlyRow(hour: WrittenHour, report: WrittenReport = {}, place = WRITTEN_PLACE): string {
  const { code = '1', minutes = utcMinutes(hour, place), station = '72466693067', type = 'FM-15' } = report;
  const { day, hour: hourOfDay, minute, month, year } = civilTime(minutes);
  const cells = [
    station,
    `${year}-${two(month)}-${two(day)}T${two(hourOfDay)}:${two(minute)}:00`,
    '4',
    place.latitude,
    place.longitude,
    place.elevationM.toFixed(1),
    `${place.name}, CO US`,
    type,
    `${signed(hour.dryBulbC * 10, 4)},${code}`,
    `${signed(hour.dewPointC * 10, 4)},${code}`,
    `${String(Math.round(seaLevelPa(hour, place.elevationM) / 10)).padStart(5, '0')},1`,
    `99999,9,${String(Math.round(hour.pressurePa / 10)).padStart(5, '0')},1`,
  ];
  return cells.map((cell) => `"${cell}"`).join(',');
}

export function globalHourlyLines(hours: readonly WrittenHour[], place = WRITTEN_PLACE): string[] {
  return [GLOBAL_HOURLY_HEADER, ...hours.map((hour) => globalHourlyRow(hour, {}, place))];
}

/** A row of a table in local standard time, the reading at the end of the hour. */
export function tableRow(hour: WrittenHour, delimiter = ','): string {
  const {
    day,
    hour: hourOfDay,
    minute,
    month,
    year,
  } = civilTime(civilMinutes({ year: hour.year, month: hour.month, day: hour.day, hour: hour.hour, minute: 0 }));
  const time = `${year}-${two(month)}-${two(day)} ${two(hourOfDay)}:${two(minute)}`;
  const values = [hour.dryBulbC, hour.dewPointC, hour.relativeHumidityPct, hour.pressurePa / 100];
  return [time, ...values].join(delimiter);
}

export const TABLE_NAMES = ['Time', 'Temperature (°C)', 'Dew point (°C)', 'RH (%)', 'Station pressure (hPa)'];

export function tableLines(hours: readonly WrittenHour[], delimiter = ','): string[] {
  return [TABLE_NAMES.join(delimiter), ...hours.map((hour) => tableRow(hour, delimiter))];
}

/** Lines as bytes, LF line ends. */
export function bytesOfRows(rows: readonly string[]): Uint8Array {
  return new TextEncoder().encode(`${rows.join('\n')}\n`);
}
