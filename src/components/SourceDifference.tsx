/** What changed in the source between two versions, line by line, with what stands around it. */
import { useMemo } from 'react';
import { classes } from './classes.ts';
import { differenceOf } from './changedLines.ts';
import type { Line } from './changedLines.ts';

const SIGN: Record<Line['kind'], string> = { kept: ' ', added: '+', removed: '−', gap: '⋯' };
const WORD: Record<Line['kind'], string> = {
  kept: '',
  added: 'added: ',
  removed: 'removed: ',
  gap: 'unchanged lines left out',
};
const LOOK: Record<Line['kind'], string> = {
  kept: 'text-ink-3',
  added: 'bg-ultramarine-wash text-ink',
  removed: 'bg-hair text-ink-2',
  gap: 'text-ink-3',
};

export function SourceDifference({
  before,
  after,
}: {
  readonly before: string;
  readonly after: string;
}) {
  const lines = useMemo(() => differenceOf(before, after), [before, after]);
  if (lines.length === 0) {
    return <p className="text-note text-ink-3">The two sources are the same.</p>;
  }
  return (
    <ol className="text-label font-mono leading-[1.7]">
      {lines.map(({ kind, text }, index) => (
        <li key={index} className="flex">
          <span aria-hidden="true" className="text-ink-3 w-22 flex-none select-none">
            {SIGN[kind]}
          </span>
          <code
            className={classes('min-w-0 flex-1 px-4 break-words whitespace-pre-wrap', LOOK[kind])}
          >
            <span className="sr-only">{WORD[kind]}</span>
            {text}
          </code>
        </li>
      ))}
    </ol>
  );
}
