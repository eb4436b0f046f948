import pg from 'pg';

export interface ListenerLog {
  error(fields: Record<string, unknown>, message: string): void;
}

const FIRST_WAIT_MS = 200;
const LONGEST_WAIT_MS = 10_000;

/**
 * Keeps one dedicated connection that listens on a channel, opened again with growing waits when it is cut.
 * Answers when it listens, or after the first try failed (it goes on trying).
 * @param options.onListening called each time the connection stands anew; what was told before it is lost
 */
export async function keepListening(options: {
  databaseUrl: string;
  channel: string;
  onMessage: (payload: string) => void;
  onListening: () => void;
  log: ListenerLog;
}): Promise<{ close(): Promise<void> }> {
  let client: pg.Client | null = null;
  let timer: NodeJS.Timeout | null = null;
  let waitMs = FIRST_WAIT_MS;

  function lost(which: pg.Client, error: unknown): void {
    if (client !== which) return;
    client = null;
    which.end().catch(() => undefined);
    options.log.error(
      { channel: options.channel, error: String(error), waitMs },
      'listening was cut off; trying again',
    );
    timer = setTimeout(() => void connect(), waitMs);
    waitMs = Math.min(waitMs * 2, LONGEST_WAIT_MS);
  }

  async function connect(): Promise<void> {
    const next = new pg.Client({ connectionString: options.databaseUrl, keepAlive: true });
    client = next;
    next.on('error', (error) => lost(next, error));
    next.on('end', () => lost(next, 'the connection ended'));
    next.on('notification', (message) => options.onMessage(message.payload ?? ''));
    try {
      await next.connect();
      await next.query(`listen ${pg.escapeIdentifier(options.channel)}`);
      waitMs = FIRST_WAIT_MS;
      options.onListening();
    } catch (error) {
      lost(next, error);
    }
  }

  await connect();
  return {
    async close() {
      if (timer !== null) clearTimeout(timer);
      const last = client;
      client = null;
      await last?.end();
    },
  };
}
