/** From an id in a request to the row, its group, and the role of who asks. */
import { z } from 'zod';
import type { Role } from '../../shared/contracts/people.ts';
import type { Database } from '../database.ts';
import { notFound } from '../fault.ts';
import type { ModelRow } from '../models/model.ts';
import type { GroupRow } from '../models/group.ts';
import type { NotebookRow } from '../models/notebook.ts';
import { requireRole, type Action } from '../policies/policy.ts';

const uuid = z.uuid();

/** An id that is none leads nowhere, like one that does not exist. */
function checked(id: string): string {
  if (!uuid.safeParse(id).success) throw notFound();
  return id;
}

export async function roleIn(
  { models }: Database,
  personId: string,
  groupId: string,
): Promise<Role | undefined> {
  const membership = await models.Membership.findOne({ where: { personId, groupId } });
  return membership?.role;
}

export interface GroupAccess {
  readonly group: GroupRow;
  readonly role: Role;
}

export async function accessGroup(
  database: Database,
  personId: string,
  groupId: string,
  action: Action,
): Promise<GroupAccess> {
  const group = await database.models.Group.findByPk(checked(groupId));
  const role = group ? await roleIn(database, personId, group.id) : undefined;
  const granted = requireRole(role, action);
  if (!group) throw notFound();
  return { group, role: granted };
}

export interface NotebookAccess extends GroupAccess {
  readonly notebook: NotebookRow;
}

export async function accessNotebook(
  database: Database,
  personId: string,
  notebookId: string,
  action: Action,
): Promise<NotebookAccess> {
  const notebook = await database.models.Notebook.findByPk(checked(notebookId), {
    include: 'group',
  });
  if (!notebook?.group) throw notFound();
  const role = requireRole(await roleIn(database, personId, notebook.groupId), action);
  return { notebook, group: notebook.group, role };
}

export interface ModelAccess extends NotebookAccess {
  readonly model: ModelRow;
}

export async function accessModel(
  database: Database,
  personId: string,
  modelId: string,
  action: Action,
): Promise<ModelAccess> {
  const model = await database.models.Model.findByPk(checked(modelId), {
    include: { association: 'notebook', include: [{ association: 'group' }] },
  });
  const { notebook } = model ?? {};
  const { group } = notebook ?? {};
  if (!model || !notebook || !group) throw notFound();
  const role = requireRole(await roleIn(database, personId, group.id), action);
  return { model, notebook, group, role };
}
