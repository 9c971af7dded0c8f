/** The server process. */
import { createServer } from 'node:http';
import { join } from 'node:path';
import process from 'node:process';
import type { RequestHandler } from 'express';
import { createApp } from './app.ts';
import { ConfigFault, readConfig } from './config.ts';
import { openDatabase } from './database.ts';
import { createLog } from './log.ts';
import { createMailer } from './mail/mailer.ts';
import { openDerivationHub } from './queue/derivationHub.ts';
import { connectRedis } from './queue/derivationQueue.ts';

async function main(): Promise<void> {
  const config = readConfig();
  const log = createLog(config, 'server');
  const database = openDatabase(config.DATABASE_URL);
  await database.sequelize.authenticate();
  const redis = connectRedis(config.REDIS_URL);
  redis.on('error', (error) => {
    log.warn({ err: error }, 'Redis does not answer');
  });
  const hub = await openDerivationHub(database, config.DATABASE_URL, log);
  const mailer = createMailer(config);
  const server = createServer();
  const development = process.argv.includes('--dev') ? await hotReload(server) : undefined;
  const clientFolder = join(process.cwd(), 'dist', 'client');
  server.on(
    'request',
    createApp(config, { database, redis, mailer, hub, log, clientFolder, development }),
  );
  server.listen(config.PORT, config.HOST, () => {
    log.info({ url: config.publicUrl }, 'listening');
  });
  server.on('error', (error) => {
    log.fatal({ err: error }, 'the server cannot listen');
    process.exit(1);
  });

  const end = (): void => {
    log.info('ending');
    // Event streams never end by themselves.
    server.closeAllConnections();
    server.close();
    void Promise.allSettled([hub.close(), redis.quit(), database.close()]).then(() => {
      mailer.close();
      process.exit(0);
    });
  };
  process.once('SIGTERM', end);
  process.once('SIGINT', end);
}

/** Vite as a middleware: pages come from the sources and change as these change. */
async function hotReload(server: import('node:http').Server): Promise<RequestHandler> {
  const { createServer: createVite } = await import('vite');
  const vite = await createVite({
    server: { middlewareMode: true, hmr: { server } },
    appType: 'spa',
  });
  return vite.middlewares as unknown as RequestHandler;
}

main().catch((error: unknown) => {
  console.error(error instanceof ConfigFault ? error.message : error);
  process.exit(1);
});
