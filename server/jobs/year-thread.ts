import { makeThreadPool } from './thread-pool.ts';
import type {
  Derived,
  DeriveTask,
  HourRows,
  HourRowsTask,
  HoursTask,
  LinesTask,
  WrittenHours,
  YearAnswer,
  YearTask,
} from './year-task.ts';

/** A thread that works on one weather year at a time; its errors are those of `ThreadPool.run`. */
export interface YearThread {
  derive(task: DeriveTask, signal: AbortSignal): Promise<Derived>;
  writeHours(task: HoursTask, signal: AbortSignal): Promise<WrittenHours>;
  listHours(task: HourRowsTask, signal: AbortSignal): Promise<HourRows>;
  /** Line of each slot; null where the original no longer leads to the year. */
  readLines(task: LinesTask, signal: AbortSignal): Promise<Uint32Array | null>;
  close(): Promise<void>;
}

/** @param entry the module that answers every kind of task; the thread starts with the first of them */
export function makeYearThread(entry: URL): YearThread {
  const pool = makeThreadPool<YearTask, YearAnswer>({ entry, threads: 1 });
  return {
    async derive(task, signal) {
      const answered = await pool.run({ kind: 'derive', task }, { signal });
      if (answered.kind !== 'derive') throw wrongAnswer();
      return answered.answer;
    },
    async writeHours(task, signal) {
      const answered = await pool.run({ kind: 'hours', task }, { signal });
      if (answered.kind !== 'hours') throw wrongAnswer();
      return answered.answer;
    },
    async listHours(task, signal) {
      const answered = await pool.run({ kind: 'rows', task }, { signal });
      if (answered.kind !== 'rows') throw wrongAnswer();
      return answered.answer;
    },
    async readLines(task, signal) {
      const answered = await pool.run({ kind: 'lines', task }, { signal });
      if (answered.kind !== 'lines') throw wrongAnswer();
      return answered.answer;
    },
    close: () => pool.close(),
  };
}

function wrongAnswer(): Error {
  return new Error('the thread answered another kind of task');
}
