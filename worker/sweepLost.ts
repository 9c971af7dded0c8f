/** Finds derivations that nobody works on any more, and puts them into the outbox again. */
import type { Queue } from 'bullmq';
import { Op } from 'sequelize';
import type { Database } from '../server/database.ts';
import { jobIdOf, type DerivationJob } from '../server/queue/derivationQueue.ts';
import { putIntoOutbox } from '../server/services/derivations.ts';

/** A derivation that has not moved for so long is looked at. */
export const LOST_AFTER_MS = 30_000;

/**
 * Redis may have lost jobs, or given one up while the database did not answer. The number of
 * derivations put in again.
 */
export async function sweepLost(
  database: Database,
  queue: Queue<DerivationJob>,
  olderThanMs = LOST_AFTER_MS,
): Promise<number> {
  const { Derivation } = database.models;
  const suspects = await Derivation.findAll({
    where: {
      state: ['queued', 'deriving', 'verifying'],
      updatedAt: { [Op.lt]: new Date(Date.now() - olderThanMs) },
    },
    attributes: ['id', 'round'],
    limit: 100,
  });
  let count = 0;
  for (const { id, round } of suspects) {
    const job = await queue.getJob(jobIdOf({ derivationId: id, round }));
    const state = job ? await job.getState() : 'unknown';
    if (['active', 'waiting', 'delayed', 'prioritized', 'waiting-children'].includes(state))
      continue;
    await database.sequelize.transaction(async (transaction) => {
      const derivation = await Derivation.findByPk(id, {
        transaction,
        lock: transaction.LOCK.UPDATE,
      });
      if (!derivation || derivation.round !== round) return;
      await derivation.update({ state: 'queued', round: round + 1 }, { transaction });
      await putIntoOutbox(database, derivation, transaction);
      count++;
    });
  }
  return count;
}
