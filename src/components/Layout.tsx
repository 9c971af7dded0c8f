/** The sheet of content and the margin beside it, in which stands what is said about the content. */
import type { HTMLAttributes, ReactNode } from 'react';
import { classes } from './classes.ts';

/** One column of content, and a margin of 320 px where the window is wide enough. */
export function TwoColumns({ className, ...rest }: HTMLAttributes<HTMLDivElement>) {
  return (
    <div
      className={classes(
        'desk:grid-cols-[minmax(0,1fr)_320px] desk:items-start desk:gap-44 grid grid-cols-[minmax(0,1fr)]',
        className,
      )}
      {...rest}
    />
  );
}

export function Sheet({ className, ...rest }: HTMLAttributes<HTMLDivElement>) {
  return (
    <div
      className={classes(
        'border-hair bg-sheet desk:px-28 desk:pt-18 desk:pb-26 min-w-0 border p-14',
        className,
      )}
      {...rest}
    />
  );
}

export function Margin({
  label,
  className,
  ...rest
}: HTMLAttributes<HTMLElement> & { readonly label: string }) {
  return (
    <aside
      aria-label={label}
      className={classes(
        'text-note text-ink-2 desk:pt-20 desk:pb-0 desk:pl-0 pt-10 pb-16 pl-14',
        className,
      )}
      {...rest}
    />
  );
}

/** A heading of the sheet or the margin. */
export function SmallHeading({
  children,
  aside,
  className,
}: {
  readonly children: ReactNode;
  /** Said beside it in small: `as of line 13 · 11 ms`. */
  readonly aside?: ReactNode;
  readonly className?: string;
}) {
  return (
    <h2 className={classes('text-body text-ink mb-8 font-[560]', className)}>
      {children}
      {aside !== undefined && (
        <>
          {' '}
          <small className="text-ink-3 font-mono text-[12px] font-normal">{aside}</small>
        </>
      )}
    </h2>
  );
}

const NOTE = {
  plain: 'border-rule',
  ochre: 'border-ochre',
  cinnabar: 'border-cinnabar',
  verdigris: 'border-verdigris',
} as const;

/** A remark in the margin: a rule at its left, whose colour goes with the words. */
export function Note({
  tone = 'plain',
  className,
  ...rest
}: HTMLAttributes<HTMLDivElement> & { readonly tone?: keyof typeof NOTE }) {
  return (
    <div className={classes('text-note my-14 border-l-2 pl-14', NOTE[tone], className)} {...rest} />
  );
}

/** A row of tools above the content. */
export function Tools({ className, ...rest }: HTMLAttributes<HTMLDivElement>) {
  return (
    <div
      className={classes(
        'text-label text-ink-3 mb-18 flex flex-wrap items-center gap-10 font-mono',
        className,
      )}
      {...rest}
    />
  );
}
