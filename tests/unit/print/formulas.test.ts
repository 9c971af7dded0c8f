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
    'N k \\left(\\tfrac{5}{2} + \\ln\\frac{V - N b}{N \\Lambda^{3}}\\right)',
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
