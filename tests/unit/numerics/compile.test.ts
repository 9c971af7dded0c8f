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
import { integrateAdaptively } from '../../../shared/numerics/gaussKronrod.ts';
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

  it('give the same numbers over long columns as one by one', () => {
    fc.assert(
      fc.property(randomExpression, randomValues, (e, values) => {
        const f = compile([e], ['x', 'y', 'z']);
        const xs = Array.from({ length: 300 }, (_, i) => values.x + i / 1000);
        const result = new Float64Array(xs.length);
        f.columns([xs, [values.y], [values.z]], [result], xs.length);
        for (const row of [0, 1, 127, 128, 299]) {
          expect(result[row]).toBe(f([xs[row] ?? NaN, values.y, values.z])[0]);
        }
      }),
      { numRuns: 100, seed: 13 },
    );
  });

  it('bind the running variable, also where an input has its name', () => {
    const i = C.symbol('i', { integer: true });
    const inner = C.summation(i, C.one, i, i);
    const e = C.add(C.multiply(i, C.integer(100)), C.summation(i, C.one, C.integer(3), inner));
    // 100·7 + (1) + (1 + 2) + (1 + 2 + 3)
    expect(compile([e], ['i'])([7])[0]).toBe(710);
  });

  it('compute outside a sum what does not depend on its index', () => {
    const i = C.symbol('i', { integer: true });
    const part = C.exp(C.square(x));
    const e = C.summation(i, C.one, C.integer(3), C.multiply(part, C.power(x, i)));
    const both = compile([e, part], ['x']);
    expect(both.instructionCount).toBe(compile([e], ['x']).instructionCount);
    const [value = NaN] = both([0.5]);
    expect(value).toBeCloseTo(Math.exp(0.25) * (0.5 + 0.25 + 0.125), 14);
  });

  it('keep the heat capacity of a cold vibration, where exp(Θ/T) overflows', () => {
    const u = C.divide(C.symbol('Theta'), x);
    const minusOne = C.subtract(C.exp(u), C.one);
    const capacity = C.product([C.square(u), C.exp(u), C.power(minusOne, C.integer(-2))]);
    const half = C.divide(u, C.two);
    const bySinh = C.product([
      C.square(half),
      C.call('cosh', [half]),
      C.power(C.call('sinh', [half]), C.integer(-3)),
    ]);
    const f = compile(
      [capacity, bySinh, C.ln(minusOne), C.ln(C.call('cosh', [u]))],
      ['Theta', 'x'],
    );
    const [cold = NaN, sinh = NaN, lnMinusOne, lnCosh] = f([3374, 4]);
    expect(cold).toBeCloseTo(843.5 ** 2 * Math.exp(-843.5), 300);
    expect(cold).toBeGreaterThanOrEqual(0);
    expect(sinh).toBeGreaterThanOrEqual(0);
    expect(lnMinusOne).toBe(843.5);
    expect(lnCosh).toBeCloseTo(843.5 - Math.LN2, 12);
    const [warm = NaN] = f([1, 1]);
    expect(warm).toBeCloseTo(Math.E / (Math.E - 1) ** 2, 14);
  });

  it('take the logarithm of a product whose exponential would underflow', () => {
    const q = C.abbreviation('q', C.multiply(C.exp(C.negate(C.divide(C.one, x))), C.symbol('V')));
    const f = compile([C.ln(C.product([C.integer(3), q, C.symbol('V')]))], ['x', 'V']);
    expect(f([1e-4, 2])[0]).toBeCloseTo(-1e4 + Math.log(12), 9);
  });

  it('integrate a hard core with a square well in pieces', () => {
    // B₂ = (2π σ³/3) [1 − (λ³ − 1)(e^(ε/kT) − 1)], D. A. McQuarrie, Statistical Mechanics (1976), from memory.
    const r = C.symbol('r', { positive: true });
    const sigma = C.symbol('sigma', { positive: true });
    const well = C.multiply(C.fraction(3, 2), sigma);
    const u = C.piecewise(
      [
        { condition: { left: r, sign: '<', right: sigma }, value: C.infinity },
        { condition: { left: r, sign: '<', right: well }, value: C.minusOne },
      ],
      C.zero,
    );
    const weight = C.exp(C.negate(C.divide(u, x)));
    const b2 = C.product([
      C.integer(-2),
      C.pi,
      C.integral(r, C.zero, C.infinity, C.multiply(C.subtract(weight, C.one), C.square(r))),
    ]);
    // Its derivative by temperature holds u exp(−u/x), which is no ∞·0 within the core.
    const slope = C.product([
      C.integer(-2),
      C.pi,
      C.integral(
        r,
        C.zero,
        C.infinity,
        C.product([u, weight, C.square(r), C.power(x, C.integer(-2))]),
      ),
    ]);
    const [value = NaN, derivative = NaN] = compile([b2, slope], ['x', 'sigma'])([0.8, 3.4e-10]);
    const volume = (2 * Math.PI * 3.4e-10 ** 3) / 3;
    const exact = volume * (1 - (1.5 ** 3 - 1) * Math.expm1(1 / 0.8));
    expect(Math.abs(value / exact - 1)).toBeLessThan(1e-12);
    const exactSlope = volume * (1.5 ** 3 - 1) * Math.exp(1 / 0.8) * 0.8 ** -2;
    expect(Math.abs(derivative / exactSlope - 1)).toBeLessThan(1e-12);
  });

  it('have no value where a sum or an integral does not settle', () => {
    const i = C.symbol('i', { integer: true });
    const r = C.symbol('r', { positive: true });
    const f = compile(
      [
        C.summation(i, C.one, C.infinity, C.power(x, i)),
        C.integral(r, C.zero, C.one, C.divide(x, r)),
        C.integral(r, C.zero, C.integer(2), C.ln(C.subtract(r, x))),
        C.summation(i, C.one, C.integer(10n ** 23n), C.divide(x, i)),
        C.productOver(i, C.one, C.infinity, C.add(C.one, C.divide(x, i))),
      ],
      ['x'],
    );
    for (const value of f([1])) expect(value).toBeNaN();
  });

  it('multiply a binomial coefficient out', () => {
    const f = compile([C.call('binomial', [x, C.symbol('n')])], ['x', 'n']);
    expect(f([50, 25])[0]).toBe(126410606437752);
    expect(f([0.5, 2])[0]).toBe(-0.125);
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

describe('the rule of Gauss and Kronrod', () => {
  it('is exact for polynomials up to degree 22', () => {
    for (let degree = 0; degree <= 22; degree += 2) {
      const { value } = integrateAdaptively((t) => t ** degree, -8, 8, Infinity);
      expect(value / ((2 * 8 ** (degree + 1)) / (degree + 1))).toBeCloseTo(1, 14);
    }
  });

  it('takes over where a step has no known place', () => {
    const { value, error } = integrate((t) => (t * t < 0.1 ? 1 : 0), 0, 1);
    expect(Math.abs(value - Math.sqrt(0.1))).toBeLessThan(1e-10);
    expect(error).toBeLessThan(1e-10);
  });
});

describe('endless sums', () => {
  it('wait for terms that underflow at first', () => {
    const { value } = sumSeries((i) => Math.exp(-((i - 1000) ** 2) / 200), 0, Infinity);
    expect(value).toBeCloseTo(Math.sqrt(200 * Math.PI), 10);
  });

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
          (u) =>
            evaluatePrecisely(e, new Map<string, string | number>([...point, ['x', u.toString()]])),
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
