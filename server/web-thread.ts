/** What a thread of the web process runs; started by `server/jobs/thread.mjs`. */
import { rescoreStations } from './features/runs/rescore-station.ts';
import { answerInThread } from './jobs/answer-in-thread.ts';

answerInThread(rescoreStations);
