/** Find, on `/`: groups, notebooks and models within reach, by any part of their names. */
import { useEffect, useMemo, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Desk } from '../../shared/contracts/models.ts';
import { useDesk } from '../api/index.ts';
import { paths } from '../routes/paths.ts';
import { Dialog } from './Dialog.tsx';
import { Key } from './KeyboardHelp.tsx';
import { useShortcut } from './shortcuts.ts';

export interface Found {
  readonly kind: 'group' | 'notebook' | 'model';
  readonly id: string;
  readonly title: string;
  /** Where it stands: the notebook of a model, the group of a notebook. */
  readonly within: string;
  readonly to: string;
}

const MOST = 12;

/** Everything on the desk that can be gone to, models first, each once. */
export function gatherPlaces(desk: Desk): Found[] {
  const models = desk.recentModels.map<Found>(({ id, title, notebook }) => ({
    kind: 'model',
    id,
    title,
    within: notebook.title,
    to: paths.model(id),
  }));
  const notebooks = desk.groups.flatMap((group) =>
    group.notebooks.map<Found>(({ id, title }) => ({
      kind: 'notebook',
      id,
      title,
      within: group.name,
      to: paths.notebook(id),
    })),
  );
  const groups = desk.groups.map<Found>(({ id, name, role }) => ({
    kind: 'group',
    id,
    title: name,
    within: role,
    to: paths.group(id),
  }));
  return [...models, ...notebooks, ...groups];
}

/** Those in whose name or place every word of the query occurs. */
export function findPlaces(places: readonly Found[], query: string): Found[] {
  const words = query.toLowerCase().split(/\s+/).filter(Boolean);
  return places
    .filter(({ title, within, kind }) => {
      const text = `${title} ${within} ${kind}`.toLowerCase();
      return words.every((word) => text.includes(word));
    })
    .slice(0, MOST);
}

export function FindButton() {
  const [isOpen, setOpen] = useState(false);
  useShortcut('/', 'find a group, a notebook or a model', () => setOpen(true));
  return (
    <>
      <button
        type="button"
        onClick={() => setOpen(true)}
        aria-keyshortcuts="/"
        className="border-rule text-ink-2 hover:border-ink-3 hover:text-ink min-h-28 rounded border px-8 py-4"
      >
        Find <Key>/</Key>
      </button>
      {isOpen && <FindDialog onClose={() => setOpen(false)} />}
    </>
  );
}

function FindDialog({ onClose }: { readonly onClose: () => void }) {
  const desk = useDesk();
  const navigate = useNavigate();
  const [query, setQuery] = useState('');
  const [chosen, setChosen] = useState(0);
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => field.current?.focus(), []);
  const places = useMemo(() => (desk.data ? gatherPlaces(desk.data) : []), [desk.data]);
  const found = findPlaces(places, query);
  const current = found[Math.min(chosen, found.length - 1)];

  const go = (place: Found | undefined) => {
    if (!place) return;
    onClose();
    void navigate(place.to);
  };

  return (
    <Dialog title="Find" onClose={onClose}>
      <input
        ref={field}
        type="search"
        role="combobox"
        aria-label="Find a group, a notebook or a model"
        aria-expanded={found.length > 0}
        aria-controls="found-places"
        aria-activedescendant={current ? `found-${current.kind}-${current.id}` : undefined}
        autoComplete="off"
        placeholder="part of a name"
        value={query}
        onChange={(event) => {
          setQuery(event.target.value);
          setChosen(0);
        }}
        onKeyDown={(event) => {
          if (event.key === 'ArrowDown') setChosen(Math.min(chosen + 1, found.length - 1));
          else if (event.key === 'ArrowUp') setChosen(Math.max(chosen - 1, 0));
          else if (event.key === 'Enter') go(current);
          else return;
          event.preventDefault();
        }}
        className="border-ink-3 bg-sheet text-label text-ink block w-full rounded border px-10 py-8"
      />
      <ul id="found-places" role="listbox" aria-label="Found" className="mt-14">
        {found.map((place, index) => (
          // The keys are those of the field, as the pattern of a combobox has it.
          // eslint-disable-next-line jsx-a11y/click-events-have-key-events
          <li
            key={place.kind + place.id}
            id={`found-${place.kind}-${place.id}`}
            role="option"
            aria-selected={place === current}
            onClick={() => go(place)}
            onPointerMove={() => setChosen(index)}
            className="aria-selected:border-ultramarine aria-selected:bg-ultramarine-wash flex cursor-pointer items-baseline gap-14 border-l-2 border-transparent px-10 py-6"
          >
            <span className="text-body text-ink">{place.title}</span>
            <span className="text-label text-ink-3 ml-auto text-right font-mono">
              {place.kind} · {place.within}
            </span>
          </li>
        ))}
      </ul>
      {desk.isPending && <p className="text-label text-ink-3 font-mono">Fetching …</p>}
      {desk.data && found.length === 0 && (
        <p role="status" className="text-note text-ink-2">
          Nothing of that name is within reach.
        </p>
      )}
    </Dialog>
  );
}
