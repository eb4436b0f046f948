/** What the threads of the pool's own tests run: adds, fails, waits or dies, as it is told. */
import { threadId } from 'node:worker_threads';
import { answerInThread } from '../../server/jobs/answer-in-thread.ts';

export type TestTask =
  | { readonly kind: 'add'; readonly one: number; readonly other: number }
  | { readonly kind: 'fail'; readonly words: string }
  | { readonly kind: 'mark'; readonly shared: SharedArrayBuffer; readonly waitMs: number }
  | { readonly kind: 'die' };

export interface TestAnswer {
  readonly threadId: number;
  readonly sum: number | null;
}

answerInThread((task: TestTask): TestAnswer => {
  switch (task.kind) {
    case 'add':
      return { threadId, sum: task.one + task.other };
    case 'fail':
      throw new RangeError(task.words);
    case 'die':
      return process.exit(7);
    case 'mark': {
      const begun = new Int32Array(task.shared);
      Atomics.add(begun, 0, 1);
      Atomics.notify(begun, 0);
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, task.waitMs);
      // From then on the thread shows that it lives.
      setInterval(() => Atomics.add(begun, 1, 1), 5);
      return { threadId, sum: null };
    }
  }
});
