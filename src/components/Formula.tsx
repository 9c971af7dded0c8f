/**
 * A typeset formula. KaTeX comes as a chunk of its own, so that the first page is light; until it
 * is there, and where a formula cannot be typeset, its plain text stands in its place.
 */
import { useEffect, useRef, useState, useSyncExternalStore } from 'react';
import { classes } from './classes.ts';

type Typeset = (tex: string, isDisplay: boolean) => string | null;

let typeset: Typeset | undefined;
let loading: Promise<void> | undefined;
const listeners = new Set<() => void>();

/** Fetches KaTeX; harmless to call again. */
export function loadTypesetting(): Promise<void> {
  loading ??= import('./typeset.ts').then(
    (module) => {
      typeset = module.typeset;
      for (const listener of listeners) listener();
    },
    () => {
      // The next formula tries again.
      loading = undefined;
    },
  );
  return loading;
}

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  if (!typeset) void loadTypesetting();
  return () => listeners.delete(listener);
}

function useTypeset(): Typeset | undefined {
  return useSyncExternalStore(subscribe, () => typeset);
}

interface FormulaProps {
  readonly tex: string;
  /** The same as plain text, shown until and unless it can be typeset. */
  readonly text?: string;
  readonly className?: string;
}

/** A formula within a line. */
export function Formula({ tex, text, className }: FormulaProps) {
  const markup = useTypeset()?.(tex, false);
  if (!markup) {
    return (
      <code className={classes('text-ink-2 break-words', className)} title={text ? tex : undefined}>
        {text ?? tex}
      </code>
    );
  }
  return <span className={className} dangerouslySetInnerHTML={{ __html: markup }} />;
}

type Hidden = 'left' | 'right' | 'both' | undefined;

interface BoxedFormulaProps extends FormulaProps {
  /** What the formula is, for those who reach its box by keyboard. */
  readonly label?: string;
}

/** A formula on a line of its own; a long one scrolls in its box, faded where it is cut. */
export function DisplayFormula(props: BoxedFormulaProps) {
  return <BoxedFormula {...props} isDisplay />;
}

/** A formula in the size of running text, in a box in which a long one scrolls. */
export function ScrollingFormula(props: BoxedFormulaProps) {
  return <BoxedFormula {...props} isDisplay={false} />;
}

function BoxedFormula({
  tex,
  text,
  className,
  label,
  isDisplay,
}: BoxedFormulaProps & { readonly isDisplay: boolean }) {
  const markup = useTypeset()?.(tex, isDisplay);
  const box = useRef<HTMLDivElement>(null);
  const [hidden, setHidden] = useState<Hidden>();
  const [isScrolling, setIsScrolling] = useState(false);

  useEffect(() => {
    const element = box.current;
    if (!element) return;
    const measure = () => {
      setIsScrolling(element.scrollWidth > element.clientWidth);
      // A pixel too wide is nothing to fade.
      const left = element.scrollLeft > 1;
      const right = element.scrollLeft + element.clientWidth < element.scrollWidth - 1;
      setHidden(left && right ? 'both' : left ? 'left' : right ? 'right' : undefined);
    };
    measure();
    element.addEventListener('scroll', measure, { passive: true });
    const observer =
      typeof ResizeObserver === 'undefined' ? undefined : new ResizeObserver(measure);
    observer?.observe(element);
    // A face that comes later changes the width of the formula, and not of its box.
    const fonts = document.fonts as FontFaceSet | undefined;
    fonts?.addEventListener('loadingdone', measure);
    return () => {
      element.removeEventListener('scroll', measure);
      fonts?.removeEventListener('loadingdone', measure);
      observer?.disconnect();
    };
  }, [markup]);

  return (
    <div
      ref={box}
      data-more={hidden}
      className={classes('formula-scroll', isDisplay && 'text-formula', className)}
      // A box that scrolls must be reachable by keyboard.
      {...(isScrolling ? { tabIndex: 0, role: 'region', 'aria-label': label ?? 'formula' } : {})}
    >
      {markup ? (
        <div dangerouslySetInnerHTML={{ __html: markup }} />
      ) : (
        <code className="text-ink-2 block py-8 whitespace-pre">{text ?? tex}</code>
      )}
    </div>
  );
}
