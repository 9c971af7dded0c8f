/** A formulation to be read: numbered lines in the colours of the language. */
import { Fragment } from 'react';
import { classes } from './classes.ts';
import { sourceLines } from './sourceParts.ts';
import type { SourcePart } from './sourceParts.ts';

export function SourceLine({ parts }: { readonly parts: readonly SourcePart[] }) {
  return parts.map((part, index) =>
    part.kind === 'plain' ? (
      <Fragment key={index}>{part.text}</Fragment>
    ) : (
      <span key={index} className={`source-${part.kind}`}>
        {part.text}
      </span>
    ),
  );
}

export function SourceText({
  source,
  label,
  className,
}: {
  readonly source: string;
  readonly label: string;
  readonly className?: string;
}) {
  const lines = sourceLines(source.replace(/\n$/, ''));
  return (
    <ol aria-label={label} className={classes('desk:text-[15px] font-mono text-[14px]', className)}>
      {lines.map((parts, index) => (
        <li key={index} className="flex leading-[1.85]">
          <span
            aria-hidden="true"
            className="text-label text-ink-3 desk:w-38 w-26 flex-none leading-[2.1] select-none"
          >
            {index + 1}
          </span>
          <code className="desk:text-[15px] min-w-0 flex-1 text-[14px] break-words whitespace-pre-wrap">
            <SourceLine parts={parts} />
          </code>
        </li>
      ))}
    </ol>
  );
}
