import { describe, expect, it } from 'vitest';
import * as C from '../../../shared/algebra/construct.ts';
import { differentiate } from '../../../shared/algebra/differentiate.ts';
import { equal, isZero } from '../../../shared/algebra/equality.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';
import { limitAt } from '../../../shared/algebra/limit.ts';
import { simplify, Simplifier } from '../../../shared/algebra/simplify.ts';
import { a, b, free, k, Lambda, lnQ, N, T, V } from './vanDerWaals.ts';

const kT = C.multiply(k, T);
const pressure = C.multiply(kT, differentiate(lnQ, V));
const energy = C.product([kT, T, differentiate(lnQ, T)]);
const entropy = C.add(C.divide(energy, T), C.multiply(k, lnQ));

/** The van der Waals equation as everybody writes it. */
const vanDerWaals = C.subtract(
  C.divide(C.product([N, k, T]), free),
  C.divide(C.product([a, N, N]), C.product([V, V])),
);

describe('the shortest form', () => {
  const simplifier = new Simplifier({ known: [lnQ], dominant: [V, T] });

  it('of the pressure is the van der Waals equation', () => {
    expect(simplifier.simplify(pressure)).toBe(vanDerWaals);
  });

  it('of the internal energy is 3/2 N k T − a N²/V', () => {
    const expected = C.subtract(
      C.product([C.fraction(3, 2), N, k, T]),
      C.divide(C.product([a, N, N]), V),
    );
    expect(simplifier.simplify(energy)).toBe(expected);
  });

  it('of the entropy has one logarithm', () => {
    const expected = C.product([
      N,
      k,
      C.add(C.fraction(5, 2), C.ln(C.divide(free, C.multiply(N, C.power(Lambda, C.integer(3)))))),
    ]);
    expect(simplifier.simplify(entropy)).toBe(expected);
  });

  it('of the heat capacity at constant pressure keeps its two parts', () => {
    const tension = differentiate(vanDerWaals, T);
    const stiffness = differentiate(vanDerWaals, V);
    const heatCapacity = C.subtract(
      C.product([C.fraction(3, 2), N, k]),
      C.divide(C.product([T, tension, tension]), stiffness),
    );
    const expected = C.add(
      C.product([C.fraction(3, 2), N, k]),
      C.divide(
        C.product([N, k, k, T, V, V, V]),
        C.subtract(C.product([k, T, V, V, V]), C.product([C.two, a, N, free, free])),
      ),
    );
    expect(simplifier.simplify(heatCapacity)).toBe(expected);
  });

  it('of an oscillator’s energy has one exponential', () => {
    const theta = C.symbol('Theta', { positive: true });
    const x = C.divide(theta, T);
    const lnq = C.negate(C.ln(C.subtract(C.one, C.exp(C.negate(x)))));
    const U = simplify(C.product([k, T, T, differentiate(lnq, T)]));
    expect(U).toBe(C.divide(C.multiply(k, theta), C.subtract(C.exp(x), C.one)));
  });

  it('finds common denominators and cancels', () => {
    const x = C.symbol('x');
    const y = C.symbol('y');
    const e = C.divide(C.subtract(C.square(x), C.square(y)), C.subtract(x, y));
    expect(simplify(e)).toBe(C.add(x, y));
  });
});

describe('equality', () => {
  const x = C.symbol('x', { positive: true });
  const y = C.symbol('y', { positive: true });
  const identities: [string, Expression, Expression][] = [
    [
      'a binomial',
      C.square(C.add(x, y)),
      C.sum([C.square(x), C.product([C.two, x, y]), C.square(y)]),
    ],
    ['exponentials of sums', C.exp(C.add(x, y)), C.multiply(C.exp(x), C.exp(y))],
    [
      'a hyperbolic identity',
      C.subtract(C.square(C.call('cosh', [x])), C.square(C.call('sinh', [x]))),
      C.one,
    ],
    [
      'the derivative of tanh',
      differentiate(C.call('tanh', [x]), x),
      C.power(C.call('cosh', [x]), C.integer(-2)),
    ],
    ['logarithms of products', C.ln(C.multiply(x, y)), C.add(C.ln(x), C.ln(y))],
    [
      'logarithms of numbers',
      C.ln(C.integer(12)),
      C.add(C.multiply(C.two, C.ln(C.two)), C.ln(C.integer(3))),
    ],
    ['roots', C.multiply(C.sqrt(x), C.sqrt(x)), x],
    [
      'roots of numbers',
      C.square(C.add(C.one, C.sqrt(C.two))),
      C.add(C.integer(3), C.multiply(C.two, C.sqrt(C.two))),
    ],
    ['roots of sums', C.subtract(C.square(C.sqrt(C.add(C.one, x))), C.one), x],
    [
      'quotients',
      C.subtract(C.divide(C.one, x), C.divide(C.one, y)),
      C.divide(C.subtract(y, x), C.multiply(x, y)),
    ],
    ['an abbreviation', C.square(C.abbreviation('s', C.add(x, y))), C.square(C.add(x, y))],
  ];
  it.each(identities)('decides %s', (_, left, right) => {
    expect(equal(left, right)).toBe('equal');
  });

  it('tells different rational functions apart', () => {
    expect(equal(C.square(C.add(x, y)), C.add(C.square(x), C.square(y)))).toBe('different');
  });

  it('does not claim to know what it cannot decide', () => {
    const gamma = (e: Expression): Expression => C.call('Gamma', [e]);
    expect(equal(gamma(C.add(x, C.one)), C.multiply(x, gamma(x)))).toBe('undecided');
  });

  it('holds Maxwell’s relation of the van der Waals fluid', () => {
    const left = differentiate(entropy, V);
    const right = differentiate(pressure, T);
    expect(isZero(C.subtract(left, right))).toBe('zero');
  });

  it('sees a wrong sign', () => {
    expect(isZero(C.add(differentiate(entropy, V), differentiate(pressure, T)))).toBe('nonzero');
  });
});

describe('limits', () => {
  it('of the compressibility factor at low density is 1', () => {
    const Z = C.divide(C.multiply(pressure, V), C.product([N, k, T]));
    expect(limitAt(Z, V, C.infinity)).toBe(C.one);
  });

  it('of the second virial coefficient is b − a/(k T)', () => {
    const Z = C.divide(C.multiply(vanDerWaals, V), C.product([N, k, T]));
    const B2 = limitAt(C.multiply(C.subtract(Z, C.one), C.divide(V, N)), V, C.infinity);
    expect(B2 && equal(B2, C.subtract(b, C.divide(a, kT)))).toBe('equal');
  });

  it('follow exponentials that vanish', () => {
    const theta = C.symbol('Theta', { positive: true });
    const x = C.divide(theta, T);
    const heat = C.divide(C.multiply(C.square(x), C.exp(x)), C.square(C.subtract(C.exp(x), C.one)));
    expect(limitAt(heat, T, C.infinity)).toBe(C.one);
  });

  it('that grow say so', () => {
    expect(limitAt(C.divide(C.one, T), T, C.zero)).toBe(C.infinity);
  });
});
