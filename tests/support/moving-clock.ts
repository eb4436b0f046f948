/** A clock that a test moves by hand, for what lasts minutes or days. */
export interface MovingClock {
  now(): Date;
  moveMs(by: number): void;
  /** Stands at a moment until the work is over, and then where it stood before. */
  at<T>(iso: string, work: () => Promise<T>): Promise<T>;
}

export const MINUTE_MS = 60_000;
export const DAY_MS = 24 * 60 * MINUTE_MS;

export function makeMovingClock(start = '2026-03-01T10:00:00Z'): MovingClock {
  let nowMs = Date.parse(start);
  return {
    now: () => new Date(nowMs),
    moveMs: (by) => {
      nowMs += by;
    },
    async at(iso, work) {
      const kept = nowMs;
      nowMs = Date.parse(iso);
      try {
        return await work();
      } finally {
        nowMs = kept;
      }
    },
  };
}
