import type { Response } from 'express';
import { AppError } from './app-error.ts';

/** Aborts when the client leaves before its answer is whole. */
export function abortWhenGone(response: Response): AbortController {
  const over = new AbortController();
  if (response.closed && !response.writableFinished) over.abort();
  response.once('close', () => {
    if (!response.writableFinished) over.abort();
  });
  return over;
}

/** Answers `unavailable` when the time is over; what the work still does after that is told to stop. */
export async function withinTime(
  work: () => Promise<void>,
  { seconds, over, response }: { seconds: number; over: AbortController; response: Response },
): Promise<void> {
  let timer: NodeJS.Timeout | undefined;
  const timeIsUp = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => {
      // An answer that is already on its way ends with its connection, which has a time limit of its own.
      if (response.headersSent) return;
      const message = `This took longer than ${seconds} s and was stopped. Try again.`;
      reject(new AppError('unavailable', message, [], { retryAfterS: 5 }));
      over.abort();
    }, seconds * 1000);
  });
  try {
    await Promise.race([work(), timeIsUp]);
  } finally {
    clearTimeout(timer);
  }
}
