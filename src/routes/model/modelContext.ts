/** What the frame of a model hands to the section within it. */
import { useOutletContext } from 'react-router-dom';
import type { Model } from '../../../shared/contracts/models.ts';
import type { StreamState } from '../../api/index.ts';

export interface ModelContext {
  readonly model: Model;
  /** Whether news of derivations arrive at the moment. */
  readonly stream: StreamState;
}

/** The model whose section is shown; for components within the frame only. */
export function useModelContext(): ModelContext {
  return useOutletContext<ModelContext>();
}
