/** What the web's thread for single weather years runs; started by `server/jobs/thread.mjs`. */
import { hourRowsInThread, writeHoursInThread } from './features/runs/write-hours-in-thread.ts';
import { deriveInThread } from './features/weather/derive-in-thread.ts';
import { linesInThread } from './features/weather/lines-in-thread.ts';
import { answerInThread } from './jobs/answer-in-thread.ts';
import type { YearAnswer, YearTask } from './jobs/year-task.ts';

answerInThread<YearTask, YearAnswer>((asked) => {
  switch (asked.kind) {
    case 'derive':
      return { kind: 'derive', answer: deriveInThread(asked.task) };
    case 'rows':
      return { kind: 'rows', answer: hourRowsInThread(asked.task) };
    case 'lines':
      return { kind: 'lines', answer: linesInThread(asked.task) };
    case 'hours':
      return { kind: 'hours', answer: writeHoursInThread(asked.task) };
  }
});
