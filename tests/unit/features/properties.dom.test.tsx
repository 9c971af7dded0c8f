import { afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { cleanup, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import {
  versionSummarySchema,
  type Model,
  type Version,
} from '../../../shared/contracts/models.ts';
import { derive } from '../../../shared/thermodynamics/index.ts';
import { Properties } from '../../../src/features/properties/index.ts';
import { HARD_CORE_FLUID } from '../../api/support/formulations.ts';
import { completeBrowser } from '../components/rendering.ts';
import { AT, draftOf, DraftServer, MODEL, openSection, stubBrowser } from './section.tsx';

const result = derive(HARD_CORE_FLUID).derivation ?? null;
const check = { kind: 'identity', title: 'U = A + T S', detail: 'symbolically' } as const;

function version(change: Partial<Version['derivation']> = {}): Version {
  const isComplete = (change.state ?? 'complete') === 'complete';
  return {
    id: 'v1',
    number: 1,
    hash: '9'.repeat(64),
    note: '',
    frozenAt: AT,
    frozenBy: { id: 'p1', name: 'I. Varnholt' },
    derivation: {
      state: 'complete',
      progress: 1,
      stage: 'derived',
      fault: null,
      verification: 'passed',
      updatedAt: AT,
      ...change,
    },
    source: HARD_CORE_FLUID,
    result: isComplete ? result : null,
    verification: isComplete
      ? {
          status: 'undecided',
          general: [{ ...check, title: 'homogeneous of degree one', status: 'passed' }],
          properties: [
            { symbol: 'p', status: 'passed', checks: [{ ...check, status: 'passed' }] },
            {
              symbol: 'U',
              status: 'undecided',
              checks: [
                { ...check, status: 'passed' },
                { ...check, title: 'second opinion', status: 'undecided', detail: 'no answer' },
              ],
            },
          ],
        }
      : null,
  };
}

function openVersion(one: Version, search = ''): void {
  const summary = versionSummarySchema.parse(one);
  const model: Model = { ...MODEL, latestVersion: summary, versionCount: 1 };
  const server = new DraftServer(draftOf(one.source, 0));
  stubBrowser(server);
  vi.stubGlobal('fetch', (path: string, options: RequestInit) => {
    if (path.endsWith('/versions')) return answer([summary]);
    if (path.endsWith('/versions/1')) return answer(one);
    return server.fetch(path, options);
  });
  openSection(Properties, model, { search });
}

const answer = (body: unknown): Promise<Response> =>
  Promise.resolve(new Response(JSON.stringify(body)));

const property = async (name: string): Promise<HTMLElement> =>
  screen.findByRole('region', { name });

beforeAll(completeBrowser);
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

describe('the property sheet', () => {
  it('shows each property with unit, value, trail and seal', async () => {
    openVersion(version());
    const p = await property('pressure');
    expect(within(p).getByText('Pa')).toBeTruthy();
    expect(within(p).getByText(/^99\d\d\d\.\d+ Pa$|^1\d{5}/)).toBeTruthy();
    expect(within(p).getByText(/Derivation, \d+ steps/)).toBeTruthy();
    expect(within(p).getByText('attraction')).toBeTruthy();
    expect(within(p).getByRole('button', { name: 'verified 1 of 1' })).toBeTruthy();
  });

  it('opens what was tried, and never shows the undecided as passed', async () => {
    openVersion(version());
    const U = await property('internal energy');
    const seal = within(U).getByRole('button', { name: 'not decided, 1 of 2 passed' });
    await userEvent.click(seal);
    expect(within(U).getByText('second opinion')).toBeTruthy();
    expect(within(U).getByText('no answer')).toBeTruthy();
  });

  it('offers the forms that there are', async () => {
    openVersion(version());
    await property('pressure');
    const forms = screen.getByRole('group', { name: 'Form' });
    await userEvent.click(within(forms).getByRole('button', { name: 'per molecule' }));
    const U = await property('internal energy');
    expect(within(U).queryByText('Contributions')).toBeNull();
    expect(within(forms).queryByRole('button', { name: 'reduced' })).toBeNull();
  });

  it('takes another state for its numbers', async () => {
    openVersion(version());
    const U = await property('internal energy');
    const before = within(U).getByText(/ J$/).textContent;
    const field = screen.getByLabelText('temperature T in K');
    await userEvent.clear(field);
    await userEvent.type(field, '600{Enter}');
    await waitFor(() => expect(within(U).getByText(/ J$/).textContent).not.toBe(before));
  });

  it('finds properties by name and symbol', async () => {
    openVersion(version());
    await property('pressure');
    await userEvent.type(screen.getByRole('searchbox'), 'entropy');
    await waitFor(() => expect(screen.queryByRole('region', { name: 'pressure' })).toBeNull());
    expect(await property('entropy')).toBeTruthy();
  });
});

describe('a version that is not derived yet', () => {
  it('shows how far it is, with Cancel', async () => {
    openVersion(version({ state: 'verifying', progress: 0.7, stage: 'verifying C_V' }));
    expect(await screen.findByRole('progressbar', { name: 'verifying C_V' })).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Cancel' })).toBeTruthy();
  });

  it('says why it failed and offers to derive it again', async () => {
    openVersion(version({ state: 'failed', fault: 'It took longer than 120 s.' }));
    expect(await screen.findByText(/It took longer than 120 s/)).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Derive again' })).toBeTruthy();
  });
});

describe('a draft without a version', () => {
  it('shows what follows, and says that it is not verified', async () => {
    stubBrowser(new DraftServer(draftOf(HARD_CORE_FLUID, 0)));
    openSection(Properties);
    await property('pressure');
    expect(screen.getByText(/which has not been verified/)).toBeTruthy();
    expect(screen.queryByText(/verified \d/)).toBeNull();
  });

  it('leads back to the formulation where that is at fault', async () => {
    stubBrowser(new DraftServer(draftOf('ensemble canonical\nQ = nothing', 0)));
    openSection(Properties);
    const link = await screen.findByRole('link', { name: 'Go to the formulation' });
    expect(link.getAttribute('href')).toBe('/models/m1');
  });
});
