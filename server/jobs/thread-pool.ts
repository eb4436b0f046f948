import { Worker } from 'node:worker_threads';
import type { Posted, Reply } from './thread-messages.ts';

/** A few threads that answer tasks of one kind, so that the thread that called never stands still for them. */
export interface ThreadPool<Task, Answer> {
  readonly threads: number;
  /** Starts every thread now, so that the first task need not wait for it. */
  warm(): void;
  /**
   * Answers a task as soon as a thread is free; with `seat`, 0 first, rather that thread than another that is free too, since it has
   * at hand what it answered such a task from before. @throws ThreadTaskError what the thread threw, or that it died; the reason of
   * `signal` as soon as it aborts: a waiting task is never begun, one that runs ends unheard
   */
  run(task: Task, on?: { readonly signal?: AbortSignal | undefined; readonly seat?: number }): Promise<Answer>;
  /** Takes nothing new, refuses what waits, lets what runs end for a while, then ends the threads. */
  close(): Promise<void>;
}

/** A task that its thread could not answer. */
export class ThreadTaskError extends Error {
  override readonly name = 'ThreadTaskError';
}

interface Waiting<Task, Answer> extends Posted<Task> {
  readonly seat: number | undefined;
  readonly resolve: (answer: Answer) => void;
  readonly reject: (reason: unknown) => void;
}

interface Seat<Task, Answer> {
  /** Null before the first task and after a death: the next task starts a new one, so nothing dies in a circle. */
  worker: Worker | null;
  running: Waiting<Task, Answer> | null;
}

const THREAD = new URL('./thread.mjs', import.meta.url);
const FINISH_WITHIN_MS = 5_000;

/** @param options.entry the module that answers, by `answerInThread` */
export function makeThreadPool<Task, Answer>(options: { entry: URL; threads: number }): ThreadPool<Task, Answer> {
  const seats = Array.from({ length: options.threads }, (): Seat<Task, Answer> => ({ worker: null, running: null }));
  const waiting: Waiting<Task, Answer>[] = [];
  let lastId = 0;
  let closed = false;
  let whenIdle: (() => void) | null = null;

  function startIn(seat: Seat<Task, Answer>): Worker {
    const worker = new Worker(THREAD, { workerData: { entry: options.entry.href } });
    // A pool that nobody closes does not keep its process: only a running task does.
    worker.unref();
    worker.on('message', (reply: Reply<Answer>) => settle(seat, reply));
    worker.on('error', (error) => lose(seat, { worker, cause: error }));
    worker.on('exit', (code) => lose(seat, { worker, cause: new Error(`it ended with code ${code}`) }));
    seat.worker = worker;
    return worker;
  }

  function settle(seat: Seat<Task, Answer>, reply: Reply<Answer>): void {
    const { running } = seat;
    if (running?.id !== reply.id) return;
    seat.running = null;
    seat.worker?.unref();
    if (reply.ok) running.resolve(reply.answer);
    else running.reject(new ThreadTaskError(reply.message, { cause: reply.stack }));
    giveOut();
  }

  function lose(seat: Seat<Task, Answer>, { worker, cause }: { worker: Worker; cause: Error }): void {
    if (seat.worker !== worker) return;
    const { running } = seat;
    seat.worker = null;
    seat.running = null;
    running?.reject(new ThreadTaskError('The thread that worked on this died; another takes its place.', { cause }));
    giveOut();
  }

  /** What waits for this seat or for any; rather than have it idle, what waits for another one that is at work. */
  function takeFor(nth: number): Waiting<Task, Answer> | undefined {
    const own = waiting.findIndex(({ seat }) => seat === undefined || seat === nth);
    const place = own >= 0 ? own : waiting.findIndex(({ seat }) => seat !== undefined && seats[seat]?.running !== null);
    return place < 0 ? undefined : waiting.splice(place, 1)[0];
  }

  function giveOut(): void {
    for (const [nth, seat] of seats.entries()) {
      if (seat.running !== null) continue;
      const next = takeFor(nth);
      if (next === undefined) continue;
      const worker = seat.worker ?? startIn(seat);
      seat.running = next;
      worker.ref();
      try {
        worker.postMessage({ id: next.id, task: next.task } satisfies Posted<Task>);
      } catch (error) {
        // What cannot be cloned never left; the thread is as free as before.
        seat.running = null;
        next.reject(error);
      }
    }
    if (seats.every(({ running }) => running === null)) whenIdle?.();
  }

  return {
    threads: options.threads,
    warm: () => {
      for (const seat of seats) if (seat.worker === null && !closed) startIn(seat);
    },
    run(task, { signal, seat } = {}) {
      if (closed) return Promise.reject(new ThreadTaskError('The threads are closing.'));
      if (signal?.aborted) return Promise.reject(signal.reason);
      return new Promise<Answer>((resolve, reject) => {
        const id = ++lastId;
        const stop = () => {
          const place = waiting.findIndex((each) => each.id === id);
          if (place >= 0) waiting.splice(place, 1);
          reject(signal?.reason);
        };
        const done = () => signal?.removeEventListener('abort', stop);
        signal?.addEventListener('abort', stop, { once: true });
        waiting.push({
          id,
          task,
          seat,
          resolve: (answer) => {
            done();
            resolve(answer);
          },
          reject: (reason) => {
            done();
            reject(reason);
          },
        });
        giveOut();
      });
    },
    async close() {
      closed = true;
      for (const each of waiting.splice(0)) each.reject(new ThreadTaskError('The threads are closing.'));
      await untilIdle();
      await Promise.all(
        seats.map(async (seat) => {
          const { worker } = seat;
          if (worker === null) return;
          await worker.terminate();
          lose(seat, { worker, cause: new Error('the pool was closed') });
        }),
      );
    },
  };

  function untilIdle(): Promise<void> {
    if (seats.every(({ running }) => running === null)) return Promise.resolve();
    return new Promise((resolve) => {
      const timer = setTimeout(resolve, FINISH_WITHIN_MS);
      whenIdle = () => {
        clearTimeout(timer);
        resolve();
      };
    });
  }
}
