/** The queue of derivations in Redis. */
import { Queue, type ConnectionOptions } from 'bullmq';
import { Redis } from 'ioredis';
import type { Config } from '../config.ts';

/** A job names what is to be derived; everything else is read from the database. */
export interface DerivationJob {
  readonly derivationId: string;
  readonly round: number;
}

/** A connection as BullMQ wants it: commands wait for Redis to come back. */
export function connectRedis(url: string): Redis {
  return new Redis(url, { maxRetriesPerRequest: null });
}

/** The same round of the same derivation is one job, however often it is put in. */
export function jobIdOf({ derivationId, round }: DerivationJob): string {
  return `${derivationId}-${round}`;
}

export function openDerivationQueue(
  config: Pick<Config, 'QUEUE_NAME'>,
  connection: Redis,
): Queue<DerivationJob> {
  return new Queue<DerivationJob>(config.QUEUE_NAME, {
    connection: connection as unknown as ConnectionOptions,
    defaultJobOptions: {
      attempts: 3,
      backoff: { type: 'exponential', delay: 500 },
      removeOnComplete: { age: 3600, count: 1000 },
      removeOnFail: { age: 86_400, count: 1000 },
    },
  });
}
