import net from 'node:net';

/**
 * True when nothing listens on this port of the address.
 * @throws the system's error when nobody could listen there: an address of another machine, a port that needs root
 */
export function portIsFree(port: number, address = '127.0.0.1'): Promise<boolean> {
  return new Promise((resolve, reject) => {
    const probe = net.createServer();
    probe.once('error', (error: NodeJS.ErrnoException) => {
      if (error.code === 'EADDRINUSE') resolve(false);
      else reject(error);
    });
    probe.listen({ port, host: address, exclusive: true }, () => probe.close(() => resolve(true)));
  });
}

/** A port of the loopback address that was free a moment ago: whoever takes it must be ready to ask for another. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = net.createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      probe.close(() => {
        if (address !== null && typeof address === 'object') resolve(address.port);
        else reject(new Error('The system gave no port.'));
      });
    });
  });
}

/** True when something on loopback takes a connection on this port. */
export function answersOn(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = net.connect({ port, host: '127.0.0.1' });
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });
}
