import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { draftSchema, keptTextSchema, modelSchema } from '../../shared/contracts/models.ts';
import { IDEAL_GAS } from './support/formulations.ts';
import { createPerson, join, openDeskOfEditor, signIn } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

describe('a draft', () => {
  it('begins as the model was made and counts up with every save', async () => {
    const { browser, modelId, editor } = await openDeskOfEditor(site, IDEAL_GAS);
    const model = modelSchema.parse((await browser.get(`/api/models/${modelId}`)).body);
    expect(model).toMatchObject({
      title: 'A model',
      role: 'editor',
      mayEdit: true,
      versionCount: 0,
    });
    const path = `/api/models/${modelId}/draft`;
    const first = draftSchema.parse((await browser.get(path).expect(200)).body);
    expect(first).toMatchObject({ source: IDEAL_GAS, revision: 0, updatedBy: { id: editor.id } });
    const saved = await browser.put(path, { source: 'ensemble canonical', basedOn: 0 }).expect(200);
    expect(draftSchema.parse(saved.body)).toMatchObject({
      source: 'ensemble canonical',
      revision: 1,
    });
  });

  it('shows both texts to the second of two who save, and keeps both', async () => {
    const { browser: ada, modelId, groupId } = await openDeskOfEditor(site, 'the first text');
    const other = await createPerson(site, 'Ben Other');
    await join(site, other, groupId, 'modeler');
    const ben = await signIn(site, other);
    const path = `/api/models/${modelId}/draft`;
    await ada.put(path, { source: 'the text of Ada', basedOn: 0 }).expect(200);
    const refused = await ben.put(path, { source: 'the text of Ben', basedOn: 0 }).expect(409);
    expect(refused.body).toMatchObject({
      type: 'urn:massieu:problem:draft-conflict',
      current: { source: 'the text of Ada', revision: 1, updatedBy: { name: 'Edith Editor' } },
    });
    // Sent again and again, it is kept once.
    await ben.put(path, { source: 'the text of Ben', basedOn: 0 }).expect(409);
    await ben.put(path, { source: 'Ben after all', basedOn: 1 }).expect(200);
    const kept = keptTextSchema.array().parse((await ada.get(`${path}/kept`).expect(200)).body);
    expect(kept.map(({ source, revision }) => [source, revision])).toEqual([
      ['Ben after all', 2],
      ['the text of Ben', null],
      ['the text of Ada', 1],
      ['the first text', 0],
    ]);
    expect(kept[1]?.person.name).toBe('Ben Other');
  });

  it('lets exactly one of many who save at once through', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, '');
    const answers = await Promise.all(
      Array.from({ length: 8 }, (_, i) =>
        browser.put(`/api/models/${modelId}/draft`, { source: `text ${i}`, basedOn: 0 }),
      ),
    );
    const statuses = answers.map(({ status }) => status).sort();
    expect(statuses).toEqual([200, ...Array<number>(7).fill(409)]);
    const kept = await browser.get(`/api/models/${modelId}/draft/kept`);
    expect(kept.body).toHaveLength(9);
  });

  it('takes the same save twice as one, since an answer may be lost on the way', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, '');
    const save = { source: 'sent twice', basedOn: 0 };
    await browser.put(`/api/models/${modelId}/draft`, save).expect(200);
    const again = await browser.put(`/api/models/${modelId}/draft`, save).expect(200);
    expect(again.body.revision).toBe(1);
  });

  it('holds 64 KiB as bytes and no character that no text can hold', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, '');
    const save = (source: string) =>
      browser.put(`/api/models/${modelId}/draft`, { source, basedOn: 0 });
    const long = await save('θ'.repeat(40_000)).expect(413);
    expect(long.body.type).toBe('urn:massieu:problem:payload-too-large');
    const characters = await save('a'.repeat(65_537)).expect(400);
    expect(characters.body.fields.source).toMatch(/64 KiB/);
    for (const source of ['a\0b', 'half \ud800 a pair']) {
      const { body } = await save(source).expect(400);
      expect(body.type).toBe('urn:massieu:problem:validation');
    }
    await save('θ'.repeat(32_768)).expect(200);
    await browser.agent
      .put(`/api/models/${modelId}/draft`)
      .set({ 'X-CSRF-Token': browser.csrfToken, 'Content-Type': 'application/json' })
      .send(`{"source":"${'a'.repeat(600_000)}","basedOn":1}`)
      .expect(413);
  });
});
