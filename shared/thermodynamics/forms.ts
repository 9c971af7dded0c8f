/**
 * The forms of a property other than the molecular one: per molecule and molar.
 *
 * Where ln Q is extensive a property is the same function for any size of the system, so the form
 * per molecule is that of a system of one molecule in the volume v, and the molar form that of
 * N_Av molecules in the volume V_m, with k N_Av = R and parameters as the author reports them per
 * mole. No other algebra is needed.
 */
import {
  abbreviation,
  divide,
  multiply,
  number,
  one,
  power,
  product,
  splitPower,
  sum,
  symbol,
} from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { abbreviationsOf, dependsOn, rebuild, substitute } from '../algebra/traverse.ts';
import type { FormName } from '../contracts/derivation.ts';
import type { Formulation, Report } from '../language/formulation.ts';
import type { Model } from './model.ts';

export interface Form {
  readonly form: FormName;
  /** What takes the place of what. */
  readonly replacements: ReadonlyMap<Expression, Expression>;
}

const avogadro = symbol('N_Av', { positive: true });
const gasConstant = symbol('R', { positive: true });

/** The forms that the model allows; none where ln Q is not extensive or has no numbers. */
export function formsOf(model: Model): Form[] {
  const { components, naturals } = model.surroundings;
  if (model.formulation.ensemble !== 'canonical' || components.length === 0) return [];
  const sizes = (perSystem: Expression, extentName: string): Map<Expression, Expression> => {
    const map = new Map<Expression, Expression>();
    // The mole fractions add up to one.
    if (components.length > 1) map.set(sum(components.map(({ number: n }) => n)), perSystem);
    for (const { species, number } of components) {
      const share = species === '' ? one : symbol(`x_${species}`, { positive: true });
      map.set(number, multiply(share, perSystem));
    }
    for (const { role, symbol: extent, name } of naturals) {
      if (role === 'extent')
        map.set(extent, symbol(extentNameOf(name, extentName), { positive: true }));
    }
    return map;
  };
  const molar = sizes(avogadro, 'm');
  molar.set(boltzmannOf(model.formulation), divide(gasConstant, avogadro));
  for (const report of model.formulation.molar) {
    const solved = solveForParameter(report, model.formulation);
    if (solved) molar.set(solved.parameter, solved.value);
  }
  return [
    { form: 'per molecule', replacements: protect(model, sizes(one, 'v')) },
    { form: 'molar', replacements: protect(model, molar) },
  ];
}

function extentNameOf(name: string, kind: string): string {
  if (kind === 'm') return `${name}_m`;
  return name === 'V' ? 'v' : `${name.toLowerCase()}_1`;
}

function boltzmannOf(formulation: Formulation): Expression {
  return (
    formulation.naturalConstants.find(({ name }) => name === 'k')?.symbol ??
    symbol('k', { positive: true })
  );
}

/** From a_m = N_Av² a: a is a_m/N_Av². Undefined where the report is no plain multiple. */
function solveForParameter(
  report: Report,
  formulation: Formulation,
): { parameter: Expression; value: Expression } | undefined {
  const parameter = formulation.quantities.find(({ symbol: s }) => dependsOn(report.expression, s));
  if (!parameter) return undefined;
  const factor = divide(report.expression, parameter.symbol);
  if (dependsOn(factor, parameter.symbol)) return undefined;
  const named = symbol(report.name, { positive: parameter.symbol.positive });
  return { parameter: parameter.symbol, value: divide(named, factor) };
}

/**
 * Abbreviations keep their name: those that do not depend on the size of the system as they are,
 * the others with the replacements made inside.
 */
function protect(
  model: Model,
  sizes: ReadonlyMap<Expression, Expression>,
): ReadonlyMap<Expression, Expression> {
  const all = new Map(sizes);
  const symbolsOfSize = model.surroundings.naturals.filter(
    ({ role }) => role === 'number' || role === 'extent',
  );
  const doubled = new Map<Expression, Expression>(
    symbolsOfSize.map(({ symbol: s }) => [s, product([symbol('lambda_', { positive: true }), s])]),
  );
  const visit = (e: Expression): void => {
    for (const found of abbreviationsOf(e)) {
      if (found.kind !== 'abbreviation') continue;
      visit(found.definition);
      const isIntensive = substitute(found.definition, doubled) === found.definition;
      all.set(
        found,
        isIntensive ? found : abbreviation(found.name, substitute(found.definition, sizes)),
      );
    }
  };
  visit(model.f);
  return all;
}

/** The expression in the form; `times` is by what a property of one molecule is multiplied. */
export function inForm(e: Expression, form: Form, times: Expression = one): Expression {
  const replaced = substitute(e, form.replacements);
  if (form.form !== 'molar') return replaced;
  return multiply(times, takeOutAvogadro(replaced));
}

/** By what a property of one molecule is multiplied to be one of a mole. */
export const perMole: Expression = avogadro;

/**
 * Sums with their common power of N_Av in front: R T V³/N_Av − 2 a (V − b)²/N_Av cancels only so
 * against what stands outside.
 */
function takeOutAvogadro(e: Expression): Expression {
  if (e.kind === 'abbreviation') return e;
  const inside = rebuild(e, takeOutAvogadro);
  if (inside.kind !== 'sum' || !Q.isZero(inside.constant)) return inside;
  const exponents = inside.terms.map(avogadroExponent);
  const [first, ...rest] = exponents;
  if (first === undefined) return inside;
  const least = rest.reduce((a, b) => (Q.compare(a, b) <= 0 ? a : b), first);
  if (Q.isZero(least)) return inside;
  const common = power(avogadro, number(least));
  return multiply(common, sum(inside.terms.map((term) => divide(term, common))));
}

function avogadroExponent(term: Expression): Q.Rational {
  for (const factor of term.kind === 'product' ? term.factors : [term]) {
    const { base, exponent } = splitPower(factor);
    if (base === avogadro && exponent.kind === 'number') return exponent.value;
  }
  return Q.ZERO;
}
