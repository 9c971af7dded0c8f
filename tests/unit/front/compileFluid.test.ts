import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { toJson } from '../../../shared/print/index.ts';
import { compileFluid } from '../../../src/routes/front/compileFluid.ts';
import { portray } from '../../../src/routes/front/portrait.ts';

const positive = (name: string) => C.symbol(name, { positive: true });
const [N, k, T, V, a, b] = ['N', 'k', 'T', 'V', 'a', 'b'].map(positive) as [
  ReturnType<typeof positive>,
  ReturnType<typeof positive>,
  ReturnType<typeof positive>,
  ReturnType<typeof positive>,
  ReturnType<typeof positive>,
  ReturnType<typeof positive>,
];
const free = C.subtract(V, C.multiply(N, b));
const pressure = C.subtract(
  C.divide(C.product([N, k, T]), free),
  C.divide(C.multiply(a, C.square(N)), C.square(V)),
);
const lnQ = C.sum([
  C.multiply(N, C.ln(free)),
  // Contributions without V and π in them are part of every real formula.
  C.multiply(N, C.ln(C.product([C.integer(2), C.pi, k, T]))),
  C.divide(C.multiply(a, C.square(N)), C.product([V, k, T])),
]);

function derivationOf(extent: string): Derivation {
  const formula = { tex: '', text: '' };
  return {
    title: '',
    ensemble: 'canonical',
    lnPartitionFunction: { symbolTex: '\\ln Q', ...formula, tree: toJson(lnQ) },
    variables: [
      { name: 'N', tex: 'N', role: 'number', unit: '1', description: '' },
      { name: extent, tex: extent, role: 'extent', unit: 'm^3', description: '' },
      { name: 'T', tex: 'T', role: 'temperature', unit: 'K', description: '' },
    ],
    quantities: [],
    values: { k: 1.380649e-23, a: 3.7e-49, b: 5.3e-29 },
    domain: [],
    properties: [
      {
        symbol: 'p',
        symbolTex: 'p',
        name: 'pressure',
        unit: 'Pa',
        definitionTex: '',
        ...formula,
        tree: toJson(pressure),
        forms: [],
        contributions: [],
        steps: [],
        notes: [],
      },
    ],
    claims: [],
  };
}

describe('the fluid of a derivation', () => {
  it('has the pressure of its formula for one mole, and none outside the domain', () => {
    const fluid = compileFluid(derivationOf('V'));
    const moles = 6.02214076e23;
    const excluded = moles * 5.3e-29;
    const expected =
      (moles * 1.380649e-23 * 300) / (1e-3 - excluded) - (3.7e-49 * moles ** 2) / 1e-6;
    expect((fluid?.pressure(300, 1e-3) ?? 0) / expected).toBeCloseTo(1, 12);
    expect(fluid?.pressure(300, 0.9 * excluded)).toBeNaN();
  });

  it('has the critical point and the two curves of the hard core with attraction', () => {
    const fluid = compileFluid(derivationOf('V'));
    const portrait = fluid && portray(fluid);
    // k T_c = 8 a/(27 b)
    expect(portrait?.critical?.temperature).toBeCloseTo(
      (8 * 3.7e-49) / (27 * 5.3e-29 * 1.380649e-23),
      4,
    );
    expect(portrait?.coexistence.length).toBeGreaterThan(15);
  });

  it('is absent for models of another extent', () => {
    expect(compileFluid(derivationOf('M'))).toBeUndefined();
  });
});
