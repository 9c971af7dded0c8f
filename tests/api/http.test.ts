/** What holds for every answer: headers, problem details, request ids, health, pages, logs. */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Writable } from 'node:stream';
import { pino } from 'pino';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problemSchema } from '../../shared/contracts/problem.ts';
import { createApp } from '../../server/app.ts';
import { logOptions } from '../../server/log.ts';
import { createPerson, PASSWORD, signIn, visit } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
let folder: string;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'massieu-client-'));
  mkdirSync(join(folder, 'assets'));
  writeFileSync(join(folder, 'index.html'), '<!doctype html><title>Massieu</title>');
  writeFileSync(join(folder, 'theme.js'), '');
  writeFileSync(join(folder, 'assets/main-1a2b.js'), 'export {};');
  site = await openSite();
});
afterAll(async () => {
  await site.close();
  rmSync(folder, { recursive: true, force: true });
});

describe('an answer', () => {
  it('carries a strict content security policy and tells nothing of the server', async () => {
    const { headers } = await request(site.app).get('/api/session').expect(200);
    const policy = headers['content-security-policy'] ?? '';
    expect(policy).toContain("default-src 'self'");
    expect(policy).toContain("script-src 'self' 'wasm-unsafe-eval'");
    expect(policy).toContain("frame-ancestors 'none'");
    expect(policy).toContain("object-src 'none'");
    expect(policy).not.toContain("'unsafe-eval'");
    expect(policy.replace(/style-src [^;]*/, '')).not.toContain("'unsafe-inline'");
    expect(headers['x-powered-by']).toBeUndefined();
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['cache-control']).toBe('no-store');
  });

  it('has an id: the one given, where it is harmless, else a new one', async () => {
    const ask = (id: string) => request(site.app).get('/healthz').set('X-Request-Id', id);
    expect((await ask('from-the-proxy-1')).headers['x-request-id']).toBe('from-the-proxy-1');
    expect((await ask('<script>')).headers['x-request-id']).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('to a fault is a problem with a name, a status, a way out and the id of the request', async () => {
    const faults = [
      await request(site.app).get('/api/nowhere'),
      await request(site.app).get('/api/desk'),
      await request(site.app).post('/api/session').send({}),
      await request(site.app).post('/api/session').type('json').send('{"broken'),
    ];
    expect(faults.map(({ status }) => status)).toEqual([404, 401, 403, 400]);
    for (const { status, headers, body } of faults) {
      expect(headers['content-type']).toMatch(/^application\/problem\+json/);
      const problem = problemSchema.parse(body);
      expect(problem.status).toBe(status);
      expect(problem.type).toMatch(/^urn:massieu:problem:[a-z-]+$/);
      expect(problem.detail.length).toBeGreaterThan(10);
      expect(problem.instance).toBe(`urn:massieu:request:${headers['x-request-id']}`);
    }
  });

  it('to a fault of ours says nothing of its insides', async () => {
    const broken = createApp(site.config, {
      ...site.dependencies,
      database: {
        ...site.database,
        sequelize: undefined,
      } as unknown as Site['database'],
    });
    const person = await createPerson(site, 'Lea Broken');
    const browser = await visit({ ...site, app: broken });
    await browser.post('/api/session', { email: person.email, password: PASSWORD }).expect(200);
    await browser.open();
    const { body } = await browser.post('/api/groups', { name: 'X' }).expect(500);
    expect(body.type).toBe('urn:massieu:problem:internal');
    expect(JSON.stringify(body)).not.toMatch(/transaction|undefined|sequelize|\.ts/i);
  });
});

describe('health', () => {
  it('is alive without asking anybody, and ready where all answer', async () => {
    await request(site.app).get('/healthz').expect(200, { status: 'alive' });
    await request(site.app)
      .get('/readyz')
      .expect(200, { database: true, redis: true, queue: true });
  });

  it('is not ready where the queue does not answer', async () => {
    const queue = { getJobCounts: () => Promise.reject(new Error('away')) };
    const app = createApp(site.config, {
      ...site.dependencies,
      queue: queue as unknown as Site['queue'],
    });
    await request(app).get('/readyz').expect(503, { database: true, redis: true, queue: false });
    await request(app).get('/healthz').expect(200);
  });
});

describe('pages', () => {
  const app = () => createApp(site.config, { ...site.dependencies, clientFolder: folder });

  it('are the same for every address of the application, and asked for each time', async () => {
    for (const path of ['/', '/desk', '/models/1/versions/2']) {
      const { text, headers } = await request(app())
        .get(path)
        .set('Accept', 'text/html')
        .expect(200);
      expect(text).toContain('<title>Massieu</title>');
      expect(headers['cache-control']).toBe('no-cache');
    }
  });

  it('are kept for a year where their name has a hash, and else asked for', async () => {
    const hashed = await request(app()).get('/assets/main-1a2b.js').expect(200);
    expect(hashed.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    const plain = await request(app()).get('/theme.js').expect(200);
    expect(plain.headers['cache-control']).toBe('no-cache');
  });

  it('do not stand in for a file or an address of the API that does not exist', async () => {
    await request(app()).get('/assets/gone-1a2b.js').set('Accept', 'text/html').expect(404);
    await request(app()).get('/api/gone').set('Accept', 'text/html').expect(404);
    const outside = await request(app()).get('/..%2f..%2fpackage.json');
    expect(outside.text).not.toContain('"dependencies"');
  });
});

describe('the log', () => {
  it('names every request by its id and holds no secret', async () => {
    const lines: string[] = [];
    const sink = new Writable({
      write(chunk: Buffer, _encoding, done) {
        lines.push(chunk.toString());
        done();
      },
    });
    const log = pino({ ...logOptions('info', 'test') }, sink);
    const logged = { ...site, app: createApp(site.config, { ...site.dependencies, log }) };
    const person = await createPerson(site, 'Mia Logged');
    const browser = await signIn(logged, person);
    await browser.put('/api/password-resets/a-token-that-is-secret-0123456789', {
      password: 'another long password',
    });
    await browser.get('/auth/github/callback?code=secret-code&state=secret-state');
    const text = lines.join('');
    expect(text).toContain('"path":"/api/session"');
    expect(lines.length).toBeGreaterThan(3);
    for (const secret of [
      PASSWORD,
      'another long',
      'a-token-that',
      'secret-code',
      'secret-state',
    ]) {
      expect(text).not.toContain(secret);
    }
    expect(text).not.toContain(browser.csrfToken);
    expect(text).not.toContain(person.email);
    expect(text).not.toMatch(/massieu=s%3A/);
  });
});
