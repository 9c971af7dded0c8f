import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import { differentiate } from '../../../shared/algebra/differentiate.ts';
import { isZero } from '../../../shared/algebra/equality.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';
import { expandLn, gatherLogarithms } from '../../../shared/algebra/logarithm.ts';
import { simplify } from '../../../shared/algebra/simplify.ts';
import { expandAbbreviations } from '../../../shared/algebra/traverse.ts';
import { evaluatePlainly } from './evaluatePlainly.ts';
import { randomExpression, randomValues, x } from './randomExpression.ts';

const RUNS = { numRuns: 600, seed: 1906 };

/** How far rounding may carry two ways of computing one value apart. */
function magnitude(e: Expression, values: Record<string, number>): number {
  const parts = e.kind === 'sum' ? e.terms : e.kind === 'product' ? e.factors : [];
  const own = Math.abs(evaluatePlainly(e, values));
  const inner = parts.map((part) => magnitude(part, values));
  if (e.kind === 'product') {
    const product = inner.reduce((a, b) => a * b, 1);
    return Math.max(own, product, ...inner);
  }
  return Math.max(own, ...inner);
}

function expectSameValue(a: Expression, b: Expression, values: Record<string, number>): void {
  const left = evaluatePlainly(a, values);
  const right = evaluatePlainly(b, values);
  if (!Number.isFinite(left) || Math.abs(left) > 1e12) return;
  const scale = Math.max(1, magnitude(a, values), magnitude(b, values));
  if (scale > 1e13) return;
  expect(Math.abs(left - right)).toBeLessThanOrEqual(1e-9 * scale);
}

describe('for random expressions', () => {
  it('simplification never changes a value', () => {
    fc.assert(
      fc.property(randomExpression, randomValues, (e, values) => {
        expectSameValue(e, simplify(e), values);
      }),
      RUNS,
    );
  });

  it('the derivative agrees with a difference quotient', () => {
    fc.assert(
      fc.property(randomExpression, randomValues, (e, values) => {
        const exact = evaluatePlainly(differentiate(e, x), values);
        if (!Number.isFinite(exact) || Math.abs(exact) > 1e8) return;
        const at = (h: number): number => evaluatePlainly(e, { ...values, x: values.x + h });
        // Two steps of Richardson's extrapolation: the error is of the order of h⁶.
        const slope = (h: number): number => (at(h) - at(-h)) / (2 * h);
        const h = 1e-2;
        const first = (4 * slope(h / 2) - slope(h)) / 3;
        const second = (4 * slope(h / 4) - slope(h / 2)) / 3;
        const numerical = (16 * second - first) / 15;
        const doubt = Math.abs(second - first) + 1e-9 * Math.abs(at(0)) + 1e-9;
        expect(Math.abs(exact - numerical)).toBeLessThanOrEqual(
          100 * doubt + 1e-7 * Math.abs(exact),
        );
      }),
      RUNS,
    );
  });

  it('logarithms taken apart and put together keep their value', () => {
    fc.assert(
      fc.property(randomExpression, randomExpression, randomValues, (a, b, values) => {
        const argument = C.product([C.exp(a), C.add(C.one, C.square(b)), C.divide(x, C.pi)]);
        const apart = expandLn(argument);
        expectSameValue(C.ln(argument), apart, values);
        expectSameValue(apart, gatherLogarithms(apart), values);
      }),
      RUNS,
    );
  });

  it('an expression minus its simplified form is zero by the normal form', () => {
    fc.assert(
      fc.property(randomExpression, (e) => {
        const difference = C.subtract(expandAbbreviations(e), expandAbbreviations(simplify(e)));
        expect(isZero(difference)).not.toBe('nonzero');
      }),
      RUNS,
    );
  });

  it('equal structure is one object and canonical order does not depend on the way there', () => {
    fc.assert(
      fc.property(randomExpression, randomExpression, randomExpression, (a, b, c) => {
        expect(C.sum([a, b, c])).toBe(C.sum([c, a, b]));
        expect(C.product([a, b])).toBe(C.product([b, a]));
      }),
      RUNS,
    );
  });
});
