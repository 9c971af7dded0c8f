/** Seals: a ring with a mark, and the words that say the same. */
import type { CheckStatus } from '../../shared/contracts/derivation.ts';
import { classes } from './classes.ts';

const COLOUR: Record<CheckStatus, string> = {
  passed: 'text-verdigris',
  failed: 'text-cinnabar',
  undecided: 'text-ochre',
};

const MARK: Record<CheckStatus, string> = {
  passed: 'M4.6 8.3 7 10.7l4.5-5',
  failed: 'M5.3 5.3l5.4 5.4M10.7 5.3l-5.4 5.4',
  undecided: 'M4.8 8h6.4',
};

/** The mark alone; the words belong beside it. */
export function SealMark({ status }: { readonly status: CheckStatus }) {
  return (
    <svg
      viewBox="0 0 16 16"
      width="16"
      height="16"
      aria-hidden="true"
      // Its foot stands a little below the line of writing, as a letter's would.
      className={classes('relative top-[3px] inline-block flex-none', COLOUR[status])}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.3"
    >
      <circle
        cx="8"
        cy="8"
        r="6.4"
        {...(status === 'undecided' ? { strokeDasharray: '2.4 1.6' } : {})}
      />
      <path d={MARK[status]} strokeWidth="1.5" />
    </svg>
  );
}

/** `verified 3 of 3`, `failed, 2 of 3 passed`, `not decided, 2 of 3 passed`. */
export function sealWords(status: CheckStatus, passed?: number, total?: number): string {
  const counted = passed !== undefined && total !== undefined;
  if (status === 'passed') return counted ? `verified ${passed} of ${total}` : 'verified';
  const word = status === 'failed' ? 'failed' : 'not decided';
  return counted ? `${word}, ${passed} of ${total} passed` : word;
}

interface SealProps {
  readonly status: CheckStatus;
  readonly passed?: number;
  readonly total?: number;
  /** Opens what was tried. */
  readonly onOpen?: () => void;
  readonly isOpen?: boolean;
}

export function Seal({ status, passed, total, onOpen, isOpen }: SealProps) {
  const content = (
    <>
      <SealMark status={status} />
      <span className={onOpen && 'underline decoration-dotted underline-offset-[3px]'}>
        {sealWords(status, passed, total)}
      </span>
    </>
  );
  const className = classes(
    'inline-flex items-baseline gap-[7px] font-mono text-label whitespace-nowrap',
    onOpen && 'min-h-28',
    COLOUR[status],
  );
  if (!onOpen) return <span className={className}>{content}</span>;
  return (
    <button type="button" onClick={onOpen} aria-expanded={isOpen} className={className}>
      {content}
    </button>
  );
}
