import { describe, expect, it } from 'vitest';
import { officeBrief } from '../../../server/features/briefs/presets.ts';
import { makeSharedJudging } from '../../../server/features/runs/shared-judging.ts';
import type { RescoredStation, StationToRescore } from '../../../server/jobs/web-task.ts';

const station = (stationId: string, contentHash = 'hash'): StationToRescore => ({
  stationId,
  zone: 'UTC',
  heightM: 100,
  adjustedFromM: null,
  position: { latitude: 0, longitude: 0 },
  years: [
    {
      ...{ weatherYearId: `year of ${stationId}`, contentHash, kind: 'typical', year: null, utcOffsetMin: 0 },
      columns: new SharedArrayBuffer(0),
    },
  ],
});

const judgedAs = ({ stationId, heightM }: StationToRescore, score: number): RescoredStation => ({
  ...{ stationId, heightM, score, scoreNote: null, words: null, verdict: null, yearsMeeting: 0, range: null },
  ...{ shown: null, shownWeatherYearId: null, restsOn: [], usable: [], resultHashes: [] },
  raw: { served: null, severity: null, spell: null, damp: null, water: null, electricity: null, 'worst-year': null },
});

/** Judges one after another and remembers whom. */
function judge() {
  const seen: string[] = [];
  let score = 0;
  return {
    seen,
    work: async (stations: readonly StationToRescore[]) => {
      await Promise.resolve();
      score += 1;
      seen.push(...stations.map(({ stationId }) => stationId));
      return stations.map((each) => judgedAs(each, score));
    },
  };
}

describe('a judging that is shared', () => {
  const brief = officeBrief();
  const [a, b, c] = [station('a'), station('b'), station('c')];

  it('judges each station once under one draft, though two ask at the same time, and answers each in its own order', async () => {
    const shared = makeSharedJudging();
    const { seen, work } = judge();
    const [first, second] = await Promise.all([
      shared.take({ brief, stations: [a, b] }, work),
      shared.take({ brief, stations: [c, b, a] }, work),
    ]);
    expect(seen).toEqual(['a', 'b', 'c']);
    expect(first.map(({ stationId }) => stationId)).toEqual(['a', 'b']);
    expect(second.map(({ stationId, score }) => [stationId, score])).toEqual([
      ['c', 2],
      ['b', 1],
      ['a', 1],
    ]);
  });

  it('judges anew under another draft, and when the weather is another', async () => {
    const shared = makeSharedJudging();
    const { seen, work } = judge();
    await shared.take({ brief, stations: [a] }, work);
    await shared.take({ brief: { ...brief, effDirect: 0.5 }, stations: [a] }, work);
    await shared.take({ brief, stations: [station('a', 'other hash')] }, work);
    expect(seen).toEqual(['a', 'a', 'a']);
  });

  it('keeps nobody waiting behind one who has gone', async () => {
    const shared = makeSharedJudging();
    const gone = shared.take({ brief, stations: [a] }, () => Promise.reject(new Error('gone')));
    const { seen, work } = judge();
    const next = shared.take({ brief, stations: [a] }, work);
    await expect(gone).rejects.toThrow('gone');
    expect((await next).map(({ stationId }) => stationId)).toEqual(['a']);
    expect(seen).toEqual(['a']);
  });
});
