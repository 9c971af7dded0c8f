/** Derivations on their way: into the outbox, and news of them to whoever listens. */
import type { Transaction } from 'sequelize';
import type { Database } from '../database.ts';
import type { DerivationRow } from '../models/derivation.ts';
import { describeProgress } from './describe.ts';

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
