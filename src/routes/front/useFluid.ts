/** The fluid of a derivation, compiled for drawing; what that takes is fetched when it is needed. */
import { useEffect, useState } from 'react';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import type { Fluid } from './criticalPoint.ts';

export function useFluid(derivation: Derivation): Fluid | undefined {
  const [known, setKnown] = useState<{ of: Derivation; fluid: Fluid | undefined }>();
  useEffect(() => {
    let isWanted = true;
    void import('./compileFluid.ts').then(({ compileFluid }) => {
      if (isWanted) setKnown({ of: derivation, fluid: compileFluid(derivation) });
    });
    return () => {
      isWanted = false;
    };
  }, [derivation]);
  // While the next one is compiled the one before stays, so that the plot does not flicker.
  return known?.fluid;
}
