/** Draws up the portrait of a fluid off the main thread: thousands of states are evaluated for it. */
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { compileFluid } from './compileFluid.ts';
import { portray } from './portrait.ts';
import type { Portrait } from './portrait.ts';

export interface PortraitResponse {
  /** False for models of other variables, which have no isotherms in this sense. */
  readonly isFluid: boolean;
  /** Undefined where the pressure has no values to show. */
  readonly portrait: Portrait | undefined;
}

self.addEventListener('message', ({ data }: MessageEvent<Derivation>) => {
  const fluid = compileFluid(data);
  const response: PortraitResponse = {
    isFluid: fluid !== undefined,
    portrait: fluid && portray(fluid),
  };
  self.postMessage(response);
});
