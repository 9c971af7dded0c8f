/** Ports on loopback. */
import { createServer } from 'node:net';

/** Whether 127.0.0.1:port can be listened on now. */
export function isFree(port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen({ port, host: '127.0.0.1', exclusive: true }, () => {
      probe.close(() => resolve(true));
    });
  });
}

/** A port that the system gives; free at this moment. */
function anyPort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen({ port: 0, host: '127.0.0.1' }, () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });
}

/** The preferred port if it is free, else any free one. */
export async function freePort(preferred) {
  return preferred !== undefined && (await isFree(preferred)) ? preferred : anyPort();
}

/** The first free port from `first` on; any free one when the next fifty are taken. */
export async function freePortFrom(first) {
  for (let port = first; port < first + 50; port += 1) {
    if (await isFree(port)) return port;
  }
  return anyPort();
}
