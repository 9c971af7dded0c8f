import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { QueryClientProvider } from '@tanstack/react-query';
import { cleanup, render, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import type { RouteObject } from 'react-router-dom';
import { createQueryClient } from '../../../src/api/queryClient.ts';
import { Component as DeskRoom } from '../../../src/routes/desk/DeskRoom.tsx';
import { Component as GroupRoom } from '../../../src/routes/group/GroupRoom.tsx';
import { Component as ModelFrame } from '../../../src/routes/model/ModelFrame.tsx';
import { Component as NotebookRoom } from '../../../src/routes/notebook/NotebookRoom.tsx';
import { Component as SignIn } from '../../../src/routes/sign-in/SignIn.tsx';
import { Component as VersionsSection } from '../../../src/routes/versions/VersionsSection.tsx';
import { completeBrowser } from '../components/rendering.ts';

const NOW = '2026-05-14T10:00:00.000Z';
const person = { id: 'p1', name: 'I. Varnholt', email: 'i.varnholt@hallowmere.example' };
const notebook = { id: 'n1', title: 'Working fluid K-7' };
const group = { id: 'g1', name: 'Working Fluids, Hallowmere Works' };
const derivation = {
  state: 'deriving',
  progress: 0.46,
  stage: 'deriving C_p',
  fault: null,
  verification: null,
  updatedAt: NOW,
};
const version = {
  id: 'v2',
  number: 2,
  hash: `9c41f07e${'0'.repeat(56)}`,
  note: 'Attraction refitted',
  frozenAt: NOW,
  frozenBy: { id: 'p1', name: 'I. Varnholt' },
  derivation,
};
const model = {
  id: 'm1',
  title: 'Hard core with mean-field attraction',
  updatedAt: NOW,
  latestVersion: version,
  notebook,
  group,
};

type Answers = Record<string, unknown>;
const session = (isSignedIn: boolean) => ({
  person: isSignedIn ? person : null,
  csrfToken: 't',
  groups: [],
  identityProviderIsLocal: true,
});

/** Serves the answers by `METHOD /path`; everything else is not found. Keeps what was asked. */
function serve(answers: Answers) {
  const asked: string[] = [];
  vi.stubGlobal('fetch', (path: string, options: RequestInit) => {
    const key = `${options.method ?? 'GET'} ${path}`;
    asked.push(key);
    const found = answers[key];
    const problem = {
      type: 'urn:massieu:problem:not-found',
      title: 'Not found',
      status: 404,
      detail: 'Nothing there.',
    };
    if (found instanceof Response) return Promise.resolve(found.clone());
    return Promise.resolve(
      new Response(JSON.stringify(found ?? problem), { status: found ? 200 : 404 }),
    );
  });
  return asked;
}

const routes: RouteObject[] = [
  { path: '/sign-in', Component: SignIn },
  { path: '/desk', Component: DeskRoom },
  { path: '/groups/:groupId', Component: GroupRoom },
  { path: '/notebooks/:notebookId', Component: NotebookRoom },
  {
    path: '/models/:modelId',
    Component: ModelFrame,
    children: [{ path: 'versions', Component: VersionsSection }],
  },
];

function open(at: string) {
  const router = createMemoryRouter(routes, { initialEntries: [at] });
  render(
    <QueryClientProvider client={createQueryClient()}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return router;
}

beforeAll(completeBrowser);
beforeEach(() => {
  vi.stubGlobal(
    'EventSource',
    class {
      addEventListener() {
        // No news arrive in these tests.
      }
      close() {
        // Nothing is open.
      }
    },
  );
});
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

describe('signing in', () => {
  it('says when a local stand-in answers for the identity provider', async () => {
    serve({ 'GET /api/session': session(false) });
    open('/sign-in?next=/models/m1');
    expect(await screen.findByText(/local stand-in/)).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Sign in with GitHub' }).getAttribute('href')).toBe(
      '/auth/github?next=%2Fmodels%2Fm1',
    );
  });

  it('keeps what was typed when the password is wrong, and then leads back', async () => {
    const answers: Answers = {
      'GET /api/session': session(false),
      'POST /api/session': new Response(
        JSON.stringify({
          type: 'urn:massieu:problem:wrong-credentials',
          title: 'Wrong',
          status: 401,
          detail: 'E-mail and password do not belong together.',
        }),
        { status: 401 },
      ),
    };
    serve(answers);
    const router = open('/sign-in?next=/desk');
    await userEvent.type(screen.getByLabelText('E-mail'), 'I.Varnholt@hallowmere.example');
    await userEvent.type(screen.getByLabelText('Password'), 'not the one');
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(
      (await screen.findByText(/do not belong together/)).closest('[role=alert]'),
    ).toBeTruthy();
    expect(screen.getByLabelText<HTMLInputElement>('Password').value).toBe('not the one');
    answers['POST /api/session'] = session(true);
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/desk'));
  });

  it('names the field at fault before anything is sent', async () => {
    const asked = serve({ 'GET /api/session': session(false) });
    open('/sign-in');
    await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
    expect(await screen.findByText('Write an address such as name@example.org.')).toBeTruthy();
    expect(screen.getByText('Write the password.')).toBeTruthy();
    expect(asked.filter((request) => request.startsWith('POST'))).toEqual([]);
  });
});

describe('the desk', () => {
  it('counts and shows what waits', async () => {
    serve({
      'GET /api/session': session(true),
      'GET /api/desk': {
        recentModels: [model],
        jobs: [{ model: { id: 'm1', title: model.title }, version }],
        events: [],
        groups: [],
      },
    });
    open('/desk');
    expect(await screen.findByRole('progressbar', { name: 'deriving C_p' })).toBeTruthy();
    expect(await screen.findByRole('link', { name: /Desk 1 waiting/ })).toBeTruthy();
  });

  it('says so when nothing waits and there is no model', async () => {
    serve({
      'GET /api/session': session(true),
      'GET /api/desk': { recentModels: [], jobs: [], events: [], groups: [] },
    });
    open('/desk');
    expect(await screen.findByText(/Nothing waits for you/)).toBeTruthy();
    expect(screen.getByText(/You are in no group yet/)).toBeTruthy();
  });
});

describe('a group of others', () => {
  it('is not found, whether it exists or not', async () => {
    serve({ 'GET /api/session': session(true) });
    open('/groups/g9');
    expect(await screen.findByRole('heading', { name: 'Nothing stands here' })).toBeTruthy();
  });
});

describe('a notebook', () => {
  it('offers readers nothing that they may not do', async () => {
    serve({
      'GET /api/session': session(true),
      'GET /api/notebooks/n1': {
        ...notebook,
        introduction: 'About *K-7*.',
        modelCount: 1,
        updatedAt: NOW,
        group,
        role: 'reader',
        models: [model],
      },
    });
    open('/notebooks/n1');
    expect(await screen.findByText('K-7')).toBeTruthy();
    expect(screen.queryByRole('button', { name: 'Begin a model' })).toBeNull();
    expect(screen.queryByRole('button', { name: /introduction/ })).toBeNull();
  });

  it('begins a model from the specimen under the title given', async () => {
    let body = '';
    const asked = serve({
      'GET /api/session': session(true),
      'GET /api/notebooks/n1': {
        ...notebook,
        introduction: '',
        modelCount: 0,
        updatedAt: NOW,
        group,
        role: 'modeler',
        models: [],
      },
      'POST /api/notebooks/n1/models': { id: 'm7' },
    });
    const inner = globalThis.fetch;
    vi.stubGlobal('fetch', (path: string, options: RequestInit) => {
      if (options.method === 'POST' && typeof options.body === 'string') body = options.body;
      return inner(path, options);
    });
    const router = open('/notebooks/n1');
    const [button] = await screen.findAllByRole('button', { name: 'Begin a model' });
    if (!button) throw new Error('no button');
    await userEvent.click(button);
    await userEvent.type(screen.getByLabelText('Title'), 'First attempt');
    await userEvent.click(screen.getByRole('button', { name: 'a hard core with attraction' }));
    await userEvent.click(screen.getByRole('button', { name: 'Begin the model' }));
    await waitFor(() => expect(router.state.location.pathname).toBe('/models/m7'));
    expect(asked).toContain('POST /api/notebooks/n1/models');
    const sent = JSON.parse(body) as { title: string; source: string };
    expect(sent.title).toBe('First attempt');
    expect(sent.source).toMatch(/^# First attempt\nensemble canonical\n/);
  });
});

describe('the versions of a model', () => {
  it('show the derivation under way, which can be cancelled', async () => {
    const asked = serve({
      'GET /api/session': session(true),
      'GET /api/models/m1': { ...model, role: 'editor', mayEdit: true, versionCount: 2 },
      'GET /api/models/m1/versions': [version],
      'POST /api/models/m1/versions/2/derivation/cancellation': {},
    });
    open('/models/m1/versions');
    expect(await screen.findByText('Attraction refitted')).toBeTruthy();
    expect(screen.getAllByText('9c41 f07e').length).toBeGreaterThan(0);
    await userEvent.click(screen.getByRole('button', { name: 'Cancel' }));
    await waitFor(() =>
      expect(asked).toContain('POST /api/models/m1/versions/2/derivation/cancellation'),
    );
  });

  it('show why a derivation failed and the way out', async () => {
    serve({
      'GET /api/session': session(true),
      'GET /api/models/m1': { ...model, role: 'editor', mayEdit: true, versionCount: 2 },
      'GET /api/models/m1/versions': [
        {
          ...version,
          derivation: { ...derivation, state: 'failed', fault: 'It took longer than 60 s.' },
        },
      ],
    });
    open('/models/m1/versions');
    expect(await screen.findByText(/It took longer than 60 s/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Derive again' })).toBeTruthy();
  });
});
