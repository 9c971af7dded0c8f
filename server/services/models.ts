/** Models. */
import { LARGEST_SOURCE, type Model } from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import { Fault, notFound } from '../fault.ts';
import { may } from '../policies/policy.ts';
import { accessModel, accessNotebook } from './access.ts';
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
    await database.models.KeptText.create(
      { modelId: model.id, personId, source, basedOn: 0, revision: 0 },
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
