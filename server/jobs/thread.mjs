/**
 * Where every thread starts. Plain JavaScript, since a thread does not inherit what lets its parent read TypeScript: it registers
 * tsx and loads the module that answers the thread's tasks.
 */
import { workerData } from 'node:worker_threads';
import { register } from 'tsx/esm/api';

register();
await import(workerData.entry);
