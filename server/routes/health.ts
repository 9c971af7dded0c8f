/** Whether the process lives, and whether it can do its work. */
import { Router } from 'express';
import type { Queue } from 'bullmq';
import type { Redis } from 'ioredis';
import type { Database } from '../database.ts';
import type { DerivationJob } from '../queue/derivationQueue.ts';

export function healthRoutes(
  database: Database,
  redis: Redis,
  queue: Queue<DerivationJob>,
): Router {
  const router = Router();

  router.get('/healthz', (_request, response) => {
    response.json({ status: 'alive' });
  });

  router.get('/readyz', async (_request, response) => {
    const [databaseAnswers, redisAnswers, queueAnswers] = await Promise.all([
      answers(() => database.sequelize.query('SELECT 1 FROM people LIMIT 1')),
      answers(() => redis.ping()),
      answers(() => queue.getJobCounts('waiting', 'active')),
    ]);
    response
      .status(databaseAnswers && redisAnswers && queueAnswers ? 200 : 503)
      .json({ database: databaseAnswers, redis: redisAnswers, queue: queueAnswers });
  });

  return router;
}

const PATIENCE_MS = 2_000;

async function answers(ask: () => Promise<unknown>): Promise<boolean> {
  let timer: NodeJS.Timeout | undefined;
  const impatience = new Promise<false>((resolve) => {
    timer = setTimeout(() => {
      resolve(false);
    }, PATIENCE_MS);
  });
  try {
    return await Promise.race([ask().then(() => true), impatience]);
  } catch {
    return false;
  } finally {
    clearTimeout(timer);
  }
}
