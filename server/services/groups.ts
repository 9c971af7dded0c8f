/** Groups, notebooks, the desk. */
import { Op, QueryTypes, type Transaction } from 'sequelize';
import type {
  Desk,
  Group,
  ModelSummary,
  Notebook,
  NotebookSummary,
  RecordedEvent,
} from '../../shared/contracts/models.ts';
import type { Database } from '../database.ts';
import type { EventRow } from '../models/event.ts';
import type { ModelRow } from '../models/model.ts';
import { accessGroup, accessNotebook, type GroupAccess } from './access.ts';
import { describePerson, describeVersion } from './describe.ts';

const EVENTS_SHOWN = 30;
const RECENT_MODELS = 12;

/** Writes into the record of a group. */
export async function recordEvent(
  { models }: Database,
  event: Pick<EventRow, 'groupId' | 'personId' | 'kind' | 'modelId' | 'title' | 'versionNumber'>,
  transaction?: Transaction,
): Promise<void> {
  await models.Event.create(event, { transaction: transaction ?? null });
}

function describeEvent(event: EventRow): RecordedEvent {
  return {
    id: event.id,
    at: event.at.toISOString(),
    person: event.person ? describePerson(event.person) : null,
    kind: event.kind,
    modelId: event.modelId,
    title: event.title,
    versionNumber: event.versionNumber,
  };
}

/** The latest events of groups, before the event of the given id where there is one. */
export async function eventsOf(
  { models }: Database,
  groupIds: readonly string[],
  before?: string,
): Promise<RecordedEvent[]> {
  const rows = await models.Event.findAll({
    where: { groupId: [...groupIds], ...(before ? { id: { [Op.lt]: before } } : {}) },
    include: 'person',
    order: [['id', 'DESC']],
    limit: EVENTS_SHOWN,
  });
  return rows.map(describeEvent);
}

/** The record of a group, the latest first, page by page. */
export async function listEvents(
  database: Database,
  personId: string,
  groupId: string,
  before: string | undefined,
): Promise<RecordedEvent[]> {
  const { group } = await accessGroup(database, personId, groupId, 'read the group');
  return eventsOf(database, [group.id], before);
}

async function notebookSummaries(
  { sequelize }: Database,
  groupIds: readonly string[],
): Promise<Map<string, NotebookSummary[]>> {
  const result = new Map<string, NotebookSummary[]>(groupIds.map((id) => [id, []]));
  if (groupIds.length === 0) return result;
  const rows = await sequelize.query<{
    id: string;
    group_id: string;
    title: string;
    introduction: string;
    updated_at: Date;
    model_count: string;
  }>(
    `SELECT n.id, n.group_id, n.title, n.introduction,
            greatest(n.updated_at, max(m.updated_at)) AS updated_at, count(m.id) AS model_count
     FROM notebooks n LEFT JOIN models m ON m.notebook_id = n.id
     WHERE n.group_id IN (:groupIds) GROUP BY n.id ORDER BY n.title, n.id`,
    { replacements: { groupIds: [...groupIds] }, type: QueryTypes.SELECT },
  );
  for (const row of rows) {
    result.get(row.group_id)?.push({
      id: row.id,
      title: row.title,
      introduction: row.introduction,
      modelCount: Number(row.model_count),
      updatedAt: row.updated_at.toISOString(),
    });
  }
  return result;
}

/** Models with their latest version; `model.notebook.group` must be loaded. */
export async function summarizeModels(
  { models, sequelize }: Database,
  rows: readonly ModelRow[],
): Promise<ModelSummary[]> {
  if (rows.length === 0) return [];
  const latest = await sequelize.query<{ id: string }>(
    `SELECT DISTINCT ON (model_id) id FROM versions WHERE model_id IN (:ids)
     ORDER BY model_id, number DESC`,
    { replacements: { ids: rows.map(({ id }) => id) }, type: QueryTypes.SELECT },
  );
  const versions = await models.Version.findAll({
    where: { id: latest.map(({ id }) => id) },
    attributes: { exclude: ['source', 'normalizedSource'] },
    include: [
      'frozenBy',
      { association: 'derivation', attributes: { exclude: ['result', 'verification'] } },
    ],
  });
  const byModel = new Map(versions.map((version) => [version.modelId, version]));
  return rows.map((model) => {
    const version = byModel.get(model.id);
    return {
      id: model.id,
      title: model.title,
      updatedAt: model.updatedAt.toISOString(),
      latestVersion: version ? describeVersion(version) : null,
      notebook: { id: model.notebookId, title: model.notebook?.title ?? '' },
      group: {
        id: model.notebook?.groupId ?? '',
        name: model.notebook?.group?.name ?? '',
      },
    };
  });
}

export async function listGroups(
  { models }: Database,
  personId: string,
): Promise<{ id: string; name: string; role: GroupAccess['role'] }[]> {
  const memberships = await models.Membership.findAll({ where: { personId }, include: 'group' });
  return memberships
    .map(({ groupId, role, group }) => ({ id: groupId, name: group?.name ?? '', role }))
    .sort((a, b) => a.name.localeCompare(b.name, 'en') || a.id.localeCompare(b.id));
}

/** A new group, whose founder is its first editor. */
export async function createGroup(
  database: Database,
  personId: string,
  { name, about }: { name: string; about: string },
): Promise<string> {
  return database.sequelize.transaction(async (transaction) => {
    const group = await database.models.Group.create({ name, about }, { transaction });
    await database.models.Membership.create(
      { groupId: group.id, personId, role: 'editor' },
      { transaction },
    );
    await recordEvent(
      database,
      {
        groupId: group.id,
        personId,
        kind: 'group-created',
        modelId: null,
        title: name,
        versionNumber: null,
      },
      transaction,
    );
    return group.id;
  });
}

export async function readGroup(
  database: Database,
  personId: string,
  groupId: string,
): Promise<Group> {
  const { group, role } = await accessGroup(database, personId, groupId, 'read the group');
  const [notebooks, members, events] = await Promise.all([
    notebookSummaries(database, [group.id]),
    database.models.Membership.findAll({ where: { groupId: group.id }, include: 'person' }),
    eventsOf(database, [group.id]),
  ]);
  return {
    id: group.id,
    name: group.name,
    about: group.about,
    role,
    notebooks: notebooks.get(group.id) ?? [],
    people: members
      .map((member) => ({ ...describePerson(member.person), role: member.role }))
      .sort((a, b) => a.name.localeCompare(b.name, 'en')),
    events,
  };
}

export async function createNotebook(
  database: Database,
  personId: string,
  groupId: string,
  { title, introduction }: { title: string; introduction: string },
): Promise<string> {
  const { group } = await accessGroup(database, personId, groupId, 'create a notebook');
  return database.sequelize.transaction(async (transaction) => {
    const notebook = await database.models.Notebook.create(
      { groupId: group.id, title, introduction },
      { transaction },
    );
    await recordEvent(
      database,
      {
        groupId: group.id,
        personId,
        kind: 'notebook-created',
        modelId: null,
        title,
        versionNumber: null,
      },
      transaction,
    );
    return notebook.id;
  });
}

export async function readNotebook(
  database: Database,
  personId: string,
  notebookId: string,
): Promise<Notebook> {
  const { notebook, group, role } = await accessNotebook(
    database,
    personId,
    notebookId,
    'read the group',
  );
  const rows = await database.models.Model.findAll({
    where: { notebookId: notebook.id },
    include: { association: 'notebook', include: [{ association: 'group' }] },
    order: [
      ['updatedAt', 'DESC'],
      ['id', 'ASC'],
    ],
  });
  return {
    id: notebook.id,
    title: notebook.title,
    introduction: notebook.introduction,
    modelCount: rows.length,
    updatedAt: notebook.updatedAt.toISOString(),
    group: { id: group.id, name: group.name },
    role,
    models: await summarizeModels(database, rows),
  };
}

export async function updateNotebook(
  database: Database,
  personId: string,
  notebookId: string,
  change: { title?: string | undefined; introduction?: string | undefined },
): Promise<Notebook> {
  const { notebook } = await accessNotebook(database, personId, notebookId, 'change a notebook');
  await notebook.update({
    title: change.title ?? notebook.title,
    introduction: change.introduction ?? notebook.introduction,
  });
  return readNotebook(database, personId, notebookId);
}

export async function readDesk(database: Database, personId: string): Promise<Desk> {
  const groups = await listGroups(database, personId);
  const groupIds = groups.map(({ id }) => id);
  const recent = await database.models.Model.findAll({
    include: {
      association: 'notebook',
      required: true,
      where: { groupId: groupIds },
      include: [{ association: 'group' }],
    },
    order: [
      ['updatedAt', 'DESC'],
      ['id', 'ASC'],
    ],
    limit: RECENT_MODELS,
  });
  const unsettled = await database.models.Version.findAll({
    where: { frozenById: personId },
    attributes: { exclude: ['source', 'normalizedSource'] },
    include: [
      'frozenBy',
      {
        association: 'model',
        required: true,
        // Somebody who has left a group sees nothing of it, not even what he did there.
        include: [{ association: 'notebook', required: true, where: { groupId: groupIds } }],
      },
      {
        association: 'derivation',
        required: true,
        attributes: { exclude: ['result', 'verification'] },
        where: { state: ['queued', 'deriving', 'verifying', 'failed'] },
      },
    ],
    order: [['frozenAt', 'DESC']],
    limit: 20,
  });
  const notebooks = await notebookSummaries(database, groupIds);
  return {
    recentModels: await summarizeModels(database, recent),
    jobs: unsettled.map((version) => ({
      model: { id: version.modelId, title: version.model?.title ?? '' },
      version: describeVersion(version),
    })),
    events: groupIds.length === 0 ? [] : await eventsOf(database, groupIds),
    groups: groups.map((group) => ({ ...group, notebooks: notebooks.get(group.id) ?? [] })),
  };
}
