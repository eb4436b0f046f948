import { makeThreadPool } from './thread-pool.ts';
import type { Derived, DeriveTask, HoursTask, WrittenHours, YearAnswer, YearTask } from './year-task.ts';

/** A thread that works on one weather year at a time; its errors are those of `ThreadPool.run`. */
export interface YearThread {
  derive(task: DeriveTask, signal: AbortSignal): Promise<Derived>;
  writeHours(task: HoursTask, signal: AbortSignal): Promise<WrittenHours>;
  close(): Promise<void>;
}

/** @param entry the module that answers both kinds of task; the thread starts with the first of them */
export function makeYearThread(entry: URL): YearThread {
  const pool = makeThreadPool<YearTask, YearAnswer>({ entry, threads: 1 });
  return {
    async derive(task, signal) {
      const answered = await pool.run({ kind: 'derive', task }, signal);
      if (answered.kind !== 'derive') throw wrongAnswer();
      return answered.answer;
    },
    async writeHours(task, signal) {
      const answered = await pool.run({ kind: 'hours', task }, signal);
      if (answered.kind !== 'hours') throw wrongAnswer();
      return answered.answer;
    },
    close: () => pool.close(),
  };
}

function wrongAnswer(): Error {
  return new Error('the thread answered another kind of task');
}
