import { describe, expect, it } from 'vitest';
import {
  differenceK,
  fileSize,
  hours,
  list,
  moment,
  number,
  percent,
  plural,
  position,
  sensible,
  sentence,
  share,
  shortFingerprint,
  temperatureC,
  utcOffset,
  waitingTime,
} from '../../../src/lib/format.ts';

/** No-break spaces as plain ones, for reading. */
const plain = (text: string) => text.replaceAll('\u00a0', ' ');

describe('printed numbers', () => {
  it('have a thousands separator, a unit and a true minus sign', () => {
    expect(plain(hours(8760))).toBe('8,760 h');
    expect(plain(temperatureC(-3.25))).toBe('−3.3 °C');
    expect(plain(differenceK(12))).toBe('12.0 K');
    expect(plain(percent(85, 0))).toBe('85 %');
  });

  it('never print a negative zero', () => {
    expect(number(-0.04, 1)).toBe('0.0');
  });

  it('hold number and unit together with a no-break space', () => {
    expect(hours(1)).toBe('1\u00a0h');
  });

  it('carry about three digits whatever their size', () => {
    expect(['2,120 L', '24.1 L', '0.38 L', '5 L', '0 L']).toEqual(
      [2120.4, 24.06, 0.381, 5, 0].map((value) => plain(sensible(value, 'L'))),
    );
  });

  it('say 100 % and 0 % only of all and of nothing', () => {
    expect([100, 99.97, 90.31, 0.02, 0].map((value) => plain(share(value)))).toEqual([
      '100 %',
      '99.9 %',
      '90.3 %',
      '0.1 %',
      '0 %',
    ]);
  });

  it('give sizes of files in the unit that fits', () => {
    expect([18, 999, 1_534_221, 64 * 1024 * 1024].map((bytes) => plain(fileSize(bytes)))).toEqual([
      '18 bytes',
      '999 bytes',
      '1.5 MB',
      '67 MB',
    ]);
  });
});

describe('printed places and times', () => {
  it('name the hemisphere instead of a sign', () => {
    expect(plain(position({ latitude: -26.6, longitude: 20.6 }))).toBe('26.60° S, 20.60° E');
    expect(plain(position({ latitude: 30, longitude: -95.367 }))).toBe('30.00° N, 95.37° W');
  });

  it('give offsets of whole and of half hours', () => {
    expect([0, 2, -6, 5.5, 5.75, -3.5].map(utcOffset)).toEqual([
      'UTC',
      'UTC+2',
      'UTC−6',
      'UTC+5:30',
      'UTC+5:45',
      'UTC−3:30',
    ]);
  });

  it('give a moment in the zone of the reader', () => {
    expect(moment('2026-11-12T12:05:00.000Z', 'UTC')).toBe('12 Nov 2026, 12:05');
    // Chatham is 13:45 ahead of UTC in November.
    expect(moment('2026-11-12T12:05:00.000Z', 'Pacific/Chatham')).toBe('13 Nov 2026, 01:50');
    expect(moment('2026-11-12T12:05:00.000Z')).toBe('13 Nov 2026, 01:50');
  });

  it('round waiting times up, so that nobody tries too early', () => {
    expect([0.2, 1, 40, 89, 91, 300].map((seconds) => plain(waitingTime(seconds)))).toEqual([
      '1 second',
      '1 second',
      '40 seconds',
      '89 seconds',
      '2 minutes',
      '5 minutes',
    ]);
  });

  it('join words and count nouns', () => {
    expect([list([]), list(['a']), list(['a', 'b']), list(['a', 'b', 'c'])]).toEqual([
      '',
      'a',
      'a and b',
      'a, b and c',
    ]);
    expect([plural(1, 'file'), plural(1200, 'file')]).toEqual(['1 file', '1,200 files']);
    expect([sentence('open 8 to 18'), sentence('Open.')]).toEqual(['open 8 to 18.', 'Open.']);
    expect(plain(shortFingerprint('9c41e07a55b2'))).toBe('9c41 e07a');
  });
});
