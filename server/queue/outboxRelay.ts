/**
 * Takes what stands in the outbox to the queue. A row is marked only after Redis has the job, so a
 * crash in between sends it twice, which the job's id makes harmless.
 */
import type { Queue } from 'bullmq';
import { QueryTypes } from 'sequelize';
import type { Database } from '../database.ts';
import type { Logger } from '../log.ts';
import { jobIdOf, type DerivationJob } from './derivationQueue.ts';
import { listen } from './listener.ts';

const AT_ONCE = 50;
/** Notifications wake the relay; this is for one that was missed. */
const LOOK_EVERY_MS = 2_000;

export interface OutboxRelay {
  close(): Promise<void>;
}

/** Sends one batch; the number of rows sent. */
export async function relayOutbox(
  { sequelize }: Database,
  queue: Queue<DerivationJob>,
): Promise<number> {
  return sequelize.transaction(async (transaction) => {
    const rows = await sequelize.query<{ id: string; derivation_id: string; round: number }>(
      `SELECT id, derivation_id, round FROM outbox WHERE dispatched_at IS NULL
       ORDER BY id LIMIT ${AT_ONCE} FOR UPDATE SKIP LOCKED`,
      { type: QueryTypes.SELECT, transaction },
    );
    for (const row of rows) {
      const job = { derivationId: row.derivation_id, round: row.round };
      await queue.add('derive', job, { jobId: jobIdOf(job) });
    }
    if (rows.length > 0) {
      await sequelize.query('UPDATE outbox SET dispatched_at = now() WHERE id IN (:ids)', {
        replacements: { ids: rows.map(({ id }) => id) },
        transaction,
      });
    }
    return rows.length;
  });
}

export async function openOutboxRelay(
  database: Database,
  url: string,
  queue: Queue<DerivationJob>,
  log: Logger,
): Promise<OutboxRelay> {
  let work: Promise<void> = Promise.resolve();
  const send = async (): Promise<void> => {
    try {
      while ((await relayOutbox(database, queue)) === AT_ONCE);
    } catch (error) {
      log.warn({ err: error }, 'the outbox could not be sent, trying again');
    }
  };
  const wake = (): void => {
    work = work.then(send);
  };
  const listener = await listen(url, 'outbox', { heard: wake, reconnected: wake }, log);
  const timer = setInterval(wake, LOOK_EVERY_MS);
  wake();
  return {
    async close() {
      clearInterval(timer);
      await listener.close();
      await work;
    },
  };
}
