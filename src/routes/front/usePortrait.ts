/** The portrait of the fluid of a derivation, and the fluid itself for the isotherm that moves. */
import { useEffect, useRef, useState } from 'react';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { compileFluid } from './compileFluid.ts';
import type { Fluid } from './criticalPoint.ts';
import type { PortraitResponse } from './portrait.worker.ts';

export interface Portrayal extends PortraitResponse {
  readonly fluid: Fluid | undefined;
}

/**
 * Undefined until the first portrait is there; then the one before stays while the next is drawn
 * up, so that the plot does not flicker. Of what changes meanwhile only the newest is drawn.
 */
export function usePortrait(derivation: Derivation): Portrayal | undefined {
  const [portrayal, setPortrayal] = useState<Portrayal>();
  const show = useRef<((derivation: Derivation) => void) | undefined>(undefined);

  useEffect(() => {
    const worker = new Worker(new URL('./portrait.worker.ts', import.meta.url), {
      type: 'module',
    });
    let drawn: Derivation | undefined;
    let waiting: Derivation | undefined;
    const start = (next: Derivation) => {
      drawn = next;
      waiting = undefined;
      worker.postMessage(next);
    };
    worker.onmessage = ({ data }: MessageEvent<PortraitResponse>) => {
      if (drawn) setPortrayal({ ...data, fluid: compileFluid(drawn) });
      drawn = undefined;
      if (waiting) start(waiting);
    };
    show.current = (next) => {
      if (drawn) waiting = next;
      else start(next);
    };
    return () => {
      show.current = undefined;
      worker.terminate();
    };
  }, []);

  useEffect(() => show.current?.(derivation), [derivation]);
  return portrayal;
}
