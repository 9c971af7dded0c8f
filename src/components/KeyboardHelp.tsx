/** The list of keys, on `?`. */
import { useState } from 'react';
import { Dialog } from './Dialog.tsx';
import { listShortcuts, spellKeys, useShortcut } from './shortcuts.ts';
import type { Shortcut } from './shortcuts.ts';

export function Key({ children }: { readonly children: string }) {
  return (
    <kbd className="border-rule text-label rounded-[3px] border px-4 font-mono">{children}</kbd>
  );
}

export function KeyboardHelp() {
  const [list, setList] = useState<readonly Shortcut[]>();
  useShortcut('?', 'list the keys', () => setList(listShortcuts()));
  if (!list) return null;
  return (
    <Dialog title="Keys" onClose={() => setList(undefined)}>
      <dl className="grid grid-cols-[auto_1fr] items-baseline gap-x-22 gap-y-8">
        {list.map(({ keys, does }) => (
          <div key={keys} className="contents">
            <dt>
              <Key>{spellKeys(keys)}</Key>
            </dt>
            <dd className="text-note text-ink-2">{does}</dd>
          </div>
        ))}
        <div className="contents">
          <dt>
            <Key>Esc</Key>
          </dt>
          <dd className="text-note text-ink-2">close what is open</dd>
        </div>
      </dl>
    </Dialog>
  );
}
