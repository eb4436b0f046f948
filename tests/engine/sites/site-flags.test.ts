import { describe, expect, test } from 'vitest';
import { siteFlags } from '#engine/sites/site-flags.ts';

const station = { distanceKm: 20, heightDifferenceM: 50, hasYears: true };
const site = { elevationM: 500, elevationSource: 'person', reliefM: 520, kmFromLand: 0, station } as const;

describe('the flags of a site', () => {
  test('are none for a site on land near its station', () => {
    expect(siteFlags(site)).toEqual([]);
  });

  test('tell what grade D has: over 100 km, or over 300 m either way (method 7.7)', () => {
    const of = (distanceKm: number, heightDifferenceM: number | null) =>
      siteFlags({ ...site, station: { ...station, distanceKm, heightDifferenceM } });
    expect(of(100, 300)).toEqual([]);
    expect(of(100.1, -300.5)).toEqual(['far', 'height']);
    expect(of(20, 301)).toEqual(['height']);
    expect(of(20, null)).toEqual([]);
  });

  test('tell a place over 20 km out at sea, and a given height over 300 m from the relief', () => {
    expect(siteFlags({ ...site, kmFromLand: 20 })).toEqual([]);
    expect(siteFlags({ ...site, kmFromLand: 20.1 })).toEqual(['sea']);
    expect(siteFlags({ ...site, reliefM: 900 })).toEqual(['relief']);
    expect(siteFlags({ ...site, elevationSource: 'relief', reliefM: 900 })).toEqual([]);
    expect(siteFlags({ ...site, reliefM: null })).toEqual([]);
  });

  test('tell a site without a station, and a chosen station that has no year any more', () => {
    expect(siteFlags({ ...site, station: null })).toEqual(['no station']);
    expect(siteFlags({ ...site, station: { ...station, hasYears: false } })).toEqual(['station without years']);
  });
});
