import { describe, expect, test } from 'vitest';
import { readDataPeriods } from '#engine/weather-files/epw/data-periods.ts';
import { readDesignConditions } from '#engine/weather-files/epw/design-conditions.ts';
import { headerFields } from '#engine/weather-files/epw/header-fields.ts';
import { readPeriodDate } from '#engine/weather-files/epw/period-date.ts';
import { FindingList } from '#engine/weather-files/finding-list.ts';
import { epwLines } from '../../support/epw-text.ts';
import { findingsOf, readRefused, readUsable, remarkable } from '../../support/readings.ts';

describe('header of an EPW', () => {
  test('gives the station, its WMO number as text, and the comments as they stand', () => {
    const reading = readUsable({
      location: 'Moose Factory,ON,CAN,CWEC,CAN270,51.27,-80.65,-5.0,9.0',
      comments: ['Station data, 1995 to 2010', '"Quoted, with a comma"'],
    });
    expect(reading.station).toEqual({
      name: 'Moose Factory',
      latitude: 51.27,
      longitude: -80.65,
      elevationM: 9,
      utcOffsetH: -5,
      wmoNumber: 'CAN270',
    });
    expect(reading.comments).toBe('Station data, 1995 to 2010\nQuoted, with a comma');
  });

  test('takes a WMO number of dashes, unknown or nines for none, and names a nameless place by its position', () => {
    for (const wmo of ['-', 'unknown', '999', '999999', '']) {
      const { station } = readUsable({ location: `unknown,-,-,ERA,${wmo},45.0,8.0,1,250` });
      expect(station.wmoNumber).toBeNull();
      expect(station.name).toBe('45.00 N, 8.00 E');
    }
  });

  test('is read by keyword: out of order, lower case, trailing commas, records missing, SAVING without S', () => {
    const lines = epwLines();
    const [location = '', , , , , , , periods = '', ...rows] = lines;
    const header = [
      `${location.replace('LOCATION', 'Location')},,,,`,
      'comments 2,second,,,,',
      'HOLIDAYS/DAYLIGHT SAVING,No,0,0,0,,,',
      'SOMETHING ELSE,1,2,3',
      'Comments 1,first,,',
      periods.replace('DATA PERIODS', ' data  periods').replace(' 1/ 1,12/31', '1-Jan,Dec-31,,,,'),
    ];
    const reading = readUsable([...header, ...rows]);
    expect(remarkable(reading)).toEqual([]);
    expect(reading.comments).toBe('second\nfirst');
    expect(reading.hours.lines[0]).toBe(7);
  });

  test('without LOCATION is refused, and read when it stands lower down', () => {
    const [location = '', design = '', ...rest] = epwLines();
    const reading = readRefused(['STATION,1,2', design, ...rest]);
    expect(reading.format).toBe('EPW');
    expect(findingsOf(reading, 'header')).toEqual([
      expect.objectContaining({ severity: 'refuse', line: 1, message: expect.stringContaining('no LOCATION record') }),
    ]);
    expect(readUsable([design, location, ...rest]).station.latitude).toBe(33.45);
  });

  test('without DATA PERIODS is refused at the line where the data begin, and faults of the data are told as well', () => {
    const lines = epwLines();
    lines.splice(7, 1);
    lines[100] = 'x,1,4,22';
    const reading = readRefused(lines);
    expect(findingsOf(reading, 'header')[0]).toMatchObject({ severity: 'refuse', line: 8 });
    expect(findingsOf(reading, 'field-count')[0]).toMatchObject({ severity: 'refuse', line: 101 });
  });

  test('with letters for the number of periods or of records is refused with the line', () => {
    for (const dataPeriods of [
      'x,1,Data,Sunday,1/1,12/31',
      '1,seven,Data,Sunday,1/1,12/31',
      '1,7,Data,Sunday,1/1,12/31',
      '0,1',
    ]) {
      expect(findingsOf(readRefused({ dataPeriods }), 'header')[0]).toMatchObject({ severity: 'refuse', line: 8 });
    }
  });

  test('with a licence in its comments is noted, and a plain comment is not', () => {
    const licensed = readUsable({ comments: ['Copyright (c) by Nobody, all rights reserved', ''] });
    expect(findingsOf(licensed, 'licence')[0]).toMatchObject({ severity: 'note' });
    expect(findingsOf(readUsable({}), 'licence')).toEqual([]);
  });

  test('fields keep commas within quotation marks', () => {
    expect(headerFields('COMMENTS 1,"a, b",c ')).toEqual(['COMMENTS 1', 'a, b', 'c']);
  });
});

describe('dates of header records', () => {
  test.each([
    ['1/1', 1, 1],
    [' 1/ 1', 1, 1],
    ['12/31', 12, 31],
    ['2/29/2012', 2, 29],
    ['1 January', 1, 1],
    ['31 Dec', 12, 31],
    ['1-Jan', 1, 1],
    ['Dec-31', 12, 31],
    ['January 7', 1, 7],
    ['60', 3, 1],
    ['365', 12, 31],
  ])('%s is month %d, day %d', (text, month, day) => {
    expect(readPeriodDate(text, false)).toEqual({ month, day });
  });

  test.each(['', '13/1', '2/30', '0/0', 'last Sunday in April', '366', '1/1/1/1'])('%s is none', (text) => {
    expect(readPeriodDate(text, false)).toBeNull();
  });

  test('day 60 of a leap year is 29 February, and day 366 exists there', () => {
    expect(readPeriodDate('60', true)).toEqual({ month: 2, day: 29 });
    expect(readPeriodDate('366', true)).toEqual({ month: 12, day: 31 });
  });

  test('weekdays may be cut to three letters', () => {
    const fields = ['DATA PERIODS', '1', '1', 'Data', 'Wed', '1/1', '12/31'];
    expect(readDataPeriods(fields, 8, new FindingList()).periods[0]?.startWeekday).toBe(3);
  });
});

test('design conditions give dry and wet bulb of the cooling group in the 2009, 2021 and 2005 layouts', () => {
  // Header of Phoenix, 2009 edition (seen); the other layouts differ before the word Cooling.
  const cooling = 'Cooling,7,12,43.4,21.1,42.3,21,41.2,20.9,24.5,35.8,24,35.4,23.5,35.1,4.1,260';
  for (const heatings of [14, 15]) {
    const record = `DESIGN CONDITIONS,1,Title,,Heating,${Array(heatings).fill('1').join(',')},${cooling}`;
    expect(readDesignConditions(headerFields(record), 2)).toEqual({
      line: 2,
      dryBulbC: [43.4, 42.3, 41.2],
      wetBulbC: [24.5, 24, 23.5],
    });
  }
  expect(readDesignConditions(['DESIGN CONDITIONS', '0'], 2)).toBeNull();
  expect(readDesignConditions(headerFields('DESIGN CONDITIONS,1,T,,Cooling,N_A,N_A'), 2)).toBeNull();
});

test('design values that differ by more than 3 K dry bulb or 2.5 K wet bulb are noted with both numbers', () => {
  const fitting = readUsable({ designConditions: '1,T,,Cooling,7,12,40.9,18,40.5,18,40,18,21,38,21,38,20.8,38' });
  expect(findingsOf(fitting, 'design-differs')).toEqual([]);
  const differing = readUsable({ designConditions: '1,T,,Cooling,7,12,48,18,40.5,18,40,18,27,38,21,38,20.8,38' });
  const [finding] = findingsOf(differing, 'design-differs');
  expect(finding).toMatchObject({ severity: 'note', line: 2 });
  expect(finding?.message).toMatch(
    /0\.4 % dry bulb 48\.0 °C published, 4\d\.\d °C here; 0\.4 % wet bulb 27\.0 °C published/,
  );
});
