import { relativeHumidityOfDewPointPct } from '#engine/psychrometrics/moist-air.ts';
import { daysInMonth } from '#engine/reduction/calendar.ts';

/** An hour of a made-up EPW. What is not given follows from the default weather; text is written as it stands. */
export interface EpwHour {
  readonly year?: number | string;
  readonly minute?: number;
  readonly flags?: string;
  readonly dryBulbC?: number | string;
  readonly dewPointC?: number | string;
  /** Left out: what dry bulb and dew point mean, over water, to 0.1 %. */
  readonly relativeHumidityPct?: number | string;
  readonly pressurePa?: number | string;
}

export interface EpwDate {
  readonly slot: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
}

export interface EpwOptions {
  /** 8760, or 8784 with 29 February. */
  readonly slots?: number;
  readonly hour?: (date: EpwDate) => EpwHour;
  /** Replaces LOCATION's fields after the keyword. */
  readonly location?: string;
  readonly designConditions?: string;
  readonly leapYearObserved?: string;
  readonly comments?: readonly [string, string];
  /** Replaces the fields of DATA PERIODS after the keyword. */
  readonly dataPeriods?: string;
  readonly recordsPerHour?: number;
}

/** Line of the first data record. */
export const FIRST_DATA_LINE = 9;

const LOCATION = 'Made-up Field,-,Nowhere,Invented,-,33.45,-111.98,-7.0,337.0';
const UNIFORM_FLAGS = '?9?9?9?9E0?9?9?9?9?9?9?9?9?9?9?9?9?9?9?9*9*9?9?9?9';
const REST = '0,0,292,0,0,0,0,0,0,0,110,1.5,0,0,16.0,77777,9,999999999,150,0.0470,0,88,0.200,0.0,1.0';

/** A dry, clear climate: dry bulb 9 to 43 °C, dew point 4 to 12 °C, pressure near 97,300 Pa; no day is that before. */
export function plainHour({ slot, hour }: EpwDate): { dryBulbC: number; dewPointC: number; pressurePa: number } {
  const season = Math.cos((2 * Math.PI * (slot / 24 - 200)) / 365);
  const day = Math.cos((2 * Math.PI * (hour - 15)) / 24);
  return {
    dryBulbC: tenths(25 + 10 * season + 6 * day + 1 + Math.sin(slot / 17)),
    dewPointC: tenths(8 + 3 * season + Math.sin(slot / 37)),
    pressurePa: 97_300 + 10 * Math.round(30 * Math.sin(slot / 61)),
  };
}

function tenths(value: number): number {
  return Math.round(value * 10) / 10;
}

/** The dates of a calendar of 8760 or 8784 hours, in order. */
export function epwDates(slots = 8760): readonly EpwDate[] {
  const dates: EpwDate[] = [];
  for (let month = 1; month <= 12; month++) {
    for (let day = 1; day <= daysInMonth(month, slots === 8784); day++) {
      for (let hour = 1; hour <= 24; hour++) dates.push({ slot: dates.length, month, day, hour });
    }
  }
  return dates;
}

/** The lines of a valid EPW, for tests that damage some of them. Data begin at `FIRST_DATA_LINE`. */
export function epwLines(options: EpwOptions = {}): string[] {
  const { recordsPerHour = 1, slots = 8760 } = options;
  const lines = [
    `LOCATION,${options.location ?? LOCATION}`,
    `DESIGN CONDITIONS,${options.designConditions ?? '0'}`,
    'TYPICAL/EXTREME PERIODS,0',
    'GROUND TEMPERATURES,0',
    `HOLIDAYS/DAYLIGHT SAVINGS,${options.leapYearObserved ?? 'No'},0,0,0`,
    `COMMENTS 1,${options.comments?.[0] ?? 'Made up for a test'}`,
    `COMMENTS 2,${options.comments?.[1] ?? ''}`,
    `DATA PERIODS,${options.dataPeriods ?? `1,${recordsPerHour},Data,Sunday, 1/ 1,12/31`}`,
  ];
  const plain = recordsPerHour === 1 ? plainRows(slots) : null;
  for (const date of epwDates(slots)) {
    const hour = options.hour?.(date);
    for (let record = 1; record <= recordsPerHour; record++) {
      const minute = recordsPerHour === 1 ? 0 : (60 / recordsPerHour) * record;
      const ready = hour === undefined || Object.keys(hour).length === 0 ? plain?.[date.slot] : undefined;
      lines.push(ready ?? epwRow(date, { minute, ...hour }));
    }
  }
  return lines;
}

const plainRowsBySlots = new Map<number, readonly string[]>();

/** The rows of the default weather, made once. */
function plainRows(slots: number): readonly string[] {
  const rows = plainRowsBySlots.get(slots) ?? epwDates(slots).map((date) => epwRow(date));
  plainRowsBySlots.set(slots, rows);
  return rows;
}

/** One data record. */
export function epwRow(date: EpwDate, hour: EpwHour = {}): string {
  const plain = plainHour(date);
  const dryBulbC = hour.dryBulbC ?? plain.dryBulbC;
  const dewPointC = hour.dewPointC ?? plain.dewPointC;
  const humidity = hour.relativeHumidityPct ?? humidityText(dryBulbC, dewPointC);
  // Months of different years, as in a typical year.
  const year = hour.year ?? 1990 + date.month;
  const time = `${year},${date.month},${date.day},${date.hour},${hour.minute ?? 0}`;
  const values = `${dryBulbC},${dewPointC},${humidity},${hour.pressurePa ?? plain.pressurePa}`;
  return `${time},${hour.flags ?? UNIFORM_FLAGS},${values},${REST}`;
}

function humidityText(dryBulbC: number | string, dewPointC: number | string): string {
  if (typeof dryBulbC === 'string' || typeof dewPointC === 'string') return '50';
  if (dewPointC > dryBulbC || dryBulbC > 99) return '100';
  return relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'water').toFixed(1);
}

/** A whole EPW as text, LF line ends. */
export function epwText(options: EpwOptions = {}): string {
  return `${epwLines(options).join('\n')}\n`;
}

/** A whole EPW as bytes. */
export function epwBytes(options: EpwOptions = {}): Uint8Array {
  return bytesOf(epwText(options));
}

export function bytesOf(text: string): Uint8Array {
  return new TextEncoder().encode(text);
}

/** Lines as the bytes of a file, LF line ends and one at the end. */
export function bytesOfLines(lines: readonly string[]): Uint8Array {
  return bytesOf(`${lines.join('\n')}\n`);
}
