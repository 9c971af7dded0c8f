/** Random expressions for property tests, well-behaved for values of the symbols near 1. */
import fc from 'fast-check';
import * as C from '../../../shared/algebra/construct.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';

export const x = C.symbol('x', { positive: true });
export const y = C.symbol('y', { positive: true });
export const z = C.symbol('z', { positive: true });

const leaf: fc.Arbitrary<Expression> = fc.oneof(
  fc.constantFrom<Expression>(x, y, z, x, y, C.pi),
  fc.integer({ min: -4, max: 5 }).map((n) => C.integer(n)),
  fc
    .tuple(fc.integer({ min: -5, max: 5 }), fc.integer({ min: 2, max: 4 }))
    .map(([n, d]) => C.fraction(n, d)),
);

/** 1 + e², so that logarithms, roots and denominators have something positive to work on. */
function positiveOf(e: Expression): Expression {
  return C.add(C.one, C.square(e));
}

const { expression } = fc.letrec<{ expression: Expression }>((tie) => ({
  expression: fc.oneof(
    { maxDepth: 4, depthSize: 'small', withCrossShrink: true },
    leaf,
    fc.tuple(tie('expression'), tie('expression')).map(([a, b]) => C.add(a, b)),
    fc.tuple(tie('expression'), tie('expression')).map(([a, b]) => C.subtract(a, b)),
    fc.tuple(tie('expression'), tie('expression')).map(([a, b]) => C.multiply(a, b)),
    fc.tuple(tie('expression'), tie('expression')).map(([a, b]) => C.divide(a, positiveOf(b))),
    fc
      .tuple(tie('expression'), fc.integer({ min: 2, max: 3 }))
      .map(([a, n]) => C.power(a, C.integer(n))),
    tie('expression').map((a) => C.ln(positiveOf(a))),
    tie('expression').map((a) => C.sqrt(positiveOf(a))),
    tie('expression').map((a) => C.exp(C.negate(positiveOf(C.divide(a, positiveOf(a)))))),
    fc
      .tuple(
        fc.constantFrom('tanh', 'sin', 'cos', 'arcsinh', 'sinh', 'cosh', 'coth'),
        tie('expression'),
      )
      .map(([name, a]) =>
        C.call(
          name as 'tanh',
          [C.divide(a, positiveOf(a))].map((u) => (name === 'coth' ? positiveOf(u) : u)),
        ),
      ),
    tie('expression').map((a) => C.abbreviation('s', positiveOf(a))),
  ),
}));

export const randomExpression = expression;

export const randomValues = fc.record({
  x: fc.double({ min: 0.5, max: 1.7, noNaN: true }),
  y: fc.double({ min: 0.5, max: 1.7, noNaN: true }),
  z: fc.double({ min: 0.5, max: 1.7, noNaN: true }),
});
