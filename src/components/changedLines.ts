/** The changed lines between two sources. */
import { diffLines } from 'diff';

export interface Line {
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
