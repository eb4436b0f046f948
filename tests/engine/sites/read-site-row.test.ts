import { describe, expect, test } from 'vitest';
import { guarded, withoutGuard } from '#engine/csv-cell.ts';
import { readSiteRow } from '#engine/sites/read-site-row.ts';
import { guessSiteColumns, siteHeads } from '#engine/sites/site-columns.ts';

describe('a row of a table of sites', () => {
  test('is read with angles, metres and kilowatts in the forms in which people write them', () => {
    const row = { name: ' School ', latitude: "24° 30' S", longitude: '25,5', elevation: '1 012 m', load: '350,5 kW' };
    expect(readSiteRow(row)).toEqual({
      site: {
        ...{ name: 'School', latitude: -24.5, longitude: 25.5, elevationM: 1012, designLoadKw: 350.5, notes: '' },
        ...{ stationName: null, stationReason: null },
      },
      faults: [],
    });
    expect(readSiteRow({ name: 'a', position: '-24.5, 25.5' }).site).toMatchObject({
      latitude: -24.5,
      longitude: 25.5,
    });
  });

  test('tells every fault with its column', () => {
    const { site, faults } = readSiteRow({ latitude: '90.1', longitude: '', elevation: '1,200', load: 'big' });
    expect(site).toBeNull();
    expect(faults).toEqual([
      { column: 'name', message: 'The site has no name.' },
      { column: 'latitude', message: expect.stringContaining('between -90 and 90') },
      { column: 'longitude', message: 'The longitude is missing.' },
      { column: 'elevation', message: expect.stringContaining('can be read in two ways') },
      { column: 'load', message: '“big” is not a number.' },
    ]);
    expect(readSiteRow({ name: 'a', latitude: '1', longitude: '2', elevation: '9001', load: '0' }).faults).toEqual([
      { column: 'elevation', message: '9001 m does not lie between -500 and 9000 m.' },
      { column: 'load', message: 'Give more than 0 kW, or leave it empty.' },
    ]);
  });

  test('suspects swapped angles, and turns nothing by itself', () => {
    const { site, faults } = readSiteRow({ name: 'a', latitude: '115.1', longitude: '-36.1' });
    expect(site).toBeNull();
    expect(faults).toEqual([
      {
        column: 'latitude',
        message: expect.stringMatching(/between -90 and 90.* Are latitude and longitude swapped\?$/),
      },
    ]);
  });

  test('keeps formulas, emoji and names from right to left as text', () => {
    for (const name of ['=cmd|calc', '🏫 École №5', 'مدرسة النور', '@sum', '-Nord-'])
      expect(readSiteRow({ name, latitude: '1', longitude: '2' }).site?.name).toBe(name);
    expect(readSiteRow({ name: 'a\u0000b', latitude: '1', longitude: '2' }).site?.name).toBe('ab');
  });

  test('a height of the relief is taken from the relief again', () => {
    const row = { name: 'a', latitude: '1', longitude: '2', elevation: '300', 'elevation source': 'relief' };
    expect(readSiteRow(row).site?.elevationM).toBeNull();
  });
});

describe('guarding a table that leaves the product', () => {
  // OWASP, CSV Injection: cells that begin with = + - @, a tab or a carriage return.
  test.each(['=cmd', '+1', '-1', '@a', '\tx', '\rx', "'=x", '＝x'])(
    '“%s” is guarded, and comes back as it was',
    (text) => {
      expect(guarded(text)).toBe(`'${text}`);
      expect(withoutGuard(guarded(text))).toBe(text);
    },
  );

  test.each(['School', "'t Huis", '', '3 = 3', "O'Brien", "'"])('“%s” is left alone', (text) => {
    expect(guarded(text)).toBe(text);
    expect(withoutGuard(text)).toBe(text);
  });
});

describe('recognising columns', () => {
  test('knows its own heads', () => {
    const heads = Object.values(siteHeads);
    const { position: _position, ...guess } = guessSiteColumns(heads);
    expect(guess).toEqual(
      Object.fromEntries(Object.keys(siteHeads).flatMap((column, at) => (column === 'position' ? [] : [[column, at]]))),
    );
  });

  test('knows those of others, and leaves what it does not know', () => {
    expect(guessSiteColumns(['ID', 'School name', 'LAT', 'Long', 'Altitude [m]', 'Cooling load, kW', 'Ward'])).toEqual({
      ...{ name: 1, latitude: 2, longitude: 3, elevation: 4, load: 5 },
    });
    expect(guessSiteColumns(['site', 'Coordinates'])).toEqual({ name: 0, position: 1 });
    expect(guessSiteColumns(['a', 'b'])).toEqual({});
  });
});
