import { describe, expect, test } from 'vitest';
import { recordLimits } from '#engine/weather-files/quality/continental-record.ts';
import type { QualityOptions } from '#engine/weather-files/quality/quality-options.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { epwBytes } from '../../../support/epw-text.ts';
import { findingsOf, remarkable } from '../../../support/readings.ts';

/** A place whose zone fits its longitude, at a height that fits the pressure of the made-up weather. */
const LOCATION = 'Made-up Field,-,Nowhere,Invented,-,33.45,-111.98,-7.0,337.0';

function readAt(groundM: number, seaKm: number, options: QualityOptions = {}) {
  const relief = { heightM: () => groundM, kmFromLand: () => seaKm };
  return readWeatherFile(epwBytes({ location: LOCATION }), 'made-up.epw', { relief, ...options });
}

describe('a place against coast and relief', () => {
  test('over 20 km out at sea is a doubt that names the distance; less is not told', () => {
    expect(findingsOf(readAt(0, 34), 'place-sea')).toEqual([expect.objectContaining({ severity: 'doubt', line: 1 })]);
    expect(findingsOf(readAt(0, 34), 'place-sea')[0]?.message).toContain('34 km from the nearest land');
    expect(findingsOf(readAt(0, 40), 'place-sea')[0]?.message).toContain('over 40 km');
    expect(remarkable(readAt(40, 20))).toEqual([]);
  });

  test('an elevation more than 300 m from the relief is a note: it asks and refuses nothing', () => {
    expect(remarkable(readAt(637, 0))).toEqual([]);
    const reading = readAt(638, 0);
    expect(reading.status).toBe('review');
    expect(findingsOf(reading, 'elevation-relief')).toEqual([expect.objectContaining({ severity: 'note', line: 1 })]);
    expect(findingsOf(reading, 'elevation-relief')[0]?.message).toMatch(/elevation of 337 m; .* has 638 m there/);
  });

  test('out at sea the ground has no height to be told', () => {
    expect(remarkable(readAt(-4000, 40))).toEqual(['place-sea doubt']);
  });

  test('both can be switched off, and without a relief nothing is said', () => {
    expect(remarkable(readAt(0, 34, { rulesOff: ['place-sea'] }))).toEqual([]);
    expect(remarkable(readAt(2000, 0, { rulesOff: ['elevation-relief'] }))).toEqual([]);
    expect(remarkable(readWeatherFile(epwBytes({ location: LOCATION }), 'made-up.epw'))).toEqual([]);
  });

  test('a place that is none is not looked up', () => {
    const relief = {
      heightM: () => {
        throw new Error('looked up');
      },
      kmFromLand: () => {
        throw new Error('looked up');
      },
    };
    for (const place of ['0,0', '95,10', '10,400', ',']) {
      const bytes = epwBytes({ location: `Made-up Field,-,Nowhere,Invented,-,${place},0.0,337.0` });
      expect(readWeatherFile(bytes, 'made-up.epw', { relief }).status).toBe('asks');
    }
  });
});

describe('the record of a place', () => {
  test.each([
    ['Phoenix', 33.4, -112, 'North America'],
    ['Delhi', 28.6, 77.2, 'Asia'],
    ['Madrid', 40.4, -3.7, 'Europe'],
    ['Cairo', 28, 31.2, 'Africa'],
    ['Alice Springs', -23.7, 133.9, 'Oceania'],
    ['Lima', -12, -77, 'South America'],
    ['Byrd Station', -80, -119.5, 'Antarctica'],
    ['Ankara, between two regions', 39.9, 32.9, null],
  ] as const)('%s', (_name, latitude, longitude, region) => {
    expect(recordLimits({ latitude, longitude }).region).toBe(region);
  });
});
