/** Freezing a draft, reading versions, and what a person may do to their derivation. */
import { createHash } from 'node:crypto';
import { Op, type Transaction } from 'sequelize';
import { derivationSchema, verificationSchema } from '../../shared/contracts/derivation.ts';
import type { Version, VersionSummary } from '../../shared/contracts/models.ts';
import { analyse, type Formulation } from '../../shared/language/index.ts';
import type { Database } from '../database.ts';
import { Fault, notFound } from '../fault.ts';
import type { DerivationRow } from '../models/derivation.ts';
import type { VersionRow } from '../models/version.ts';
import { accessModel } from './access.ts';
import { announce, isOpen, putIntoOutbox, unsuccessful } from './derivations.ts';
import { describeVersion } from './describe.ts';
import { recordEvent } from './groups.ts';

const VERSIONS_SHOWN = 200;

export function hashOf(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex');
}

/**
 * Freezes the draft as the next version: version, intent to derive and record in one transaction.
 * Throws `draft-conflict` where the draft has moved on, `formulation-at-fault` with the diagnostics
 * where the text has faults.
 */
export async function freeze(
  database: Database,
  personId: string,
  modelId: string,
  { revision, note }: { revision: number; note: string },
): Promise<VersionSummary> {
  const { model, group } = await accessModel(database, personId, modelId, 'freeze a version');
  const { formulation } = await soundDraft(database, model.id, revision);
  const hash = hashOf(formulation.normalizedSource);
  const number = await database.sequelize.transaction(async (transaction) => {
    const draft = await database.models.Draft.findByPk(model.id, {
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    // The text was studied before the lock was taken, and may have been saved again since.
    if (draft?.revision !== revision) throw movedOn();
    const last = await database.models.Version.findOne({
      where: { modelId: model.id },
      attributes: ['number', 'hash'],
      order: [['number', 'DESC']],
      transaction,
    });
    if (last?.hash === hash) {
      throw new Fault(
        'conflict',
        `This text stands already as version ${last.number}. Change it before it is frozen again.`,
      );
    }
    const version = await database.models.Version.create(
      {
        modelId: model.id,
        number: (last?.number ?? 0) + 1,
        source: draft.source,
        normalizedSource: formulation.normalizedSource,
        hash,
        note,
        frozenById: personId,
      },
      { transaction },
    );
    const derivation = await database.models.Derivation.create(
      { versionId: version.id },
      { transaction },
    );
    await putIntoOutbox(database, derivation, transaction);
    await announce(database, derivation, version, transaction);
    await recordEvent(
      database,
      {
        groupId: group.id,
        personId,
        kind: 'version-frozen',
        modelId: model.id,
        title: model.title,
        versionNumber: version.number,
      },
      transaction,
    );
    await model.update({ updatedAt: new Date() }, { transaction });
    return version.number;
  });
  return describeVersion(await findVersion(database, model.id, number));
}

function movedOn(): Fault {
  return new Fault(
    'conflict',
    'The draft has been saved again since you looked. Read it once more, then freeze it.',
  );
}

/** The draft of this revision, read and found to be without faults. */
async function soundDraft(
  { models }: Database,
  modelId: string,
  revision: number,
): Promise<{ formulation: Formulation }> {
  const draft = await models.Draft.findByPk(modelId);
  if (!draft) throw notFound();
  if (draft.revision !== revision) throw movedOn();
  const { formulation, diagnostics } = analyse(draft.source);
  if (!formulation) {
    throw new Fault(
      'formulation-at-fault',
      'Mend the faults that are marked in the formulation; a version must be sound.',
      { diagnostics },
    );
  }
  return { formulation };
}

async function findVersion(
  { models }: Database,
  modelId: string,
  number: number,
  transaction?: Transaction,
): Promise<VersionRow & { derivation: DerivationRow }> {
  const version = Number.isSafeInteger(number)
    ? await models.Version.findOne({
        where: { modelId, number },
        include: ['frozenBy', 'derivation'],
        transaction: transaction ?? null,
      })
    : null;
  if (!version?.derivation) throw notFound();
  return version as VersionRow & { derivation: DerivationRow };
}

/** The versions of a model, the latest first; before a number, for the next page. */
export async function listVersions(
  database: Database,
  personId: string,
  modelId: string,
  before?: number,
): Promise<VersionSummary[]> {
  const { model } = await accessModel(database, personId, modelId, 'read the group');
  const versions = await database.models.Version.findAll({
    where: {
      modelId: model.id,
      ...(before === undefined ? {} : { number: { [Op.lt]: before } }),
    },
    attributes: { exclude: ['source', 'normalizedSource'] },
    include: [
      'frozenBy',
      { association: 'derivation', attributes: { exclude: ['result', 'verification'] } },
    ],
    order: [['number', 'DESC']],
    limit: VERSIONS_SHOWN,
  });
  return versions.map(describeVersion);
}

export async function readVersion(
  database: Database,
  personId: string,
  modelId: string,
  number: number,
): Promise<Version> {
  const { model } = await accessModel(database, personId, modelId, 'read the group');
  const version = await findVersion(database, model.id, number);
  const { result, verification } = version.derivation;
  return {
    ...describeVersion(version),
    source: version.source,
    result: result === null ? null : derivationSchema.parse(JSON.parse(result)),
    verification: verification === null ? null : verificationSchema.parse(JSON.parse(verification)),
  };
}

/** Asks for the end of a derivation that waits or runs; one that waits ends at once. */
export async function cancelDerivation(
  database: Database,
  personId: string,
  modelId: string,
  number: number,
): Promise<VersionSummary> {
  const { model, group } = await accessModel(database, personId, modelId, 'control a derivation');
  await database.sequelize.transaction(async (transaction) => {
    const version = await findVersion(database, model.id, number, transaction);
    const derivation = await database.models.Derivation.findByPk(version.derivation.id, {
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!derivation) throw notFound();
    if (derivation.state === 'queued') {
      await derivation.update(
        { ...unsuccessful(derivation, 'cancelled', null), cancelRequested: true },
        { transaction },
      );
      await announce(database, derivation, version, transaction);
      await recordEvent(
        database,
        {
          groupId: group.id,
          personId,
          kind: 'derivation-cancelled',
          modelId: model.id,
          title: model.title,
          versionNumber: version.number,
        },
        transaction,
      );
    } else if (isOpen(derivation.state)) {
      await derivation.update({ cancelRequested: true }, { transaction });
    }
  });
  return describeVersion(await findVersion(database, model.id, number));
}

/** Puts a derivation into the queue again. A result that stands is derived anew and compared. */
export async function deriveAgain(
  database: Database,
  personId: string,
  modelId: string,
  number: number,
): Promise<VersionSummary> {
  const { model } = await accessModel(database, personId, modelId, 'control a derivation');
  await database.sequelize.transaction(async (transaction) => {
    const version = await findVersion(database, model.id, number, transaction);
    const derivation = await database.models.Derivation.findByPk(version.derivation.id, {
      transaction,
      lock: transaction.LOCK.UPDATE,
    });
    if (!derivation) throw notFound();
    if (isOpen(derivation.state)) return;
    await derivation.update(
      {
        state: 'queued',
        progress: 0,
        stage: 'waiting for a worker',
        fault: null,
        cancelRequested: false,
        attempts: 0,
        round: derivation.round + 1,
      },
      { transaction },
    );
    await putIntoOutbox(database, derivation, transaction);
    await announce(database, derivation, version, transaction);
  });
  return describeVersion(await findVersion(database, model.id, number));
}
