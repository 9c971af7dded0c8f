import { describe, expect, it } from 'vitest';
import { QueryClient } from '@tanstack/react-query';
import type { Model, VersionSummary } from '../../../shared/contracts/models.ts';
import { applyDerivationEvent } from '../../../src/api/derivationEvents.ts';
import { keys } from '../../../src/api/queryClient.ts';

const version: VersionSummary = {
  id: 'v2',
  number: 2,
  hash: 'a'.repeat(64),
  note: '',
  frozenAt: '2026-05-14T10:00:00.000Z',
  frozenBy: { id: 'p', name: 'I. Varnholt' },
  derivation: {
    state: 'deriving',
    progress: 0.5,
    stage: 'deriving C_p',
    fault: null,
    verification: null,
    updatedAt: '2026-05-14T10:00:02.000Z',
  },
};

function cached() {
  const client = new QueryClient();
  client.setQueryData(keys.versions('m'), [version, { ...version, id: 'v1', number: 1 }]);
  client.setQueryData(keys.model('m'), { id: 'm', latestVersion: version });
  return client;
}

describe('news of a derivation', () => {
  it('reach the version in the list and in the model, and no other', () => {
    const client = cached();
    applyDerivationEvent(client, 'm', {
      versionId: 'v2',
      versionNumber: 2,
      derivation: { ...version.derivation, progress: 0.8, updatedAt: '2026-05-14T10:00:03.000Z' },
    });
    const versions = client.getQueryData<VersionSummary[]>(keys.versions('m'));
    expect(versions?.map(({ derivation }) => derivation.progress)).toEqual([0.8, 0.5]);
    const model = client.getQueryData<Model>(keys.model('m'));
    expect(model?.latestVersion?.derivation.progress).toBe(0.8);
  });

  it('never turn the clock back when they arrive late', () => {
    const client = cached();
    applyDerivationEvent(client, 'm', {
      versionId: 'v2',
      versionNumber: 2,
      derivation: { ...version.derivation, progress: 0.1, updatedAt: '2026-05-14T10:00:01.000Z' },
    });
    const versions = client.getQueryData<VersionSummary[]>(keys.versions('m'));
    expect(versions?.[0]?.derivation.progress).toBe(0.5);
  });
});
