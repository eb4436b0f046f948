import { parentPort } from 'node:worker_threads';
import type { Posted, Reply } from './thread-messages.ts';

/** Called once by the module that a thread loads: answers each task in turn; what is thrown goes back as an error. */
export function answerInThread<Task, Answer>(answer: (task: Task) => Answer): void {
  const port = parentPort;
  if (port === null) throw new Error('This module answers tasks of a pool and runs in its threads alone.');
  port.on('message', ({ id, task }: Posted<Task>) => port.postMessage(replyTo({ id, task }, answer)));
}

function replyTo<Task, Answer>({ id, task }: Posted<Task>, answer: (task: Task) => Answer): Reply<Answer> {
  try {
    return { id, ok: true, answer: answer(task) };
  } catch (error) {
    const { message, stack } = error instanceof Error ? error : { message: String(error), stack: undefined };
    return { id, ok: false, message, stack: stack ?? null };
  }
}
