import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';
import { fromJson, nameStyle, toJson, toTex, toText } from '../../../shared/print/index.ts';
import { randomExpression } from '../algebra/randomExpression.ts';
import { a, free, k, Lambda, lnQ, N, T, V } from '../algebra/vanDerWaals.ts';

const style = nameStyle(['m', 'a', 'N', 'b', 'Lambda', 'k', 'T', 'V']);
const x = C.symbol('x', { positive: true });
const theta = C.symbol('Theta_E', { positive: true });

const formulas: [string, Expression, string, string][] = [
  [
    'the van der Waals equation',
    C.subtract(C.divide(C.product([N, k, T]), free), C.divide(C.product([a, N, N]), C.square(V))),
    'N k T/(V - N b) - a N^2/V^2',
    '\\frac{N k T}{V - N b} - \\frac{a N^{2}}{V^{2}}',
  ],
  [
    'a rational factor in front',
    C.product([C.fraction(3, 2), N, k, T]),
    '3/2 N k T',
    '\\tfrac{3}{2} N k T',
  ],
  [
    'a bracket around a tall logarithm',
    C.product([
      N,
      k,
      C.add(C.fraction(5, 2), C.ln(C.divide(free, C.multiply(N, C.power(Lambda, C.integer(3)))))),
    ]),
    'N k (5/2 + ln((V - N b)/(N Lambda^3)))',
    'N k \\left[\\tfrac{5}{2} + \\ln\\frac{V - N b}{N \\Lambda^{3}}\\right]',
  ],
  [
    'one root for several factors',
    C.divide(
      C.symbol('h'),
      C.sqrt(C.product([C.two, C.pi, C.symbol('m', { positive: true }), k, T])),
    ),
    'h/sqrt(2 pi m k T)',
    '\\frac{h}{\\sqrt{2 \\pi m k T}}',
  ],
  [
    'a fraction in an exponent with a slash',
    C.divide(C.one, C.subtract(C.exp(C.divide(theta, T)), C.one)),
    '1/(exp(Theta_E/T) - 1)',
    '\\frac{1}{\\mathrm{e}^{\\Theta_{\\mathrm{E}}/T} - 1}',
  ],
  ['ascending powers', C.sum([C.one, C.negate(x), C.square(x)]), '1 - x + x^2', '1 - x + x^{2}'],
  ['a leading plus where there is one', C.subtract(x, C.one), 'x - 1', 'x - 1'],
];

const J = C.symbol('J', { integer: true });
const rotor = C.summation(
  J,
  C.zero,
  C.infinity,
  C.product([
    C.add(C.multiply(C.two, J), C.one),
    C.exp(C.negate(C.divide(C.product([J, C.add(J, C.one), C.symbol('Theta_r')]), T))),
  ]),
);
const thermal = C.product([C.two, C.pi, C.symbol('m', { positive: true }), k, T]);
const list = [1n, 2n].map((numerator) => ({ numerator, denominator: 1n }));

formulas.push(
  [
    'a common power of three halves',
    C.multiply(
      V,
      C.power(C.divide(thermal, C.square(C.symbol('h', { positive: true }))), C.fraction(3, 2)),
    ),
    'V (2 pi m k T)^(3/2)/h^3',
    '\\frac{V (2 \\pi m k T)^{3/2}}{h^{3}}',
  ],
  [
    'one root over a fraction',
    C.sqrt(
      C.divide(
        C.product([C.integer(5), k, T]),
        C.multiply(C.integer(3), C.symbol('m', { positive: true })),
      ),
    ),
    'sqrt(5 k T/(3 m))',
    '\\sqrt{\\frac{5 k T}{3 m}}',
  ],
  [
    'a quotient to a power that is a name',
    C.product([C.integer(4), C.power(C.divide(x, V), C.symbol('n'))]),
    '4 (x/V)^n',
    '4 \\left(\\frac{x}{V}\\right)^{n}',
  ],
  [
    'an index by descending powers and beside its own sums',
    rotor,
    'sum J from 0 to inf { (2 J + 1) exp(-Theta_r J (J + 1)/T) }',
    '\\sum_{J=0}^{\\infty} (2 J + 1) \\mathrm{e}^{-\\Theta_{\\mathrm{r}} J (J + 1)/T}',
  ],
  [
    'a tall exponent on the line',
    C.exp(C.negate(C.divide(C.add(C.divide(a, V), x), C.multiply(k, T)))),
    'exp(-(x + a/V)/(k T))',
    '\\exp\\left(-\\frac{x + \\frac{a}{V}}{k T}\\right)',
  ],
  [
    'a sum that is not the last term within parentheses, so that it ends',
    C.add(rotor, C.ln(x)),
    'ln(x) + sum J from 0 to inf { (2 J + 1) exp(-Theta_r J (J + 1)/T) }',
    '\\ln x + \\sum_{J=0}^{\\infty} (2 J + 1) \\mathrm{e}^{-\\Theta_{\\mathrm{r}} J (J + 1)/T}',
  ],
  [
    'an element of a list whose name has a subscript',
    C.element('E_v', list, J),
    'E_v(J)',
    'E_{\\mathrm{v},J}',
  ],
  [
    'a measured value as a decimal',
    C.multiply(C.fraction(1380649n, 10n ** 29n), T),
    '1.380649e-23 T',
    '1.380649 \\times 10^{-23} T',
  ],
  [
    'factorials',
    C.divide(C.call('factorial', [N]), C.square(C.call('factorial', [C.subtract(N, C.one)]))),
    'N!/((N - 1)!)^2',
    '\\frac{N!}{[(N - 1)!]^{2}}',
  ],
  [
    'equal names by ascending powers',
    C.sum([
      C.multiply(C.square(x), V),
      C.multiply(x, V),
      C.negate(C.multiply(C.power(x, C.integer(3)), V)),
    ]),
    'x V + x^2 V - x^3 V',
    'x V + x^{2} V - x^{3} V',
  ],
  ['√3/2', C.sqrt(C.fraction(3, 4)), 'sqrt(3)/2', '\\frac{\\sqrt{3}}{2}'],
);

const names: [string, string][] = [
  ['theta', '\\theta'],
  ['eps', '\\varepsilon'],
  ['hbar', '\\hbar'],
  ['C_V', 'C_{V}'],
  ['kappa_T', '\\kappa_{T}'],
  ['mu_JT', '\\mu_{\\mathrm{JT}}'],
  ['N_Av', 'N_{\\mathrm{A}}'],
  ['Theta_E', '\\Theta_{\\mathrm{E}}'],
  ['x_w', 'x_{\\mathrm{w}}'],
  ['B2', 'B_{2}'],
  ['alpha1', '\\alpha_{1}'],
  ['volume', '\\mathrm{volume}'],
];

describe('the typography of names', () => {
  it.each(names)('%s', (name, tex) => {
    expect(style.texOf(name)).toBe(tex);
  });
});

describe('printing', () => {
  it.each(formulas)('writes %s', (_, e, text, tex) => {
    expect(toText(e, style)).toBe(text);
    expect(toTex(e, style)).toBe(tex);
  });

  it('never lets a factor follow a division', () => {
    fc.assert(
      fc.property(randomExpression, (e) => {
        // A name or an opening parenthesis right behind `/name ` would be refused by the language.
        expect(toText(e, style)).not.toMatch(/[a-z)]\/[A-Za-z_]+(\^\d+)? [A-Za-z(]/);
      }),
      { numRuns: 500, seed: 7 },
    );
  });

  it('gives TeX that KaTeX accepts without a warning', () => {
    fc.assert(
      fc.property(randomExpression, (e) => {
        katex.renderToString(toTex(e, style), { strict: 'error', trust: false });
      }),
      { numRuns: 300, seed: 8 },
    );
  });

  it('lets nothing but letters and digits of a name reach TeX', () => {
    const hostile = C.symbol('a\\href{x}{y}_$^', {});
    expect(toTex(hostile, style)).not.toMatch(/href\{|\$|\^/);
  });
});

describe('JSON', () => {
  it('is read back as the very same expression', () => {
    fc.assert(
      fc.property(randomExpression, (e) => {
        expect(fromJson(JSON.parse(JSON.stringify(toJson(e))))).toBe(e);
      }),
      { numRuns: 500, seed: 9 },
    );
    expect(fromJson(toJson(lnQ))).toBe(lnQ);
  });

  it('refuses what it has not written', () => {
    expect(() => fromJson(['f', 'constructor', ['n', '1']])).toThrow();
    expect(() => fromJson({ kind: 'number' })).toThrow();
    expect(() => fromJson(['n', '1e400'])).toThrow();
  });
});
