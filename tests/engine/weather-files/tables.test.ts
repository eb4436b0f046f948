import { describe, expect, test } from 'vitest';
import { relativeHumidityOfWetBulbPct } from '#engine/psychrometrics/humidity-of-wet-bulb.ts';
import { standardPressurePa, stationPressureOfAltimeterPa } from '#engine/psychrometrics/pressure.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { readWeatherFileParts } from '#engine/weather-files/read-weather-file-parts.ts';
import type { TableGuess } from '#engine/weather-files/table/table-guess.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';
import { civilMinutes, civilTime } from '#engine/weather-files/time/civil-minutes.ts';
import type { UsableReading } from '#engine/weather-files/weather-file-reading.ts';
import { findingsOf } from '../../support/readings.ts';
import {
  bytesOfRows,
  seaLevelPa,
  tableLines,
  tableRow,
  WRITTEN_PLACE,
  type WrittenHour,
  writtenYear,
} from '../../support/weather-writers.ts';

const { name: _name, ...KNOWN } = WRITTEN_PLACE;
const placed: ReadOptions = { place: KNOWN };
/** January to early March: read in a fifth of the time of a year, and spring's change of clocks is in it. */
const written = writtenYear(1).slice(0, 70 * 24);

function guessOf(lines: readonly string[], options: ReadOptions = placed): TableGuess {
  const reading = readWeatherFile(bytesOfRows(lines), 'made-up.csv', options);
  if (reading.status === 'asks' && reading.hours === null) return reading.table;
  throw new Error(`no guess: ${reading.findings.map(({ message }) => message).join(' ')}`);
}

function mappingOf(lines: readonly string[]): TableMapping {
  const { mapping } = guessOf(lines);
  if (mapping === null) throw new Error('nothing guessed');
  return mapping;
}

function read(lines: readonly string[], mapping: TableMapping, options: ReadOptions = placed): UsableReading {
  const reading = readWeatherFile(bytesOfRows(lines), 'made-up.csv', { ...options, mapping });
  if (reading.status !== 'refused' && reading.hours !== null) return reading;
  throw new Error(`not read: ${reading.findings.map(({ message }) => message).join(' ')}`);
}

/** The table read under its own guess. */
const readGuessed = (lines: readonly string[], change: Partial<TableMapping> = {}) =>
  read(lines, { ...mappingOf(lines), ...change });

const two = (value: number) => String(value).padStart(2, '0');

/** The end of an hour as minutes of its own clock. */
const minutesOf = (hour: WrittenHour) => civilMinutes({ ...hour, minute: 0 });

/** A table whose time is written by `stamp` from the end of the hour. */
function stamped(stamp: (minutes: number) => string, names = 'Time', delimiter = ','): string[] {
  const air = ({ dewPointC, dryBulbC, pressurePa }: WrittenHour) => [dryBulbC, dewPointC, pressurePa / 100];
  return [
    [names, 'temp', 'dew', 'press'].join(delimiter),
    ...written.map((hour) => [stamp(minutesOf(hour)), ...air(hour)].join(delimiter)),
  ];
}

/** Slots that must hold what was written in them. */
function expectSame({ hours }: UsableReading, shift = 0): void {
  for (const slot of [10, 500, 1000, 1600]) {
    expect(hours.dryBulbC[slot + shift], `slot ${slot}`).toBeCloseTo(written[slot]?.dryBulbC ?? Number.NaN, 6);
  }
}

describe('a table without a confirmed mapping', () => {
  const lines = tableLines(written);

  test('asks, and shows what it guesses with the first ten rows', () => {
    const reading = readWeatherFile(bytesOfRows(lines), 'made-up.csv', placed);
    expect(reading).toMatchObject({ status: 'asks', format: 'table', hours: null, part: '' });
    if (reading.status === 'refused' || reading.hours !== null) throw new Error('not asked');
    expect(reading.asks.map(({ what }) => what)).toEqual(['unit-guess']);
    expect(reading.asks[0]?.proposal).toBe(
      'Dry bulb from “Temperature (°C)” in °C, dew point from “Dew point (°C)” in °C, relative humidity from “RH (%)” in %, pressure from “Station pressure (hPa)” in hPa, local standard time.',
    );
    expect(reading.table.sample).toHaveLength(10);
    expect(reading.table.sample[0]).toMatchObject({
      line: 2,
      time: '2015-01-01T01:00',
      pressurePa: written[0]?.pressurePa,
    });
    expect(reading.table.stepMin).toBe(60);
    expect(reading.table.questions.map(({ about }) => about)).toEqual([
      'columns',
      'units',
      'time scale',
      'time mark',
      'years',
    ]);
  });

  test('asks for the place as well when nobody has said it', () => {
    const reading = readWeatherFile(bytesOfRows(lines), 'made-up.csv');
    expect(reading.status === 'asks' && reading.asks.map(({ what }) => what)).toEqual(['unit-guess', 'place-missing']);
  });

  test('has the key of its shape: the same for other values, another for other columns or separators', () => {
    const { shapeKey } = guessOf(lines);
    expect(shapeKey).toMatch(/^[0-9a-f]{16}$/);
    expect(guessOf(tableLines(written.toReversed())).shapeKey).toBe(shapeKey);
    expect(guessOf(tableLines(written, ';')).shapeKey).not.toBe(shapeKey);
    expect(guessOf(lines.map((line) => `${line},x`)).shapeKey).not.toBe(shapeKey);
  });

  test('is asked again when the mapping names a column that it does not have', () => {
    const mapping = { ...mappingOf(lines), dryBulb: { column: 'Outside', unit: 'C' } } as const;
    const reading = readWeatherFile(bytesOfRows(lines), 'made-up.csv', { ...placed, mapping });
    expect(reading).toMatchObject({ status: 'asks', hours: null });
    expect(findingsOf(reading, 'header')[0]?.message).toContain('“Outside”');
  });
});

describe('times of a table', () => {
  const iso = (minutes: number, join = 'T', end = '') => {
    const { day, hour, minute, month, year } = civilTime(minutes);
    return `${year}-${two(month)}-${two(day)}${join}${two(hour)}:${two(minute)}${end}`;
  };
  const parts = (minutes: number) => civilTime(minutes);

  test.each<[string, (minutes: number) => string]>([
    ['ISO 8601', (minutes) => iso(minutes)],
    ['ISO 8601 with seconds', (minutes) => `${iso(minutes, ' ')}:00`],
    [
      'day first',
      (minutes) =>
        `${parts(minutes).day}/${parts(minutes).month}/${parts(minutes).year} ${two(parts(minutes).hour)}:00`,
    ],
    [
      'month first, 12-hour clock',
      (minutes) => {
        const { day, hour, month, year } = parts(minutes);
        return `${month}/${day}/${year} ${hour % 12 === 0 ? 12 : hour % 12}:00 ${hour < 12 ? 'AM' : 'PM'}`;
      },
    ],
    [
      'day first with points',
      (minutes) =>
        `${two(parts(minutes).day)}.${two(parts(minutes).month)}.${parts(minutes).year} ${two(parts(minutes).hour)}:00`,
    ],
    ['digits alone', (minutes) => iso(minutes).replace(/[-T:]/g, '')],
    ['digits to the hour', (minutes) => iso(minutes).replace(/[-T:]/g, '').slice(0, 10)],
    ['the form of PVGIS', (minutes) => iso(minutes).replace(/[-:]/g, '').replace('T', ':')],
    ['days of a spreadsheet', (minutes) => (minutes / 1440 + 25_569).toFixed(6)],
    [
      'month by name',
      (minutes) =>
        `${parts(minutes).day}-${['Jan', 'Feb', 'Mar', 'Apr'][parts(minutes).month - 1]}-${parts(minutes).year} ${two(parts(minutes).hour)}:00`,
    ],
  ])('are read as %s', (_form, stamp) => expectSame(readGuessed(stamped(stamp))));

  test('are read from two columns, with 24:00 as the end of a day', () => {
    const lines = [
      'Date,Time,temp,dew,press',
      ...written.map((hour) => {
        const clock = `${two(hour.hour)}:00`;
        return `${hour.day}.${hour.month}.${hour.year},${clock},${hour.dryBulbC},${hour.dewPointC},${hour.pressurePa / 100}`;
      }),
    ];
    expect(mappingOf(lines).time.columns).toMatchObject({ form: 'date and time', order: 'day first' });
    expectSame(readGuessed(lines));
  });

  test('are read from a column each, hours 1 to 24 or 100 to 2400', () => {
    for (const [name, factor] of [
      ['Hour', 1],
      ['HHMM', 100],
    ] as const) {
      const lines = [
        `Year,Month,Day,${name},temp,dew,press`,
        ...written.map((hour) =>
          [
            hour.year,
            hour.month,
            hour.day,
            hour.hour * factor,
            hour.dryBulbC,
            hour.dewPointC,
            hour.pressurePa / 100,
          ].join(','),
        ),
      ];
      expectSame(readGuessed(lines));
    }
  });

  test('with an offset, and seconds since 1970, are moved to local standard time', () => {
    expectSame(readGuessed(stamped((minutes) => iso(minutes + 60 * 7, 'T', 'Z'))));
    expectSame(readGuessed(stamped((minutes) => iso(minutes - 120, 'T', '-09:00'))));
    expectSame(readGuessed(stamped((minutes) => String((minutes + 60 * 7) * 60), 'epoch')));
    expectSame(readGuessed(stamped((minutes) => String((minutes + 60 * 7) * 60_000), 'epoch')));
  });

  test('in UTC are told by the column’s name', () => {
    const lines = stamped((minutes) => iso(minutes + 60 * 7), 'Time (UTC)');
    expect(mappingOf(lines).time.scale).toBe('UTC');
    expectSame(readGuessed(lines));
  });

  test('at which an hour begins are one slot later than those at which it ends', () => {
    const lines = stamped((minutes) => iso(minutes - 60));
    const mapping = mappingOf(lines);
    expectSame(read(lines, { ...mapping, time: { ...mapping.time, mark: 'beginning' } }));
    expectSame(read(lines, { ...mapping, time: { ...mapping.time, mark: 'ending' } }), -1);
  });

  test('at half past belong to the hour that contains them', () => {
    expectSame(readGuessed(stamped((minutes) => iso(minutes - 30))));
  });

  test('on a clock with daylight saving are guessed so, and read with the zone: one hour is absent, none is doubled', () => {
    // Denver, 8 March 2015: 02:00 became 03:00.
    const change = civilMinutes({ year: 2015, month: 3, day: 8, hour: 2, minute: 0 });
    const clock = (minutes: number) => minutes + (minutes >= change ? 60 : 0);
    const lines = stamped((minutes) => iso(clock(minutes)));
    const mapping = mappingOf(lines);
    const reading = read(lines, { ...mapping, time: { ...mapping.time, scale: 'clock', zone: 'America/Denver' } });
    expectSame(reading);
    // The rest of the year is not written; nothing else is missing.
    expect(findingsOf(reading, 'time-gap')).toHaveLength(1);
  });

  test('of an hour that comes twice in autumn are two hours', () => {
    const autumn = writtenYear(2).slice(300 * 24, 320 * 24);
    const change = civilMinutes({ year: 2015, month: 11, day: 1, hour: 1, minute: 0 });
    const lines = [
      'Time,temp,dew,press',
      ...autumn.map((hour) => {
        const minutes = minutesOf(hour);
        // Standard time begins at 01:00 of standard time, which is 02:00 of the clock before.
        const shown = iso(minutes + (minutes < change ? 60 : 0));
        return `${shown},${hour.dryBulbC},${hour.dewPointC},${hour.pressurePa / 100}`;
      }),
    ];
    const mapping = mappingOf(lines);
    const options = { time: { ...mapping.time, scale: 'clock', zone: 'America/Denver' } } as const;
    const reading = readWeatherFile(bytesOfRows(lines), 'autumn.csv', {
      ...placed,
      mapping: { ...mapping, ...options },
    });
    expect(findingsOf(reading, 'time-repeat')).toEqual([]);
  });

  test('that tell no day from a month ask for the order', () => {
    const days = written.filter(({ day, month }) => day <= 12 && month <= 3);
    const lines = [
      'Time,temp,dew,press',
      ...days.map((hour) => `${hour.month}/${hour.day}/2015 ${two(hour.hour % 24)}:00,20,10,950`),
    ];
    expect(guessOf(lines).questions.map(({ about }) => about)).toContain('date order');
  });

  test('of months from several years make a typical year', () => {
    const lines = stamped((minutes) => {
      const { month } = civilTime(minutes - 1);
      return iso(minutes).replace('2015', String(2000 + month));
    });
    expect(mappingOf(lines).years).toBe('typical');
    const reading = readGuessed(lines);
    expect(reading).toMatchObject({ kind: 'typical', year: null });
    expectSame(reading);
  });

  test('every ten minutes become hours, by the mean', () => {
    const lines = ['Time,temp,dew,press'];
    for (const hour of written.slice(0, 40 * 24)) {
      for (let minute = 10; minute <= 60; minute += 10) {
        const dryBulbC = hour.dryBulbC + (minute - 35) / 50;
        lines.push(
          `${iso(minutesOf(hour) - 60 + minute)},${dryBulbC.toFixed(1)},${hour.dewPointC},${hour.pressurePa / 100}`,
        );
      }
    }
    const reading = readGuessed(lines);
    expect(reading.hours.dryBulbC[500]).toBeCloseTo(written[500]?.dryBulbC ?? 0, 6);
  });

  test('every day, or at no step at all, are refused with what would mend it', () => {
    const daily = [
      'Time,temp,dew,press',
      ...Array.from({ length: 300 }, (_none, day) => `${iso(day * 1440 + 23_000_000)},20,10,950`),
    ];
    const refused = readWeatherFile(bytesOfRows(daily), 'daily.csv', { ...placed, mapping: mappingOf(daily) });
    expect(findingsOf(refused, 'time-order')[0]?.message).toContain('every 24 hours');
    const uneven = [
      'Time,temp,dew,press',
      ...Array.from({ length: 300 }, (_none, row) => `${iso(row * row * 7 + 23_000_000)},20,10,950`),
    ];
    const irregular = readWeatherFile(bytesOfRows(uneven), 'uneven.csv', { ...placed, mapping: mappingOf(uneven) });
    expect(findingsOf(irregular, 'time-order')[0]?.message).toContain('regular step');
  });
});

describe('units and columns of a table', () => {
  const plain = mappingOf(tableLines(written));

  test('are guessed from names, from a row of units, and else from the values', () => {
    const inFahrenheit = (hour: WrittenHour) => (hour.dryBulbC * 9) / 5 + 32;
    const time = (hour: WrittenHour) => tableRow(hour).split(',')[0];
    const lines = (names: string, row: (hour: WrittenHour) => readonly number[], units?: string) => [
      names,
      ...(units === undefined ? [] : [units]),
      ...written.map((hour) => `${time(hour)},${row(hour).join(',')}`),
    ];
    const kelvin = mappingOf(
      lines('when,T2M,RH,SP', (hour) => [hour.dryBulbC + 273.15, hour.relativeHumidityPct / 100, hour.pressurePa]),
    );
    expect(kelvin.dryBulb.unit).toBe('K');
    expect(kelvin.relativeHumidity?.unit).toBe('fraction');
    expect(kelvin.pressure?.unit).toBe('Pa');
    const american = mappingOf(
      lines('when,Dry Bulb,hum,baro', (hour) => [
        inFahrenheit(hour),
        hour.relativeHumidityPct,
        hour.pressurePa / 3386.389,
      ]),
    );
    expect(american.dryBulb.unit).toBe('F');
    expect(american.pressure?.unit).toBe('inHg');
    const named = mappingOf(
      lines('when,ta,td,slp', (hour) => [hour.dryBulbC, hour.dewPointC, 1013], 'ISO,degC,degC,mbar'),
    );
    expect(named).toMatchObject({ dryBulb: { unit: 'C' }, pressure: { unit: 'hPa', level: 'sea level' } });
    const kilopascals = mappingOf(
      lines('when,Luft temp,rel hum,pressure', (hour) => [
        hour.dryBulbC,
        hour.relativeHumidityPct,
        hour.pressurePa / 1000,
      ]),
    );
    expect(kilopascals.pressure?.unit).toBe('kPa');
  });

  test('are converted: °F, K, fractions, inches and millimetres of mercury', () => {
    const rows = written.map((hour) => {
      const [time] = tableRow(hour).split(',');
      const f = (value: number) => ((value * 9) / 5 + 32).toFixed(4);
      return `${time},${f(hour.dryBulbC)},${f(hour.dewPointC)},${hour.relativeHumidityPct / 100},${(hour.pressurePa / 3386.389).toFixed(6)}`;
    });
    const lines = [tableLines([])[0] ?? '', ...rows];
    const fahrenheit = (column: string) => ({ column, unit: 'F' }) as const;
    const reading = read(lines, {
      ...plain,
      dryBulb: fahrenheit('Temperature (°C)'),
      dewPoint: fahrenheit('Dew point (°C)'),
      relativeHumidity: { column: 'RH (%)', unit: 'fraction' },
      pressure: { column: 'Station pressure (hPa)', unit: 'inHg', level: 'station' },
    });
    expect(reading.hours.dryBulbC[700]).toBeCloseTo(written[700]?.dryBulbC ?? 0, 3);
    expect(reading.hours.pressurePa[700]).toBeCloseTo(written[700]?.pressurePa ?? 0, 0);
  });

  test('with decimal commas are read between semicolons, and refused between commas', () => {
    const commas = (text: string) => text.replaceAll('.', ',');
    const [names = '', ...rows] = tableLines(written, ';');
    expectSame(readGuessed([names, ...rows.map(commas)]));
    const refused = readWeatherFile(
      bytesOfRows([
        'Time,temp,dew,press',
        ...written.map(
          (hour) =>
            `${tableRow(hour).split(',')[0]},${commas(`${hour.dryBulbC.toFixed(1)},${hour.dewPointC.toFixed(1)},${(hour.pressurePa / 100).toFixed(1)}`)}`,
        ),
      ]),
      'commas.csv',
    );
    expect(refused.findings[0]?.message).toContain('mark decimals as well');
  });

  test('with a preamble, a row of numbers first and words after the last row are read all the same', () => {
    const [names = '', ...rows] = tableLines(written);
    const lines = [
      'Latitude (decimal degrees): 38.5',
      'Longitude (decimal degrees): -105.25',
      'Elevation (ft): 1640.42',
      'Time zone: -7',
      'Station name: Made-up Field',
      '',
      `,${names}`,
      ...rows.map((row, index) => `${index},${row}`),
      '',
      'RH: relative humidity',
      'Data (c) Nobody 2015',
    ];
    const reading = read(lines, mappingOf(lines), {});
    expectSame(reading);
    expect(reading.station).toMatchObject({
      name: 'Made-up Field',
      latitude: 38.5,
      longitude: -105.25,
      utcOffsetH: -7,
    });
    expect(reading.station.elevationM).toBeCloseTo(500, 2);
    expect(reading.comments).toBe('Data (c) Nobody 2015');
    expect(findingsOf(reading, 'field-count')[0]).toMatchObject({ severity: 'note', count: 2 });
  });

  test('with titles over a line of values, as a radiation data base writes them, give the place', () => {
    const lines = [
      'Source,Location ID,Latitude,Longitude,Time Zone,Elevation',
      'Somebody,12,38.5,-105.25,-7,500',
      ...tableLines(written),
    ];
    const reading = readWeatherFile(bytesOfRows(lines), 'titled.csv');
    expect(reading.station).toMatchObject({ latitude: 38.5, longitude: -105.25, utcOffsetH: -7, elevationM: 500 });
  });

  test('with the wet bulb as the only humidity give the humidity that belongs to it', () => {
    const rows = written.map((hour, slot) => {
      const [time] = tableRow(hour).split(',');
      return `${time},${hour.dryBulbC},${(hour.dryBulbC - 2 - (slot % 7) / 2).toFixed(1)},${hour.pressurePa / 100}`;
    });
    const reading = readGuessed(['Time,dry bulb,wet bulb,pressure', ...rows]);
    expect(reading.humidityFrom).toBe('wet bulb');
    const { dryBulbC, humidityRatio, pressurePa } = reading.hours;
    const slot = 1201;
    const wanted = Number((written[slot]?.dryBulbC ?? 0) - 2 - (slot % 7) / 2);
    expect(wetBulbC(dryBulbC[slot] ?? 0, humidityRatio[slot] ?? 0, pressurePa[slot] ?? 0)).toBeCloseTo(wanted, 2);
    expect(relativeHumidityOfWetBulbPct(20, 20.3, 95_000)).toBeCloseTo(100, 6);
    expect(relativeHumidityOfWetBulbPct(20, 21, 95_000)).toBeNaN();
  });

  test('with pressure at sea level or an altimeter setting give the pressure at the station', () => {
    const rows = (pressure: (hour: WrittenHour) => number) =>
      written.map(
        (hour) =>
          `${tableRow(hour).split(',')[0]},${hour.dryBulbC},${hour.dewPointC},${(pressure(hour) / 100).toFixed(3)}`,
      );
    const sea = readGuessed(['Time,temp,dew,mslp', ...rows((hour) => seaLevelPa(hour, 500))]);
    expect(sea.hours.pressurePa[300]).toBeCloseTo(written[300]?.pressurePa ?? 0, -0.5);
    const setting = readGuessed(['Time,temp,dew,QNH', ...rows(() => 101_325)]);
    expect(setting.hours.pressurePa[300]).toBeCloseTo(standardPressurePa(500), -1);
    // The setting of a station at the sea is its pressure; by the standard atmosphere 1013.25 hPa stands for it everywhere.
    expect(stationPressureOfAltimeterPa(99_000, 0)).toBeCloseTo(99_000, 6);
    expect(stationPressureOfAltimeterPa(101_325, 1600)).toBeCloseTo(standardPressurePa(1600), -1);
  });

  test('of two stations give each station as a part of its own', () => {
    const both = written.flatMap((hour) => ['East', 'West'].map((station) => `${station},${tableRow(hour)}`));
    const lines = [`Station,${tableLines([])[0]}`, ...both];
    const mapping = mappingOf(lines);
    expect(mapping.station).toBe('Station');
    const readings = readWeatherFileParts(bytesOfRows(lines), 'two.csv', { ...placed, mapping });
    expect(readings.map(({ part, station }) => [part, station?.name])).toEqual([
      ['East', 'East'],
      ['West', 'West'],
    ]);
  });
});

describe('a damaged table', () => {
  const lines = tableLines(written);
  const mapping = mappingOf(lines);
  const readLines = (rows: readonly string[]) =>
    readWeatherFile(bytesOfRows(rows), 'damaged.csv', { ...placed, mapping });

  test('is refused with the line of a row that is too short, has no time, or holds a word', () => {
    const damaged = lines
      .with(99, '2015-01-05 03:00,1,2')
      .with(199, 'never,1,2,3,4')
      .with(299, (lines[299] ?? '').replace(/,[^,]*,/, ',cold,'));
    const reading = readLines(damaged);
    expect(reading.status).toBe('refused');
    expect(findingsOf(reading, 'field-count')[0]).toMatchObject({ line: 100, severity: 'refuse' });
    expect(findingsOf(reading, 'not-a-number').map(({ line }) => line)).toEqual([200, 300]);
  });

  test('loses its last line when that is cut short', () => {
    const text = lines.join('\n');
    const reading = readWeatherFile(new TextEncoder().encode(text.slice(0, -12)), 'cut.csv', { ...placed, mapping });
    expect(findingsOf(reading, 'truncated')[0]).toMatchObject({ line: lines.length, severity: 'repair' });
  });

  test('has blanks, NA and codes for what is missing', () => {
    const without = ['', 'NA', '-9999', '-', 'null'].map((word, index) =>
      (lines[100 + 50 * index] ?? '').replace(/,[^,]*,/, `,${word},`),
    );
    const damaged = without.reduce((rows, row, index) => rows.with(100 + 50 * index, row), [...lines]);
    const gaps = findingsOf(readLines(damaged), 'time-gap');
    expect(gaps.filter(({ count }) => count === 1).map(({ line }) => line)).toEqual([101, 151, 201, 251, 301]);
  });

  test('with few rows, without temperatures or without a humidity is refused or asked for what is missing', () => {
    expect(findingsOf(readLines(lines.slice(0, 50)), 'too-few-rows')[0]).toMatchObject({
      severity: 'refuse',
      count: 49,
    });
    const noHumidity = written.map((hour) => tableRow(hour).split(',').toSpliced(2, 2).join(','));
    const bare = ['Time,temp,press', ...noHumidity];
    const asked = readWeatherFile(bytesOfRows(bare), 'bare.csv', placed);
    expect(findingsOf(asked, 'unit-guess')[0]?.message).toContain('none could be told to hold a humidity');
    const refused = readWeatherFile(bytesOfRows(bare), 'bare.csv', { ...placed, mapping: mappingOf(bare) });
    expect(findingsOf(refused, 'no-humidity')[0]).toMatchObject({ severity: 'refuse' });
    const untimed = ['a,b,c', ...written.map((hour) => `${hour.dryBulbC},1,2`)];
    expect(guessOf(untimed).mapping).toBeNull();
  });
});
