import { describe, expect, it } from 'vitest';
import { createModel } from '../../../shared/thermodynamics/model.ts';
import {
  add,
  determinant,
  known,
  negate,
} from '../../../shared/thermodynamics/verification/approximate.ts';
import {
  BeyondLibrary,
  jetByLibrary,
} from '../../../shared/thermodynamics/verification/independentLibrary.ts';
import { JetReader } from '../../../shared/thermodynamics/verification/jet.ts';
import {
  preciseConstants,
  preciseValuesAt,
} from '../../../shared/thermodynamics/verification/preciseValue.ts';
import { call, multiply } from '../../../shared/algebra/construct.ts';
import { fluid, N, stated, T } from './fixtures.ts';

describe('numbers with a bound of their error', () => {
  it('keep the error of both where they cancel', () => {
    const difference = add(known(1), negate(known(1)));
    expect(difference.value.isZero()).toBe(true);
    expect(difference.error).toBeGreaterThan(0);
    expect(difference.scale).toBe(2);
  });

  it('make determinants', () => {
    const rows = [
      [2, 1, 0],
      [0, 3, 1],
      [1, 0, 1],
    ].map((row) => row.map((x) => known(x)));
    expect(Number(determinant(rows).value)).toBe(7);
  });
});

describe('properties read off the derivatives that a library took', () => {
  const model = createModel(fluid());
  const state = new Map([
    ['N', 6.02214076e23],
    ['V', 0.0224],
    ['T', 273.15],
  ]);
  const values = preciseValuesAt(preciseConstants(fluid()), state);
  const reader = new JetReader(model, jetByLibrary(model.f, model.naturals)(values), values);
  const [n, v, t, k, a, b] = [6.02214076e23, 0.0224, 273.15, 1.380649e-23, 3.7e-49, 5.3e-29];

  // The van der Waals equation of state at this state, by hand.
  it.each([
    ['p', (n * k * t) / (v - n * b) - (a * n * n) / v ** 2],
    ['U', 1.5 * n * k * t - (a * n * n) / v],
    ['C_V', 1.5 * n * k],
    ['C_p', 1.5 * n * k + (n * k) / (1 - (2 * a * n * (v - n * b) ** 2) / (k * t * v ** 3))],
    ['pi_T', (a * n * n) / v ** 2],
  ])('have %s', (name, expected) => {
    expect(Number(reader.property(name).value) / expected).toBeCloseTo(1, 11);
  });
});

it('the library says which function it does not know', () => {
  const f = multiply(N, call('lnGamma', [T]));
  const model = createModel(stated('canonical', ['N', 'T'], f));
  expect(() => jetByLibrary(model.f, model.naturals)).toThrow(BeyondLibrary);
});
