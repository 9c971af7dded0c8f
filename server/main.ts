/** The server process. */
import { createServer, type Server } from 'node:http';
import { join } from 'node:path';
import process from 'node:process';
import type { RequestHandler } from 'express';
import { createApp } from './app.ts';
import { ConfigFault, readConfig } from './config.ts';
import { openDatabase } from './database.ts';
import { createLog } from './log.ts';
import { createMailer } from './mail/mailer.ts';
import { openSessionStore } from './middleware/sessions.ts';
import { openDerivationHub } from './queue/derivationHub.ts';
import { connectRedis, openDerivationQueue } from './queue/derivationQueue.ts';
import { openOutboxRelay } from './queue/outboxRelay.ts';

/** Requests under way may finish for so long when the process is told to end. */
const GRACE_MS = 5_000;

async function main(): Promise<void> {
  const config = readConfig();
  const log = createLog(config, 'server');
  const database = openDatabase(config.DATABASE_URL);
  await database.sequelize.authenticate();
  const redis = connectRedis(config.REDIS_URL);
  redis.on('error', (error) => {
    log.warn({ err: error }, 'Redis does not answer');
  });
  const queue = openDerivationQueue(config, redis);
  const relay = await openOutboxRelay(database, config.DATABASE_URL, queue, log);
  const hub = await openDerivationHub(database, config.DATABASE_URL, log);
  const mailer = createMailer(config, log);
  const sessions = openSessionStore(config.DATABASE_URL, log);
  const server = createServer();
  const development = process.argv.includes('--dev') ? await hotReload(server) : undefined;
  const app = createApp(config, {
    database,
    redis,
    queue,
    sessionStore: sessions.store,
    mailer,
    hub,
    log,
    clientFolder: join(process.cwd(), 'dist', 'client'),
    development,
  });
  server.on('request', app);
  server.on('error', (error) => {
    log.fatal({ err: error }, 'the server cannot listen');
    process.exit(1);
  });
  server.listen(config.PORT, config.HOST, () => {
    log.info({ url: config.publicUrl }, 'listening');
  });

  let isEnding = false;
  const end = async (): Promise<void> => {
    if (isEnding) return;
    isEnding = true;
    log.info('ending');
    const closed = new Promise((resolve) => server.close(resolve));
    // Event streams never end by themselves; browsers come back to whoever serves next.
    await hub.close();
    server.closeIdleConnections();
    const timer = setTimeout(() => {
      server.closeAllConnections();
    }, GRACE_MS);
    await closed;
    clearTimeout(timer);
    await Promise.allSettled([relay.close(), mailer.close(), sessions.close()]);
    await Promise.allSettled([queue.close(), database.close()]);
    redis.disconnect();
    process.exit(0);
  };
  process.on('SIGTERM', () => void end());
  process.on('SIGINT', () => void end());
}

/** Vite as a middleware: pages come from the sources and change as these change. */
async function hotReload(server: Server): Promise<RequestHandler> {
  const { createServer: createVite } = await import('vite');
  const vite = await createVite({
    server: { middlewareMode: true, hmr: { server } },
    appType: 'spa',
  });
  return vite.middlewares;
}

main().catch((error: unknown) => {
  console.error(error instanceof ConfigFault ? error.message : error);
  process.exit(1);
});
