import { describe, expect, it } from 'vitest';
import { multiply, two } from '../../../shared/algebra/construct.ts';
import { createModel, type Model } from '../../../shared/thermodynamics/model.ts';
import { verify } from '../../../shared/thermodynamics/verification/index.ts';
import { verificationSchema } from '../../../shared/contracts/derivation.ts';
import { fluid } from './fixtures.ts';

describe('the verification of a sound model', { timeout: 60_000 }, () => {
  const result = verify(createModel(fluid()));

  it('passes in every property and keeps to its contract', () => {
    expect(verificationSchema.parse(result)).toEqual(result);
    expect(result.status).toBe('passed');
    expect(result.properties.filter(({ status }) => status !== 'passed')).toEqual([]);
  });

  it('takes every property again by a library and by differences', () => {
    for (const { checks } of result.properties) {
      const kinds = checks.map(({ kind }) => kind);
      expect(kinds).toContain('second opinion');
      expect(kinds).toContain('numerical derivative');
      expect(kinds).toContain('dimension');
    }
  });

  it('is the same when done again', () => {
    expect(JSON.stringify(verify(createModel(fluid())))).toBe(JSON.stringify(result));
  });

  it('tells how far it has come', () => {
    const fractions: number[] = [];
    verify(createModel(fluid()), { onProgress: (_, fraction) => fractions.push(fraction) });
    expect(fractions).toEqual([...fractions].sort((a, b) => a - b));
    expect(fractions.at(-1)).toBe(1);
  });
});

describe('the verification of a wrong property', () => {
  const sound = createModel(fluid());
  const wrong: Model = {
    ...sound,
    worked: (name) => {
      const { raw, value } = sound.worked(name);
      return name === 'p' ? { raw, value: multiply(two, value) } : { raw, value };
    },
  };
  const result = verify(wrong);

  it('fails by both independent ways, and shows where', () => {
    const checks = result.properties.find(({ symbol }) => symbol === 'p')?.checks ?? [];
    const failed = checks.filter(({ status }) => status === 'failed');
    expect(failed.map(({ kind }) => kind)).toEqual(['second opinion', 'numerical derivative']);
    expect(failed[0]?.detail).toMatch(/as derived, .* by this check, at .*T = /);
    expect(result.status).toBe('failed');
  });

  it('leaves the others standing', () => {
    expect(result.properties.find(({ symbol }) => symbol === 'U')?.status).toBe('passed');
  });
});
