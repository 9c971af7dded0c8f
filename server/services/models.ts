/** Models and their drafts. */
import { QueryTypes } from 'sequelize';
import { LARGEST_SOURCE, type Draft, type Model } from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import { Fault, notFound } from '../fault.ts';
import { may } from '../policies/policy.ts';
import { accessModel, accessNotebook } from './access.ts';
import { describeDraft } from './describe.ts';
import { recordEvent, summarizeModels } from './groups.ts';

/** zod counts characters; the limit is in bytes. */
export function requireSize(source: string): void {
  if (Buffer.byteLength(source, 'utf8') > LARGEST_SOURCE) {
    throw new Fault('payload-too-large', 'A formulation has at most 64 KiB.');
  }
}

export async function createModel(
  database: Database,
  personId: string,
  notebookId: string,
  { title, source }: { title: string; source: string },
): Promise<string> {
  requireSize(source);
  const { notebook } = await accessNotebook(database, personId, notebookId, 'create a model');
  return database.sequelize.transaction(async (transaction) => {
    const model = await database.models.Model.create(
      { notebookId: notebook.id, title, createdById: personId },
      { transaction },
    );
    await database.models.Draft.create(
      { modelId: model.id, source, revision: 0, updatedById: personId },
      { transaction },
    );
    await recordEvent(
      database,
      {
        groupId: notebook.groupId,
        personId,
        kind: 'model-created',
        modelId: model.id,
        title,
        versionNumber: null,
      },
      transaction,
    );
    return model.id;
  });
}

export async function readModel(
  database: Database,
  personId: string,
  modelId: string,
): Promise<Model> {
  const { model, role } = await accessModel(database, personId, modelId, 'read the group');
  const [summary] = await summarizeModels(database, [model]);
  if (!summary) throw notFound();
  return {
    ...summary,
    role,
    mayEdit: may(role, 'save a draft'),
    versionCount: await database.models.Version.count({ where: { modelId: model.id } }),
  };
}

export async function renameModel(
  database: Database,
  personId: string,
  modelId: string,
  title: string,
): Promise<Model> {
  const { model } = await accessModel(database, personId, modelId, 'change a model');
  await model.update({ title });
  return readModel(database, personId, modelId);
}

async function currentDraft(database: Database, modelId: string): Promise<Draft> {
  const draft = await database.models.Draft.findByPk(modelId, { include: 'updatedBy' });
  if (!draft) throw notFound();
  return describeDraft(draft);
}

export async function readDraft(
  database: Database,
  personId: string,
  modelId: string,
): Promise<Draft> {
  const { model } = await accessModel(database, personId, modelId, 'read the group');
  return currentDraft(database, model.id);
}

/**
 * Saves a text that builds on a revision. Where another one was saved meanwhile, this text is kept
 * beside it and a `draft-conflict` shows the current one.
 */
export async function saveDraft(
  database: Database,
  personId: string,
  modelId: string,
  { source, basedOn }: { source: string; basedOn: number },
): Promise<Draft> {
  requireSize(source);
  const { model } = await accessModel(database, personId, modelId, 'save a draft');
  const saved = await database.sequelize.transaction(async (transaction) => {
    const rows = await database.sequelize.query<{ revision: number }>(
      `UPDATE drafts SET source = :source, revision = revision + 1, updated_by_id = :personId,
              updated_at = now()
       WHERE model_id = :modelId AND revision = :basedOn RETURNING revision`,
      {
        replacements: { source, personId, modelId: model.id, basedOn },
        type: QueryTypes.SELECT,
        transaction,
      },
    );
    if (rows.length === 0) return false;
    await database.sequelize.query('UPDATE models SET updated_at = now() WHERE id = :id', {
      replacements: { id: model.id },
      transaction,
    });
    return true;
  });
  const current = await currentDraft(database, model.id);
  if (saved) return current;
  // A save whose answer was lost is sent again: the same text on the same revision is no conflict.
  if (current.source === source && current.updatedBy.id === personId) return current;
  await database.models.KeptText.create({ modelId: model.id, personId, source, basedOn });
  throw new Fault(
    'draft-conflict',
    `${current.updatedBy.name} saved another text meanwhile. Yours is kept; choose between the two or put them together.`,
    { current },
  );
}
