/** The stream of server-sent events over a real connection. */
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { derivationEventSchema, type DerivationEvent } from '../../shared/contracts/models.ts';
import { announce } from '../../server/services/derivations.ts';
import { IDEAL_GAS } from './support/formulations.ts';
import { openDeskOfEditor, PASSWORD } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
let server: Server;
let address: string;
beforeAll(async () => {
  site = await openSite();
  server = createServer(site.app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  address = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
});
afterAll(async () => {
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
  await site.close();
});

interface Told {
  readonly id: string;
  readonly event: DerivationEvent;
}

/** Signs in over the connection and follows a model; `told` grows as events come. */
async function follow(email: string, modelId: string, lastEventId?: string) {
  const visitor = await fetch(`${address}/api/session`);
  const { csrfToken } = (await visitor.json()) as { csrfToken: string };
  const cookieOf = (response: Response) => response.headers.getSetCookie()[0]?.split(';')[0] ?? '';
  const signedIn = await fetch(`${address}/api/session`, {
    method: 'POST',
    headers: {
      'content-type': 'application/json',
      'x-csrf-token': csrfToken,
      cookie: cookieOf(visitor),
    },
    body: JSON.stringify({ email, password: PASSWORD }),
  });
  const leave = new AbortController();
  const stream = await fetch(`${address}/api/models/${modelId}/events`, {
    signal: leave.signal,
    headers: {
      cookie: cookieOf(signedIn),
      'accept-encoding': 'gzip',
      ...(lastEventId === undefined ? {} : { 'last-event-id': lastEventId }),
    },
  });
  const told: Told[] = [];
  let text = '';
  const reading = (async () => {
    const decoder = new TextDecoder();
    for await (const chunk of stream.body ?? []) {
      text += decoder.decode(chunk, { stream: true });
      for (let end = text.indexOf('\n\n'); end !== -1; end = text.indexOf('\n\n')) {
        const lines = text.slice(0, end).split('\n');
        text = text.slice(end + 2);
        const valueOf = (name: string) =>
          lines.find((line) => line.startsWith(`${name}: `))?.slice(name.length + 2);
        if (valueOf('event') !== 'derivation') continue;
        const event = derivationEventSchema.parse(JSON.parse(valueOf('data') ?? ''));
        told.push({ id: valueOf('id') ?? '', event });
      }
    }
  })().catch(() => undefined);
  return {
    stream,
    told,
    reading,
    leave: async () => {
      leave.abort();
      await reading;
    },
  };
}

async function prepare() {
  const { browser, modelId, editor } = await openDeskOfEditor(site, IDEAL_GAS);
  const { body } = await browser
    .post(`/api/models/${modelId}/versions`, { revision: 0 })
    .expect(201);
  const version = { id: body.id as string, modelId, number: 1 };
  const say = (stage: string, progress: number) =>
    site.database.sequelize.transaction(async (transaction) => {
      const row = await site.database.models.Derivation.findOne({
        where: { versionId: version.id },
        transaction,
      });
      if (!row) throw new Error('no derivation');
      await row.update({ state: 'deriving', stage, progress }, { transaction });
      await announce(site.database, row, version, transaction);
    });
  return { browser, modelId, email: editor.email, say };
}

const stages = (told: readonly Told[]): string[] => told.map(({ event }) => event.derivation.stage);

describe('the events of a model', () => {
  it('begin with how things stand and go on as they happen, uncompressed', async () => {
    const { modelId, email, say } = await prepare();
    await say('deriving p', 0.1);
    const { stream, told, leave } = await follow(email, modelId);
    expect(stream.headers.get('content-type')).toMatch(/^text\/event-stream/);
    expect(stream.headers.get('content-encoding')).toBeNull();
    await expect.poll(() => stages(told)).toEqual(['deriving p']);
    await say('deriving U', 0.2);
    await say('deriving S', 0.3);
    await expect.poll(() => stages(told)).toEqual(['deriving p', 'deriving U', 'deriving S']);
    await leave();
  });

  it('go on behind the last one that the browser names, from the database', async () => {
    const { modelId, email, say } = await prepare();
    const first = await follow(email, modelId);
    await say('one', 0.1);
    await expect.poll(() => stages(first.told).at(-1)).toBe('one');
    await first.leave();
    const last = first.told.at(-1)?.id ?? '';
    await say('two', 0.2);
    await say('three', 0.3);
    const again = await follow(email, modelId, last);
    await expect.poll(() => stages(again.told)).toEqual(['two', 'three']);
    await again.leave();
    const ids = again.told.map(({ id }) => Number(id));
    expect(Math.min(...ids)).toBeGreaterThan(Number(last));
  });

  it('are only those of this model', async () => {
    const one = await prepare();
    const other = await prepare();
    const { told, leave } = await follow(one.email, one.modelId);
    await other.say('of the other', 0.1);
    await one.say('of this one', 0.1);
    await expect.poll(() => stages(told).at(-1)).toBe('of this one');
    expect(stages(told)).not.toContain('of the other');
    await leave();
  });

  it('are numbered in the order in which they are committed', async () => {
    const { modelId, say } = await prepare();
    await Promise.all(Array.from({ length: 12 }, (_, i) => say(`step ${i}`, i / 12)));
    const [rows] = await site.database.sequelize.query(
      `SELECT id, xmin::text::bigint AS t FROM derivation_events
       WHERE model_id = '${modelId}' ORDER BY id`,
    );
    expect(rows).toHaveLength(13);
  });
});
