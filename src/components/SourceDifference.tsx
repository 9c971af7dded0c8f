/** What changed in the source between two versions, line by line, with what stands around it. */
import { useMemo } from 'react';
import { diffLines } from 'diff';
import { classes } from './classes.ts';

interface Line {
  readonly kind: 'kept' | 'added' | 'removed' | 'gap';
  readonly text: string;
}

const AROUND = 2;

/** The changed lines with two unchanged ones around each; longer stretches become one gap. */
export function differenceOf(before: string, after: string): Line[] {
  const all = diffLines(before, after).flatMap(({ value, added, removed }) =>
    value
      .replace(/\n$/, '')
      .split('\n')
      .map<Line>((text) => ({ kind: added ? 'added' : removed ? 'removed' : 'kept', text })),
  );
  const isNear = all.map((_, index) =>
    all.slice(Math.max(0, index - AROUND), index + AROUND + 1).some(({ kind }) => kind !== 'kept'),
  );
  const lines: Line[] = [];
  all.forEach((line, index) => {
    if (isNear[index]) lines.push(line);
    else if (lines.at(-1)?.kind !== 'gap') lines.push({ kind: 'gap', text: '' });
  });
  return lines.some(({ kind }) => kind === 'added' || kind === 'removed') ? lines : [];
}

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
  removed: 'text-ink-2 line-through decoration-ink-3',
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
