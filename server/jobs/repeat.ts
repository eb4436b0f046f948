import type { ListenerLog } from './listener.ts';

export interface Repeated {
  /** No more turns; answers when the one that runs has ended. */
  stop(): Promise<void>;
}

/** Does something at once and then again and again, never two at a time. A turn that fails is logged and the next one tries anew. */
export function repeat(options: {
  everyMs: number;
  what: string;
  work: () => Promise<void>;
  log: ListenerLog;
}): Repeated {
  let timer: NodeJS.Timeout | null = null;
  let stopped = false;

  async function turn(): Promise<void> {
    try {
      await options.work();
    } catch (error) {
      options.log.error({ error }, `${options.what} failed`);
    }
    if (!stopped) {
      timer = setTimeout(() => {
        running = turn();
      }, options.everyMs);
    }
  }

  let running = turn();
  return {
    async stop() {
      stopped = true;
      if (timer !== null) clearTimeout(timer);
      await running;
    },
  };
}
