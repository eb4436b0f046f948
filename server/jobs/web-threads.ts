import type { PlaceToRank } from '#engine/ranking/place-to-rank.ts';
import type { Ranking } from '#engine/ranking/rank-places.ts';
import { makeThreadPool } from './thread-pool.ts';
import type {
  DoubtsTask,
  JudgedRange,
  PreviewedYear,
  PreviewTask,
  RangeTask,
  RankTask,
  RescoredStation,
  RescoreTask,
  SurfaceGrid,
  SurfaceTask,
  TurnedVerdict,
  TurningTask,
  WebAnswer,
  WebTask,
} from './web-task.ts';

/** Threads that judge for whoever drags a slider; their errors are those of `ThreadPool.run`. */
export interface WebThreads {
  readonly threads: number;
  /** Starts every thread now, so that the first task need not wait for it. */
  warm(): void;
  /** @param on.seat the thread, 0 first, that has judged these stations before */
  rescore(task: RescoreTask, on: { signal: AbortSignal; seat?: number }): Promise<readonly RescoredStation[]>;
  preview(task: PreviewTask, signal: AbortSignal): Promise<PreviewedYear>;
  range(task: RangeTask, signal: AbortSignal): Promise<JudgedRange | null>;
  turning(task: TurningTask, signal: AbortSignal): Promise<TurnedVerdict>;
  doubts(task: DoubtsTask, signal: AbortSignal): Promise<readonly PlaceToRank[]>;
  rank(task: RankTask, signal: AbortSignal): Promise<Ranking>;
  surface(task: SurfaceTask, signal?: AbortSignal): Promise<SurfaceGrid>;
  close(): Promise<void>;
}

/** @param options.entry the module that answers every kind of task */
export function makeWebThreadsOf(options: { entry: URL; threads: number }): WebThreads {
  const pool = makeThreadPool<WebTask, WebAnswer>(options);
  return {
    threads: pool.threads,
    warm: () => pool.warm(),
    async rescore(task, on) {
      const answered = await pool.run({ kind: 'rescore', task }, on);
      if (answered.kind !== 'rescore') throw wrongAnswer();
      return answered.answer;
    },
    async preview(task, signal) {
      const answered = await pool.run({ kind: 'preview', task }, { signal });
      if (answered.kind !== 'preview') throw wrongAnswer();
      return answered.answer;
    },
    async range(task, signal) {
      const answered = await pool.run({ kind: 'range', task }, { signal });
      if (answered.kind !== 'range') throw wrongAnswer();
      return answered.answer;
    },
    async turning(task, signal) {
      const answered = await pool.run({ kind: 'turning', task }, { signal });
      if (answered.kind !== 'turning') throw wrongAnswer();
      return answered.answer;
    },
    async doubts(task, signal) {
      const answered = await pool.run({ kind: 'doubts', task }, { signal });
      if (answered.kind !== 'doubts') throw wrongAnswer();
      return answered.answer;
    },
    async rank(task, signal) {
      const answered = await pool.run({ kind: 'rank', task }, { signal });
      if (answered.kind !== 'rank') throw wrongAnswer();
      return answered.answer;
    },
    async surface(task, signal) {
      const answered = await pool.run({ kind: 'surface', task }, { signal });
      if (answered.kind !== 'surface') throw wrongAnswer();
      return answered.answer;
    },
    close: () => pool.close(),
  };
}

function wrongAnswer(): Error {
  return new Error('the thread answered another kind of task');
}
