import { describe, expect, it } from 'vitest';
import { fixtureFiles } from '../../../src/app/gallery/fixtures.ts';
import type { WeatherFile } from '../../../src/contract/weather.ts';
import { UploadQueue } from '../../../src/features/weather/upload-queue.ts';
import { ApiError } from '../../../src/lib/api-error.ts';

const [received] = fixtureFiles();

function fileOf(): WeatherFile {
  if (!received) throw new Error('The fixtures hold no file.');
  return received;
}

const named = (name: string, text = 'hours') => new File([text], name);

/** A queue whose sending ends when the test says so. */
function heldQueue() {
  const sending: {
    name: string;
    batchId: string | null;
    signal: AbortSignal;
    finish: (known?: boolean) => void;
    fail: (error: Error) => void;
    onShare: (share: number) => void;
  }[] = [];
  const begun: string[] = [];
  const archives: string[] = [];
  const queue = new UploadQueue({
    startBatch: async ({ name }) => {
      begun.push(name);
      return `batch ${begun.length}`;
    },
    sendFile: ({ file, batchId, signal, onShare }) =>
      new Promise((resolve, reject) => {
        const finish = (known = false) => resolve({ file: fileOf(), known });
        sending.push({ name: file.name, batchId, signal, finish, fail: reject, onShare });
      }),
    sendArchive: async ({ file, batchId }) => {
      archives.push(`${file.name} into ${batchId}`);
    },
  });
  return { queue, sending, begun, archives };
}

const settled = () => new Promise((resolve) => setTimeout(resolve, 0));
const states = (queue: UploadQueue) => queue.snapshot().map(({ name, state }) => `${name} ${state}`);

describe('the queue of uploads', () => {
  it('sends two at a time, in the order in which they were chosen, a request each', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a'), named('b'), named('c')], () => {});
    await settled();
    expect(sending.map(({ name }) => name)).toEqual(['a', 'b']);
    expect(states(queue)).toEqual(['a sending', 'b sending', 'c waiting']);
    sending[1]?.finish();
    await settled();
    expect(sending.map(({ name }) => name)).toEqual(['a', 'b', 'c']);
    expect(states(queue)).toEqual(['a sending', 'b sent', 'c sending']);
  });

  it('tells each arrival, and what the server knew already', async () => {
    const { queue, sending } = heldQueue();
    let arrivals = 0;
    queue.add('team', [named('a')], () => {
      arrivals += 1;
    });
    await settled();
    sending[0]?.onShare(0.5);
    expect(queue.snapshot()[0]?.sentShare).toBe(0.5);
    sending[0]?.finish(true);
    await settled();
    expect(arrivals).toBe(1);
    expect(queue.snapshot()[0]?.answer?.known).toBe(true);
    expect(queue.isBusy()).toBe(false);
  });

  it('keeps what failed, says why, and sends it again when asked', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a')], () => {});
    await settled();
    sending[0]?.fail(new ApiError({ code: 'network', message: 'No answer.' }));
    await settled();
    const [failed] = queue.snapshot();
    expect(failed).toMatchObject({ state: 'failed', problem: 'No answer.' });
    queue.retry(failed?.id ?? 0);
    await settled();
    expect(states(queue)).toEqual(['a sending']);
    sending[1]?.finish();
    await settled();
    expect(states(queue)).toEqual(['a sent']);
  });

  it('goes on with the others when one fails', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a'), named('b'), named('c')], () => {});
    await settled();
    sending[0]?.fail(new ApiError({ code: 'too_large', message: 'Too large.' }));
    await settled();
    expect(states(queue)).toEqual(['a failed', 'b sending', 'c sending']);
  });

  it('refuses an empty file before a byte is sent', () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('empty', '')], () => {});
    expect(sending).toHaveLength(0);
    expect(queue.snapshot()[0]?.problem).toContain('empty');
  });

  it('clears what has ended and nothing else', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a'), named('b')], () => {});
    await settled();
    sending[0]?.finish();
    await settled();
    queue.clearEnded();
    expect(states(queue)).toEqual(['b sending']);
  });

  it('makes one batch of what is brought together, begun with its first file', async () => {
    const { queue, sending, begun } = heldQueue();
    queue.add('team', [named('a'), named('b'), named('c')], () => {});
    await settled();
    expect(begun).toEqual(['a and 2 other files']);
    expect(sending.map(({ batchId }) => batchId)).toEqual(['batch 1', 'batch 1']);
    expect(queue.snapshot().map(({ batchId }) => batchId)).toEqual(['batch 1', 'batch 1', 'batch 1']);
  });

  it('sends a single file by itself', async () => {
    const { queue, sending, begun } = heldQueue();
    queue.add('team', [named('a')], () => {});
    await settled();
    expect(begun).toEqual([]);
    expect(sending[0]?.batchId).toBeNull();
  });

  it('counts an empty file as none: the one beside it goes by itself', async () => {
    const { queue, sending, begun } = heldQueue();
    queue.add('team', [named('a'), named('empty', '')], () => {});
    await settled();
    expect(begun).toEqual([]);
    expect(states(queue)).toEqual(['a sending', 'empty failed']);
    expect(sending[0]?.batchId).toBeNull();
  });

  it('tells a zip by its first bytes, whatever it is called, and makes a batch of it', async () => {
    const { queue, sending, archives } = heldQueue();
    queue.add('team', [named('years.epw', 'PK\u0003\u0004 and the rest')], () => {});
    queue.add('team', [named('years.zip', 'no zip at all')], () => {});
    await settled();
    expect(archives).toEqual(['years.epw into batch 1']);
    expect(sending.map(({ name }) => name)).toEqual(['years.zip']);
  });

  it('sends no more of a batch that is cancelled, and goes on with the rest', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a'), named('b'), named('c')], () => {});
    await settled();
    queue.add('team', [named('d')], () => {});
    queue.stopBatch('batch 1');
    await settled();
    expect(sending.slice(0, 2).map(({ signal }) => signal.aborted)).toEqual([true, true]);
    expect(states(queue)).toEqual(['d sending']);
  });
});
