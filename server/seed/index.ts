/** Sets up the demonstration, once. */
import { QueryTypes } from 'sequelize';
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

/** The name under which the database knows that the demonstration is set up. */
const SEED = 'hallowmere';

/**
 * True where it was set up now. It is set up once, whatever is changed or removed afterwards; one
 * that was cut short is taken up again; a site that has people of its own is left alone.
 */
export async function seed(database: Database): Promise<boolean> {
  const { models, sequelize } = database;
  const done = await sequelize.query('SELECT name FROM seeds WHERE name = :name', {
    replacements: { name: SEED },
    type: QueryTypes.SELECT,
  });
  if (done.length > 0) return false;
  if ((await models.Person.count()) === 0) await createPeople(database);
  const subjects = DEMONSTRATION_PEOPLE.map(({ subject }) => subject);
  const known = await models.Identity.findAll({ where: { provider: 'github', subject: subjects } });
  const idOf = (login: string): string => {
    const subject = DEMONSTRATION_PEOPLE.find((person) => person.login === login)?.subject;
    return known.find((identity) => identity.subject === subject)?.personId ?? '';
  };
  const editor = idOf('varnholt');
  const notebook = await models.Notebook.findOne({
    where: { title: NOTEBOOK.title },
    include: { association: 'group', where: { name: GROUP.name } },
  });
  if (editor === '' || !notebook) return false;

  // Models go through the same services as those of users: frozen, put into the outbox, derived.
  for (const { title, source, note } of [...DEMONSTRATION_MODELS].reverse()) {
    const author = note === undefined ? idOf('oswin') : editor;
    const there = await models.Model.findOne({ where: { notebookId: notebook.id, title } });
    const modelId =
      there?.id ?? (await createModel(database, author, notebook.id, { title, source }));
    const isFrozen = (await models.Version.count({ where: { modelId } })) > 0;
    if (note !== undefined && !isFrozen) {
      await freeze(database, author, modelId, { revision: 0, note });
    }
  }
  await sequelize.query('INSERT INTO seeds (name) VALUES (:name) ON CONFLICT DO NOTHING', {
    replacements: { name: SEED },
  });
  return true;
}

/** The people, their group and its notebook, in one transaction. */
async function createPeople(database: Database): Promise<void> {
  const { models, sequelize } = database;
  const passwordHash = await hashPassword(DEMONSTRATION_PASSWORD);
  await sequelize.transaction(async (transaction) => {
    const group = await models.Group.create(GROUP, { transaction });
    const ids = new Map<string, string>();
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
      ids.set(one.login, person.id);
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
    const notebook = await models.Notebook.create(
      { groupId: group.id, ...NOTEBOOK },
      { transaction },
    );
    const founding = {
      groupId: group.id,
      personId: ids.get('varnholt') ?? null,
      modelId: null,
      versionNumber: null,
    };
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
  });
}
