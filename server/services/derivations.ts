/** Derivations on their way: into the outbox, and news of them to whoever listens. */
import type { Transaction } from 'sequelize';
import type { Database } from '../database.ts';
import type { DerivationRow } from '../models/derivation.ts';
import type { DerivationState } from '../../shared/contracts/models.ts';
import { describeProgress } from './describe.ts';

const OPEN: readonly DerivationState[] = ['queued', 'deriving', 'verifying'];

/** Whether the derivation waits or runs. */
export function isOpen(state: DerivationState): boolean {
  return OPEN.includes(state);
}

/**
 * How a derivation stands after it came to nothing. Where a result stands already, it was derived
 * again only to compare: the version stays complete, and the fault tells what became of that.
 */
export function unsuccessful(
  derivation: Pick<DerivationRow, 'resultHash' | 'progress' | 'stage'>,
  state: 'failed' | 'cancelled',
  fault: string | null,
): Pick<DerivationRow, 'state' | 'progress' | 'stage' | 'fault'> {
  if (derivation.resultHash !== null) {
    const stage = `complete; deriving again ${state === 'failed' ? 'failed' : 'was cancelled'}`;
    return { state: 'complete', progress: 1, stage, fault };
  }
  const stage = state === 'cancelled' ? 'cancelled' : derivation.stage;
  return { state, progress: derivation.progress, stage, fault };
}

/** The intent to derive, written with whatever gave rise to it; a relay takes it to the queue. */
export async function putIntoOutbox(
  { sequelize }: Database,
  derivation: Pick<DerivationRow, 'id' | 'round'>,
  transaction: Transaction,
): Promise<void> {
  await sequelize.query('INSERT INTO outbox (derivation_id, round) VALUES (:id, :round)', {
    replacements: { id: derivation.id, round: derivation.round },
    transaction,
  });
  await sequelize.query(`NOTIFY outbox`, { transaction });
}

/** An event for the browsers that watch the model; PostgreSQL tells the servers at the commit. */
export async function announce(
  { sequelize }: Database,
  derivation: DerivationRow,
  version: { id: string; modelId: string; number: number },
  transaction: Transaction,
): Promise<void> {
  await sequelize.query(
    `INSERT INTO derivation_events (model_id, version_id, version_number, derivation)
     VALUES (:modelId, :versionId, :number, :derivation::jsonb)`,
    {
      replacements: {
        modelId: version.modelId,
        versionId: version.id,
        number: version.number,
        derivation: JSON.stringify(describeProgress(derivation)),
      },
      transaction,
    },
  );
}
