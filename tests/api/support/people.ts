/** People of a test site, and what they send. */
import { randomUUID } from 'node:crypto';
import request, { type Test } from 'supertest';
import type { Role } from '../../../shared/contracts/people.ts';
import { hashPassword } from '../../../server/services/passwords.ts';
import type { Site } from './site.ts';

export const PASSWORD = 'correct horse battery';

let passwordHash: Promise<string> | undefined;

export interface TestPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
}

/** A person whose address is confirmed and whose password is PASSWORD. */
export async function createPerson(site: Site, name: string): Promise<TestPerson> {
  passwordHash ??= hashPassword(PASSWORD);
  const email = `${name.toLowerCase().replace(/\W+/g, '.')}.${randomUUID().slice(0, 8)}@example.org`;
  const row = await site.database.models.Person.create({
    name,
    email,
    emailConfirmedAt: new Date(),
    passwordHash: await passwordHash,
  });
  return { id: row.id, name, email };
}

export async function join(
  site: Site,
  person: TestPerson,
  groupId: string,
  role: Role,
): Promise<void> {
  await site.database.models.Membership.create({ personId: person.id, groupId, role });
}

export const VERBS = ['get', 'post', 'put', 'patch', 'delete'] as const;
export type Verb = (typeof VERBS)[number];

/** A browser: keeps cookies, and sends the token of its session with every change. */
export class Browser {
  readonly agent: ReturnType<typeof request.agent>;
  csrfToken = '';

  constructor(site: Site) {
    this.agent = request.agent(site.app);
  }

  /** Reads the session and remembers its token. */
  async open(): Promise<{ person: TestPerson | null; groups: { id: string; role: Role }[] }> {
    const { body } = await this.agent.get('/api/session').expect(200);
    this.csrfToken = body.csrfToken;
    return body;
  }

  send(verb: Verb, path: string, body?: object): Test {
    const test = this.agent[verb](path);
    if (verb !== 'get') void test.set('X-CSRF-Token', this.csrfToken);
    return body === undefined ? test : test.send(body);
  }

  get(path: string): Test {
    return this.send('get', path);
  }

  post(path: string, body?: object): Test {
    return this.send('post', path, body);
  }

  put(path: string, body?: object): Test {
    return this.send('put', path, body);
  }

  patch(path: string, body?: object): Test {
    return this.send('patch', path, body);
  }
}

export async function visit(site: Site): Promise<Browser> {
  const browser = new Browser(site);
  await browser.open();
  return browser;
}

/** A browser in which the person has signed in by password. */
export async function signIn(
  site: Site,
  person: TestPerson,
  password = PASSWORD,
): Promise<Browser> {
  const browser = await visit(site);
  const { body } = await browser
    .post('/api/session', { email: person.email, password })
    .expect(200);
  browser.csrfToken = body.csrfToken;
  return browser;
}

/** Somebody signed in who is the editor of a group of his own with a notebook and a model. */
export async function openDeskOfEditor(site: Site, source: string) {
  const editor = await createPerson(site, 'Edith Editor');
  const browser = await signIn(site, editor);
  const group = await browser.post('/api/groups', { name: 'A group' }).expect(201);
  const groupId: string = group.body.id;
  const notebook = await browser
    .post(`/api/groups/${groupId}/notebooks`, { title: 'A notebook' })
    .expect(201);
  const notebookId: string = notebook.body.id;
  const model = await browser
    .post(`/api/notebooks/${notebookId}/models`, { title: 'A model', source })
    .expect(201);
  const modelId: string = model.body.id;
  return { editor, browser, groupId, notebookId, modelId };
}
