/** Every route as every role, as somebody outside the group, and as a visitor. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { IDEAL_GAS } from './support/formulations.ts';
import {
  createPerson,
  join,
  openDeskOfEditor,
  signIn,
  visit,
  type Browser,
  type Verb,
} from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

const WHO = ['reader', 'modeler', 'referee', 'editor', 'outsider', 'visitor'] as const;
type Who = (typeof WHO)[number];

let site: Site;
const browsers = new Map<Who, Browser>();
let places: Record<string, string>;

beforeAll(async () => {
  site = await openSite();
  const { browser, groupId, notebookId, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
  await browser.post(`/api/models/${modelId}/versions`, { revision: 0 }).expect(201);
  places = { group: groupId, notebook: notebookId, model: modelId };
  browsers.set('editor', browser);
  for (const role of ['reader', 'modeler', 'referee'] as const) {
    const person = await createPerson(site, `The ${role}`);
    await join(site, person, groupId, role);
    browsers.set(role, await signIn(site, person));
  }
  browsers.set('outsider', await signIn(site, await createPerson(site, 'An outsider')));
  browsers.set('visitor', await visit(site));
});
afterAll(() => site.close());

interface Route {
  readonly verb: Verb;
  readonly path: string;
  readonly body?: object;
  /** May a reader do it? The others of the group may do everything here. */
  readonly reads: boolean;
}

const ROUTES: readonly Route[] = [
  { verb: 'get', path: '/groups/:group', reads: true },
  { verb: 'get', path: '/groups/:group/events', reads: true },
  { verb: 'get', path: '/notebooks/:notebook', reads: true },
  { verb: 'get', path: '/models/:model', reads: true },
  { verb: 'get', path: '/models/:model/draft', reads: true },
  { verb: 'get', path: '/models/:model/draft/kept', reads: true },
  { verb: 'get', path: '/models/:model/versions', reads: true },
  { verb: 'get', path: '/models/:model/versions/1', reads: true },
  { verb: 'post', path: '/groups/:group/notebooks', body: { title: 'N' }, reads: false },
  { verb: 'patch', path: '/notebooks/:notebook', body: { title: 'N' }, reads: false },
  { verb: 'post', path: '/notebooks/:notebook/models', body: { title: 'M' }, reads: false },
  { verb: 'patch', path: '/models/:model', body: { title: 'M' }, reads: false },
  {
    verb: 'put',
    path: '/models/:model/draft',
    body: { source: IDEAL_GAS, basedOn: 0 },
    reads: false,
  },
  { verb: 'post', path: '/models/:model/versions/1/derivation/cancellation', reads: false },
  { verb: 'post', path: '/models/:model/versions/1/derivation', reads: false },
];

const statusFor = (who: Who, route: Route): number | 'granted' => {
  if (who === 'visitor') return 401;
  if (who === 'outsider') return 404;
  return who === 'reader' && !route.reads ? 403 : 'granted';
};

describe.each(ROUTES)('$verb $path', (route) => {
  it.each(WHO)('as %s', async (who) => {
    const path = `/api${route.path.replace(/:(\w+)/g, (_, name: string) => places[name] ?? '')}`;
    const browser = browsers.get(who);
    if (!browser) throw new Error(who);
    const { status, body } = await browser.send(route.verb, path, route.body);
    const expected = statusFor(who, route);
    if (expected === 'granted') expect(status).toBeLessThan(300);
    else expect([status, body.status]).toEqual([expected, expected]);
  });
});

describe('freezing and following', () => {
  const path = (end: string) => `/api/models/${places['model'] ?? ''}/${end}`;

  it.each(['reader', 'outsider', 'visitor'] as const)('a version is refused to %s', async (who) => {
    const { status } = await (browsers.get(who) as Browser).post(path('versions'), { revision: 0 });
    expect(status).toBe({ reader: 403, outsider: 404, visitor: 401 }[who]);
  });

  it.each(['modeler', 'referee'] as const)('a version is granted to %s', async (who) => {
    // The text stands already: so far it comes only for those who may freeze.
    const { status } = await (browsers.get(who) as Browser).post(path('versions'), { revision: 0 });
    expect(status).toBe(409);
  });

  it.each(['outsider', 'visitor'] as const)('the events are refused to %s', async (who) => {
    const { status } = await (browsers.get(who) as Browser).get(path('events'));
    expect(status).toBe({ outsider: 404, visitor: 401 }[who]);
  });
});

describe('what one sees of others', () => {
  it('is nothing of groups that one does not belong to', async () => {
    const outsider = browsers.get('outsider') as Browser;
    expect((await outsider.get('/api/groups').expect(200)).body).toEqual([]);
    const desk = await outsider.get('/api/desk').expect(200);
    expect(desk.body).toEqual({ recentModels: [], jobs: [], events: [], groups: [] });
  });

  it('is nothing any more of a group that one has left', async () => {
    const { browser, groupId, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
    const person = await createPerson(site, 'Gone Modeler');
    await join(site, person, groupId, 'modeler');
    const gone = await signIn(site, person);
    await gone.post(`/api/models/${modelId}/versions`, { revision: 0 }).expect(201);
    expect((await gone.get('/api/desk')).body.jobs).toHaveLength(1);
    await site.database.models.Membership.destroy({ where: { personId: person.id, groupId } });
    const desk = await gone.get('/api/desk').expect(200);
    expect(desk.body).toEqual({ recentModels: [], jobs: [], events: [], groups: [] });
    await browser.get(`/api/models/${modelId}`).expect(200);
  });

  it('answers the same for what is hidden and for what does not exist', async () => {
    const outsider = browsers.get('outsider') as Browser;
    const hidden = await outsider.get(`/api/models/${places['model'] ?? ''}`).expect(404);
    for (const id of ['00000000-0000-4000-8000-000000000000', 'no-id', '%00']) {
      const missing = await outsider.get(`/api/models/${id}`).expect(404);
      expect({ ...missing.body, instance: '' }).toEqual({ ...hidden.body, instance: '' });
    }
  });

  it('is the role in each group, and what it may do with a model', async () => {
    const session = await (browsers.get('reader') as Browser).open();
    expect(session.groups).toEqual([{ id: places['group'], name: 'A group', role: 'reader' }]);
    const model = await (browsers.get('reader') as Browser).get(
      `/api/models/${places['model'] ?? ''}`,
    );
    expect(model.body).toMatchObject({ role: 'reader', mayEdit: false });
  });

  it.each(['0', '-1', '1.5', 'abc', '99999999999999999999', '4000000000'])(
    'a version numbered %s does not exist',
    async (number) => {
      const editor = browsers.get('editor') as Browser;
      await editor.get(`/api/models/${places['model'] ?? ''}/versions/${number}`).expect(404);
    },
  );
});
