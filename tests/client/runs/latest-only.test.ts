import { describe, expect, it, vi } from 'vitest';
import { latestOnly } from '../../../src/features/runs/latest-only.ts';

interface Call {
  readonly wish: string;
  readonly signal: AbortSignal;
  readonly resolve: (answer: string) => void;
  readonly reject: (reason: unknown) => void;
}

function turnsWithCalls() {
  const calls: Call[] = [];
  const onAnswer = vi.fn();
  const onFault = vi.fn();
  const turns = latestOnly<string, string>({
    ask: (wish, signal) => new Promise((resolve, reject) => calls.push({ wish, signal, resolve, reject })),
    onAnswer,
    onFault,
  });
  return { calls, onAnswer, onFault, turns };
}

const settled = () => new Promise((resolve) => setTimeout(resolve, 0));

describe('asking one thing at a time', () => {
  it('leaves out what was wished while the one before was asked, but for the latest', async () => {
    const { calls, onAnswer, turns } = turnsWithCalls();
    for (const wish of ['a', 'b', 'c']) turns.want(wish);
    expect(calls.map(({ wish }) => wish)).toEqual(['a']);
    calls[0]?.resolve('A');
    await settled();
    expect(calls.map(({ wish }) => wish)).toEqual(['a', 'c']);
    calls[1]?.resolve('C');
    await settled();
    expect(onAnswer.mock.calls).toEqual([
      ['A', 'a'],
      ['C', 'c'],
    ]);
  });

  it('goes on after a fault, and drops what comes after it was left', async () => {
    const { calls, onAnswer, onFault, turns } = turnsWithCalls();
    turns.want('a');
    turns.want('b');
    calls[0]?.reject(new Error('away'));
    await settled();
    expect(onFault).toHaveBeenCalledTimes(1);
    turns.leave();
    expect(calls[1]?.signal.aborted).toBe(true);
    calls[1]?.resolve('B');
    await settled();
    expect(onAnswer).not.toHaveBeenCalled();
    turns.want('c');
    expect(calls.at(-1)?.wish).toBe('c');
  });
});
