/** How a derivation stands is written with its announcement, in one transaction. */
import type { Database } from '../server/database.ts';
import type { DerivationRow } from '../server/models/derivation.ts';
import type { VersionRow } from '../server/models/version.ts';
import type { DerivationJob } from '../server/queue/derivationQueue.ts';
import { announce, isOpen, unsuccessful } from '../server/services/derivations.ts';
import { recordEvent } from '../server/services/groups.ts';
import type { RecordedEvent } from '../shared/contracts/models.ts';

export type Change = Partial<
  Pick<
    DerivationRow,
    | 'state'
    | 'progress'
    | 'stage'
    | 'fault'
    | 'result'
    | 'resultHash'
    | 'verification'
    | 'verificationStatus'
    | 'engine'
    | 'attempts'
  >
>;

/** A change, or how it follows from the row as it stands when it is written. */
type ChangeOf = Change | ((derivation: DerivationRow) => Change);

/**
 * Writes a change of a derivation of this round. False where the derivation has been settled or
 * put into the queue anew meanwhile: then nothing is written.
 */
export async function writeProgress(
  database: Database,
  version: VersionRow,
  { derivationId, round }: DerivationJob,
  changeOf: ChangeOf,
  event?: RecordedEvent['kind'],
): Promise<boolean> {
  return database.sequelize.transaction(async (transaction) => {
    const derivation = await database.models.Derivation.findByPk(derivationId, {
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!derivation || derivation.round !== round || !isOpen(derivation.state)) return false;
    const change = typeof changeOf === 'function' ? changeOf(derivation) : changeOf;
    await derivation.update(change, { transaction });
    await announce(database, derivation, version, transaction);
    if (event === undefined) return true;
    const model = await database.models.Model.findByPk(version.modelId, {
      include: 'notebook',
      transaction,
    });
    if (!model?.notebook) throw new Error(`version ${version.id} belongs to no notebook`);
    const record = {
      groupId: model.notebook.groupId,
      personId: null,
      kind: event,
      modelId: model.id,
      title: model.title,
      versionNumber: version.number,
    };
    await recordEvent(database, record, transaction);
    return true;
  });
}

/** Writes that a derivation has come to nothing, with the reason for the reader. */
export function writeFailure(
  database: Database,
  version: VersionRow,
  job: DerivationJob,
  fault: string,
): Promise<boolean> {
  return writeProgress(
    database,
    version,
    job,
    (derivation) => unsuccessful(derivation, 'failed', fault),
    'derivation-failed',
  );
}
