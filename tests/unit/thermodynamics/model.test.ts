import { describe, expect, it } from 'vitest';
import {
  add,
  call,
  divide,
  exp,
  fraction,
  integer,
  ln,
  minusOne,
  multiply,
  negate,
  one,
  pi,
  power,
  product,
  sqrt,
  square,
  subtract,
  sum,
  symbol,
  two,
  zero,
} from '../../../shared/algebra/construct.ts';
import { equal } from '../../../shared/algebra/equality.ts';
import type { Expression } from '../../../shared/algebra/expression.ts';
import { createModel, type Model } from '../../../shared/thermodynamics/model.ts';
import { NoSuchDerivative } from '../../../shared/thermodynamics/partialDerivative.ts';
import { N, T, V, a, b, fluid, h, k, Lambda, m, natural, stated } from './fixtures.ts';

const kT = multiply(k, T);

function expectEqual(model: Model, name: string, expected: Expression): void {
  expect(equal(model.worked(name).value, expected), name).toBe('equal');
}

describe('a hard-core fluid with attraction in the canonical ensemble', () => {
  const model = createModel(fluid());
  const free = subtract(V, multiply(N, b));
  // The van der Waals equation of state and what follows from it, in any textbook.
  const expected: Record<string, Expression> = {
    p: subtract(divide(product([N, kT]), free), product([a, square(N), power(V, integer(-2))])),
    U: subtract(product([fraction(3, 2), N, kT]), divide(multiply(a, square(N)), V)),
    S: product([
      N,
      k,
      add(fraction(5, 2), ln(divide(free, multiply(N, power(Lambda, integer(3)))))),
    ]),
    C_V: product([fraction(3, 2), N, k]),
    pi_T: product([a, square(N), power(V, integer(-2))]),
    C_p: add(
      product([fraction(3, 2), N, k]),
      divide(
        multiply(N, k),
        subtract(
          one,
          divide(product([two, a, N, square(free)]), multiply(kT, power(V, integer(3)))),
        ),
      ),
    ),
  };

  it.each(Object.entries(expected))('has the known %s', (name, value) => {
    expectEqual(model, name, value);
  });

  it('has the chemical potential that makes G = N mu', () => {
    expectEqual(model, 'G', multiply(N, model.worked('mu').value));
  });

  it('is extensive', () => {
    expect(model.isExtensive()).toBe(true);
  });

  it('gives any partial derivative of any properties', () => {
    const joule = model.resolve(call('partial', [symbol('T'), symbol('p'), symbol('H'), N]));
    expect(equal(joule, model.worked('mu_JT').value)).toBe('equal');
    const maxwell = model.resolve(call('partial', [symbol('S'), V, T, N]));
    expect(equal(maxwell, model.resolve(call('partial', [symbol('p'), T, V, N])))).toBe('equal');
  });

  it('refuses a derivative that holds too few quantities', () => {
    expect(() => model.resolve(call('partial', [symbol('U'), V, T]))).toThrow(NoSuchDerivative);
  });
});

describe('other ensembles by the same scheme', () => {
  it('give the adsorption isotherm of Langmuir from ln Xi', () => {
    // I. Langmuir, J. Am. Chem. Soc. 40 (1918) 1361: N/M = 1/(1 + exp(−(mu + e)/(k T))).
    const [mu, sites, e] = [natural('mu'), natural('M'), symbol('e_b', { positive: true })];
    const exponent = divide(add(mu, e), kT);
    const model = createModel(
      stated('grand canonical', ['mu', 'M', 'T'], multiply(sites, ln(add(one, exp(exponent))))),
    );
    expectEqual(model, 'N', divide(sites, add(one, exp(negate(exponent)))));
    expectEqual(model, 'Omega', negate(multiply(model.worked('p').value, sites)));
  });

  it('give the length of hard rods from ln Delta', () => {
    // L. Tonks, Phys. Rev. 50 (1936) 955: L = N k T/p + N d.
    const p = natural('p');
    const lnDelta = multiply(
      N,
      subtract(ln(divide(kT, multiply(p, Lambda))), divide(multiply(p, b), kT)),
    );
    const model = createModel(stated('isothermal-isobaric', ['N', 'p', 'T'], lnDelta));
    expectEqual(model, 'L', add(divide(multiply(N, kT), p), multiply(N, b)));
    expectEqual(model, 'C_p', product([fraction(3, 2), N, k]));
    expectEqual(model, 'C_V', product([fraction(1, 2), N, k]));
  });

  it('give temperature and pressure from ln W', () => {
    const U = natural('U');
    const lnW = multiply(
      N,
      sum([
        ln(divide(V, N)),
        multiply(
          fraction(3, 2),
          ln(divide(product([integer(4), pi, m, U]), product([integer(3), N, square(h)]))),
        ),
        fraction(5, 2),
      ]),
    );
    const model = createModel(stated('microcanonical', ['N', 'V', 'U'], lnW));
    expectEqual(model, 'T', divide(multiply(two, U), product([integer(3), N, k])));
    expectEqual(model, 'p', divide(multiply(two, U), multiply(integer(3), V)));
    expectEqual(model, 'C_p', product([fraction(5, 2), N, k]));
  });

  it('give the magnetization of spins as the response to a field', () => {
    const B = natural('B');
    const moment = symbol('mu_m', { positive: true });
    const x = divide(multiply(moment, B), kT);
    const model = createModel(
      stated('canonical', ['N', 'B', 'T'], multiply(N, ln(multiply(two, call('cosh', [x]))))),
    );
    expectEqual(model, 'M_B', product([N, moment, call('tanh', [x])]));
    expect(model.entry('p')).toBeUndefined();
    expect(model.entry('kappa_T')).toBeUndefined();
  });
});

describe('a photon gas', () => {
  const c = symbol('c', { positive: true });
  const model = createModel(
    stated(
      'canonical',
      ['N', 'V', 'T'],
      product([
        fraction(8, 45),
        power(pi, integer(5)),
        V,
        power(kT, integer(3)),
        power(multiply(h, c), integer(-3)),
      ]),
    ),
  );

  it('has U = 3 p V and no Gibbs energy', () => {
    expectEqual(model, 'U', product([integer(3), model.worked('p').value, V]));
    expectEqual(model, 'G', zero);
  });

  it('has no compressibility, since its pressure does not vary with V', () => {
    expect(() => model.worked('kappa_T')).toThrow(NoSuchDerivative);
    expect(() => model.worked('C_p')).toThrow(NoSuchDerivative);
  });

  it('has neither chemical potential nor speed of sound of a mass', () => {
    expect(model.entry('mu')).toBeUndefined();
    expect(model.entry('w')).toBeUndefined();
  });
});

it('the speed of sound of an ideal gas is √(5 k T/(3 m))', () => {
  const lnQ = sum([
    multiply(N, ln(V)),
    product([integer(-3), N, ln(Lambda)]),
    negate(multiply(N, ln(N))),
    N,
  ]);
  const model = createModel(stated('canonical', ['N', 'V', 'T'], lnQ));
  expectEqual(model, 'w', sqrt(divide(product([integer(5), kT]), multiply(integer(3), m))));
  expectEqual(model, 'mu_JT', zero);
  expectEqual(model, 'alpha', power(T, minusOne));
});
