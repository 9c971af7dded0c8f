import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import {
  compile,
  evaluatePrecisely,
  integrate,
  preciseDerivative,
  sumSeries,
} from '../../../shared/numerics/index.ts';
import { differentiate } from '../../../shared/algebra/differentiate.ts';
import { evaluatePlainly } from '../algebra/evaluatePlainly.ts';
import { randomExpression, randomValues, x } from '../algebra/randomExpression.ts';

describe('compiled expressions', () => {
  it('have the value of the plain recursion', () => {
    fc.assert(
      fc.property(randomExpression, randomValues, (e, values) => {
        const plain = evaluatePlainly(e, values);
        if (!Number.isFinite(plain) || Math.abs(plain) > 1e10) return;
        const [compiled = NaN] = compile([e], ['x', 'y', 'z'])([values.x, values.y, values.z]);
        expect(Math.abs(compiled - plain)).toBeLessThanOrEqual(1e-8 * (1 + Math.abs(plain)));
      }),
      { numRuns: 600, seed: 11 },
    );
  });

  it('compute an equal part once', () => {
    const part = C.exp(C.square(x));
    const one = compile([C.add(part, C.one)], ['x']).instructionCount;
    const two = compile([C.add(part, C.one), C.add(part, C.two)], ['x']).instructionCount;
    expect(two).toBe(one + 1);
  });

  it('keep the digits of 1 − exp(−u) and ln(1 + u) for small u', () => {
    const f = compile(
      [
        C.subtract(C.one, C.exp(C.negate(x))),
        C.ln(C.add(C.one, x)),
        C.ln(C.subtract(C.one, C.exp(C.negate(x)))),
      ],
      ['x'],
    );
    const [difference = 0, logarithm = 0, both = 0] = f([1e-12]);
    expect(difference / 1e-12).toBeCloseTo(1 - 5e-13, 14);
    expect(logarithm / 1e-12).toBeCloseTo(1 - 5e-13, 14);
    expect(both).toBeCloseTo(Math.log(1e-12) - 5e-13, 13);
  });

  it('run over columns of states', () => {
    const f = compile([C.multiply(x, C.symbol('y', { positive: true }))], ['x', 'y']);
    const result = new Float64Array(3);
    f.columns([[1, 2, 3], [10]], [result], 3);
    expect([...result]).toEqual([10, 20, 30]);
  });

  it('sum over whole numbers without end: the rotor tends to T/Θ + 1/3 + Θ/(15 T)', () => {
    // The high-temperature expansion of the rigid rotor (H. P. Mulholland, Proc. Camb. Phil. Soc. 24 (1928) 280).
    const J = C.symbol('J', { integer: true });
    const body = C.multiply(
      C.add(C.multiply(C.two, J), C.one),
      C.exp(C.negate(C.product([J, C.add(J, C.one), x]))),
    );
    const q = C.summation(J, C.zero, C.infinity, body);
    const [value = NaN] = compile([q], ['x'])([0.01]);
    expect(value).toBeCloseTo(100 + 1 / 3 + 0.01 / 15 + (4 * 0.01 ** 2) / 315, 8);
  });

  it('say NaN outside the domain', () => {
    expect(compile([C.ln(x)], ['x'])([-1])[0]).toBeNaN();
  });
});

describe('quadrature', () => {
  it.each([
    ['a smooth function', (t: number) => Math.exp(t), 0, 1, Math.E - 1],
    ['a logarithmic end', (t: number) => Math.log(t), 0, 1, -1],
    ['a root at the end', (t: number) => 1 / Math.sqrt(t), 0, 4, 4],
    ['the half-line', (t: number) => Math.exp(-t), 0, Infinity, 1],
    ['the line', (t: number) => Math.exp(-t * t), -Infinity, Infinity, Math.sqrt(Math.PI)],
    [
      'Planck’s integral π⁴/15',
      (t: number) => t ** 3 / Math.expm1(t),
      0,
      Infinity,
      Math.PI ** 4 / 15,
    ],
  ])('takes %s', (_, f, a, b, expected) => {
    expect(Math.abs(integrate(f, a, b).value / expected - 1)).toBeLessThan(1e-12);
  });
});

describe('endless sums', () => {
  it('bound what they leave out', () => {
    const { value, remainder } = sumSeries((i) => 0.5 ** i, 0, Infinity);
    expect(value).toBeCloseTo(2, 15);
    expect(remainder).toBeLessThan(1e-15);
  });

  it('that do not converge have no value', () => {
    expect(sumSeries((i) => 1.1 ** i, 0, Infinity).value).toBeNaN();
  });
});

describe('many digits', () => {
  it('ln 2 to sixty of them', () => {
    // OEIS A002162, from memory.
    expect(evaluatePrecisely(C.ln(C.two), new Map())?.toFixed(50)).toBe(
      '0.69314718055994530941723212145817656807550013436026',
    );
  });

  it('derivatives of random expressions agree with the difference quotient to 30', () => {
    fc.assert(
      fc.property(randomExpression, randomValues, (e, values) => {
        const point = new Map(Object.entries(values));
        const exact = evaluatePrecisely(differentiate(e, x), point);
        const at = evaluatePrecisely(x, point);
        if (!exact || !at || !exact.isFinite() || exact.abs().gt(1e8)) return;
        const numerical = preciseDerivative(
          (u) => evaluatePrecisely(e, new Map([...point, ['x', u.toString()]])),
          at,
        );
        if (!numerical) return;
        const scale = exact.abs().plus(1);
        expect(exact.minus(numerical).abs().div(scale).toNumber()).toBeLessThan(1e-26);
      }),
      { numRuns: 300, seed: 12 },
    );
  });
});
