/** The demonstration that the first start sets up, and what its people see. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { deskSchema, groupSchema, notebookSchema } from '../../shared/contracts/models.ts';
import { analyse } from '../../shared/language/index.ts';
import { DEMONSTRATION_MODELS } from '../../server/seed/formulations.ts';
import { seed } from '../../server/seed/index.ts';
import { DEMONSTRATION_PASSWORD, DEMONSTRATION_PEOPLE } from '../../server/seed/people.ts';
import { createPerson, signIn } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

const enter = (login: string) => {
  const person = DEMONSTRATION_PEOPLE.find((one) => one.login === login);
  if (!person) throw new Error(login);
  return signIn(site, { ...person, id: '' }, DEMONSTRATION_PASSWORD);
};

describe('the demonstration', () => {
  it.each(DEMONSTRATION_MODELS.map(({ title, source }) => [title, source]))(
    'states %s without a fault or a warning',
    (_, source) => {
      expect(analyse(source).diagnostics).toEqual([]);
    },
  );

  it('is set up once, and taken up again where it was cut short', async () => {
    const { models, sequelize } = site.database;
    expect(await seed(site.database)).toBe(true);
    expect(await seed(site.database)).toBe(false);
    const count = await models.Model.count();
    expect(count).toBe(DEMONSTRATION_MODELS.length);
    const frozen = DEMONSTRATION_MODELS.filter(({ note }) => note !== undefined).length;
    expect(await models.Version.count()).toBe(frozen);

    const unfrozen = DEMONSTRATION_MODELS.find(({ note }) => note === undefined);
    const draftOnly = await models.Model.findOne({ where: { title: unfrozen?.title ?? '' } });
    await draftOnly?.destroy();
    expect(await seed(site.database)).toBe(false);
    await sequelize.query('DELETE FROM seeds');
    expect(await seed(site.database)).toBe(true);
    expect(await models.Model.count()).toBe(count);
    expect(await models.Version.count()).toBe(frozen);
  });

  it('says that it is invented, and has somebody for every role', async () => {
    const editor = await enter('varnholt');
    const desk = deskSchema.parse((await editor.get('/api/desk').expect(200)).body);
    expect(desk.jobs.length).toBeGreaterThan(0);
    expect(desk.recentModels.length).toBe(DEMONSTRATION_MODELS.length);
    expect(desk.events[0]?.person?.name).toBeDefined();
    const groupId = desk.groups[0]?.id ?? '';
    const group = groupSchema.parse((await editor.get(`/api/groups/${groupId}`)).body);
    expect(group.about).toMatch(/invented/);
    expect(new Set(group.people.map(({ role }) => role))).toEqual(
      new Set(['reader', 'modeler', 'referee', 'editor']),
    );
    const path = `/api/notebooks/${group.notebooks[0]?.id ?? ''}`;
    const notebook = notebookSchema.parse((await editor.get(path)).body);
    expect(notebook.introduction).toMatch(/invented/);
    expect(notebook.models.length).toBe(DEMONSTRATION_MODELS.length);
    expect(notebook.modelCount).toBe(notebook.models.length);
    const changed = await editor.patch(path, { introduction: 'Another question' }).expect(200);
    expect(notebookSchema.parse(changed.body)).toMatchObject({
      title: notebook.title,
      introduction: 'Another question',
    });
  });

  it('shows its site administrator and its newcomer no group', async () => {
    for (const login of ['marrowby', 'ostrander']) {
      const browser = await enter(login);
      expect((await browser.open()).groups).toEqual([]);
    }
  });

  it('leaves a site alone that has people of its own', async () => {
    const own = await openSite();
    try {
      await createPerson(own, 'Own Person');
      expect(await seed(own.database)).toBe(false);
      expect(await own.database.models.Person.count()).toBe(1);
      expect(await own.database.models.Group.count()).toBe(0);
    } finally {
      await own.close();
    }
  });
});
