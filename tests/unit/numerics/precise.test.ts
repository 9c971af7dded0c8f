/** Values to thirty digits and more, against closed forms. */
import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';
import {
  evaluatePrecisely,
  preciseDerivative,
  preciseMixedDerivative,
  big,
} from '../../../shared/numerics/index.ts';

const r = C.symbol('r', { positive: true });
const x = C.symbol('x', { positive: true });
const J = C.symbol('J', { integer: true, positive: true });
const power = (e: Expression, n: number): Expression => C.power(e, C.integer(n));
const well = C.piecewise(
  [
    { condition: { left: r, sign: '<', right: C.one }, value: C.infinity },
    { condition: { left: r, sign: '<', right: C.fraction(3, 2) }, value: C.minusOne },
  ],
  C.zero,
);
const boltzmann = C.exp(C.negate(C.divide(well, x)));

/** Each expression with one that has the same value. */
const pairs: [string, Expression, Expression][] = [
  [
    '∫ exp(−r²) over the line is √π',
    C.integral(r, C.negate(C.infinity), C.infinity, C.exp(C.negate(C.square(r)))),
    C.sqrt(C.pi),
  ],
  [
    'Planck’s integral is π⁴/15',
    C.integral(r, C.zero, C.infinity, C.divide(power(r, 3), C.subtract(C.exp(r), C.one))),
    C.divide(power(C.pi, 4), C.integer(15)),
  ],
  [
    'an integral with a root at its end',
    C.integral(r, C.zero, C.integer(4), C.power(r, C.fraction(-1, 2))),
    C.integer(4),
  ],
  [
    'Li₂(−1) is −π²/12',
    C.call('polylog', [C.two, C.minusOne]),
    C.divide(C.square(C.pi), C.integer(-12)),
  ],
  [
    'Γ(−1/2) is −2√π',
    C.call('Gamma', [C.fraction(-1, 2)]),
    C.multiply(C.integer(-2), C.sqrt(C.pi)),
  ],
  [
    'a hard core with a square well',
    C.integral(r, C.zero, C.infinity, C.multiply(C.subtract(boltzmann, C.one), C.square(r))),
    C.divide(
      C.subtract(
        C.multiply(C.fraction(19, 8), C.subtract(C.exp(C.divide(C.one, x)), C.one)),
        C.one,
      ),
      C.integer(3),
    ),
  ],
  [
    'the same by temperature, without ∞·0 in the core',
    C.integral(r, C.zero, C.infinity, C.product([well, boltzmann, C.square(r)])),
    C.multiply(C.fraction(-19, 24), C.exp(C.divide(C.one, x))),
  ],
  [
    'a geometric series',
    C.summation(J, C.zero, C.infinity, C.power(C.divide(x, C.two), J)),
    C.divide(C.one, C.subtract(C.one, C.divide(x, C.two))),
  ],
];

describe('precise values', () => {
  it.each(pairs)('%s', (_, left, right) => {
    const values = new Map([['x', '0.8']]);
    const [a, b] = [evaluatePrecisely(left, values), evaluatePrecisely(right, values)];
    expect(a && b ? a.div(b).minus(1).abs().toNumber() : NaN).toBeLessThan(1e-34);
  });

  it('are missing where an integral diverges or an integrand has no value', () => {
    const diverging = C.integral(r, C.zero, C.one, C.divide(C.one, r));
    const outside = C.integral(r, C.zero, C.one, C.ln(C.subtract(r, C.half)));
    expect(evaluatePrecisely(diverging, new Map())).toBeUndefined();
    expect(evaluatePrecisely(outside, new Map())).toBeUndefined();
  });

  it('give second and mixed derivatives of x³y² to 25 digits', () => {
    const f = (u: ReturnType<typeof big>, v: ReturnType<typeof big>): ReturnType<typeof big> =>
      u.pow(3).times(v.pow(2));
    const [u, v] = [big('1.7'), big('0.3')];
    const second = preciseDerivative((w) => f(w, v), u, 2);
    const mixed = preciseMixedDerivative(f, u, v);
    expect(second?.div(big('0.918')).minus(1).abs().toNumber()).toBeLessThan(1e-25);
    expect(mixed?.div(big('5.202')).minus(1).abs().toNumber()).toBeLessThan(1e-25);
  });
});
