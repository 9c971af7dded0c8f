/** The reference of the formulation language, searched by `/`. */
import { useRef } from 'react';
import { useSearchParams } from 'react-router-dom';
import { Key } from '../../components/KeyboardHelp.tsx';
import { Margin, Sheet, SmallHeading, TwoColumns } from '../../components/Layout.tsx';
import { Room } from '../../components/Room.tsx';
import { SourceLine } from '../../components/SourceText.tsx';
import { sourceParts } from '../../components/sourceParts.ts';
import { useShortcut } from '../../components/shortcuts.ts';
import { searchReference } from './reference.ts';
import type { Chapter } from './reference.ts';

function ChapterText({
  chapter,
  isFiltered,
}: {
  readonly chapter: Chapter;
  readonly isFiltered: boolean;
}) {
  return (
    <section
      aria-labelledby={chapter.id}
      className="border-hair border-t pt-22 pb-30 first:border-0 first:pt-0"
    >
      <h2 id={chapter.id} className="text-heading mb-8 scroll-mt-22 font-[480]">
        {chapter.title}
      </h2>
      {!isFiltered && <p className="max-w-text text-ink-2 mb-14">{chapter.opening}</p>}
      <dl>
        {chapter.entries.map(({ name, says, example }) => (
          <div
            key={name}
            className="border-rule desk:grid-cols-[190px_minmax(0,1fr)] grid grid-cols-[minmax(0,1fr)] gap-x-22 border-t border-dotted py-10"
          >
            <dt className="text-label text-ink font-mono leading-[25px]">{name}</dt>
            <dd>
              <p className="max-w-text text-ink-2">{says}</p>
              {example !== undefined && (
                <pre className="mt-4 text-[14px] leading-[1.7] break-words whitespace-pre-wrap">
                  <code className="text-[14px]">
                    <SourceLine parts={sourceParts(example)} />
                  </code>
                </pre>
              )}
            </dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

export function Component() {
  const [search, setSearch] = useSearchParams();
  const query = search.get('q') ?? '';
  const chapters = searchReference(query);
  const field = useRef<HTMLInputElement>(null);
  useShortcut('/', 'search the reference', () => field.current?.focus());
  return (
    <Room windowTitle="The language" title="The language">
      <TwoColumns>
        <Sheet>
          {chapters.map((chapter) => (
            <ChapterText key={chapter.id} chapter={chapter} isFiltered={query !== ''} />
          ))}
          {chapters.length === 0 && (
            <p className="text-ink-2 py-22">The reference says nothing of “{query}”.</p>
          )}
        </Sheet>
        <Margin label="Search and chapters" className="max-desk:order-first max-desk:pl-0">
          <div className="desk:sticky desk:top-22">
            <label
              className="text-label text-ink-2 mb-4 block font-mono"
              htmlFor="search-reference"
            >
              Search <Key>/</Key>
            </label>
            <input
              id="search-reference"
              ref={field}
              type="search"
              value={query}
              onChange={(event) =>
                setSearch(event.target.value === '' ? {} : { q: event.target.value }, {
                  replace: true,
                  preventScrollReset: true,
                })
              }
              className="border-ink-3 bg-sheet text-label text-ink mb-22 block w-full rounded border px-10 py-6"
            />
            <p role="status" className="sr-only">
              {query !== '' &&
                `${chapters.reduce((sum, { entries }) => sum + entries.length, 0)} entries found`}
            </p>
            <SmallHeading>Chapters</SmallHeading>
            <ul className="max-desk:flex max-desk:flex-wrap max-desk:gap-x-14">
              {chapters.map(({ id, title }) => (
                <li key={id} className="py-4">
                  <a href={`#${id}`}>{title}</a>
                </li>
              ))}
            </ul>
          </div>
        </Margin>
      </TwoColumns>
    </Room>
  );
}
