/** The examples of the language and every formulation with values from outside. */
import { describe, expect, it } from 'vitest';
import {
  fraction,
  integer,
  ln,
  multiply,
  negate,
  product,
  sum,
  symbol,
} from '../../../shared/algebra/construct.ts';
import { symbolsOf } from '../../../shared/algebra/traverse.ts';
import * as Q from '../../../shared/algebra/rational.ts';
import type { Formulation } from '../../../shared/language/formulation.ts';
import { analyse, parseExpressionFor, parseState } from '../../../shared/language/index.ts';
import { nameStyle, relationToText, toText } from '../../../shared/print/index.ts';
import { formatDimension } from '../../../shared/units/formatDimension.ts';
import checks from '../../reference/checks.json' with { type: 'json' };
import { DIATOMIC_GAS, FLUID, LATTICE_GAS } from './texts.ts';

function read(source: string): Formulation {
  const { formulation, diagnostics } = analyse(source);
  expect(diagnostics.filter(({ severity }) => severity === 'error')).toEqual([]);
  if (!formulation) throw new Error('no formulation');
  return formulation;
}

function inWords(f: Formulation): { ln: string; domain: string } {
  const style = nameStyle(f.nameOrder);
  return {
    ln: toText(f.lnPartitionFunction, style),
    domain: f.domain.map((relation) => relationToText(relation, style)).join(', '),
  };
}

describe('the hard-core fluid', () => {
  const fluid = read(FLUID);

  it('has a title, an ensemble and its natural variables', () => {
    expect(fluid.title).toBe('Hard-core fluid with mean-field attraction');
    expect([fluid.ensemble, fluid.partitionFunction]).toEqual(['canonical', 'Q']);
    expect(fluid.variables.map(({ name }) => name)).toEqual(['N', 'V', 'T']);
  });

  it('has ln Q by Stirling, taken apart', () => {
    const [N, V, T, k, a, b] = ['N', 'V', 'T', 'k', 'a', 'b'].map((name) =>
      symbol(name, { positive: true }),
    ) as [ReturnType<typeof symbol>, ...ReturnType<typeof symbol>[]];
    const Lambda = fluid.abbreviations[0]?.expression;
    if (!V || !T || !k || !a || !b || !Lambda) throw new Error('missing');
    const expected = sum([
      multiply(N, ln(sum([V, negate(multiply(N, b))]))),
      product([integer(-3), N, ln(Lambda)]),
      product([a, N, N, V, k, T].map((x, i) => (i < 3 ? x : powerOfMinusOne(x)))),
      negate(multiply(N, ln(N))),
      N,
    ]);
    expect(fluid.lnPartitionFunction).toBe(expected);
  });

  it('has its numbers in SI units, exactly', () => {
    const m = fluid.quantities.find(({ name }) => name === 'm');
    expect(m?.unit).toBe('u');
    expect(m?.value).toEqual(
      Q.multiply(Q.fromDecimal('39.948'), Q.fromDecimal('1.66053906892e-27')),
    );
    const b = fluid.quantities.find(({ name }) => name === 'b');
    expect(b?.bounds?.upper).toEqual(Q.fromDecimal('1e-27'));
    expect(b?.symbol.positive).toBe(true);
    expect(FLUID.slice(b?.valueSpan.start, b?.valueSpan.end)).toBe('5.3e-29');
  });

  it('uses three constants of nature', () => {
    expect(fluid.naturalConstants.map(({ name }) => name)).toEqual(['k', 'h', 'N_Av']);
  });

  it('demands V > N b', () => {
    expect(inWords(fluid).domain).toBe('V > N b');
  });

  it('orders names as its author does', () => {
    const at = (name: string): number => fluid.nameOrder.indexOf(name);
    for (const [first, second] of [
      ['a', 'N'],
      ['N', 'b'],
      ['N', 'k'],
      ['k', 'T'],
      ['N_Av', 'a'],
      ['p', 'V'],
    ] as const) {
      expect(at(first), `${first} before ${second}`).toBeLessThan(at(second));
    }
  });

  it('has its claims and molar parameters', () => {
    expect(fluid.claims.map(({ kind }) => kind)).toEqual(['limit', 'equality', 'inequality']);
    expect(fluid.claims[1]?.text).toBe('partial(U, V; T, N) = a N^2 / V^2');
    const [, , stable] = fluid.claims;
    if (stable?.kind !== 'inequality') throw new Error('no inequality');
    expect(stable.ranges.map(({ lower }) => Q.toNumber(lower))).toEqual([300, 1e-27]);
    expect(fluid.molar.map(({ name, unit }) => [name, unit])).toEqual([
      ['a_m', 'Pa m^6 mol^-2'],
      ['b_m', 'm^3 mol^-1'],
    ]);
  });
});

function powerOfMinusOne(x: ReturnType<typeof symbol>): Formulation['lnPartitionFunction'] {
  const statement = parseExpressionFor(read(FLUID), `1/${x.name}`).statement;
  if (statement?.kind !== 'expression') throw new Error('no expression');
  return statement.expression;
}

describe('the lattice gas', () => {
  const gas = read(LATTICE_GAS);

  it('has sites for its extent and an order parameter', () => {
    expect(gas.variables.map(({ name }) => name)).toEqual(['mu', 'M', 'T']);
    const [theta] = gas.orderParameters;
    expect(theta?.name).toBe('theta');
    expect(theta && symbolsOf(gas.lnPartitionFunction).has(theta.symbol)).toBe(true);
    expect(inWords(gas).domain).toBe('theta > 0, theta < 1');
  });

  it('reads a value with a constant of nature', () => {
    const [, eps] = gas.quantities;
    expect(eps?.value).toEqual(Q.multiply(Q.fromDecimal('1.380649e-23'), Q.rational(150)));
    // Without bounds a parameter may change its sign.
    expect(eps?.symbol.positive).toBe(false);
  });

  it('reports in properties', () => {
    const [report] = gas.reports;
    expect(report && toText(report.expression, nameStyle())).toBe('N/M');
    expect(report?.unit).toBe('1');
  });
});

describe('the diatomic gas', () => {
  it('keeps its factors apart in ln Q', () => {
    expect(inWords(read(DIATOMIC_GAS))).toEqual({
      ln: 'N + N ln(q_vib) + N ln(V) + N ln(q_rot) - N ln(N) - 3 N ln(Lambda)',
      domain: '',
    });
  });
});

describe('other ensembles', () => {
  it('know their natural variables', () => {
    const names = (head: string, body: string): string[] =>
      read(`ensemble ${head}\n${body}`).variables.map(({ name }) => name);
    expect(
      names('isothermal-isobaric', 'ln Delta = N ln(k T/(p V_0))\nconstant V_0 [m^3] = 1'),
    ).toEqual(['N', 'p', 'T']);
    expect(names('microcanonical', 'constant E_0 [J] = 1\nW = (U/(N E_0))^N')).toEqual([
      'N',
      'V',
      'U',
    ]);
    expect(
      names('grand canonical', 'constant V_0 [m^3] = 1\nln Xi = V/V_0 * exp(mu/(k T))'),
    ).toEqual(['mu', 'V', 'T']);
  });

  it('know several species, their total and their fractions', () => {
    const f = read(
      'ensemble canonical\nspecies w "water", e "ethanol"\nln Q = -N_w ln(x_w) - N_e ln(x_e) + N ln(2)',
    );
    expect(f.variables.map(({ name }) => name)).toEqual(['N_w', 'N_e', 'V', 'T']);
    expect([...symbolsOf(f.lnPartitionFunction)].map(({ name }) => name).sort()).toEqual([
      'N_e',
      'N_w',
    ]);
    const open = read(
      'ensemble grand canonical\nspecies a, b\nconstant V_0 [m^3] = 1\nln Xi = V/V_0 * (exp(mu_a/(k T)) + exp(mu_b/(k T)))\nreport y = x_a',
    );
    expect(open.reports[0] && toText(open.reports[0].expression, nameStyle())).toBe(
      'N_a/(N_a + N_b)',
    );
  });

  it('give the pressure the dimension of its extent', () => {
    const f = read(
      'ensemble isothermal-isobaric\nextent L [m]\nconstant d [m] = 1e-10\nln Delta = N ln(k T/(p d)) - N p d/(k T)',
    );
    expect(f.variables.map(({ dimension }) => formatDimension(dimension))).toEqual(['1', 'N', 'K']);
  });

  it('keep ln N! exact where asked to', () => {
    const text = (rest: string): string =>
      inWords(read(`ensemble canonical\n${rest}Q = 2^N/N!`)).ln;
    expect(text('')).toBe('N + N ln(2) - N ln(N)');
    expect(text('factorials exact\n')).toContain('lnGamma');
    const choose = inWords(read('ensemble canonical\nextent M [1]\nQ = binomial(M, N)')).ln;
    expect(choose).not.toContain('binomial');
    expect(choose).toContain('M ln(M)');
  });
});

describe('the formulations with values from outside', () => {
  const sound = checks.filter(({ ask }) => !('refuse' in ask) && !('warn' in ask));

  it.each(sound.map((check) => [check.id, check] as const))('reads %s', (_, check) => {
    const { diagnostics } = analyse(check.formulation);
    expect(diagnostics).toEqual([]);
    const formulation = read(check.formulation);
    const { ask } = check;
    if ('identity' in ask && ask.identity) {
      const { statement, diagnostics: faults } = parseExpressionFor(formulation, ask.identity);
      expect(faults).toEqual([]);
      expect(statement?.kind).toBe('equality');
    }
    if ('evaluate' in ask && ask.evaluate) {
      const { values, diagnostics: faults } = parseState(ask.evaluate);
      expect(faults).toEqual([]);
      for (const [name, { dimension }] of values) {
        const variable = formulation.variables.find((v) => v.name === name);
        expect(variable?.dimension.map(Q.toText)).toEqual(dimension.map(Q.toText));
      }
    }
  });

  const faulty = checks.filter(({ ask }) => 'refuse' in ask);
  it.each(faulty.map((check) => [check.id, check] as const))('refuses %s', (_, check) => {
    const { formulation, diagnostics } = analyse(check.formulation);
    const reason = 'refuse' in check.ask ? check.ask.refuse : undefined;
    expect(formulation).toBeUndefined();
    const codes = diagnostics.filter((d) => d.severity === 'error').map(({ code }) => code);
    expect(codes[0]).toBe(reason?.replace(/ /g, '-'));
    for (const { hint } of diagnostics) expect(hint).not.toBe('');
  });

  const warned = checks.filter(({ ask }) => 'warn' in ask && ask.warn !== 'not extensive');
  it.each(warned.map((check) => [check.id, check] as const))('warns of %s', (_, check) => {
    const { formulation, diagnostics } = analyse(check.formulation);
    expect(formulation).toBeDefined();
    const reason = 'warn' in check.ask ? check.ask.warn : undefined;
    expect(diagnostics.map(({ code }) => code)).toEqual([reason?.replace(/ /g, '-')]);
  });
});

describe('a half', () => {
  it('is a rational number before a product', () => {
    const { statement } = parseExpressionFor(read(FLUID), '3/2 N k T');
    if (statement?.kind !== 'expression') throw new Error('no expression');
    const [N, k, T] = ['N', 'k', 'T'].map((n) => symbol(n, { positive: true }));
    if (!N || !k || !T) throw new Error('missing');
    expect(statement.expression).toBe(product([fraction(3, 2), N, k, T]));
    expect(formatDimension(statement.dimension)).toBe('J');
  });
});
