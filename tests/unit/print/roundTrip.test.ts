/** What the printers write is read back by the language as the very same expression. */
import fc from 'fast-check';
import katex from 'katex';
import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';
import { analyse } from '../../../shared/language/index.ts';
import { fromJson, nameStyle, toJson, toTex, toText } from '../../../shared/print/index.ts';
import { randomExpression, x, y, z } from '../algebra/randomExpression.ts';

const style = nameStyle(['x', 'y', 'z', 'r', 's', 'n', 'g', 'E_v']);
const free = C.symbol('f');
const other = C.symbol('g_0');
const G = [5n, 3n, 1n].map((n) => ({ numerator: n, denominator: 1n }));

/** A formulation whose report is the text; the symbols are those of the random expressions. */
function read(text: string): Expression | undefined {
  const { formulation, diagnostics } = analyse(`ensemble canonical
parameter x = 1 between 0.5 and 2
parameter y = 1 between 0.5 and 2
parameter z = 1 between 0.5 and 2
parameter n = 1 between 0.5 and 2
parameter f = 1 between -2 and 2
parameter g_0 = 1 between -2 and 2
list E_v = 5, 3, 1
constant v_0 [m^3] = 1e-30
q = V/v_0
Q = q^N / N!
report text = ${text}`);
  const report = formulation?.reports.find(({ name }) => name === 'text');
  if (!report) throw new Error(`${text}\n${JSON.stringify(diagnostics)}`);
  return report.expression;
}

/** The expression without abbreviations: the text shows their names only. */
function withoutNames(e: Expression): boolean {
  return !JSON.stringify(toJson(e)).includes('"let"');
}

const n = C.symbol('n', { positive: true });
// The language takes an index that starts from 0 or 1 as positive.
const J = C.symbol('J', { integer: true, positive: true });
const r = C.symbol('r', { positive: true });
const sumOverJ = C.summation(J, C.zero, C.integer(4), C.add(C.power(x, J), J));

const cases: [string, Expression][] = [
  [
    'a root over positive names',
    C.sqrt(C.divide(C.multiply(C.integer(5), x), C.multiply(C.integer(3), y))),
  ],
  ['a root of what may be negative', C.sqrt(free)],
  ['two roots of what may be negative', C.multiply(C.sqrt(free), C.sqrt(other))],
  ['a root below the bar', C.divide(C.sqrt(x), C.sqrt(free))],
  ['a root of a quotient of unknown sign', C.power(C.divide(free, other), C.fraction(-1, 2))],
  ['roots of numbers', C.sum([C.sqrt(C.half), C.sqrt(C.fraction(3, 4)), C.sqrt(C.integer(18))])],
  ['thirds', C.power(C.product([C.two, x, C.square(y)]), C.fraction(2, 3))],
  ['three halves', C.divide(z, C.power(C.product([C.two, C.pi, x, y]), C.fraction(3, 2)))],
  ['a quotient to a name', C.product([C.integer(4), C.power(C.divide(x, y), n)])],
  [
    'powers of numbers side by side',
    C.product([C.integer(5), C.power(C.integer(3), x), C.power(C.fraction(2, 3), y)]),
  ],
  ['a negative exponent that is no number', C.power(x, C.negate(C.add(y, C.one)))],
  ['a tower of powers', C.power(x, C.power(y, z))],
  [
    'factorials',
    C.divide(C.call('factorial', [n]), C.square(C.call('factorial', [C.subtract(n, C.one)]))),
  ],
  ['decimals', C.add(C.multiply(C.fraction(1380649n, 10n ** 29n), x), C.fraction(12345, 1000000))],
  ['large whole numbers', C.multiply(C.integer(602214076000000000000000n), x)],
  ['a sum as a factor', C.multiply(C.add(C.one, sumOverJ), sumOverJ)],
  ['a sum over a power', C.divide(x, C.square(sumOverJ))],
  [
    'an integral',
    C.multiply(x, C.integral(r, C.zero, C.integer(3), C.multiply(r, C.exp(C.negate(r))))),
  ],
  ['a product over an index', C.productOver(J, C.one, C.integer(3), C.add(J, x))],
  [
    'elements of a list',
    C.summation(
      J,
      C.one,
      C.integer(3),
      C.multiply(C.element('E_v', G, J), C.exp(C.negate(C.divide(C.element('E_v', G, J), x)))),
    ),
  ],
  ['several arguments', C.call('max', [x, C.divide(y, z), C.call('besselI', [C.one, x])])],
  [
    'a piecewise function',
    C.multiply(
      free,
      C.piecewise(
        [
          { condition: { left: x, sign: '<', right: y }, value: C.negate(z) },
          {
            condition: { left: x, sign: '>=', right: C.multiply(C.two, y) },
            value: C.divide(x, y),
          },
        ],
        C.zero,
      ),
    ),
  ],
];

describe('the text of an expression', () => {
  it.each(cases)('is read back: %s', (_, e) => {
    expect(read(toText(e, style))).toBe(e);
  });

  it('is read back for random expressions', () => {
    fc.assert(
      fc.property(randomExpression.filter(withoutNames), (e) => {
        expect(read(toText(e, style))).toBe(e);
      }),
      { numRuns: 300, seed: 21 },
    );
  });
});

describe('the JSON of an expression', () => {
  it.each(cases)('is read back: %s', (_, e) => {
    expect(fromJson(JSON.parse(JSON.stringify(toJson(e))))).toBe(e);
  });
});

describe('the TeX of an expression', () => {
  it.each(cases)('is accepted: %s', (_, e) => {
    expect(() =>
      katex.renderToString(toTex(e, style), { strict: 'error', trust: false }),
    ).not.toThrow();
  });
});
