/** Freezing as one step: whole or not at all, and one after the other. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { IDEAL_GAS } from './support/formulations.ts';
import { openDeskOfEditor } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

describe('freezing', () => {
  it.each(['outbox', 'derivation_events', 'events'])(
    'leaves no version behind where %s cannot be written',
    async (table) => {
      const { browser, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
      const { models, sequelize } = site.database;
      const path = `/api/models/${modelId}/versions`;
      const before = await models.Derivation.count();
      await sequelize.query(`ALTER TABLE ${table} RENAME TO elsewhere`);
      try {
        await browser.post(path, { revision: 0 }).expect(500);
      } finally {
        await sequelize.query(`ALTER TABLE elsewhere RENAME TO ${table}`);
      }
      expect(await models.Version.count({ where: { modelId } })).toBe(0);
      expect(await models.Derivation.count()).toBe(before);
      const { body } = await browser.post(path, { revision: 0 }).expect(201);
      expect(body.number).toBe(1);
    },
  );

  it('counts up from version to version, and lets one of many at once through', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
    const path = `/api/models/${modelId}/versions`;
    for (let revision = 0; revision < 3; revision++) {
      const answers = await Promise.all(
        Array.from({ length: 5 }, () => browser.post(path, { revision })),
      );
      expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409, 409, 409]);
      const frozen = answers.find(({ status }) => status === 201);
      expect(frozen?.body.number).toBe(revision + 1);
      const source = IDEAL_GAS.replace('39.948', `${40 + revision}.5`);
      await browser.put(`/api/models/${modelId}/draft`, { source, basedOn: revision }).expect(200);
    }
    const { body } = await browser.get(path).expect(200);
    expect((body as { number: number }[]).map(({ number }) => number)).toEqual([3, 2, 1]);
  });

  it('takes the text that was looked at, whoever saves another one meanwhile', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
    const later = IDEAL_GAS.replace('39.948', '20.1797');
    const [frozen, saved] = await Promise.all([
      browser.post(`/api/models/${modelId}/versions`, { revision: 0 }),
      browser.put(`/api/models/${modelId}/draft`, { source: later, basedOn: 0 }),
    ]);
    expect(saved.status).toBe(200);
    expect([201, 409]).toContain(frozen.status);
    const versions = await site.database.models.Version.findAll({ where: { modelId } });
    expect(versions.map(({ source }) => source)).toEqual(frozen.status === 201 ? [IDEAL_GAS] : []);
  });
});
