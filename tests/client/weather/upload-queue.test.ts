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
    finish: (known?: boolean) => void;
    fail: (error: Error) => void;
    onShare: (share: number) => void;
  }[] = [];
  const queue = new UploadQueue(
    ({ file, onShare }) =>
      new Promise((resolve, reject) => {
        const finish = (known = false) => resolve({ file: fileOf(), known });
        sending.push({ name: file.name, finish, fail: reject, onShare });
      }),
  );
  return { queue, sending };
}

const settled = () => new Promise((resolve) => setTimeout(resolve, 0));
const states = (queue: UploadQueue) => queue.snapshot().map(({ name, state }) => `${name} ${state}`);

describe('the queue of uploads', () => {
  it('sends two at a time, in the order in which they were chosen, a request each', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a'), named('b'), named('c')], () => {});
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
    sending[0]?.fail(new ApiError({ code: 'network', message: 'No answer.' }));
    await settled();
    const [failed] = queue.snapshot();
    expect(failed).toMatchObject({ state: 'failed', problem: 'No answer.' });
    queue.retry(failed?.id ?? 0);
    expect(states(queue)).toEqual(['a sending']);
    sending[1]?.finish();
    await settled();
    expect(states(queue)).toEqual(['a sent']);
  });

  it('goes on with the others when one fails', async () => {
    const { queue, sending } = heldQueue();
    queue.add('team', [named('a'), named('b'), named('c')], () => {});
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
    sending[0]?.finish();
    await settled();
    queue.clearEnded();
    expect(states(queue)).toEqual(['b sending']);
  });
});
