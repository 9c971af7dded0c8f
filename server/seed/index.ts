/** Sets up the demonstration, once. */
import type { Database } from '../database.ts';
import { hashPassword } from '../services/passwords.ts';
import { recordEvent } from '../services/groups.ts';
import { createModel } from '../services/models.ts';
import { freeze } from '../services/versions.ts';
import { DEMONSTRATION_MODELS } from './formulations.ts';
import { DEMONSTRATION_PASSWORD, DEMONSTRATION_PEOPLE } from './people.ts';

const GROUP = {
  name: 'Working Fluids, Hallowmere Works',
  about:
    'A demonstration. Hallowmere Works, its people, its fluid K-7 and every number about them are invented.',
};

const NOTEBOOK = {
  title: 'Working fluid K-7',
  introduction: `Which equation of state shall the K-7 loop be designed with?

This is a demonstration: K-7 is an invented fluid, and so are its parameters. The models here state $\\ln Q$ and let everything else follow, $p = k T\\,(\\partial \\ln Q/\\partial V)_{T,N}$ to begin with.

A released model is no substitute for the design codes and the licensed practice that apply where it is used.`,
};

/** True where it was set up now; a database that has people is left alone. */
export async function seed(database: Database): Promise<boolean> {
  const { models, sequelize } = database;
  if ((await models.Person.count()) > 0) return false;
  const passwordHash = await hashPassword(DEMONSTRATION_PASSWORD);
  const ids = await sequelize.transaction(async (transaction) => {
    const people = new Map<string, string>();
    const group = await models.Group.create(GROUP, { transaction });
    for (const one of DEMONSTRATION_PEOPLE) {
      const person = await models.Person.create(
        {
          name: one.name,
          email: one.email,
          emailConfirmedAt: new Date(),
          passwordHash,
          isSiteAdministrator: one.isSiteAdministrator ?? false,
        },
        { transaction },
      );
      people.set(one.login, person.id);
      await models.Identity.create(
        { provider: 'github', subject: one.subject, personId: person.id },
        { transaction },
      );
      if (one.role) {
        await models.Membership.create(
          { groupId: group.id, personId: person.id, role: one.role },
          { transaction },
        );
      }
    }
    const editor = people.get('varnholt') ?? '';
    const notebook = await models.Notebook.create(
      { groupId: group.id, ...NOTEBOOK },
      { transaction },
    );
    const founding = { groupId: group.id, personId: editor, modelId: null, versionNumber: null };
    await recordEvent(
      database,
      { ...founding, kind: 'group-created', title: group.name },
      transaction,
    );
    await recordEvent(
      database,
      { ...founding, kind: 'notebook-created', title: notebook.title },
      transaction,
    );
    return { notebookId: notebook.id, modeler: people.get('oswin') ?? '', editor };
  });
  // Models go through the same services as those of users: frozen, put into the outbox, derived.
  for (const { title, source, note } of [...DEMONSTRATION_MODELS].reverse()) {
    const author = note === undefined ? ids.modeler : ids.editor;
    const modelId = await createModel(database, author, ids.notebookId, { title, source });
    if (note !== undefined) await freeze(database, author, modelId, { revision: 0, note });
  }
  return true;
}
