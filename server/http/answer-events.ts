import { once } from 'node:events';
import type { ServerResponse } from 'node:http';
import type * as z from 'zod/mini';

/** How long a browser waits before it comes back. */
const RETRY_MS = 2_000;

export interface EventStream {
  readonly response: ServerResponse;
  readonly schema: z.ZodMiniType;
  readonly events: AsyncIterable<unknown>;
  /** Aborted when the client has gone or the server closes. */
  readonly signal: AbortSignal;
  /** Looked at before every heartbeat; the stream ends when the answer is no. */
  mayStillWatch(): Promise<boolean>;
  readonly heartbeatMs: number;
}

/** Sends events as they happen until the events, the client, the server or the right to see them ends. */
export async function answerEvents(stream: EventStream): Promise<void> {
  const { response, signal } = stream;
  response.writeHead(200, {
    'Content-Type': 'text/event-stream; charset=utf-8',
    // no-transform keeps compression away, which would hold events back.
    'Cache-Control': 'no-store, no-transform',
    'X-Accel-Buffering': 'no',
  });
  response.write(`retry: ${RETRY_MS}\n\n`);
  const iterator = stream.events[Symbol.asyncIterator]();
  try {
    let next = iterator.next();
    let beatAt = performance.now() + stream.heartbeatMs;
    while (!signal.aborted) {
      const untilBeatMs = beatAt - performance.now();
      const arrived = untilBeatMs <= 0 ? 'beat' : await firstOf(next, { signal, timeoutMs: untilBeatMs });
      if (arrived === 'aborted') break;
      if (arrived === 'beat') {
        if (!(await stream.mayStillWatch())) break;
        await write(stream, ': still here\n\n');
        beatAt = performance.now() + stream.heartbeatMs;
        continue;
      }
      if (arrived.done === true) break;
      await write(stream, `data: ${JSON.stringify(stream.schema.parse(arrived.value))}\n\n`);
      next = iterator.next();
    }
  } finally {
    // Not awaited: an iterator that waits for its next event answers only when one comes.
    iterator.return?.().catch(() => undefined);
    response.end();
  }
}

/** A reader that is slow makes us wait here rather than fill the memory. */
async function write({ response, signal }: EventStream, text: string): Promise<void> {
  if (!response.write(text) && !signal.aborted) await once(response, 'drain', { signal }).catch(() => undefined);
}

async function firstOf<T>(
  next: Promise<T>,
  { signal, timeoutMs }: { signal: AbortSignal; timeoutMs: number },
): Promise<T | 'aborted' | 'beat'> {
  const over = new AbortController();
  const beat = new Promise<'beat'>((resolve) => {
    const timer = setTimeout(() => resolve('beat'), timeoutMs);
    over.signal.addEventListener('abort', () => clearTimeout(timer));
  });
  const aborted = once(signal, 'abort', { signal: over.signal }).then(
    () => 'aborted' as const,
    () => 'aborted' as const,
  );
  try {
    return await Promise.race([next, aborted, beat]);
  } finally {
    over.abort();
  }
}
