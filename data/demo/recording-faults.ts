import type { InventedYear } from './invent-weather.ts';
import { seededRandom } from './seeded-random.ts';
import type { DemoStation } from './stations.ts';

/** What a station's recorder handed on; NaN where it handed on nothing. */
export interface RecordedYear extends InventedYear {
  /** 1 where the source filled the hour by interpolation and says so in its flags. */
  readonly interpolated: Uint8Array;
}

type Column = 'dryBulbC' | 'dewPointC' | 'relativeHumidityPct' | 'pressurePa';
const ALL: readonly Column[] = ['dryBulbC', 'dewPointC', 'relativeHumidityPct', 'pressurePa'];
const HUMIDITY: readonly Column[] = ['dewPointC', 'relativeHumidityPct'];

/** Gaps stay this far from midnight at the ends of the year, h. */
const EDGE_H = 48;

/** The invented year as an imperfect recorder would hand it on: short gaps everywhere, and the station's own faults. */
export function recordWithFaults(station: DemoStation, invented: InventedYear): RecordedYear {
  const random = seededRandom(`Muslin demo 1, faults: ${station.name}`);
  const { length } = invented.dryBulbC;
  const year: RecordedYear = {
    dryBulbC: invented.dryBulbC.slice(),
    dewPointC: invented.dewPointC.slice(),
    relativeHumidityPct: invented.relativeHumidityPct.slice(),
    pressurePa: invented.pressurePa.slice(),
    skyCoverTenths: invented.skyCoverTenths,
    interpolated: new Uint8Array(length),
  };
  const anySlot = () => EDGE_H + Math.floor(random.uniform() * (length - 2 * EDGE_H));
  const lose = (columns: readonly Column[], firstSlot: number, hours: number) => {
    for (const column of columns) year[column].fill(Number.NaN, firstSlot, firstSlot + hours);
  };

  const shortGaps = 2 + Math.floor(random.uniform() * 5);
  for (let gap = 0; gap < shortGaps; gap += 1) {
    lose(random.uniform() < 0.7 ? ALL : HUMIDITY, anySlot(), 1 + Math.floor(random.uniform() * 5));
  }
  const filledRuns = 10 + Math.floor(random.uniform() * 30);
  for (let run = 0; run < filledRuns; run += 1) interpolate(year, anySlot(), 2 + Math.floor(random.uniform() * 2));

  for (const fault of station.faults) {
    const slot = anySlot();
    if (fault === 'long gap') lose(ALL, slot, 9 + Math.floor(random.uniform() * 20));
    if (fault === 'humidity gap') lose(HUMIDITY, slot, 30);
    if (fault === 'stuck dew point') stickDewPoint(year);
    if (fault === 'humidity over 100') readHumidityHigh(year);
    if (fault === 'pressure spike') year.pressurePa[slot] = Math.round(0.088 * (year.pressurePa[slot] ?? 0)) * 10;
  }
  return year;
}

const GRAIN: Readonly<Record<Column, number>> = {
  dryBulbC: 0.1,
  dewPointC: 0.1,
  relativeHumidityPct: 1,
  pressurePa: 10,
};

/** Straight between the hours before and after, to the grain of the column, as a source's own filling does. */
function interpolate(year: RecordedYear, firstSlot: number, hours: number): void {
  for (const column of ALL) {
    const before = year[column][firstSlot - 1] ?? Number.NaN;
    const after = year[column][firstSlot + hours] ?? Number.NaN;
    for (let step = 0; step < hours; step += 1) {
      const value = before + ((step + 1) / (hours + 1)) * (after - before);
      year[column][firstSlot + step] = Number((Math.round(value / GRAIN[column]) * GRAIN[column]).toFixed(1));
    }
  }
  year.interpolated.fill(1, firstSlot, firstSlot + hours);
}

const STUCK_H = 54;

/**
 * The dew point stays at one value for two days and more, at the first time in autumn at which the night then cools below it
 * for a few hours: the sensor of the relative humidity goes on as it was.
 */
function stickDewPoint(year: RecordedYear): void {
  for (let slot = 1500; slot < year.dryBulbC.length - STUCK_H; slot += 1) {
    const stuckC = year.dewPointC[slot] ?? Number.NaN;
    const belowK = year.dryBulbC.subarray(slot, slot + STUCK_H).map((dryBulbC) => stuckC - dryBulbC);
    const impossibleH = belowK.filter((kelvin) => kelvin > 0.5).length;
    if (impossibleH < 3 || impossibleH > 8 || !(Math.max(...belowK) < 3)) continue;
    year.dewPointC.fill(stuckC, slot, slot + STUCK_H);
    return;
  }
  throw new RangeError('no two days in which the dew point could be stuck');
}

/** Days for which a humidity sensor reads high. */
const HIGH_DAYS = 12;

/** For some days in which there is fog the humidity sensor reads a little over 100 %. */
function readHumidityHigh(year: RecordedYear): void {
  const foggy = year.relativeHumidityPct.findIndex((humidityPct, slot) => slot > 4344 && humidityPct >= 99);
  for (let slot = foggy; slot < foggy + HIGH_DAYS * 24; slot += 1) {
    const humidityPct = year.relativeHumidityPct[slot] ?? Number.NaN;
    if (humidityPct >= 99) year.relativeHumidityPct[slot] = humidityPct + 2;
  }
}
