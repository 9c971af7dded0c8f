/** Sections of a model in jsdom: a server by its answers, and workers that answer at once. */
import type { ComponentType } from 'react';
import { QueryClientProvider } from '@tanstack/react-query';
import { configure, render } from '@testing-library/react';
import { createMemoryRouter, Outlet, RouterProvider } from 'react-router-dom';
import { vi } from 'vitest';
import type { Draft, Model, SaveDraft } from '../../../shared/contracts/models.ts';
import { derive } from '../../../shared/thermodynamics/index.ts';
import { createQueryClient } from '../../../src/api/queryClient.ts';
import type { DerivationRequest } from '../../../src/workers/derivationProtocol.ts';

/** A save waits a moment, and one that failed is tried again after a few seconds. */
configure({ asyncUtilTimeout: 10_000 });

export const AT = '2026-05-14T10:00:00.000Z';

export const MODEL: Model = {
  id: 'm1',
  title: 'Hard core with mean-field attraction',
  updatedAt: AT,
  latestVersion: null,
  notebook: { id: 'n1', title: 'Working fluid K-7' },
  group: { id: 'g1', name: 'Working Fluids, Hallowmere Works' },
  role: 'editor',
  mayEdit: true,
  versionCount: 0,
};

export function draftOf(source: string, revision: number, name = 'I. Varnholt'): Draft {
  return { source, revision, updatedAt: AT, updatedBy: { id: name, name } };
}

/** A server that keeps one draft as the real one does. */
export class DraftServer {
  current: Draft;
  isDown = false;
  readonly saves: SaveDraft[] = [];

  constructor(current: Draft) {
    this.current = current;
  }

  readonly fetch = (path: string, options: RequestInit = {}): Promise<Response> => {
    if (this.isDown) return Promise.reject(new TypeError('no connection'));
    const answer = (body: unknown, status = 200): Promise<Response> =>
      Promise.resolve(new Response(JSON.stringify(body), { status }));
    if (path === '/api/session') {
      return answer({ person: null, csrfToken: 't', groups: [], identityProviderIsLocal: true });
    }
    if (path !== '/api/models/m1/draft') return answer([]);
    if (options.method !== 'PUT') return answer(this.current);
    const body = JSON.parse(options.body as string) as SaveDraft;
    this.saves.push(body);
    if (body.basedOn !== this.current.revision) {
      return answer(
        {
          type: 'urn:massieu:problem:draft-conflict',
          title: 'Two texts',
          status: 409,
          detail: 'Somebody else has saved meanwhile.',
          current: this.current,
        },
        409,
      );
    }
    this.current = draftOf(body.source, body.basedOn + 1);
    return answer(this.current);
  };
}

/** Derives in the page, as the worker would beside it. */
class ImmediateWorker {
  onmessage: ((event: { data: unknown }) => void) | null = null;
  onerror: (() => void) | null = null;
  #isEnded = false;

  postMessage({ id, source, brief }: DerivationRequest): void {
    const { diagnostics, derivation } = derive(
      source,
      brief ? { properties: brief, isBrief: true } : {},
    );
    queueMicrotask(() => {
      if (this.#isEnded) return;
      this.onmessage?.({
        data: { id, diagnostics, derivation, milliseconds: 1, expressions: 1 },
      });
    });
  }

  terminate(): void {
    this.#isEnded = true;
  }
}

/** What jsdom lacks. Undone by `vi.unstubAllGlobals`. */
export function stubBrowser(server: DraftServer): void {
  vi.stubGlobal('fetch', server.fetch);
  vi.stubGlobal('Worker', ImmediateWorker);
}

/** Shows a section of the model at its address. */
export function openSection(
  Section: ComponentType,
  model: Model = MODEL,
  { client = createQueryClient(), search = '' } = {},
) {
  const router = createMemoryRouter(
    [
      {
        path: '/models/:modelId',
        element: <Outlet context={{ model, stream: 'open' }} />,
        children: [{ index: true, Component: Section }],
      },
    ],
    { initialEntries: [`/models/${model.id}${search}`] },
  );
  return render(
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
}
