/** A whole site for a test: its own database and queue, letters kept in memory, the application. */
import { randomBytes } from 'node:crypto';
import type { Express } from 'express';
import type { Redis } from 'ioredis';
import { createApp, type Dependencies } from '../../../server/app.ts';
import { readConfig, type Config } from '../../../server/config.ts';
import { openDatabase, type Database } from '../../../server/database.ts';
import { createLog } from '../../../server/log.ts';
import type { Letter } from '../../../server/mail/mailer.ts';
import { openSessionStore } from '../../../server/middleware/sessions.ts';
import { openDerivationHub } from '../../../server/queue/derivationHub.ts';
import { connectRedis, openDerivationQueue } from '../../../server/queue/derivationQueue.ts';
import { createTestDatabase, redisUrl } from './databases.ts';

export interface Site {
  readonly config: Config;
  /** The environment of a process that belongs to the site: a worker, say. */
  readonly environment: Readonly<Record<string, string>>;
  readonly database: Database;
  readonly redis: Redis;
  readonly queue: ReturnType<typeof openDerivationQueue>;
  readonly app: Express;
  /** What the application was made of, to make another one on the same data. */
  readonly dependencies: Dependencies;
  readonly letters: readonly Letter[];
  close(): Promise<void>;
}

/** Opens a site of its own. `settings` are added to its environment. */
export async function openSite(settings: Readonly<Record<string, string>> = {}): Promise<Site> {
  const own = await createTestDatabase();
  const environment = {
    NODE_ENV: 'test',
    DATABASE_URL: own.url,
    REDIS_URL: redisUrl(),
    QUEUE_NAME: `test-${randomBytes(6).toString('hex')}`,
    SESSION_SECRET: 'a secret of tests, long enough to pass',
    PUBLIC_URL: 'http://127.0.0.1:8460',
    SIGN_IN_ATTEMPTS: '1000',
    LOG_LEVEL: process.env['TEST_LOG_LEVEL'] ?? 'silent',
    ...settings,
  };
  const config = readConfig(environment);
  const log = createLog(config, 'test');
  const database = openDatabase(config.DATABASE_URL, 5);
  const redis = connectRedis(config.REDIS_URL);
  const queue = openDerivationQueue(config, redis);
  const hub = await openDerivationHub(database, config.DATABASE_URL, log);
  const letters: Letter[] = [];
  const mailer = {
    requireMail: () => undefined,
    post: (letter: Letter) => void letters.push(letter),
    close: async () => undefined,
  };
  const sessions = openSessionStore(config.DATABASE_URL, log);
  const sessionStore = sessions.store;
  // express-session listens to the store for every application that is made on it.
  sessionStore.setMaxListeners(50);
  const dependencies = { database, redis, queue, sessionStore, mailer, hub, log };
  const app = createApp(config, dependencies);
  return {
    config,
    environment,
    database,
    redis,
    queue,
    app,
    dependencies,
    letters,
    async close() {
      await hub.close();
      await sessions.close();
      await queue.close();
      const keys = await redis.keys(`*${config.QUEUE_NAME}:*`);
      if (keys.length > 0) await redis.del(...keys);
      await redis.quit();
      await database.close();
      await own.drop();
    },
  };
}
