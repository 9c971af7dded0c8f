/** Derives what the page sends, off its main thread. */
import { internedCount } from '../../shared/algebra/expression.ts';
import { derive } from '../../shared/thermodynamics/index.ts';
import type { DerivationRequest, DerivationResponse } from './derivationProtocol.ts';

self.addEventListener('message', ({ data }: MessageEvent<DerivationRequest>) => {
  const start = performance.now();
  const { diagnostics, derivation } = derive(
    data.source,
    data.brief ? { properties: data.brief, isBrief: true } : {},
  );
  const response: DerivationResponse = {
    id: data.id,
    diagnostics,
    derivation,
    milliseconds: performance.now() - start,
    expressions: internedCount(),
  };
  self.postMessage(response);
});
