/** Ports of this machine that nobody uses. */
import { createServer } from 'node:net';

/** So many free ports of the loopback address, all different. */
export async function freePorts(count: number): Promise<number[]> {
  const servers = await Promise.all(Array.from({ length: count }, () => listen()));
  const ports = servers.map(({ port }) => port);
  await Promise.all(servers.map(({ close }) => close()));
  return ports;
}

function listen(): Promise<{ port: number; close: () => Promise<void> }> {
  const server = createServer();
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      const port = typeof address === 'object' && address ? address.port : 0;
      resolve({ port, close: () => new Promise((done) => server.close(() => done())) });
    });
  });
}
