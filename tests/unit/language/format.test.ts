import { describe, expect, it } from 'vitest';
import { analyse, format } from '../../../shared/language/index.ts';
import checks from '../../reference/checks.json' with { type: 'json' };
import { FLUID, LATTICE_GAS } from './texts.ts';

describe('tidying', () => {
  it('spaces evenly and keeps names, comments and lines', () => {
    const text =
      '#  Title\n\n\nensemble   canonical\nlet Λ=h/sqrt( 2π m k T )   # wavelength\n\nconstant m[u]=1.0\nln Q=-N*ln( Λ/Λ )\n+3 / 2N!^2- N\n';
    expect(format(text)).toBe(
      '#  Title\n\nensemble canonical\nlet Λ = h / sqrt(2 π m k T)  # wavelength\n\nconstant m [u] = 1.0\nln Q = -N * ln(Λ / Λ)\n    + 3/2 N!^2 - N\n',
    );
  });

  it('leaves a text alone that cannot be read', () => {
    expect(format('let  x = (')).toBe('let  x = (');
  });

  it.each([FLUID, LATTICE_GAS, ...new Set(checks.map(({ formulation }) => formulation))])(
    'changes neither the meaning nor anything the second time: %#',
    (text) => {
      const tidied = format(text);
      expect(format(tidied)).toBe(tidied);
      const [before, after] = [analyse(text), analyse(tidied)];
      expect(after.formulation?.lnPartitionFunction).toBe(before.formulation?.lnPartitionFunction);
      expect(after.diagnostics.map(({ code }) => code)).toEqual(
        before.diagnostics.map(({ code }) => code),
      );
    },
  );
});

describe('the normal form', () => {
  const normal = (text: string): string | undefined => analyse(text).formulation?.normalizedSource;

  it('is the same for texts that differ in spacing and in the spelling of Greek letters', () => {
    const spaced = LATTICE_GAS.replace(/theta/g, 'θ')
      .replace(/ = /g, '=')
      .replace(/\n/g, '\r\n\r\n')
      .replace(/\* /g, '*');
    expect(normal(spaced)).toBe(normal(LATTICE_GAS));
    expect(normal(LATTICE_GAS)).toContain('theta');
  });

  it('keeps comments and differs where anything else does', () => {
    expect(normal(FLUID)).toContain('# Hard-core fluid');
    expect(normal(FLUID.replace('3.7e-49', '3.8e-49'))).not.toBe(normal(FLUID));
  });

  it('is its own normal form', () => {
    const once = normal(FLUID);
    expect(once && normal(once)).toBe(once);
  });
});
