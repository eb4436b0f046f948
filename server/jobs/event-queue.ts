/** A queue that one reader drains with `for await`. */
export interface EventQueue<T> extends AsyncIterable<T> {
  push(item: T): void;
  /** What waits is still read; then the reading ends. */
  end(): void;
}

/** A reader that is this far behind is cut off rather than allowed to fill the memory. */
const MOST_WAITING = 1000;

/** @param options.onEnd called once, as soon as nothing more can come in */
export function createEventQueue<T>(options: { signal: AbortSignal; onEnd: () => void }): EventQueue<T> {
  const waiting: T[] = [];
  let ended = false;
  let wake: (() => void) | null = null;

  function end(): void {
    if (ended) return;
    ended = true;
    options.signal.removeEventListener('abort', end);
    options.onEnd();
    wake?.();
  }

  async function* read(): AsyncGenerator<T, void, undefined> {
    try {
      while (true) {
        const item = waiting.shift();
        if (item !== undefined) yield item;
        else if (ended) return;
        else {
          await new Promise<void>((resolve) => {
            wake = resolve;
          });
          wake = null;
        }
      }
    } finally {
      end();
    }
  }

  options.signal.addEventListener('abort', end);
  return {
    push(item) {
      if (ended) return;
      if (waiting.length >= MOST_WAITING) return end();
      waiting.push(item);
      wake?.();
    },
    end,
    [Symbol.asyncIterator]: read,
  };
}
