/**
 * Identities that must hold between the derived properties of any model: Maxwell's relations,
 * Euler's theorem, Legendre's transformations, relations of the second derivatives.
 */
import {
  add,
  divide,
  multiply,
  negate,
  product,
  square,
  subtract,
  sum,
} from '../../algebra/construct.ts';
import type { Expression } from '../../algebra/expression.ts';
import { partialOf, property } from '../catalogue/index.ts';
import { gibbsSum, numbersOf, thermalEnergy } from '../catalogue/surroundings.ts';
import type { Model } from '../model.ts';
import { NoSuchDerivative } from '../partialDerivative.ts';

export interface Identity {
  readonly title: string;
  /** The properties of which the identity is a check. */
  readonly of: readonly string[];
  /** Both sides as definitions are written. */
  readonly left: Expression;
  readonly right: Expression;
}

/** The identities of a model; `isExtensive` adds those that hold for extensive models only. */
export function identitiesFor(model: Model, isExtensive: boolean): Identity[] {
  const s = model.surroundings;
  const { temperature: T, pressure: p, energy: U, extent: X, components } = s;
  const numbers = numbersOf(s);
  const fields = s.fields.map(({ variable }) => variable.symbol);
  const closed = [...numbers, ...fields];
  const S = property('S');
  const A = property(s.helmholtzName);
  const has = (...names: string[]): boolean => names.every((name) => isWorkable(model, name));
  const isNatural = (e: Expression | undefined): boolean =>
    e !== undefined && (model.naturals as readonly Expression[]).includes(e);
  const identities: Identity[] = [];
  const state = (
    title: string,
    of: readonly string[],
    left: Expression,
    right: Expression,
  ): void => {
    const needed = of.filter((name) => model.entry(name) !== undefined);
    if (needed.length > 0 && has(...needed)) identities.push({ title, of: needed, left, right });
  };

  state('A = U − T S', ['U', 'S', s.helmholtzName], A, subtract(U, multiply(T, S)));
  if (X) {
    const H = property('H');
    const G = property('G');
    state('G = H − T S', ['H', 'S', 'G'], G, subtract(H, multiply(T, S)));
    state(`H = U + p ${s.extentName}`, ['H', 'U', 'p'], H, add(U, multiply(p, X)));
    if (isExtensive && components.length > 0) {
      state(
        'Euler’s theorem, G = Σ mu N',
        ['G', ...components.map((c) => c.chemicalPotentialName)],
        G,
        gibbsSum(s),
      );
    }
    if (isNatural(T) && isNatural(X)) {
      state(
        `Maxwell’s relation of S and p`,
        ['S', 'p'],
        partialOf(S, X, [T, ...closed]),
        partialOf(p, T, [X, ...closed]),
      );
      state(
        `thermodynamic equation of state`,
        ['U', 'p', 'pi_T'],
        partialOf(U, X, [T, ...closed]),
        subtract(multiply(T, partialOf(p, T, [X, ...closed])), p),
      );
      for (const c of components) {
        if (!isNatural(c.number)) continue;
        state(
          `Maxwell’s relation of ${c.chemicalPotentialName} and p`,
          [c.chemicalPotentialName, 'p'],
          partialOf(c.chemicalPotential, X, [T, ...closed]),
          negate(partialOf(p, c.number, [T, X, ...closed.filter((z) => z !== c.number)])),
        );
      }
    }
    const kappaT = property('kappa_T');
    const alpha = property('alpha');
    const cp = property('C_p');
    const cv = property('C_V');
    state(
      'heat capacity from the entropy, C_p = T (∂S/∂T)_p',
      ['C_p', 'S'],
      cp,
      multiply(T, partialOf(S, T, [p, ...closed])),
    );
    state(
      'difference of the heat capacities',
      ['C_p', 'C_V', 'alpha', 'kappa_T', 'gamma'],
      subtract(cp, cv),
      divide(product([T, X, square(alpha)]), kappaT),
    );
    state(
      'compressibilities and heat capacities, kappa_S C_p = kappa_T C_V',
      ['kappa_S', 'kappa_T', 'gamma', 'w'],
      partialOf(X, p, [S, ...closed]),
      multiply(divide(cv, cp), partialOf(X, p, [T, ...closed])),
    );
    state(
      'Joule–Thomson coefficient from the enthalpy',
      ['mu_JT', 'H', 'C_p'],
      multiply(property('mu_JT'), partialOf(H, T, [p, ...closed])),
      negate(partialOf(H, p, [T, ...closed])),
    );
    state(
      'expansion from the entropy',
      ['alpha'],
      multiply(X, alpha),
      negate(partialOf(S, p, [T, ...closed])),
    );
    if (components.length > 0) {
      state(
        'compressibility factor and pressure',
        ['Z', 'p'],
        product([property('Z'), sum(numbers), thermalEnergy(s)]),
        multiply(p, X),
      );
    }
  }
  state(
    'heat capacity from the entropy, C_V = T (∂S/∂T)_V',
    ['C_V', 'S', 'U'],
    property('C_V'),
    multiply(T, partialOf(S, T, [...(X ? [X] : []), ...closed])),
  );
  for (const { variable, response } of s.fields) {
    if (!isNatural(T)) continue;
    state(
      `Maxwell’s relation of S and ${response}`,
      [response, 'S'],
      partialOf(S, variable.symbol, [
        T,
        ...(X ? [X] : []),
        ...numbers,
        ...fields.filter((e) => e !== variable.symbol),
      ]),
      partialOf(property(response), T, [...(X ? [X] : []), ...closed]),
    );
  }
  return identities;
}

function isWorkable(model: Model, name: string): boolean {
  try {
    model.worked(name);
    return true;
  } catch (fault) {
    if (fault instanceof NoSuchDerivative) return false;
    throw fault;
  }
}
