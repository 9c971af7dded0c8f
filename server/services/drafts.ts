/** Drafts: read, saved, and nothing that was typed is lost. */
import { Op, QueryTypes, type Transaction } from 'sequelize';
import type { Draft, KeptText, SaveDraft } from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import { Fault, notFound } from '../fault.ts';
import type { DraftRow } from '../models/draft.ts';
import { accessModel } from './access.ts';
import { describeDraft, describePerson } from './describe.ts';
import { requireSize } from './models.ts';

const KEPT_TEXTS_SHOWN = 50;

/** The draft of a model; with a lock nobody else saves it before the transaction ends. */
async function findDraft(
  { models }: Database,
  modelId: string,
  transaction?: Transaction,
): Promise<DraftRow> {
  const draft = await models.Draft.findByPk(modelId, {
    include: 'updatedBy',
    ...(transaction
      ? { transaction, lock: { level: transaction.LOCK.UPDATE, of: models.Draft } }
      : {}),
  });
  if (!draft) throw notFound();
  return draft;
}

export async function readDraft(
  database: Database,
  personId: string,
  modelId: string,
): Promise<Draft> {
  const { model } = await accessModel(database, personId, modelId, 'read the group');
  return describeDraft(await findDraft(database, model.id));
}

interface Text {
  readonly modelId: string;
  readonly personId: string;
  readonly source: string;
  readonly basedOn: number;
  /** Null for a text that lost a race. */
  readonly revision: number | null;
}

async function keep({ sequelize }: Database, text: Text, transaction: Transaction): Promise<void> {
  await sequelize.query(
    `INSERT INTO kept_texts (id, model_id, person_id, source, based_on, revision, created_at)
     VALUES (gen_random_uuid(), :modelId, :personId, :source, :basedOn, :revision, now())
     ON CONFLICT DO NOTHING`,
    { replacements: { ...text }, transaction },
  );
}

/**
 * Saves a text that builds on a revision. Where another one was saved meanwhile, this text is kept
 * beside it and a `draft-conflict` shows the current one.
 */
export async function saveDraft(
  database: Database,
  personId: string,
  modelId: string,
  { source, basedOn }: SaveDraft,
): Promise<Draft> {
  requireSize(source);
  const { model } = await accessModel(database, personId, modelId, 'save a draft');
  const hasLost = await database.sequelize.transaction(async (transaction) => {
    const draft = await findDraft(database, model.id, transaction);
    const text = { modelId: model.id, personId, source, basedOn };
    // A save whose answer was lost is sent again: the same text is no conflict.
    if (draft.source === source) return false;
    if (draft.revision !== basedOn) {
      await keep(database, { ...text, revision: null }, transaction);
      return true;
    }
    const revision = draft.revision + 1;
    await draft.update({ source, revision, updatedById: personId }, { transaction });
    await keep(database, { ...text, revision }, transaction);
    await database.sequelize.query('UPDATE models SET updated_at = now() WHERE id = :id', {
      replacements: { id: model.id },
      type: QueryTypes.UPDATE,
      transaction,
    });
    return false;
  });
  const current = describeDraft(await findDraft(database, model.id));
  if (!hasLost) return current;
  throw new Fault(
    'draft-conflict',
    `${current.updatedBy.name} saved another text meanwhile. Yours is kept; choose between the two or put them together.`,
    { current },
  );
}

/** What the draft has held and what lost a race, the latest first; before a time, for the next page. */
export async function listKeptTexts(
  database: Database,
  personId: string,
  modelId: string,
  before?: string,
): Promise<KeptText[]> {
  const { model } = await accessModel(database, personId, modelId, 'read the group');
  const rows = await database.models.KeptText.findAll({
    where: {
      modelId: model.id,
      ...(before === undefined ? {} : { createdAt: { [Op.lt]: new Date(before) } }),
    },
    include: 'person',
    order: [
      ['createdAt', 'DESC'],
      ['id', 'DESC'],
    ],
    limit: KEPT_TEXTS_SHOWN,
  });
  return rows.map((row) => ({
    id: row.id,
    source: row.source,
    revision: row.revision,
    basedOn: row.basedOn,
    keptAt: row.createdAt.toISOString(),
    person: describePerson(row.person),
  }));
}
