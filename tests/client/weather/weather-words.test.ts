import { describe, expect, it } from 'vitest';
import {
  mayChangeWeather,
  parentWords,
  recordTitle,
  statusWords,
  yearWords,
} from '../../../src/features/weather/weather-words.ts';

const counts = { note: 0, repair: 0, doubt: 0, ask: 0, refuse: 0 };
const file = { status: 'review', step: null, failure: null, findingCounts: counts } as const;

describe('the status of a weather file in words', () => {
  it('has words for every status', () => {
    const all = ['reading', 'asks', 'review', 'accepted', 'refused', 'withdrawn', 'superseded'] as const;
    expect(all.map((status) => statusWords({ ...file, status }).replaceAll('\u00a0', ' '))).toEqual([
      'Reading',
      'Asks 1 question',
      'In review',
      'Accepted',
      'Refused',
      'Withdrawn',
      'Superseded',
    ]);
  });

  it('says what qualifies it', () => {
    expect(statusWords({ ...file, findingCounts: { ...counts, doubt: 2 } })).toBe('In review, 2 doubts');
    expect(statusWords({ ...file, status: 'asks', findingCounts: { ...counts, ask: 3 } })).toBe('Asks 3 questions');
    expect(statusWords({ ...file, status: 'reading', step: 'reducing' })).toBe('Reading, reducing');
    expect(statusWords({ ...file, status: 'reading', failure: 'x' })).toBe('Stopped, a fault of ours');
  });
});

describe('a weather file is named', () => {
  const station = { name: 'Korrel Pan', latitude: 0, longitude: 0, elevationM: 0, utcOffsetH: 2, wmoNumber: null };

  it('by its station and year, else by the name of the file', () => {
    expect(recordTitle({ name: 'a.epw', station, kind: 'typical', year: null })).toBe('Korrel Pan, typical year');
    expect(recordTitle({ name: 'a.epw', station, kind: 'actual', year: 2024 })).toBe('Korrel Pan, 2024');
    expect(recordTitle({ name: 'a.epw', station: null, kind: null, year: null })).toBe('a.epw');
    expect(yearWords({ kind: null, year: null })).toBe('–');
    expect(yearWords({ kind: 'derived', year: null })).toBe('Derived year');
    const parent = { fileId: '', name: '', status: 'accepted' } as const;
    expect(parentWords({ ...parent, kind: 'actual', year: 2019 })).toBe('from the year 2019');
    expect(parentWords({ ...parent, kind: 'typical', year: null })).toBe('from the typical year');
    expect(parentWords(null)).toBeNull();
  });

  it('and changed by engineers and leads alone', () => {
    expect((['viewer', 'planner', 'engineer', 'lead'] as const).map(mayChangeWeather)).toEqual([
      false,
      false,
      true,
      true,
    ]);
  });
});
