import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { modelSchema, versionSchema, versionSummarySchema } from '../../shared/contracts/models.ts';
import { AT_FAULT, HARD_CORE_FLUID, IDEAL_GAS } from './support/formulations.ts';
import { openDeskOfEditor } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

const count = async (table: string): Promise<number> => {
  const [rows] = await site.database.sequelize.query(`SELECT count(*)::int AS n FROM ${table}`);
  return (rows[0] as { n: number }).n;
};

describe('freezing', () => {
  it('makes a numbered version with its hash, its derivation and its way to the queue', async () => {
    const { browser, modelId, editor } = await openDeskOfEditor(site, HARD_CORE_FLUID);
    const path = `/api/models/${modelId}/versions`;
    const frozen = await browser.post(path, { revision: 0, note: 'first' }).expect(201);
    const version = versionSummarySchema.parse(frozen.body);
    expect(version).toMatchObject({
      number: 1,
      note: 'first',
      frozenBy: { id: editor.id },
      derivation: { state: 'queued', progress: 0, fault: null, verification: null },
    });
    const row = await site.database.models.Version.findByPk(version.id);
    expect(row?.hash).toBe(
      createHash('sha256')
        .update(row?.normalizedSource ?? '')
        .digest('hex'),
    );
    expect(version.hash).toBe(row?.hash);
    expect(await count('outbox')).toBe(1);
    expect(await count('derivation_events')).toBe(1);
    const read = versionSchema.parse((await browser.get(`${path}/1`).expect(200)).body);
    expect(read).toMatchObject({ source: HARD_CORE_FLUID, result: null, verification: null });
    const model = modelSchema.parse((await browser.get(`/api/models/${modelId}`)).body);
    expect(model).toMatchObject({ versionCount: 1, latestVersion: { number: 1 } });
    const listed = await browser.get(path).expect(200);
    expect(listed.body).toHaveLength(1);
  });

  it('gives the same hash for the same formulation, whatever its comments and spaces', async () => {
    const one = await openDeskOfEditor(site, IDEAL_GAS);
    const two = await openDeskOfEditor(site, IDEAL_GAS.replace('2 pi m', '2  pi   m'));
    const hashes = await Promise.all(
      [one, two].map(async ({ browser, modelId }) => {
        const { body } = await browser.post(`/api/models/${modelId}/versions`, { revision: 0 });
        return body.hash as string;
      }),
    );
    expect(hashes[0]).toMatch(/^[0-9a-f]{64}$/);
    expect(hashes[1]).toBe(hashes[0]);
  });

  it('refuses a formulation at fault with its diagnostics and leaves nothing behind', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, AT_FAULT);
    const before = await count('outbox');
    const { body } = await browser
      .post(`/api/models/${modelId}/versions`, { revision: 0 })
      .expect(422);
    expect(body.type).toBe('urn:massieu:problem:formulation-at-fault');
    expect(body.diagnostics[0]).toMatchObject({ severity: 'error', line: 3 });
    expect(await count('outbox')).toBe(before);
    expect((await browser.get(`/api/models/${modelId}/versions`)).body).toEqual([]);
  });

  it('refuses a revision that is no longer the draft, and a text that stands already', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
    const path = `/api/models/${modelId}/versions`;
    await browser.put(`/api/models/${modelId}/draft`, { source: `${IDEAL_GAS}\n`, basedOn: 0 });
    const old = await browser.post(path, { revision: 0 }).expect(409);
    expect(old.body.type).toBe('urn:massieu:problem:conflict');
    const both = await Promise.all([0, 1].map(() => browser.post(path, { revision: 1 })));
    expect(both.map(({ status }) => status).sort()).toEqual([201, 409]);
  });
});

describe('the database itself', () => {
  it('refuses to change, delete or clear away a version', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
    const { body } = await browser.post(`/api/models/${modelId}/versions`, { revision: 0 });
    const { sequelize } = site.database;
    const attempts = [
      `UPDATE versions SET note = 'another' WHERE id = '${body.id}'`,
      `UPDATE versions SET source = source WHERE id = '${body.id}'`,
      `DELETE FROM versions WHERE id = '${body.id}'`,
      'TRUNCATE versions CASCADE',
      `DELETE FROM models WHERE id = '${modelId}'`,
    ];
    for (const sql of attempts) await expect(sequelize.query(sql)).rejects.toThrow();
    await expect(sequelize.query(attempts[0] ?? '')).rejects.toThrow(/a version never changes/);
  });

  it('refuses a version whose hash is not that of its text', async () => {
    const { modelId, editor } = await openDeskOfEditor(site, IDEAL_GAS);
    await expect(
      site.database.models.Version.create({
        modelId,
        number: 1,
        source: 'x',
        normalizedSource: 'x',
        hash: '0'.repeat(64),
        note: '',
        frozenById: editor.id,
      }),
    ).rejects.toThrow(/versions_hash_check|versions_check/);
  });

  it('refuses to replace a result that stands', async () => {
    const { browser, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
    const { body } = await browser.post(`/api/models/${modelId}/versions`, { revision: 0 });
    const derivation = await site.database.models.Derivation.findOne({
      where: { versionId: body.id },
    });
    const outcome = (result: string) => ({
      state: 'complete' as const,
      result,
      verification: '{}',
      verificationStatus: 'passed' as const,
      resultHash: createHash('sha256').update(`${result}\n{}`).digest('hex'),
      engine: '1',
    });
    await derivation?.update(outcome('{"a":1}'));
    await expect(derivation?.update(outcome('{"a":2}'))).rejects.toThrow(/never changes/);
    await expect(derivation?.destroy()).rejects.toThrow();
  });

  it('keeps the last editor in a group, even when two leave at the same moment', async () => {
    const { groupId, editor } = await openDeskOfEditor(site, '');
    const { sequelize, models } = site.database;
    const leave = (personId: string) =>
      sequelize.query(
        'DELETE FROM memberships WHERE group_id = :groupId AND person_id = :personId',
        {
          replacements: { groupId, personId },
        },
      );
    await expect(leave(editor.id)).rejects.toThrow(/last editor/);
    await expect(
      sequelize.query(`UPDATE memberships SET role = 'reader' WHERE group_id = :groupId`, {
        replacements: { groupId },
      }),
    ).rejects.toThrow(/last editor/);
    const second = await models.Person.create({ name: 'Second', email: null });
    await models.Membership.create({ groupId, personId: second.id, role: 'editor' });
    const outcomes = await Promise.allSettled([leave(editor.id), leave(second.id)]);
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
  });
});
