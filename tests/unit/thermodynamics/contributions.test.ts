import { describe, expect, it } from 'vitest';
import {
  divide,
  integer,
  ln,
  multiply,
  negate,
  product,
  square,
  subtract,
  sum,
  two,
} from '../../../shared/algebra/construct.ts';
import { equal } from '../../../shared/algebra/equality.ts';
import { surroundingsOf } from '../../../shared/thermodynamics/catalogue/index.ts';
import { groupTerms } from '../../../shared/thermodynamics/contributions.ts';
import { createModel } from '../../../shared/thermodynamics/model.ts';
import { createNotation } from '../../../shared/thermodynamics/notation.ts';
import { a, fluid, k, Lambda, N, natural, stated, T, V } from './fixtures.ts';

function labels(formulation = fluid()): string[] {
  return groupTerms(formulation, surroundingsOf(formulation), createNotation(formulation)).map(
    ({ label }) => label,
  );
}

describe('the terms of ln Q', () => {
  it('are labelled by what their parameters are', () => {
    expect(labels().sort()).toEqual([
      'attraction',
      'excluded volume per molecule',
      'indistinguishable molecules',
      'translation',
    ]);
  });

  it('belong to translation where they are the volume or the thermal wavelength', () => {
    const lnQ = sum([
      multiply(N, ln(V)),
      product([integer(-3), N, ln(Lambda)]),
      negate(multiply(N, ln(N))),
      N,
    ]);
    expect(labels(stated('canonical', ['N', 'V', 'T'], lnQ)).sort()).toEqual([
      'indistinguishable molecules',
      'translation',
    ]);
  });

  it('count arrangements on a lattice, beside the interaction', () => {
    const M = natural('M');
    const empty = subtract(M, N);
    const lnQ = sum([
      multiply(M, ln(M)),
      negate(multiply(N, ln(N))),
      negate(multiply(empty, ln(empty))),
      divide(multiply(a, square(N)), product([two, k, T, M])),
    ]);
    expect(labels(stated('canonical', ['N', 'M', 'T'], lnQ)).sort()).toEqual([
      'arrangement',
      'attraction',
    ]);
  });

  it('have shares in a linear property that add up to it', () => {
    const formulation = fluid();
    const whole = createModel(formulation);
    const groups = groupTerms(formulation, whole.surroundings, createNotation(formulation));
    for (const entry of whole.entries.filter(({ isLinear }) => isLinear)) {
      const shares = groups.map(({ f }) =>
        createModel(formulation, { f, surroundings: whole.surroundings, shorten: (e) => e }).worked(
          entry.symbol,
        ),
      );
      const total = sum(shares.map(({ value }) => value));
      expect(equal(total, whole.worked(entry.symbol).value), entry.symbol).toBe('equal');
    }
  });
});
