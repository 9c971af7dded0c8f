/** The stream of what derivations of a model are doing, written into the cache as it comes. */
import { useEffect, useState } from 'react';
import { useQueryClient } from '@tanstack/react-query';
import type { QueryClient } from '@tanstack/react-query';
import { derivationEventSchema } from '../../shared/contracts/models.ts';
import type {
  DerivationEvent,
  Model,
  Version,
  VersionSummary,
} from '../../shared/contracts/models.ts';
import { modelPath } from './models.ts';
import { keys } from './queryClient.ts';
import { isSettled } from './versions.ts';

/** `lost` while the browser tries to connect again by itself. */
export type StreamState = 'connecting' | 'open' | 'lost';

/** Puts the news of one event into everything cached of the model. */
export function applyDerivationEvent(
  client: QueryClient,
  modelId: string,
  { versionId, versionNumber, derivation }: DerivationEvent,
): void {
  const update = <V extends VersionSummary>(version: V): V =>
    version.id === versionId && version.derivation.updatedAt <= derivation.updatedAt
      ? { ...version, derivation }
      : version;
  client.setQueryData<VersionSummary[]>(keys.versions(modelId), (known) => known?.map(update));
  client.setQueryData<Version>(keys.version(modelId, versionNumber), (known) =>
    known ? update(known) : known,
  );
  client.setQueryData<Model>(keys.model(modelId), (known) =>
    known?.latestVersion ? { ...known, latestVersion: update(known.latestVersion) } : known,
  );
  if (isSettled(derivation.state)) {
    void client.invalidateQueries({ queryKey: keys.version(modelId, versionNumber) });
    void client.invalidateQueries({ queryKey: keys.desk });
    void client.invalidateQueries({ queryKey: ['notebook'] });
  }
}

/** Follows the derivations of a model as long as the component is shown. */
export function useDerivationEvents(modelId: string): StreamState {
  const client = useQueryClient();
  const [state, setState] = useState<StreamState>('connecting');

  useEffect(() => {
    const stream = new EventSource(`${modelPath(modelId)}/events`);
    let wasLost = false;
    stream.onopen = () => {
      setState('open');
      // Whatever was missed while the stream was down is read afresh.
      if (wasLost) void client.invalidateQueries({ queryKey: keys.versions(modelId) });
      wasLost = false;
    };
    stream.onerror = () => {
      wasLost = true;
      setState('lost');
    };
    stream.addEventListener('derivation', (message: MessageEvent<string>) => {
      let data: unknown;
      try {
        data = JSON.parse(message.data);
      } catch {
        return;
      }
      const event = derivationEventSchema.safeParse(data);
      if (event.success) applyDerivationEvent(client, modelId, event.data);
    });
    return () => stream.close();
  }, [client, modelId]);

  return state;
}
