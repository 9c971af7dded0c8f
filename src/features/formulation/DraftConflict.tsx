/** Two texts of one draft side by side, until a person chooses one or puts them together. */
import { useState } from 'react';
import type { Draft } from '../../../shared/contracts/models.ts';
import { ActButton, QuietButton, RelativeTime } from '../../components/index.ts';

interface DraftConflictProps {
  readonly mine: string;
  readonly theirs: Draft;
  readonly onSettle: (text: string) => void;
}

const AREA =
  'bg-paper border-rule text-note mt-6 min-h-[260px] w-full resize-y rounded border p-10 font-mono leading-[1.7]';

export function DraftConflict({ mine, theirs, onSettle }: DraftConflictProps) {
  const [text, setText] = useState(mine);
  return (
    <section aria-label="Two texts of this draft" className="border-ochre mb-22 border-l-2 pl-14">
      <p className="text-note text-ink-2">
        <b className="text-ochre">Two texts.</b> {theirs.updatedBy.name} saved another text{' '}
        <RelativeTime at={theirs.updatedAt} />. Nothing is lost: keep yours, edited here if need be,
        or take the other.
      </p>
      <div className="desk:grid-cols-2 mt-14 grid gap-22">
        <label className="text-label text-ink-3 font-mono">
          yours, to be edited
          <textarea
            className={AREA}
            spellCheck={false}
            value={text}
            onChange={(event) => setText(event.target.value)}
          />
        </label>
        <label className="text-label text-ink-3 font-mono">
          saved by {theirs.updatedBy.name}
          <textarea className={AREA} spellCheck={false} readOnly value={theirs.source} />
        </label>
      </div>
      <div className="mt-14 flex flex-wrap gap-10">
        <ActButton onClick={() => onSettle(text)}>Keep mine</ActButton>
        <QuietButton onClick={() => onSettle(theirs.source)}>Take theirs</QuietButton>
      </div>
    </section>
  );
}
