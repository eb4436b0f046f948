import { describe, expect, it } from 'vitest';
import { demoWeatherFile } from '../../../data/demo/demo-weather-file.ts';
import { inventWeather } from '../../../data/demo/invent-weather.ts';
import { sampleStation } from '../../../data/demo/sample-upload.ts';
import { demoStations } from '../../../data/demo/stations.ts';
import { INVENTED_NOTE } from '../../../data/demo/write-epw.ts';
import { reduceYear } from '../../../src/engine/reduction/reduce-year.ts';
import { readWeatherFile } from '../../../src/engine/weather-files/read-weather-file.ts';

const HOURS = 8760;
const stations = [...demoStations, sampleStation];
const files = new Map(stations.map((station) => [station.name, demoWeatherFile(station)]));
const years = new Map(stations.map((station) => [station.name, inventWeather(station)]));

function fileOf(name: string) {
  const file = files.get(name);
  if (file === undefined) throw new RangeError(`no station ${name}`);
  return file;
}

function yearOf(name: string) {
  const year = years.get(name);
  if (year === undefined) throw new RangeError(`no station ${name}`);
  return year;
}

function mean(values: Iterable<number>): number {
  let sum = 0;
  let count = 0;
  for (const value of values) {
    sum += value;
    count += 1;
  }
  return sum / count;
}

/** Mean by hour of day, hour 1 first. */
function dayOf(values: Float64Array): number[] {
  return Array.from({ length: 24 }, (_, hour) => mean(values.filter((__, slot) => slot % 24 === hour)));
}

function correlation(one: readonly number[], other: readonly number[]): number {
  const [meanOne, meanOther] = [mean(one), mean(other)];
  let cross = 0;
  let squareOne = 0;
  let squareOther = 0;
  for (const [index, value] of one.entries()) {
    const a = value - meanOne;
    const b = (other[index] ?? Number.NaN) - meanOther;
    cross += a * b;
    squareOne += a * a;
    squareOther += b * b;
  }
  return cross / Math.sqrt(squareOne * squareOther);
}

/** Troposphere of the standard atmosphere (ISO 2533:1975, from memory), written apart from the engine's. */
function isoPressurePa(elevationM: number): number {
  return 101325 * (1 - (0.0065 * elevationM) / 288.15) ** 5.25588;
}

/** Saturation over water by Magnus with the coefficients of Sonntag 1990 (from memory), apart from the engine's. */
function magnusPa(tempC: number): number {
  return 611.2 * Math.exp((17.62 * tempC) / (243.12 + tempC));
}

describe('the invented weather', () => {
  it('is of 26 stations with different names and places, and one more to upload', () => {
    expect(demoStations).toHaveLength(26);
    expect(new Set(stations.map(({ name }) => name)).size).toBe(27);
    expect(new Set(stations.map(({ latitude, longitude }) => `${latitude} ${longitude}`)).size).toBe(27);
  });

  it('comes out with the same bytes every time', () => {
    let bytes = 0;
    for (const station of stations) {
      const [first, second] = [fileOf(station.name), demoWeatherFile(station)];
      expect(second.text === first.text, station.name).toBe(true);
      bytes += first.text.length;
    }
    expect(bytes).toBeGreaterThan(27 * 1_500_000);
  });

  it('never has a dew point above the dry bulb, and its humidity is that of the two, in all 236,520 hours', () => {
    let hours = 0;
    let worstPct = 0;
    for (const year of years.values()) {
      for (const [slot, dryBulbC] of year.dryBulbC.entries()) {
        const dewPointC = year.dewPointC[slot] ?? Number.NaN;
        const humidityPct = year.relativeHumidityPct[slot] ?? Number.NaN;
        if (!(dewPointC <= dryBulbC && humidityPct > 0 && humidityPct <= 100)) expect.fail(`slot ${slot}`);
        worstPct = Math.max(worstPct, Math.abs(humidityPct - (100 * magnusPa(dewPointC)) / magnusPa(dryBulbC)));
        hours += 1;
      }
    }
    expect(hours).toBe(27 * HOURS);
    // Half a point is the rounding of the file; the rest is the difference between the two formulas.
    expect(worstPct).toBeLessThan(0.8);
  });

  it('stays within what has been measured on the continent and moves no faster than real files do', () => {
    for (const [name, year] of years) {
      // Records of Africa in formats.md 7.1, after HadISD: -23.9 to 55.0 °C.
      expect(Math.min(...year.dryBulbC), name).toBeGreaterThan(-23.9);
      expect(Math.max(...year.dryBulbC), name).toBeLessThan(50);
      const steps = year.dryBulbC.slice(1).map((value, slot) => Math.abs(value - (year.dryBulbC[slot] ?? Number.NaN)));
      // The largest hourly step of a surveyed file: median 9.0 K, 95 % under 15.0 K.
      expect(Math.max(...steps), name).toBeLessThan(12);
    }
  });

  it('is hottest in the southern summer, warmest in mid-afternoon and coldest near sunrise at every station', () => {
    for (const [name, year] of years) {
      const month = (first: number, days: number) => mean(year.dryBulbC.subarray(first * 24, (first + days) * 24));
      expect(month(0, 31) - month(181, 31), name).toBeGreaterThan(2.5);
      const day = dayOf(year.dryBulbC);
      const warmest = day.indexOf(Math.max(...day)) + 1;
      const coldest = day.indexOf(Math.min(...day)) + 1;
      expect(warmest, name).toBeGreaterThanOrEqual(14);
      expect(warmest, name).toBeLessThanOrEqual(17);
      expect(coldest, name).toBeGreaterThanOrEqual(5);
      expect(coldest, name).toBeLessThanOrEqual(8);
    }
  });

  it('has less of a day under cloud than under a clear sky', () => {
    for (const [name, year] of years) {
      const cloudy: number[] = [];
      const clear: number[] = [];
      for (let start = 0; start < HOURS; start += 24) {
        const range =
          Math.max(...year.dryBulbC.subarray(start, start + 24)) -
          Math.min(...year.dryBulbC.subarray(start, start + 24));
        const sky = mean(year.skyCoverTenths.subarray(start + 7, start + 18));
        if (sky >= 7) cloudy.push(range);
        if (sky <= 2) clear.push(range);
      }
      expect(cloudy.length, name).toBeGreaterThan(5);
      expect(clear.length, name).toBeGreaterThan(20);
      expect(mean(clear), name).toBeGreaterThan(mean(cloudy) + 2);
    }
  });

  it('has a dew point that follows the air mass: alike from day to day, and hardly moved by the hour of day', () => {
    for (const [name, year] of years) {
      const days = Array.from({ length: 365 }, (_, day) => mean(year.dewPointC.subarray(day * 24, day * 24 + 24)));
      const dayToDay = correlation(days.slice(1), days.slice(0, -1));
      expect(dayToDay, name).toBeGreaterThan(0.6);
      const ofDay = (values: Float64Array) => Math.max(...dayOf(values)) - Math.min(...dayOf(values));
      // Dew at night takes some water on the coast; the dry bulb moves several times as much.
      expect(ofDay(year.dewPointC), name).toBeLessThan(0.35 * ofDay(year.dryBulbC));
    }
  });

  it('has the pressure of its height: within 1.2 % of the standard atmosphere on average, with tide and weather', () => {
    for (const station of stations) {
      const { pressurePa } = yearOf(station.name);
      const average = mean(pressurePa);
      expect(Math.abs(average / isoPressurePa(station.elevationM) - 1), station.name).toBeLessThan(0.012);
      const day = dayOf(pressurePa);
      expect(Math.abs(day.indexOf(Math.max(...day)) + 1 - 10), station.name).toBeLessThanOrEqual(2);
      const spread = Math.sqrt(mean(pressurePa.map((value) => (value - average) ** 2)));
      expect(spread, station.name).toBeGreaterThan(200);
      expect(spread, station.name).toBeLessThan(900);
    }
  });
});

describe('a written file', () => {
  it('has eight header records and 8760 rows of 35 fields, ends every line with CRLF, and says that it is invented', () => {
    let rows = 0;
    for (const station of stations) {
      const { text } = fileOf(station.name);
      const lines = text.split('\r\n');
      expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
      expect(lines.pop()).toBe('');
      expect(lines[0]).toMatch(new RegExp(`^LOCATION,${station.name},`));
      expect(lines[1]).toBe('DESIGN CONDITIONS,0');
      expect(lines[5]).toBe(`COMMENTS 1,${INVENTED_NOTE}`);
      expect(lines[7]).toMatch(/^DATA PERIODS,1,1,Data,/);
      for (const line of lines.slice(8)) {
        if (line.split(',').length !== 35) expect.fail(line);
        rows += 1;
      }
    }
    expect(rows).toBe(27 * HOURS);
  });

  it('writes gaps of one to five hours at every station, and a longer one where the recorder stopped', () => {
    let longer = 0;
    for (const station of stations) {
      const values = fileOf(station.name)
        .text.split('\r\n')
        .slice(8, 8 + HOURS)
        .map((line) => line.split(',')[7]);
      const gaps: number[] = [];
      let length = 0;
      for (const value of [...values, '']) {
        if (value === '99.9') length += 1;
        else if (length > 0) {
          gaps.push(length);
          length = 0;
        }
      }
      expect(gaps.filter((gap) => gap <= 5).length, station.name).toBeGreaterThanOrEqual(1);
      longer += gaps.filter((gap) => gap > 5).length;
    }
    // Long gaps at three stations, humidity lost at one; two short gaps may meet.
    expect(longer).toBeGreaterThanOrEqual(4);
    expect(longer).toBeLessThanOrEqual(6);
  });
});

describe('reading the written files', () => {
  const readings = stations.map((station) => {
    const { name, text } = fileOf(station.name);
    return { station, reading: readWeatherFile(new TextEncoder().encode(text), name) };
  });
  /** The faults that were put in, by the gravest severity that their findings have. */
  const REPAIRED = ['Twin Kopjes', 'Gannet Point', sampleStation.name];
  const DOUBTED = ['Lantern Bay'];
  const INCOMPLETE = ['Korrel Pan', 'Lantern Bay', 'Leadwood Halt', 'Plover Rand', sampleStation.name];

  it('ends in review for each, without a doubt but where a fault was put in', () => {
    expect(readings).toHaveLength(27);
    for (const { station, reading } of readings) {
      expect(reading.status, station.name).toBe('review');
      const severities = new Set(reading.findings.map(({ severity }) => severity));
      expect(severities.has('doubt'), station.name).toBe(DOUBTED.includes(station.name));
      if (!DOUBTED.includes(station.name)) {
        expect(severities.has('repair'), station.name).toBe(REPAIRED.includes(station.name));
      }
    }
  });

  it('finds the place, the kind of year and the note that it is invented in each', () => {
    for (const { station, reading } of readings) {
      if (reading.status === 'refused' || reading.hours === null) throw new Error(`${station.name} was refused`);
      const { name, latitude, longitude, elevationM, utcOffsetH } = station;
      expect(reading.station).toMatchObject({ name, latitude, longitude, elevationM, utcOffsetH });
      expect(reading.kind, name).toBe(station.year === null ? 'typical' : 'actual');
      expect(reading.year, name).toBe(station.year);
      expect(reading.comments, name).toContain(INVENTED_NOTE);
    }
  });

  it('fills the short gaps and leaves the long ones missing', () => {
    let missing = 0;
    for (const { station, reading } of readings) {
      if (reading.status === 'refused' || reading.hours === null) throw new Error(`${station.name} was refused`);
      const { facts } = reduceYear(reading);
      expect(facts.repaired, station.name).toBeGreaterThan(0);
      expect(facts.missing > 0, `${station.name}: ${facts.missing} h missing`).toBe(INCOMPLETE.includes(station.name));
      missing += facts.missing;
    }
    expect(missing).toBeGreaterThan(60);
  });
});
