import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { cleanup, fireEvent, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { createQueryClient } from '../../../src/api/queryClient.ts';
import { Formulation } from '../../../src/features/formulation/index.ts';
import { HARD_CORE_FLUID } from '../../api/support/formulations.ts';
import { completeBrowser } from '../components/rendering.ts';
import { draftOf, DraftServer, MODEL, openSection, stubBrowser } from './section.tsx';

let server: DraftServer;

beforeAll(completeBrowser);
beforeEach(() => {
  server = new DraftServer(draftOf(HARD_CORE_FLUID, 3));
  stubBrowser(server);
});
afterEach(async () => {
  cleanup();
  // What a test leaves unsaved is saved, so that the next one begins afresh.
  server.isDown = false;
  window.dispatchEvent(new Event('online'));
  await waitFor(() => expect(localStorage.length).toBe(0));
  vi.unstubAllGlobals();
});

const text = (): HTMLTextAreaElement => screen.getByRole('textbox', { name: 'Formulation' });

function write(source: string): void {
  fireEvent.change(text(), { target: { value: source } });
}

async function openFormulation(model = MODEL, client = createQueryClient()): Promise<void> {
  openSection(Formulation, model, { client });
  await screen.findByRole('heading', { name: /Consequences/ });
}

describe('the formulation beside its consequences', () => {
  it('shows what follows and how the draft is kept', async () => {
    await openFormulation();
    expect(await screen.findByText(/as of line 8/)).toBeTruthy();
    expect(screen.getByTitle('pressure')).toBeTruthy();
    expect(screen.getByText(/draft saved/)).toBeTruthy();
  });

  it('keeps the last sound consequences while a line is at fault, and offers the repair', async () => {
    await openFormulation();
    await screen.findByText(/as of line 8/);
    write(HARD_CORE_FLUID.replace('(V k T)', 'V'));
    expect(await screen.findByText(/Line 7 must be mended before these follow again/)).toBeTruthy();
    expect(screen.getByTitle('pressure').closest('[data-stale]')).toBeTruthy();
    await userEvent.click(await screen.findByRole('button', { name: 'divide by k T' }));
    await waitFor(() => expect(screen.queryByText(/must be mended/)).toBeNull());
    expect(screen.getByTitle('pressure').closest('[data-stale]')).toBeNull();
  });

  it('does not freeze what is at fault, and says so', async () => {
    await openFormulation();
    write('ensemble canonical\nQ = nothing');
    await screen.findByText(/must be mended/);
    await userEvent.click(screen.getByRole('button', { name: 'Freeze as version 1' }));
    expect(screen.queryByRole('dialog')).toBeNull();
  });

  it('lets readers read only', async () => {
    await openFormulation({ ...MODEL, role: 'reader', mayEdit: false });
    expect(text().readOnly).toBe(true);
    expect(screen.queryByRole('button', { name: /Freeze/ })).toBeNull();
  });
});

describe('the table of parameters', () => {
  it('writes a number back where it stands in the text', async () => {
    await openFormulation();
    const field = await screen.findByLabelText(/^Value of a, attraction/);
    await userEvent.clear(field);
    await userEvent.type(field, '4.1e-49{Enter}');
    expect(text().value).toBe(HARD_CORE_FLUID.replace('3.7e-49', '4.1e-49'));
  });

  it('follows the text', async () => {
    await openFormulation();
    await screen.findByLabelText(/^Value of b/);
    write(HARD_CORE_FLUID.replace('5.3e-29', '6e-29'));
    await waitFor(() =>
      expect(screen.getByLabelText<HTMLInputElement>(/^Value of b/).value).toBe('6e-29'),
    );
  });

  it('moves numbers by a slider, in equal ratios where the bounds span decades', async () => {
    await openFormulation();
    const slider = await screen.findByRole('slider', { name: /excluded volume/ });
    // Half way between 1e-30 and 1e-27.
    fireEvent.change(slider, { target: { value: '500' } });
    expect(text().value).toContain('= 3.162e-29 ');
  });

  it('takes nothing that is no number, and says what it would take', async () => {
    await openFormulation();
    const field = await screen.findByLabelText(/^Value of a, attraction/);
    await userEvent.clear(field);
    await userEvent.type(field, 'much{Enter}');
    expect(screen.getByRole('alert').textContent).toMatch(/write a number/);
    expect(text().value).toBe(HARD_CORE_FLUID);
  });
});

describe('a draft that somebody else has saved meanwhile', () => {
  it('is shown beside one’s own, and nothing is overwritten before a person chooses', async () => {
    await openFormulation();
    server.current = draftOf('# Theirs\n', 4, 'T. Oswin');
    write('# Mine\n');
    const both = await screen.findByRole('region', { name: 'Two texts of this draft' });
    expect(within(both).getByText(/T. Oswin saved another text/)).toBeTruthy();
    expect(within(both).getByLabelText<HTMLTextAreaElement>(/yours/).value).toBe('# Mine\n');
    expect(within(both).getByLabelText<HTMLTextAreaElement>(/saved by/).value).toBe('# Theirs\n');
    expect(server.current.source).toBe('# Theirs\n');
    await userEvent.click(within(both).getByRole('button', { name: /Keep mine/ }));
    await waitFor(() => expect(server.current.source).toBe('# Mine\n'));
    expect(server.current.revision).toBe(5);
  });

  it('takes the place of one’s own where that is chosen', async () => {
    await openFormulation();
    server.current = draftOf('# Theirs\n', 4, 'T. Oswin');
    write('# Mine\n');
    const both = await screen.findByRole('region', { name: 'Two texts of this draft' });
    await userEvent.click(within(both).getByRole('button', { name: /Take theirs/ }));
    expect(text().value).toBe('# Theirs\n');
  });

  it('is followed by a text without changes of its own when one comes back to the page', async () => {
    await openFormulation();
    server.current = draftOf(`${HARD_CORE_FLUID}# by another hand\n`, 4, 'T. Oswin');
    document.dispatchEvent(new Event('visibilitychange'));
    await waitFor(() => expect(text().value).toContain('# by another hand'));
  });
});

describe('without a connection', () => {
  it('the text is kept in the browser, and saved when the connection returns', async () => {
    await openFormulation();
    server.isDown = true;
    write('# Offline\n');
    expect(await screen.findByText(/kept in this browser, saved when it returns/)).toBeTruthy();
    expect(localStorage.getItem('massieu draft m1')).toContain('# Offline');
    server.isDown = false;
    window.dispatchEvent(new Event('online'));
    await waitFor(() => expect(server.current.source).toBe('# Offline\n'));
  });

  it('the text survives leaving the section', async () => {
    const client = createQueryClient();
    await openFormulation(MODEL, client);
    server.isDown = true;
    write('# Left in a hurry\n');
    await screen.findByText(/kept in this browser, saved/);
    cleanup();
    await openFormulation(MODEL, client);
    expect(text().value).toBe('# Left in a hurry\n');
  });
});
