import { describe, expect, it } from 'vitest';
import { derive, evaluate } from '../../../shared/thermodynamics/index.ts';

const IDEAL = `ensemble canonical
constant m [u] = 39.948
let Lambda = h / sqrt(2 pi m k T)
Q = (V / Lambda^3)^N / N!
`;

describe('deriving from a source text', () => {
  it('returns the faults of the language and nothing else', () => {
    const { diagnostics, derivation, model } = derive('ensemble canonical\nln Q = N ln(V)\n');
    expect(diagnostics.map(({ code }) => code)).toContain('dimension');
    expect(derivation).toBeUndefined();
    expect(model).toBeUndefined();
  });

  it('never throws, whatever the text', () => {
    for (const text of ['', '\u0000', 'Q = ', 'ensemble', '((((', 'ensemble canonical\nQ = Q^Q']) {
      expect(() => derive(text)).not.toThrow();
    }
  });

  it('shows reports among the properties', () => {
    const { derivation } = derive(`${IDEAL}report rho [m^-3] = N / V "number density"\n`);
    const rho = derivation?.properties.at(-1);
    expect(rho).toMatchObject({ symbol: 'rho', name: 'number density', text: 'N/V' });
  });

  it('names the claims by the line where they stand', () => {
    const { derivation } = derive(`${IDEAL}\nclaim "energy" U = 3/2 N k T\n`);
    expect(derivation?.claims).toMatchObject([{ title: 'energy', status: 'passed', line: 6 }]);
  });

  it('leaves out a property that does not exist, with the reason', () => {
    const { derivation } = derive('ensemble canonical\nln Q = 8 pi^5 V (k T)^3/(45 (h c)^3)\n');
    const symbols = derivation?.properties.map((p) => p.symbol);
    expect(symbols).toContain('p');
    expect(symbols).not.toContain('kappa_T');
    expect(derivation?.absent?.find((a) => a.symbol === 'kappa_T')?.reason).toContain('zero');
  });

  it('derives each species of a mixture', { timeout: 60_000 }, () => {
    const { derivation, model } = derive(`ensemble canonical
species w "water", e "ethanol"
constant m_w [u] = 18.015
constant m_e [u] = 46.068
let L_w = h / sqrt(2 pi m_w k T)
let L_e = h / sqrt(2 pi m_e k T)
Q = (V / L_w^3)^N_w / N_w! * (V / L_e^3)^N_e / N_e!
claim "Dalton" p = (N_w + N_e) k T / V
claim "Gibbs" G = mu_w N_w + mu_e N_e
`);
    expect(derivation?.claims.map(({ status }) => status)).toEqual(['passed', 'passed']);
    expect(derivation?.properties.map((p) => p.symbol)).toEqual(
      expect.arrayContaining(['mu_w', 'mu_e', 'w']),
    );
    if (!model) throw new Error('no model');
    const { values } = evaluate(model, { N_w: 1e23, N_e: 2e23, V: 0.01, T: 300 }, {}, ['p']);
    expect(values[0]?.value).toBeCloseTo((3e23 * 1.380649e-23 * 300) / 0.01, 6);
  });
});
