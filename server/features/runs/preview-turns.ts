import { AppError } from '../../http/app-error.ts';

/** At most so many previews at once, however many people drag; what comes beyond is told to come again. */
export function makePreviewTurns(most: number): <T>(work: () => Promise<T>) => Promise<T> {
  let running = 0;
  return async (work) => {
    if (running >= most)
      throw new AppError('unavailable', 'Too many previews are being computed. Try again in a moment.', [], {
        retryAfterS: 1,
      });
    running += 1;
    try {
      return await work();
    } finally {
      running -= 1;
    }
  };
}
