import { afterEach, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { act, cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { Dialog } from '../../../src/components/Dialog.tsx';
import { Field } from '../../../src/components/Field.tsx';
import { KeyboardHelp } from '../../../src/components/KeyboardHelp.tsx';
import { MessageAnnouncer, MessageLine } from '../../../src/components/MessageLine.tsx';
import { dismiss, say } from '../../../src/components/messages.ts';
import { Progress } from '../../../src/components/Progress.tsx';
import { Seal } from '../../../src/components/Seal.tsx';
import { useShortcut } from '../../../src/components/shortcuts.ts';
import { completeBrowser } from './rendering.ts';

beforeAll(completeBrowser);
afterEach(cleanup);
beforeEach(() => act(dismiss));

describe('a seal', () => {
  it('says in words what its mark shows', () => {
    render(
      <>
        <Seal status="passed" passed={3} total={3} />
        <Seal status="failed" passed={2} total={3} />
        <Seal status="undecided" passed={2} total={3} />
      </>,
    );
    expect(screen.getByText('verified 3 of 3')).toBeTruthy();
    expect(screen.getByText('failed, 2 of 3 passed')).toBeTruthy();
    expect(screen.getByText('not decided, 2 of 3 passed')).toBeTruthy();
  });
});

describe('progress', () => {
  it('says what is being done and how much of it, and can be cancelled', async () => {
    const cancel = vi.fn();
    render(<Progress stage="deriving C_p" progress={0.456} onCancel={cancel} />);
    const bar = screen.getByRole('progressbar', { name: 'deriving C_p' });
    expect(bar.getAttribute('aria-valuenow')).toBe('46');
    await userEvent.click(screen.getByRole('button', { name: 'Cancel' }));
    expect(cancel).toHaveBeenCalledOnce();
  });
});

describe('a field', () => {
  it('is described by its fault and its help', () => {
    render(<Field label="Name" help="As printed." fault="Write a name." />);
    const field = screen.getByRole('textbox', { name: 'Name' });
    const described = field
      .getAttribute('aria-describedby')
      ?.split(' ')
      .map((id) => document.getElementById(id)?.textContent);
    expect(described).toEqual(['Write a name.', 'As printed.']);
    expect(field.getAttribute('aria-invalid')).toBe('true');
  });
});

describe('a message', () => {
  it('is shown and read out, and can be undone', async () => {
    const undo = vi.fn();
    render(
      <>
        <MessageLine />
        <MessageAnnouncer />
      </>,
    );
    act(() => say('The title is changed.', undo));
    expect(screen.getByRole('status').textContent).toBe('The title is changed.');
    await userEvent.click(screen.getByRole('button', { name: 'Undo' }));
    expect(undo).toHaveBeenCalledOnce();
    expect(screen.getByRole('status').textContent).toBe('');
  });
});

describe('keys', () => {
  function Finder({ onFind }: { readonly onFind: () => void }) {
    useShortcut('/', 'find something', onFind);
    return <input aria-label="field" />;
  }

  it('are listed by ?, with what they do', async () => {
    render(
      <>
        <Finder onFind={() => undefined} />
        <KeyboardHelp />
      </>,
    );
    await userEvent.keyboard('?');
    expect(screen.getByRole('dialog', { name: 'Keys' })).toBeTruthy();
    expect(screen.getByText('find something')).toBeTruthy();
  });

  it('do nothing while one types or a dialog is open', async () => {
    const find = vi.fn();
    const { rerender } = render(<Finder onFind={find} />);
    await userEvent.type(screen.getByRole('textbox'), '/');
    expect(find).not.toHaveBeenCalled();
    act(() => screen.getByRole('textbox').blur());
    await userEvent.keyboard('/');
    expect(find).toHaveBeenCalledOnce();
    rerender(
      <>
        <Finder onFind={find} />
        <Dialog title="Open" onClose={() => undefined}>
          <p>text</p>
        </Dialog>
      </>,
    );
    await userEvent.keyboard('/');
    expect(find).toHaveBeenCalledOnce();
  });
});
