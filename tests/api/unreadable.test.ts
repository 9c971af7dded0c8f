/** Requests that cannot be read, and a site whose parts do not answer. */
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problemSchema } from '../../shared/contracts/problem.ts';
import { createPerson, signIn, visit, type Browser } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
let browser: Browser;
beforeAll(async () => {
  site = await openSite();
  browser = await signIn(site, await createPerson(site, 'Bodo Body'));
});
afterAll(() => site.close());

/** The name of the problem, which must tell the id of its request. */
function problemOf({ body, status, headers }: request.Response): string {
  const problem = problemSchema.parse(body);
  expect(problem.status).toBe(status);
  expect(problem.instance).toBe(`urn:massieu:request:${headers['x-request-id'] ?? ''}`);
  return problem.type.replace('urn:massieu:problem:', '');
}

describe('a request that cannot be read', () => {
  const DEEP = 250_000;
  const BODIES = [
    ['no JSON', 'application/json', '{"name": '],
    ['JSON that is no object', 'application/json', '[1, 2]'],
    ['text', 'text/plain', 'name'],
    ['a form', 'application/x-www-form-urlencoded', 'name=X'],
    ['an alphabet other than UTF', 'application/json; charset=iso-8859-1', '{"name":"X"}'],
    ['nested without end', 'application/json', '['.repeat(DEEP) + ']'.repeat(DEEP)],
    ['nothing', 'application/json', ''],
  ] as const;

  it.each(BODIES)('is refused as such where its body is %s', async (_, type, body) => {
    const answer = await browser.agent
      .post('/api/groups')
      .set({ 'X-CSRF-Token': browser.csrfToken, 'Content-Type': type })
      .send(body);
    expect([answer.status, problemOf(answer)]).toEqual([400, 'validation']);
  });

  it('is refused as such where its address is no text', async () => {
    const answer = await browser.get('/api/models/%E0%A4%A');
    expect([answer.status, problemOf(answer)]).toEqual([400, 'validation']);
  });

  it('is refused before it is read where it is too large', async () => {
    const visitor = await visit(site);
    const email = 'a'.repeat(600_000);
    const answer = await visitor.post('/api/session', { email, password: 'x' });
    expect([answer.status, problemOf(answer)]).toEqual([413, 'payload-too-large']);
  });
});

describe('a site', () => {
  it('is alive but not ready without its schema, and without Redis', async () => {
    const broken = await openSite();
    try {
      await broken.database.sequelize.query('ALTER TABLE people RENAME TO people_elsewhere');
      await request(broken.app)
        .get('/readyz')
        .expect(503, { database: false, redis: true, queue: true });
      broken.redis.disconnect();
      const { body } = await request(broken.app).get('/readyz').expect(503);
      expect(body).toMatchObject({ database: false, redis: false });
      await request(broken.app).get('/healthz').expect(200);
      await broken.redis.connect();
    } finally {
      await broken.close();
    }
  });

  it('insists on TLS where it has it, and so does its cookie', async () => {
    const plain = await request(site.app).get('/api/session').expect(200);
    expect(plain.headers).not.toHaveProperty('strict-transport-security');
    const secure = await openSite({ PUBLIC_URL: 'https://massieu.example', TRUSTED_PROXIES: '1' });
    try {
      const { headers } = await request(secure.app)
        .get('/api/session')
        .set('X-Forwarded-Proto', 'https')
        .expect(200);
      expect(headers['strict-transport-security']).toMatch(/max-age=\d{7,}/);
      expect(headers['set-cookie']?.[0]).toMatch(/; Secure/);
    } finally {
      await secure.close();
    }
  });
});
