/** What a thread of the web process runs; started by `server/jobs/thread.mjs`. */
import { previewYear } from './features/briefs/preview-year.ts';
import { rescoreStations } from './features/runs/rescore-station.ts';
import { answerInThread } from './jobs/answer-in-thread.ts';
import type { WebAnswer, WebTask } from './jobs/web-task.ts';

answerInThread<WebTask, WebAnswer>((asked) =>
  asked.kind === 'rescore'
    ? { kind: 'rescore', answer: rescoreStations(asked.task) }
    : { kind: 'preview', answer: previewYear(asked.task) },
);
