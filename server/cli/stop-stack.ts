/** What has been started, to be stopped in the opposite order. */
export interface StopStack {
  push(what: string, stop: () => Promise<void> | void): void;
  /** Stops everything, once; what cannot be stopped is said and does not keep the rest from being stopped. */
  stopAll(): Promise<void>;
}

export function makeStopStack(say: (words: string) => void): StopStack {
  const started: { what: string; stop: () => Promise<void> | void }[] = [];
  return {
    push: (what, stop) => {
      started.push({ what, stop });
    },
    stopAll: async () => {
      for (let last = started.pop(); last !== undefined; last = started.pop()) {
        try {
          await last.stop();
        } catch (error) {
          say(`${last.what} did not stop as it should: ${error instanceof Error ? error.message : String(error)}`);
        }
      }
    },
  };
}
