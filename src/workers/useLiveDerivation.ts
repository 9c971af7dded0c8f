/** What follows from a source while it is being typed. */
import { useEffect, useRef, useState } from 'react';
import type { Derivation } from '../../shared/contracts/derivation.ts';
import type { Diagnostic } from '../../shared/language/diagnostic.ts';
import { LiveDeriver } from './liveDeriver.ts';

export interface LiveDerivation {
  /** What follows from the last sound source; undefined until there was one. */
  readonly derivation: Derivation | undefined;
  /** Faults and warnings of the latest source that was looked at. */
  readonly diagnostics: readonly Diagnostic[];
  /** Whether `derivation` belongs to an earlier source, since the latest is at fault. */
  readonly isStale: boolean;
  /** Time that `derivation` took in the worker. */
  readonly milliseconds: number | undefined;
  /** Why nothing could be said of the latest source; undefined where something could. */
  readonly failure: string | undefined;
  /** The source of which `diagnostics` speak. */
  readonly source: string | undefined;
  /** The source from which `derivation` follows. */
  readonly soundSource: string | undefined;
}

const NOTHING: LiveDerivation = {
  derivation: undefined,
  diagnostics: [],
  isStale: false,
  milliseconds: undefined,
  failure: undefined,
  source: undefined,
  soundSource: undefined,
};

/**
 * Derives the source in a Web Worker, anew with every change of it. With `brief`, a list that stays
 * the same, only these properties are derived, and only their formulas: quick enough for typing.
 */
export function useLiveDerivation(source: string, brief?: readonly string[]): LiveDerivation {
  const [live, setLive] = useState(NOTHING);
  const deriver = useRef<LiveDeriver | undefined>(undefined);

  useEffect(() => {
    deriver.current = new LiveDeriver(
      () => new Worker(new URL('./derive.worker.ts', import.meta.url), { type: 'module' }),
      {
        onResponse: ({ derivation, diagnostics, milliseconds }, of) =>
          setLive((before) => ({
            derivation: derivation ?? before.derivation,
            diagnostics,
            isStale: derivation === undefined,
            milliseconds: derivation ? milliseconds : before.milliseconds,
            failure: undefined,
            source: of,
            soundSource: derivation ? of : before.soundSource,
          })),
        onFailure: (failure, of) =>
          setLive((before) => ({ ...before, diagnostics: [], isStale: true, failure, source: of })),
      },
      brief,
    );
    return () => {
      deriver.current?.close();
      deriver.current = undefined;
    };
  }, [brief]);

  useEffect(() => deriver.current?.derive(source), [source, brief]);
  return live;
}
