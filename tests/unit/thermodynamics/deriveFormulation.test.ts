import { describe, expect, it } from 'vitest';
import {
  call,
  divide,
  infinity,
  integer,
  multiply,
  one,
  power,
  product,
  square,
  symbol,
  zero,
} from '../../../shared/algebra/construct.ts';
import * as Q from '../../../shared/algebra/rational.ts';
import { derivationSchema } from '../../../shared/contracts/derivation.ts';
import type { Claim } from '../../../shared/language/formulation.ts';
import { deriveFormulation } from '../../../shared/thermodynamics/deriveFormulation.ts';
import { evaluate } from '../../../shared/thermodynamics/evaluate.ts';
import { dimension } from '../../../shared/units/dimension.ts';
import { a, b, fluid, k, N, stated, T, V } from './fixtures.ts';
import { ln } from '../../../shared/algebra/construct.ts';

const span = { start: 0, end: 0 };
const avogadro = symbol('N_Av', { positive: true });

describe('the derivation of a hard-core fluid', () => {
  const formulation = {
    ...fluid(),
    molar: [
      {
        name: 'a_m',
        expression: multiply(square(avogadro), a),
        dimension: dimension(5, 1, -2, 0, 0, -2),
        unit: 'Pa m^6 mol^-2',
        unitFactor: Q.ONE,
        description: '',
        span,
      },
      {
        name: 'b_m',
        expression: multiply(avogadro, b),
        dimension: dimension(3, 0, 0, 0, 0, -1),
        unit: 'm^3 mol^-1',
        unitFactor: Q.ONE,
        description: '',
        span,
      },
    ],
  };
  const { derivation, diagnostics } = deriveFormulation(formulation, '');
  const property = (name: string) => derivation?.properties.find((p) => p.symbol === name);

  it('has no complaints and keeps to its contract', () => {
    expect(diagnostics).toEqual([]);
    expect(derivationSchema.parse(derivation)).toEqual(derivation);
  });

  it('writes the pressure as one would', () => {
    expect(property('p')?.text).toBe('N k T/(V - N b) - a N^2/V^2');
    expect(property('p')?.definitionTex).toBe(
      'k T \\left(\\frac{\\partial \\ln Q}{\\partial V}\\right)_{N,T}',
    );
  });

  it('writes the entropy with the abbreviation of its author', () => {
    expect(property('S')?.text).toBe('N k (5/2 + ln((V - N b)/(N Lambda^3)))');
  });

  it('gives the forms per molecule and per mole with the molar parameters', () => {
    const forms = Object.fromEntries(property('p')?.forms.map((f) => [f.form, f.text]) ?? []);
    expect(forms).toEqual({
      'per molecule': 'k T/(v - b) - a/v^2',
      molar: 'R T/(V_m - b_m) - a_m/V_m^2',
    });
    expect(property('C_p')?.forms.find((f) => f.form === 'molar')?.unit).toBe('J/(K mol)');
  });

  it('lets the trail lead from the definition to the shown form', () => {
    const steps = property('p')?.steps ?? [];
    expect(steps.map(({ rule }) => rule)).toEqual([
      'definition',
      'logarithm of a product, Stirling’s formula',
      'term by term',
      'power, logarithm, chain rule',
      'times k T',
      'collected',
    ]);
    expect(steps.at(-1)?.tex).toBe(`p = ${property('p')?.tex ?? ''}`);
  });

  it('shows what each term of ln Q contributes', () => {
    expect(property('p')?.contributions.map(({ label, text }) => [label, text])).toEqual([
      ['excluded volume per molecule', 'N k T/(V - N b)'],
      ['attraction', '-a N^2/V^2'],
    ]);
    expect(property('C_p')?.contributions).toEqual([]);
  });

  it('says where a property diverges and what was assumed', () => {
    expect(property('kappa_T')?.notes.map(({ kind }) => kind)).toEqual(['diverges']);
    expect(property('S')?.notes.map(({ kind }) => kind)).toEqual(['assumes']);
    expect(property('p')?.notes).toEqual([]);
  });

  it('is the same, byte for byte, when done again', () => {
    const again = deriveFormulation(formulation, '');
    expect(JSON.stringify(again.derivation)).toBe(JSON.stringify(derivation));
  });

  it('can be limited to some properties', () => {
    const some = deriveFormulation(formulation, '', { properties: ['p', 'U'] });
    expect(some.derivation?.properties.map((p) => p.symbol)).toEqual(['p', 'U']);
  });

  it('tells how far it has come', () => {
    const stages: [string, number][] = [];
    deriveFormulation(formulation, '', {
      onProgress: (stage, fraction) => stages.push([stage, fraction]),
    });
    const fractions = stages.map(([, fraction]) => fraction);
    expect(fractions).toEqual([...fractions].sort((x, y) => x - y));
    expect(stages.at(-1)).toEqual(['derived', 1]);
    expect(stages.map(([stage]) => stage)).toContain('deriving C_p');
  });
});

describe('claims', () => {
  const p = symbol('p');
  const claim = (title: string) => ({ title, span, text: '' });
  const claims: Claim[] = [
    {
      ...claim('ideal when dilute'),
      kind: 'limit',
      of: divide(multiply(p, V), product([N, k, T])),
      value: one,
      variable: V,
      towards: infinity,
    },
    {
      ...claim('internal pressure'),
      kind: 'equality',
      left: call('partial', [symbol('U'), V, T, N]),
      right: product([a, square(N), power(V, integer(-2))]),
    },
    {
      ...claim('wrong energy'),
      kind: 'equality',
      left: symbol('U'),
      right: product([N, k, T]),
    },
    {
      ...claim('stable when dilute'),
      kind: 'inequality',
      relation: { left: symbol('kappa_T'), sign: '>', right: zero },
      ranges: [
        { expression: T, lower: Q.rational(300), upper: Q.rational(600) },
        {
          expression: divide(V, N),
          lower: Q.fromDecimal('1e-27'),
          upper: Q.fromDecimal('1e-25'),
        },
      ],
    },
    {
      ...claim('stable everywhere'),
      kind: 'inequality',
      relation: { left: symbol('kappa_T'), sign: '>', right: zero },
      ranges: [
        { expression: T, lower: Q.rational(50), upper: Q.rational(600) },
        {
          expression: divide(V, N),
          lower: Q.fromDecimal('1e-28'),
          upper: Q.fromDecimal('1e-25'),
        },
      ],
    },
  ];
  const { derivation } = deriveFormulation({ ...fluid(), claims }, '');
  const result = (title: string) => derivation?.claims.find((c) => c.title === title);

  it('are decided by limit, by algebra and at states, each saying which', () => {
    expect(result('ideal when dilute')).toMatchObject({ status: 'passed', method: 'by limit' });
    expect(result('internal pressure')).toMatchObject({
      status: 'passed',
      method: 'symbolically',
    });
    expect(result('stable when dilute')).toMatchObject({
      status: 'passed',
      method: 'at 4096 states',
    });
  });

  it('that fail show where, with units', () => {
    expect(result('wrong energy')?.status).toBe('failed');
    expect(result('wrong energy')?.detail).toMatch(/T = [\d.]+ K/);
    expect(result('stable everywhere')?.status).toBe('failed');
    expect(result('stable everywhere')?.detail).toMatch(
      /kappa_T is -[\d.e-]+ at .*V = [\d.e-]+ m\^3, T = [\d.]+ K/,
    );
  });
});

describe('a formulation without N!', () => {
  it('is warned of as not extensive, with the cause', () => {
    const lnQ = multiply(N, ln(divide(V, b)));
    const { diagnostics } = deriveFormulation(stated('canonical', ['N', 'V'], lnQ), '');
    const warning = diagnostics.find(({ code }) => code === 'not-extensive');
    expect(warning?.severity).toBe('warning');
    expect(warning?.message).toContain('Dividing Q by N! would make it so');
  });
});

it('a model with an order parameter is declined in words, not derived wrongly', () => {
  const { diagnostics, derivation } = deriveFormulation(
    {
      ...fluid(),
      orderParameters: [
        {
          name: 'theta',
          symbol: symbol('theta'),
          lower: Q.ZERO,
          upper: Q.ONE,
          stationary: 'maximum',
          description: '',
          span,
        },
      ],
    },
    '',
  );
  expect(derivation).toBeUndefined();
  expect(diagnostics.map(({ code }) => code)).toEqual(['not-yet']);
});

describe('values at a state', () => {
  const { model } = deriveFormulation(fluid(), '', { properties: [] });
  if (!model) throw new Error('no model');

  it('are in SI units', () => {
    const { values, diagnostics } = evaluate(
      model,
      { N: 6.02214076e23, V: 0.0224, T: 273.15 },
      {},
      ['p', 'C_V'],
    );
    expect(diagnostics).toEqual([]);
    expect(values.map(({ symbol: s, unit }) => [s, unit])).toEqual([
      ['p', 'Pa'],
      ['C_V', 'J/K'],
    ]);
    expect(values[1]?.value).toBeCloseTo(1.5 * 8.31446261815324, 10);
  });

  it('follow other values of the parameters', () => {
    const at = { N: 6.02214076e23, V: 0.0224, T: 273.15 };
    const [ideal] = evaluate(model, at, { a: 0, b: 0 }, ['Z']).values;
    expect(ideal?.value).toBeCloseTo(1, 12);
  });

  it.each([
    [{ N: 1e23, V: 0.01 }, {}, ['p'], 'missing-variable'],
    [{ N: 1e23, V: 0.01, T: 300, x: 1 }, {}, ['p'], 'unknown-name'],
    [{ N: 1e23, V: 0.01, T: 300 }, { c: 1 }, ['p'], 'unknown-name'],
    [{ N: 1e23, V: 0.01, T: 300 }, {}, ['nonsense'], 'unknown-name'],
    [{ N: 6e23, V: 1e-6, T: 300 }, {}, ['p'], 'outside-domain'],
    [{ N: 6e23, V: 1, T: -1 }, {}, ['p'], 'outside-domain'],
    [{ N: 6e23, V: NaN, T: 300 }, {}, ['p'], 'no-value'],
  ])('are refused in words at %j with %j for %j', (state, overrides, names, code) => {
    const { values, diagnostics } = evaluate(model, state, overrides, names);
    expect(diagnostics.map((d) => d.code)).toContain(code);
    expect(values).toEqual([]);
  });

  it('name the relation that a state outside the domain breaks', () => {
    const { diagnostics } = evaluate(model, { N: 6e23, V: 1e-6, T: 300 });
    expect(diagnostics[0]?.message).toContain('V > N b');
  });
});
