/** Derivations from the frozen version to the stored result, through everything that may go wrong. */
import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { versionSchema, type Version } from '../../shared/contracts/models.ts';
import { relayOutbox } from '../../server/queue/outboxRelay.ts';
import { sweepLost } from '../../worker/sweepLost.ts';
import { HARD_CORE_FLUID, IDEAL_GAS } from './support/formulations.ts';
import { openDeskOfEditor, type Browser } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';
import { createHold, startWorker, type TestWorker } from './support/workers.ts';

/** Every derivation starts a process of its own, which takes its time on a busy machine. */
const PATIENCE = { timeout: 150_000, interval: 100 };
vi.setConfig({ testTimeout: 300_000 });

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

const workers: TestWorker[] = [];
afterEach(async () => {
  await Promise.all(workers.splice(0).map((worker) => worker.kill()));
});

function work(settings?: Readonly<Record<string, string>>): TestWorker {
  const worker = startWorker(site, settings);
  workers.push(worker);
  return worker;
}

/** A frozen version, and how to look at it. */
async function freeze(source: string) {
  const { browser, modelId, groupId } = await openDeskOfEditor(site, source);
  const path = `/api/models/${modelId}/versions`;
  const { body } = await browser.post(path, { revision: 0 }).expect(201);
  const look = async (): Promise<Version> =>
    versionSchema.parse((await browser.get(`${path}/1`).expect(200)).body);
  const state = async (): Promise<string> => (await look()).derivation.state;
  return {
    browser,
    modelId,
    groupId,
    path: `${path}/1`,
    versionId: body.id as string,
    look,
    state,
  };
}

async function rowOf(versionId: string) {
  const row = await site.database.models.Derivation.findOne({ where: { versionId } });
  if (!row) throw new Error('the version has no derivation');
  return row;
}

/** Ids of the processes that work for a worker. */
function childrenOf(pid: number): number[] {
  const list = execFileSync('ps', ['-eo', 'pid=,ppid=,args='], { encoding: 'utf8' });
  return list
    .split('\n')
    .map((line) => /^\s*(\d+)\s+(\d+)\s+(.*)$/.exec(line))
    .filter((match) => match?.[2] === String(pid) && match[3]?.includes('derivationChild'))
    .map((match) => Number(match?.[1]));
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}

const kindsOf = async (browser: Browser, groupId: string): Promise<string[]> =>
  ((await browser.get(`/api/groups/${groupId}/events`)).body as { kind: string }[]).map(
    ({ kind }) => kind,
  );

describe('a derivation', () => {
  it('runs from the outbox to a verified result, and again to the same bytes', async () => {
    const { browser, groupId, path, versionId, look, state } = await freeze(HARD_CORE_FLUID);
    const worker = work();
    await expect.poll(state, PATIENCE).toBe('complete');
    const version = await look();
    expect(version.derivation).toMatchObject({ progress: 1, fault: null, verification: 'passed' });
    const pressure = version.result?.properties.find(({ symbol }) => symbol === 'p');
    expect(pressure?.unit).toBe('Pa');
    expect(version.verification?.properties.length).toBeGreaterThan(5);
    expect((await kindsOf(browser, groupId))[0]).toBe('derivation-complete');
    const first = await rowOf(versionId);
    expect(first.resultHash).toBe(
      createHash('sha256').update(`${first.result}\n${first.verification}`).digest('hex'),
    );

    await browser.post(`${path}/derivation`).expect(202);
    await expect.poll(state, PATIENCE).toBe('complete');
    const second = await rowOf(versionId);
    expect(second.round).toBe(2);
    expect(second.stage).toMatch(/byte for byte the same/);
    expect(second.result).toBe(first.result);
    expect(second.verification).toBe(first.verification);
    expect(await worker.end()).toBe(0);
  });

  it('that comes out otherwise leaves the result that stands, and says so', async () => {
    const { browser, path, versionId } = await freeze(IDEAL_GAS);
    const row = await rowOf(versionId);
    const result = '{"of":"another engine"}';
    await row.update({
      state: 'complete',
      result,
      verification: '{}',
      verificationStatus: 'passed',
      resultHash: createHash('sha256').update(`${result}\n{}`).digest('hex'),
      engine: '0',
    });
    await browser.post(`${path}/derivation`).expect(202);
    work();
    await expect.poll(async () => (await rowOf(versionId)).fault, PATIENCE).toMatch(/otherwise/);
    expect((await rowOf(versionId)).result).toBe(result);
    expect((await rowOf(versionId)).state).toBe('complete');
  });

  it('goes on with another worker when the first is killed in the middle', async () => {
    const hold = createHold();
    try {
      const { versionId, state } = await freeze(IDEAL_GAS);
      const first = work({ MASSIEU_TEST_HOLD: hold.path });
      await expect.poll(() => childrenOf(first.pid).length, PATIENCE).toBe(1);
      await expect.poll(state, PATIENCE).toBe('deriving');
      const [child = 0] = childrenOf(first.pid);
      await first.kill();
      expect(await state()).toBe('deriving');
      // The child hears nothing while it works, and ends itself all the same.
      await expect.poll(() => isAlive(child), PATIENCE).toBe(false);
      work();
      await expect.poll(state, PATIENCE).toBe('complete');
      expect((await rowOf(versionId)).attempts).toBe(2);
    } finally {
      hold.close();
    }
  });

  it('is tried again when only its own process is killed', async () => {
    const hold = createHold();
    try {
      const { state } = await freeze(IDEAL_GAS);
      const worker = work({ MASSIEU_TEST_HOLD: hold.path });
      await expect.poll(() => childrenOf(worker.pid).length, PATIENCE).toBe(1);
      const [child = 0] = childrenOf(worker.pid);
      hold.release();
      process.kill(child, 'SIGKILL');
      await expect.poll(state, PATIENCE).toBe('complete');
    } finally {
      hold.close();
    }
  });

  it('goes back to the queue at once when its worker is told to end', async () => {
    const hold = createHold();
    try {
      const { versionId, state } = await freeze(IDEAL_GAS);
      const first = work({ MASSIEU_TEST_HOLD: hold.path, LOCK_MILLISECONDS: '600000' });
      await expect.poll(() => childrenOf(first.pid).length, PATIENCE).toBe(1);
      expect(await first.end()).toBe(0);
      work({ LOCK_MILLISECONDS: '600000' });
      await expect.poll(state, PATIENCE).toBe('complete');
      expect((await rowOf(versionId)).fault).toBeNull();
    } finally {
      hold.close();
    }
  });

  it('ends when its time is up, in words for the author', async () => {
    const hold = createHold();
    try {
      const { browser, groupId, look, state } = await freeze(IDEAL_GAS);
      work({ MASSIEU_TEST_HOLD: hold.path, DERIVATION_SECONDS: '1' });
      await expect.poll(state, PATIENCE).toBe('failed');
      expect((await look()).derivation.fault).toMatch(/longer than 1 s/);
      expect((await kindsOf(browser, groupId))[0]).toBe('derivation-failed');
    } finally {
      hold.close();
    }
  });
});

describe('cancelling', () => {
  it('ends a derivation that waits, which is never begun then', async () => {
    const { browser, groupId, path, versionId, state } = await freeze(IDEAL_GAS);
    await browser.post(`${path}/derivation/cancellation`).expect(202);
    expect(await state()).toBe('cancelled');
    expect((await kindsOf(browser, groupId))[0]).toBe('derivation-cancelled');
    const after = await freeze(IDEAL_GAS);
    work();
    await expect.poll(after.state, PATIENCE).toBe('complete');
    expect(await state()).toBe('cancelled');
    expect((await rowOf(versionId)).attempts).toBe(0);
  });

  it('ends one that runs, which can be derived again afterwards', async () => {
    const hold = createHold();
    try {
      const { browser, path, state } = await freeze(IDEAL_GAS);
      const worker = work({ MASSIEU_TEST_HOLD: hold.path });
      await expect.poll(state, PATIENCE).toBe('deriving');
      await expect.poll(() => childrenOf(worker.pid).length, PATIENCE).toBe(1);
      await browser.post(`${path}/derivation/cancellation`).expect(202);
      await expect.poll(state, PATIENCE).toBe('cancelled');
      await expect.poll(() => childrenOf(worker.pid).length, PATIENCE).toBe(0);
      hold.release();
      await browser.post(`${path}/derivation`).expect(202);
      await expect.poll(state, PATIENCE).toBe('complete');
    } finally {
      hold.close();
    }
  });
});

describe('the outbox', () => {
  it('gets derivations anew whose jobs Redis has lost', async () => {
    const { state } = await freeze(IDEAL_GAS);
    while ((await relayOutbox(site.database, site.queue)) > 0);
    await site.queue.obliterate({ force: true });
    expect(await sweepLost(site.database, site.queue, 0)).toBeGreaterThan(0);
    expect(await sweepLost(site.database, site.queue, 600_000)).toBe(0);
    work();
    await expect.poll(state, PATIENCE).toBe('complete');
  });

  it('is sent again after a crash between the queue and the mark, and makes one job', async () => {
    const { versionId } = await freeze(IDEAL_GAS);
    const { queue, database } = site;
    const { id, round } = await rowOf(versionId);
    while ((await relayOutbox(database, queue)) > 0);
    await database.sequelize.query(
      'UPDATE outbox SET dispatched_at = NULL WHERE derivation_id = :id',
      {
        replacements: { id },
      },
    );
    expect(await relayOutbox(database, queue)).toBe(1);
    const jobs = (await queue.getJobs()).filter(({ data }) => data.derivationId === id);
    expect(jobs.map((job) => job.id)).toEqual([`${id}-${round}`]);
  });

  it('is emptied by several relays at once without sending a row twice', async () => {
    const before = await site.queue.getJobCountByTypes('waiting');
    await Promise.all([freeze(IDEAL_GAS), freeze(IDEAL_GAS), freeze(IDEAL_GAS)]);
    const sent = await Promise.all([1, 2, 3].map(() => relayOutbox(site.database, site.queue)));
    expect(sent.reduce((sum, n) => sum + n, 0)).toBe(3);
    expect(await site.queue.getJobCountByTypes('waiting')).toBe(before + 3);
  });
});
