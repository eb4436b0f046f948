import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import {
  partByView,
  type RescoreIds,
  type RescoreWish,
  rescoreTurns,
} from '../../../src/features/runs/rescore-turns.ts';

const NONE: RescoreIds = { stationIds: [], siteIds: [] };
const VIEW: RescoreIds = { stationIds: ['s1'], siteIds: [] };
const OTHERS: RescoreIds = { stationIds: ['s2'], siteIds: ['p1'] };
const wish = (key: string, parts: Partial<RescoreWish> = {}): RescoreWish => ({
  key,
  body: { key },
  inView: VIEW,
  others: NONE,
  ...parts,
});

interface Call {
  readonly key: unknown;
  readonly ids: RescoreIds;
  readonly signal: AbortSignal;
  readonly answer: () => void;
  readonly fail: (error: unknown) => void;
}

function scene() {
  const calls: Call[] = [];
  const told: string[] = [];
  const faults: unknown[] = [];
  const turns = rescoreTurns({
    ask: ({ body, stationIds, siteIds }, signal) =>
      new Promise((resolve, reject) => {
        calls.push({
          key: body.key,
          ids: { stationIds, siteIds },
          signal,
          answer: () => resolve({ stations: [], sites: [] }),
          fail: reject,
        });
      }),
    onAnswer: (_, { key, isWhole }) => told.push(`${key}${isWhole ? ' whole' : ''}`),
    onFault: (error) => faults.push(error),
  });
  const settle = (ms = 0) => vi.advanceTimersByTimeAsync(ms);
  return { calls, told, faults, turns, settle };
}

describe('asking while a slider moves', () => {
  beforeEach(() => {
    vi.useFakeTimers();
  });
  afterEach(() => {
    vi.useRealTimers();
  });

  it('keeps one call in flight; of what comes meanwhile the latest is asked', async () => {
    const { calls, told, turns, settle } = scene();
    for (const key of ['a', 'b', 'c', 'd']) turns.want(wish(key));
    expect(calls.map(({ key }) => key)).toEqual(['a']);
    calls[0]?.answer();
    await settle(500);
    expect(calls.map(({ key }) => key)).toEqual(['a', 'd']);
    calls[1]?.answer();
    await settle();
    expect(told).toEqual(['a', 'd whole']);
  });

  it('never asks more than the server takes in a minute, however fast it answers', async () => {
    const { calls, turns, settle } = scene();
    for (let at = 0; at < 600; at += 1) {
      turns.want(wish(`draft ${at}`));
      for (const call of calls) call.answer();
      await settle(10);
    }
    // Six seconds of dragging: a tenth of the 600 that a minute allows.
    expect(calls.length).toBeGreaterThan(40);
    expect(calls.length).toBeLessThanOrEqual(60);
  });

  it('asks for what is in view at once, and for the rest when the slider rests', async () => {
    const { calls, told, turns, settle } = scene();
    turns.want(wish('a', { others: OTHERS }));
    calls[0]?.answer();
    await settle(200);
    expect(calls.map(({ ids }) => ids)).toEqual([VIEW]);
    await settle(200);
    expect(calls.map(({ ids }) => ids)).toEqual([VIEW, OTHERS]);
    calls[1]?.answer();
    await settle();
    expect(told).toEqual(['a', 'a whole']);
  });

  it('breaks off the rest of an older draft when the slider moves again, and drops its answer', async () => {
    const { calls, told, turns, settle } = scene();
    turns.want(wish('a', { others: OTHERS }));
    calls[0]?.answer();
    await settle(400);
    turns.want(wish('b', { others: OTHERS }));
    expect(calls[1]?.signal.aborted).toBe(true);
    calls[1]?.answer();
    await settle(120);
    expect(calls[2]).toMatchObject({ key: 'b', ids: VIEW });
    expect(told).toEqual(['a']);
  });

  it('names no more places in a call than it may', async () => {
    const { calls, turns, settle } = scene();
    const many = Array.from({ length: 4500 }, (_, index) => `s${index}`);
    turns.want(wish('a', { inView: NONE, others: { stationIds: many, siteIds: ['p'] } }));
    for (let turn = 0; turn < 4; turn += 1) {
      await settle(400);
      calls.at(-1)?.answer();
    }
    await settle();
    expect(calls.map(({ ids }) => ids.stationIds.length)).toEqual([2000, 2000, 500]);
    expect(calls.flatMap(({ ids }) => ids.stationIds)).toEqual(many);
    expect(calls.map(({ ids }) => ids.siteIds.length)).toEqual([1, 0, 0]);
  });

  it('drops every answer once the draft is left', async () => {
    const { calls, told, turns, settle } = scene();
    turns.want(wish('a'));
    turns.leave();
    expect(calls[0]?.signal.aborted).toBe(true);
    calls[0]?.answer();
    await settle(1000);
    expect(told).toEqual([]);
    turns.want(wish('a'));
    await settle(200);
    expect(calls).toHaveLength(2);
  });

  it('tells a fault and asks no further by itself; the next draft is asked again', async () => {
    const { calls, told, faults, turns, settle } = scene();
    turns.want(wish('a', { others: OTHERS }));
    calls[0]?.fail(new Error('away'));
    await settle(1000);
    expect(faults).toHaveLength(1);
    expect(calls).toHaveLength(1);
    turns.want(wish('b'));
    await settle(200);
    calls[1]?.answer();
    await settle();
    expect(told).toEqual(['b whole']);
  });
});

describe('places in view', () => {
  const at = (id: string, latitude: number, longitude: number) => ({ id, latitude, longitude });
  const far = Array.from({ length: 500 }, (_, index) => at(`far${index}`, 50, 10));

  it('are told by the box of the map, over the date line too', () => {
    const stations = [at('fiji', -18, 178), at('samoa', -14, -172), ...far];
    const parted = partByView({ stations, sites: [] }, { west: 170, east: 195, south: -30, north: 0 });
    expect(parted.inView.stationIds).toEqual(['fiji', 'samoa']);
    expect(parted.others.stationIds).toHaveLength(500);
  });

  it('are all of them when there are few, or while the map is not there', () => {
    const few = { stations: far.slice(0, 10), sites: [at('p', 0, 0)] };
    const box = { west: 0, east: 1, south: 0, north: 1 };
    expect(partByView(few, box).others).toEqual(NONE);
    expect(partByView({ stations: far, sites: [] }, null).others).toEqual(NONE);
  });
});
