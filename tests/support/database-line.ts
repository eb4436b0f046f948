import net from 'node:net';

export interface DatabaseLine {
  /** The same database, reached over the line. */
  readonly databaseUrl: string;
  /** Cuts every connection and takes no new one: the database is away. */
  cut(): Promise<void>;
  mend(): Promise<void>;
  close(): Promise<void>;
}

/** A line between the application and its database that a test can cut and mend. */
export async function openDatabaseLine(databaseUrl: string): Promise<DatabaseLine> {
  const target = new URL(databaseUrl);
  const sockets = new Set<net.Socket>();
  let server = await listen(0);
  const port = portOf(server);

  function listen(at: number): Promise<net.Server> {
    const made = net.createServer((near) => {
      const far = net.connect(Number(target.port), target.hostname);
      for (const socket of [near, far]) {
        sockets.add(socket);
        socket.on('error', () => undefined);
        socket.on('close', () => sockets.delete(socket));
      }
      near.pipe(far).pipe(near);
    });
    return new Promise((resolve, reject) => {
      made.once('error', reject);
      made.listen(at, '127.0.0.1', () => resolve(made));
    });
  }

  async function cut(): Promise<void> {
    const closed = new Promise<void>((resolve) => server.close(() => resolve()));
    for (const socket of sockets) socket.destroy();
    await closed;
  }

  const url = new URL(databaseUrl);
  url.hostname = '127.0.0.1';
  url.port = String(port);
  return {
    databaseUrl: url.href,
    cut,
    async mend() {
      server = await listen(port);
    },
    close: cut,
  };
}

function portOf(server: net.Server): number {
  const address = server.address();
  return typeof address === 'object' && address !== null ? address.port : 0;
}
