import { setTimeout as sleep } from 'node:timers/promises';

/** Looks again until the answer is there (not null, not undefined, not false); fails after `withinMs`. */
export async function eventually<T>(
  what: string,
  look: () => Promise<T | null | undefined | false>,
  withinMs = 25_000,
): Promise<T> {
  const end = performance.now() + withinMs;
  while (performance.now() < end) {
    const answer = await look();
    if (answer !== null && answer !== undefined && answer !== false) return answer;
    await sleep(20);
  }
  throw new Error(`${what}: not within ${withinMs} ms`);
}
