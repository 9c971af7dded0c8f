import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { useShortcut } from '../../../src/components/shortcuts.ts';

function Page({ run }: { readonly run: () => void }) {
  useShortcut('/', 'find', run);
  return (
    <>
      <p>text</p>
      <input aria-label="field" />
      <div role="textbox" tabIndex={0} aria-label="editor">
        <span>q = V/Lambda^3</span>
      </div>
    </>
  );
}

afterEach(cleanup);

describe('a key of the application', () => {
  it('does its work where nobody is typing', () => {
    const run = vi.fn();
    render(<Page run={run} />);
    fireEvent.keyDown(screen.getByText('text'), { key: '/' });
    expect(run).toHaveBeenCalledOnce();
  });

  it.each(['field', 'editor'])('is a character in the %s', (label) => {
    const run = vi.fn();
    render(<Page run={run} />);
    fireEvent.keyDown(screen.getByLabelText(label), { key: '/' });
    expect(run).not.toHaveBeenCalled();
  });

  it('is a character within the editor’s lines as well', () => {
    const run = vi.fn();
    render(<Page run={run} />);
    fireEvent.keyDown(screen.getByText('q = V/Lambda^3'), { key: '/' });
    expect(run).not.toHaveBeenCalled();
  });
});
