import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createPerson, PASSWORD, signIn, visit } from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

let site: Site;
beforeAll(async () => {
  site = await openSite();
});
afterAll(() => site.close());

const tokenIn = (text: string): string => /([\w-]{30,})\s/.exec(`${text}\n`)?.[1] ?? '';
const lettersTo = (email: string) => site.letters.filter(({ to }) => to === email);

describe('a password', () => {
  it('signs in, and the session gets a new id and a new token', async () => {
    const person = await createPerson(site, 'Ada Adler');
    const browser = await visit(site);
    const before = browser.csrfToken;
    const answer = await browser
      .post('/api/session', { email: ` ${person.email.toUpperCase()} `, password: PASSWORD })
      .expect(200);
    expect(answer.body.person).toEqual({ id: person.id, name: 'Ada Adler', email: person.email });
    expect(answer.body.csrfToken).not.toBe(before);
    expect(answer.headers['set-cookie']?.[0]).toMatch(/HttpOnly/);
    expect(answer.headers['set-cookie']?.[0]).toMatch(/SameSite=Lax/);
    expect((await browser.open()).person?.id).toBe(person.id);
  });

  it('that is wrong answers the same as an address that nobody has', async () => {
    const person = await createPerson(site, 'Ben Wrong');
    const browser = await visit(site);
    const wrong = await browser
      .post('/api/session', { email: person.email, password: 'not this one at all' })
      .expect(401);
    const nobody = await browser
      .post('/api/session', { email: 'nobody@example.org', password: 'not this one at all' })
      .expect(401);
    expect(wrong.body.type).toBe('urn:massieu:problem:wrong-credentials');
    expect({ ...wrong.body, instance: '' }).toEqual({ ...nobody.body, instance: '' });
  });

  it('signs out again, after which the old cookie is worth nothing', async () => {
    const person = await createPerson(site, 'Cleo Out');
    const browser = await signIn(site, person);
    await browser.send('delete', '/api/session').expect(204);
    expect((await browser.open()).person).toBeNull();
    await browser.get('/api/desk').expect(401);
  });
});

describe('registering', () => {
  const registration = { name: 'Dora New', email: 'dora@example.org', password: PASSWORD };

  it('sends a link that confirms the address; before that one cannot sign in', async () => {
    const browser = await visit(site);
    await browser.post('/api/registrations', registration).expect(202);
    await expect.poll(() => lettersTo('dora@example.org').length).toBe(1);
    const refused = await browser.post('/api/session', registration).expect(403);
    expect(refused.body.type).toBe('urn:massieu:problem:email-not-confirmed');
    const [letter] = lettersTo('dora@example.org');
    expect(letter?.text).toMatch(/\/confirm-email\?token=[\w-]+/);
    const token = tokenIn(letter?.text ?? '');
    await browser.post('/api/email-confirmations', { token }).expect(204);
    await browser.post('/api/session', registration).expect(200);
    const again = await browser
      .open()
      .then(() => browser.post('/api/email-confirmations', { token }));
    expect(again.status).toBe(410);
    expect(again.body.type).toBe('urn:massieu:problem:expired-link');
  });

  it('answers the same for an address that has an account, and leaves that as it is', async () => {
    const person = await createPerson(site, 'Emil There');
    const browser = await visit(site);
    const known = await browser
      .post('/api/registrations', {
        ...registration,
        email: person.email,
        password: 'another password!',
      })
      .expect(202);
    const unknown = await browser
      .post('/api/registrations', { ...registration, email: 'fresh@example.org' })
      .expect(202);
    expect(known.body).toEqual(unknown.body);
    await signIn(site, person);
    await expect.poll(() => lettersTo(person.email).length).toBe(1);
    expect(lettersTo(person.email)[0]?.text).not.toMatch(/confirm/);
  });

  it('gives the account to the password of the registration whose link is opened', async () => {
    const email = 'victim@example.org';
    const own = await visit(site);
    await own.post('/api/registrations', { name: 'Victim', email, password: PASSWORD }).expect(202);
    await expect.poll(() => lettersTo(email).length).toBe(1);
    const stranger = await visit(site);
    await stranger
      .post('/api/registrations', { name: 'Stranger', email, password: 'of the stranger' })
      .expect(202);
    await expect.poll(() => lettersTo(email).length).toBe(2);
    const token = tokenIn(lettersTo(email)[0]?.text ?? '');
    await own.post('/api/email-confirmations', { token }).expect(204);
    await own.post('/api/session', { email, password: PASSWORD }).expect(200);
    await stranger.post('/api/session', { email, password: 'of the stranger' }).expect(401);
  });

  it('refuses what is no address and a short password, field by field', async () => {
    const browser = await visit(site);
    const { body } = await browser
      .post('/api/registrations', { name: ' ', email: 'nowhere', password: 'short' })
      .expect(400);
    expect(body.type).toBe('urn:massieu:problem:validation');
    expect(Object.keys(body.fields).sort()).toEqual(['email', 'name', 'password']);
  });
});

describe('a forgotten password', () => {
  it('is replaced by a mailed link, once, and ends the sessions that were open', async () => {
    const person = await createPerson(site, 'Finn Forgot');
    const open = await signIn(site, person);
    await open.get('/api/desk').expect(200);
    const browser = await visit(site);
    await browser.post('/api/password-resets', { email: person.email }).expect(202);
    await expect.poll(() => lettersTo(person.email).length).toBe(1);
    const [letter] = lettersTo(person.email);
    expect(letter?.text).toMatch(/\/new-password\?token=[\w-]+/);
    const path = `/api/password-resets/${tokenIn(letter?.text ?? '')}`;
    await browser.put(path, { password: 'a wholly new one' }).expect(204);
    await browser.put(path, { password: 'yet another one' }).expect(410);
    await browser.post('/api/session', { email: person.email, password: PASSWORD }).expect(401);
    await signIn(site, person, 'a wholly new one');
    await open.get('/api/desk').expect(401);
  });

  it('answers the same for an address that nobody has', async () => {
    const person = await createPerson(site, 'Gina Same');
    const browser = await visit(site);
    const known = await browser.post('/api/password-resets', { email: person.email }).expect(202);
    const unknown = await browser
      .post('/api/password-resets', { email: 'x@example.org' })
      .expect(202);
    expect(known.body).toEqual(unknown.body);
  });
});

describe('a change', () => {
  it('is refused without the token of the session', async () => {
    const person = await createPerson(site, 'Hans Token');
    const browser = await signIn(site, person);
    const { body } = await browser.agent.post('/api/groups').send({ name: 'X' }).expect(403);
    expect(body.type).toBe('urn:massieu:problem:csrf');
    await browser.agent
      .post('/api/groups')
      .set('X-CSRF-Token', 'a wrong one')
      .send({ name: 'X' })
      .expect(403);
    expect(await site.database.models.Group.count()).toBe(0);
  });

  it('is refused from another origin even with the token', async () => {
    const person = await createPerson(site, 'Ida Origin');
    const browser = await signIn(site, person);
    const from = (headers: Record<string, string>) =>
      browser.post('/api/groups', { name: 'X' }).set(headers);
    await from({ Origin: 'https://elsewhere.example' }).expect(403);
    await from({ Origin: 'null' }).expect(403);
    await from({ 'Sec-Fetch-Site': 'cross-site' }).expect(403);
    await from({ Origin: site.config.publicUrl, 'Sec-Fetch-Site': 'same-origin' }).expect(201);
  });

  it('is refused to a visitor by token and by person', async () => {
    await request(site.app).post('/api/session').send({}).expect(403);
    const browser = await visit(site);
    const { body } = await browser.post('/api/groups', { name: 'X' }).expect(401);
    expect(body.type).toBe('urn:massieu:problem:not-signed-in');
  });
});

describe('attempts', () => {
  it('are limited by client and by account', async () => {
    const strict = await openSite({ SIGN_IN_ATTEMPTS: '3' });
    try {
      const browser = await visit(strict);
      const attempt = () =>
        browser.post('/api/session', { email: 'who@example.org', password: 'not this one' });
      for (let i = 0; i < 3; i++) await attempt().expect(401);
      const { body, headers } = await attempt().expect(429);
      expect(body.type).toBe('urn:massieu:problem:too-many-requests');
      expect(headers['retry-after']).toMatch(/^\d+$/);
      // The client is out of attempts, whatever account it tries.
      const person = await createPerson(strict, 'Jon Limit');
      await browser.post('/api/session', { email: person.email, password: PASSWORD }).expect(429);
    } finally {
      await strict.close();
    }
  });

  it('that succeed do not use the limit up', async () => {
    const strict = await openSite({ SIGN_IN_ATTEMPTS: '3' });
    try {
      const person = await createPerson(strict, 'Kim Often');
      for (let i = 0; i < 6; i++) await signIn(strict, person);
    } finally {
      await strict.close();
    }
  });
});
