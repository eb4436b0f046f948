/** What a thread of the web process runs; started by `server/jobs/thread.mjs`. */
import { previewYear } from './features/briefs/preview-year.ts';
import { doubtPlaces, drawRanks, rangeOfPlace, turnVerdict } from './features/runs/doubt-place.ts';
import { rescoreStations } from './features/runs/rescore-station.ts';
import { makeSurfaceGrid } from './features/runs/surface-grid.ts';
import { answerInThread } from './jobs/answer-in-thread.ts';
import type { WebAnswer, WebTask } from './jobs/web-task.ts';
import { shippedRelief } from './tiles/relief.ts';

const relief = shippedRelief();

answerInThread<WebTask, WebAnswer>((asked) => {
  switch (asked.kind) {
    case 'rescore':
      return { kind: 'rescore', answer: rescoreStations(asked.task) };
    case 'range':
      return { kind: 'range', answer: rangeOfPlace(asked.task) };
    case 'turning':
      return { kind: 'turning', answer: turnVerdict(asked.task) };
    case 'doubts':
      return { kind: 'doubts', answer: doubtPlaces(asked.task) };
    case 'rank':
      return { kind: 'rank', answer: drawRanks(asked.task) };
    case 'preview':
      return { kind: 'preview', answer: previewYear(asked.task) };
    case 'surface':
      return { kind: 'surface', answer: makeSurfaceGrid(asked.task, relief) };
  }
});
