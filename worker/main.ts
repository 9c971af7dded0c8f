/** The worker process: takes derivations from the queue. As many may run as there are cores. */
import process from 'node:process';
import { WaitingError, Worker, type ConnectionOptions } from 'bullmq';
import { ConfigFault, readConfig } from '../server/config.ts';
import { openDatabase } from '../server/database.ts';
import { createLog } from '../server/log.ts';
import {
  connectRedis,
  openDerivationQueue,
  type DerivationJob,
} from '../server/queue/derivationQueue.ts';
import { openOutboxRelay } from '../server/queue/outboxRelay.ts';
import { clearAway } from './clearAway.ts';
import { giveUp, processDerivation, WorkerEnds } from './processDerivation.ts';
import { sweepLost } from './sweepLost.ts';

const SWEEP_EVERY_MS = 15_000;
const CLEAR_EVERY_MS = 3_600_000;

async function main(): Promise<void> {
  const config = readConfig();
  const log = createLog(config, 'worker');
  const database = openDatabase(config.DATABASE_URL, config.WORKER_CONCURRENCY + 3);
  await database.sequelize.authenticate();
  const connection = connectRedis(config.REDIS_URL);
  const queueConnection = connectRedis(config.REDIS_URL);
  for (const redis of [connection, queueConnection]) {
    redis.on('error', (error) => {
      log.warn({ err: error }, 'Redis does not answer');
    });
  }
  const queue = openDerivationQueue(config, queueConnection);
  const relay = await openOutboxRelay(database, config.DATABASE_URL, queue, log);
  const shutdown = new AbortController();
  const limits = { seconds: config.DERIVATION_SECONDS, megabytes: config.DERIVATION_MEGABYTES };
  const worker = new Worker<DerivationJob>(
    config.QUEUE_NAME,
    async (job, token) => {
      log.info(job.data, 'derivation begins');
      try {
        await processDerivation(database, job.data, limits, log, shutdown.signal);
      } catch (error) {
        if (!(error instanceof WorkerEnds)) throw error;
        await job.moveToWait(token);
        throw new WaitingError();
      }
    },
    {
      connection: connection as unknown as ConnectionOptions,
      concurrency: config.WORKER_CONCURRENCY,
      // A worker that was killed is missed after this long; its jobs go to another one, and that
      // may happen as often as workers are killed.
      lockDuration: config.LOCK_MILLISECONDS,
      stalledInterval: config.LOCK_MILLISECONDS / 2,
      maxStalledCount: 100,
    },
  );
  worker.on('failed', (job, error) => {
    log.warn({ err: error, ...job?.data }, 'derivation failed');
    if (job && job.attemptsMade >= (job.opts.attempts ?? 1)) {
      giveUp(database, job.data, error.message).catch((fault: unknown) => {
        log.error({ err: fault }, 'the failure could not be written');
      });
    }
  });
  worker.on('error', (error) => {
    log.warn({ err: error }, 'the queue does not answer');
  });
  const sweeper = setInterval(() => {
    sweepLost(database, queue).then(
      (count) => {
        if (count > 0) log.warn({ count }, 'lost derivations were put in again');
      },
      (error: unknown) => {
        log.warn({ err: error }, 'lost derivations could not be looked for');
      },
    );
  }, SWEEP_EVERY_MS);
  const clearing = setInterval(() => {
    clearAway(database).catch((error: unknown) => {
      log.warn({ err: error }, 'old rows could not be cleared away');
    });
  }, CLEAR_EVERY_MS);
  log.info({ concurrency: config.WORKER_CONCURRENCY }, 'working');

  const end = (): void => {
    log.info('ending');
    clearInterval(sweeper);
    clearInterval(clearing);
    shutdown.abort();
    void Promise.allSettled([relay.close(), worker.close()])
      .then(() => Promise.allSettled([queue.close(), database.close()]))
      .then(() => process.exit(0));
  };
  process.once('SIGTERM', end);
  process.once('SIGINT', end);
}

main().catch((error: unknown) => {
  console.error(error instanceof ConfigFault ? error.message : error);
  process.exit(1);
});
