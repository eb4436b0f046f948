import { describe, expect, it } from 'vitest';
import { contentHash } from '../../../server/features/weather/content-hash.ts';
import { storableText } from '../../../server/features/weather/storable-text.ts';
import type { WeatherYear } from '../../../src/engine/reduction/weather-year.ts';

const aYear = (change: Partial<WeatherYear> = {}): WeatherYear => ({
  kind: 'typical',
  year: null,
  utcOffsetMin: -420,
  packed: {
    dryBulb: Int16Array.from([2150, -32768]),
    humidityRatio: Uint16Array.from([4000, 65535]),
    pressure: Uint16Array.from([50000, 65535]),
    flags: Uint8Array.from([0, 63]),
  },
  ...change,
});

describe('the hash of a weather year', () => {
  it('is the same for the same year and another for any other part of it', () => {
    const { packed } = aYear();
    const others = [
      aYear({ kind: 'derived' }),
      aYear({ kind: 'actual', year: 2012 }),
      aYear({ kind: 'actual', year: 2013 }),
      aYear({ utcOffsetMin: -360 }),
      aYear({ packed: { ...packed, dryBulb: Int16Array.from([2151, -32768]) } }),
      aYear({ packed: { ...packed, humidityRatio: Uint16Array.from([4001, 65535]) } }),
      aYear({ packed: { ...packed, pressure: Uint16Array.from([50001, 65535]) } }),
      aYear({ packed: { ...packed, flags: Uint8Array.from([1, 63]) } }),
    ];
    const hashes = new Set([aYear(), aYear(), ...others].map(contentHash));
    expect(hashes.size).toBe(9);
    for (const hash of hashes) expect(hash).toMatch(/^[0-9a-f]{64}$/);
  });
});

describe('text out of a file', () => {
  it('becomes text that PostgreSQL can hold, with every odd character still visible', () => {
    expect(storableText('A\u0000B\u001fC\u007fD')).toBe('A\u2400B\u241fC\u2421D');
    expect(storableText('half \ud83d pair')).toBe('half \ufffd pair');
    expect(storableText('São João\t°C 🌧\n')).toBe('São João\t°C 🌧\n');
  });
});
