/**
 * All routes, asked of the application itself, so that a new one cannot be forgotten: what a
 * visitor, somebody outside the group and a reader are told.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Express } from 'express';
import { IDEAL_GAS } from './support/formulations.ts';
import {
  createPerson,
  join,
  openDeskOfEditor,
  signIn,
  VERBS,
  visit,
  type Verb,
} from './support/people.ts';
import { openSite, type Site } from './support/site.ts';

/** Open to visitors: they are the way in. */
const OPEN = [
  'get /session',
  'post /session',
  'delete /session',
  'post /registrations',
  'post /email-confirmations',
  'post /password-resets',
  'put /password-resets/:token',
];

/** A body that every route reads without complaint. */
const BODY = { name: 'N', title: 'T', source: IDEAL_GAS, basedOn: 0, revision: 0 };

interface Route {
  readonly verb: Verb;
  readonly path: string;
}

interface Layer {
  readonly route?: { readonly path: string; readonly methods: Readonly<Record<string, boolean>> };
  readonly handle?: { readonly stack?: readonly Layer[] };
}

/** The routes of the API as Express keeps them. */
function routesOf(app: Express): Route[] {
  const walk = (layers: readonly Layer[]): Route[] =>
    layers.flatMap(({ route, handle }) =>
      route
        ? VERBS.filter((verb) => route.methods[verb]).map((verb) => ({ verb, path: route.path }))
        : walk(handle?.stack ?? []),
    );
  const elsewhere = /^\/(healthz|readyz|github)/;
  return walk((app.router as unknown as { stack: Layer[] }).stack).filter(
    ({ path }) => !elsewhere.test(path),
  );
}

let site: Site;
let routes: Route[];
let places: Record<string, string>;
beforeAll(async () => {
  site = await openSite();
  routes = routesOf(site.app).filter(({ verb, path }) => !OPEN.includes(`${verb} ${path}`));
  const { browser, groupId, notebookId, modelId } = await openDeskOfEditor(site, IDEAL_GAS);
  await browser.post(`/api/models/${modelId}/versions`, { revision: 0 }).expect(201);
  places = { groupId, notebookId, modelId, number: '1' };
});
afterAll(() => site.close());

const nameOf = ({ verb, path }: Route): string => `${verb} ${path}`;

const addressOf = ({ path }: Route): string =>
  `/api${path.replace(/:(\w+)/g, (_, name: string) => {
    const value = places[name];
    if (value === undefined) throw new Error(`nothing is known to put in for ${name}`);
    return value;
  })}`;

/** Routes with the statuses that they answer to whoever sends. */
async function statuses(
  asked: readonly Route[],
  who: Awaited<ReturnType<typeof visit>>,
): Promise<[string, number][]> {
  const answers: [string, number][] = [];
  for (const route of asked) {
    const body = route.verb === 'get' ? undefined : BODY;
    answers.push([nameOf(route), (await who.send(route.verb, addressOf(route), body)).status]);
  }
  return answers;
}

const all = (asked: readonly Route[], status: number): [string, number][] =>
  asked.map((route) => [nameOf(route), status]);

describe('every route', () => {
  it('is found, and those that are open are there', () => {
    const found = routesOf(site.app).map(nameOf);
    expect(found.length).toBeGreaterThan(20);
    expect(found).toEqual(expect.arrayContaining([...OPEN, 'put /models/:modelId/draft']));
  });

  it('but the way in is closed to visitors', async () => {
    expect(await statuses(routes, await visit(site))).toEqual(all(routes, 401));
  });

  it('that names something is as if it were not there for somebody outside the group', async () => {
    const outsider = await signIn(site, await createPerson(site, 'An outsider'));
    const named = routes.filter(({ path }) => path.includes(':'));
    expect(await statuses(named, outsider)).toEqual(all(named, 404));
  });

  it('that changes something in a group is closed to readers, and changes nothing', async () => {
    const person = await createPerson(site, 'A reader');
    await join(site, person, places['groupId'] ?? '', 'reader');
    const changing = routes.filter(({ verb, path }) => verb !== 'get' && path.includes(':'));
    const { Model, Notebook, Version, KeptText } = site.database.models;
    const counts = () =>
      Promise.all([Model.count(), Notebook.count(), Version.count(), KeptText.count()]);
    const before = await counts();
    expect(await statuses(changing, await signIn(site, person))).toEqual(all(changing, 403));
    expect(await counts()).toEqual(before);
  });

  it('that changes something is closed to whoever has no token of his session', async () => {
    const browser = await signIn(site, await createPerson(site, 'No token'));
    browser.csrfToken = '';
    const changing = routesOf(site.app).filter(({ verb }) => verb !== 'get');
    places['token'] = 'x'.repeat(43);
    expect(await statuses(changing, browser)).toEqual(all(changing, 403));
  });
});
