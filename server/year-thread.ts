/** What the web's thread for single weather years runs; started by `server/jobs/thread.mjs`. */
import { writeHoursInThread } from './features/runs/write-hours-in-thread.ts';
import { deriveInThread } from './features/weather/derive-in-thread.ts';
import { answerInThread } from './jobs/answer-in-thread.ts';
import type { YearAnswer, YearTask } from './jobs/year-task.ts';

answerInThread<YearTask, YearAnswer>((asked) =>
  asked.kind === 'derive'
    ? { kind: 'derive', answer: deriveInThread(asked.task) }
    : { kind: 'hours', answer: writeHoursInThread(asked.task) },
);
