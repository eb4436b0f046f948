import { setTimeout as sleep } from 'node:timers/promises';
import { afterEach, describe, expect, it } from 'vitest';
import { makeThreadPool, type ThreadPool, ThreadTaskError } from '../../../server/jobs/thread-pool.ts';
import { eventually } from '../../support/eventually.ts';
import type { TestAnswer, TestTask } from '../../support/thread-for-tests.ts';

const entry = new URL('../../support/thread-for-tests.ts', import.meta.url);
const pools: ThreadPool<TestTask, TestAnswer>[] = [];

function poolOf(threads: number): ThreadPool<TestTask, TestAnswer> {
  const pool = makeThreadPool<TestTask, TestAnswer>({ entry, threads });
  pools.push(pool);
  return pool;
}

/** A task that says when it has begun, then takes its time. */
function marking(waitMs: number) {
  const shared = new SharedArrayBuffer(8);
  const task: TestTask = { kind: 'mark', shared, waitMs };
  const count = (place: number) => () => Atomics.load(new Int32Array(shared), place);
  return { task, begun: count(0), beats: count(1) };
}

afterEach(async () => {
  for (const pool of pools.splice(0)) await pool.close();
});

describe('a pool of threads', () => {
  it('answers every task once, in threads that are not this one', async () => {
    const pool = poolOf(2);
    pool.warm();
    const asked = Array.from({ length: 40 }, (_none, index) => pool.run({ kind: 'add', one: index, other: 1000 }));
    const answers = await Promise.all(asked);
    expect(answers.map(({ sum }) => sum)).toEqual(Array.from({ length: 40 }, (_none, index) => 1000 + index));
    expect(new Set(answers.map(({ threadId }) => threadId)).size).toBeLessThanOrEqual(2);
    expect(answers.every(({ threadId }) => threadId > 0)).toBe(true);
  });

  it('keeps a task for the seat that it names, unless another would stand idle', async () => {
    const pool = poolOf(2);
    const add = (seat: number) => pool.run({ kind: 'add', one: 1, other: 1 }, { seat });
    const threadOf = async (seat: number) => (await add(seat)).threadId;
    const [first, second] = [await threadOf(0), await threadOf(1)];
    expect(second).not.toBe(first);
    expect([await threadOf(1), await threadOf(0), await threadOf(1)]).toEqual([second, first, second]);
    // Two wait for the first seat while it works: the second takes one of them.
    const both = await Promise.all([add(0), add(0)]);
    expect(new Set(both.map(({ threadId }) => threadId))).toEqual(new Set([first, second]));
  });

  it('gives what a task threw back as an error, and goes on with the same thread', async () => {
    const pool = poolOf(1);
    const before = await pool.run({ kind: 'add', one: 1, other: 1 });
    await expect(pool.run({ kind: 'fail', words: 'no such month' })).rejects.toThrow(
      expect.objectContaining({ name: 'ThreadTaskError', message: 'no such month' }),
    );
    expect((await pool.run({ kind: 'add', one: 2, other: 2 })).threadId).toBe(before.threadId);
  });

  it('replaces a thread that dies: its task is refused, the ones behind it are answered by another', async () => {
    const pool = poolOf(1);
    const before = await pool.run({ kind: 'add', one: 1, other: 1 });
    const dying = pool.run({ kind: 'die' });
    const behind = pool.run({ kind: 'add', one: 2, other: 3 });
    await expect(dying).rejects.toThrow(ThreadTaskError);
    const answer = await behind;
    expect(answer.sum).toBe(5);
    expect(answer.threadId).not.toBe(before.threadId);
  });

  it('never begins a waiting task whose caller has gone, and lets go of one that runs', async () => {
    const pool = poolOf(1);
    const running = marking(300);
    const waiting = marking(0);
    const gone = new AbortController();
    const first = pool.run(running.task, { signal: gone.signal });
    const second = pool.run(waiting.task, { signal: gone.signal });
    await eventually('the first task to begin', async () => running.begun() === 1);
    gone.abort(new Error('the client has gone'));
    await expect(first).rejects.toThrow('the client has gone');
    await expect(second).rejects.toThrow('the client has gone');
    // The thread is free again once the first has ended unheard.
    expect((await pool.run({ kind: 'add', one: 1, other: 1 })).sum).toBe(2);
    expect(waiting.begun()).toBe(0);
    await expect(pool.run({ kind: 'add', one: 1, other: 1 }, { signal: gone.signal })).rejects.toThrow(
      'the client has gone',
    );
  });

  it('closes: what runs is answered, what waits and what comes later is refused, and every thread ends', async () => {
    const pool = poolOf(1);
    const running = marking(200);
    const first = pool.run(running.task);
    const second = pool.run({ kind: 'add', one: 1, other: 1 });
    const refused = expect(second).rejects.toThrow('closing');
    await eventually('the first task to begin', async () => running.begun() === 1);
    await pool.close();
    await refused;
    expect((await first).threadId).toBeGreaterThan(0);
    await expect(pool.run({ kind: 'add', one: 1, other: 1 })).rejects.toThrow('closing');
    const beats = running.beats();
    await sleep(100);
    expect(running.beats()).toBe(beats);
  });
});
