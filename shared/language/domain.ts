/**
 * Where an expression has a value: what its logarithms, roots and denominators demand.
 *
 * A denominator only has to differ from zero. The part of the line that is meant is the one that
 * holds the state of a dilute system, since every model here starts from it: 1 − eta in a
 * denominator demands eta < 1.
 */
import * as C from '../algebra/construct.ts';
import { childrenOf, type Expression, type Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { isPositive } from '../algebra/sign.ts';
import { symbolsOf } from '../algebra/traverse.ts';
import { compile } from '../numerics/compile.ts';

/** Values of symbols at the dilute state, in SI units. */
export type DiluteState = ReadonlyMap<string, number>;

/**
 * The relations, each once, in the order in which the expression is walked. What is positive by its
 * nature is not repeated, save for the `named` symbols (order parameters), whose ends matter.
 */
export function domainOf(
  e: Expression,
  dilute: DiluteState,
  named: readonly Expression[] = [],
): Relation[] {
  const relations = new Map<string, Relation>();
  const seen = new Set<Expression>();
  const bound = new Set<Expression>();
  const keep = (relation: Relation): void => {
    relations.set(`${relation.left.id} ${relation.sign} ${relation.right.id}`, relation);
  };
  const demand = (x: Expression): void => {
    if (named.includes(x)) keep({ left: x, sign: '>', right: C.zero });
    if (isPositive(x) || x.kind === 'number' || [...symbolsOf(x)].some((s) => bound.has(s))) return;
    if (x.kind === 'abbreviation') {
      demand(x.definition);
      return;
    }
    if (x.kind === 'power' && x.exponent.kind === 'number') {
      demand(x.base);
      return;
    }
    const exponent = besideOne(x);
    if (exponent) {
      demand(exponent);
      return;
    }
    if (x.kind === 'product') {
      const open = x.factors.filter((factor) => !isPositive(factor));
      const [only] = open;
      if (open.length === 1 && only && Q.sign(x.coefficient) > 0) {
        demand(only);
        return;
      }
    }
    keep(arranged(x));
  };
  const demandNotZero = (x: Expression): void => {
    if (x.kind === 'abbreviation') demandNotZero(x.definition);
    if (isPositive(x) || x.kind !== 'sum') return;
    const value = valueAt(x, dilute);
    if (value === undefined || value === 0) return;
    demand(value > 0 ? x : C.negate(x));
  };
  const visit = (part: Expression): void => {
    if (seen.has(part)) return;
    seen.add(part);
    if (part.kind === 'summation' || part.kind === 'productOver' || part.kind === 'integral') {
      bound.add(part.variable);
    }
    if (part.kind === 'power') {
      const { base, exponent } = part;
      if (exponent.kind !== 'number' || !Q.isInteger(exponent.value)) demand(base);
      else if (Q.sign(exponent.value) < 0) demandNotZero(base);
    }
    if (part.kind === 'call') {
      const [x, y] = part.arguments;
      if (x && (part.name === 'ln' || part.name === 'lnGamma')) demand(x);
      if (x && part.name === 'arctanh') {
        demand(C.subtract(C.one, x));
        demand(C.add(C.one, x));
      }
      // polylog(s, exp(y)) has a value for y below zero.
      if (y && part.name === 'polylog') {
        const isExponential = y.kind === 'call' && y.name === 'exp' && y.arguments[0];
        demand(isExponential ? C.negate(isExponential) : C.subtract(C.one, y));
      }
    }
    childrenOf(part).forEach(visit);
  };
  visit(e);
  return [...relations.values()];
}

/** y where the expression is 1 − exp(−y) or exp(y) − 1, which are positive with y. */
function besideOne(x: Expression): Expression | undefined {
  const [term] = x.kind === 'sum' ? x.terms : [];
  if (x.kind !== 'sum' || !term || x.terms.length !== 1) return undefined;
  const { coefficient, rest } = C.splitCoefficient(term);
  const [y] = rest.kind === 'call' && rest.name === 'exp' ? rest.arguments : [];
  if (!y || !Q.equals(coefficient, Q.negate(x.constant))) return undefined;
  return Q.sign(coefficient) > 0 ? y : C.negate(y);
}

/** x > 0 with the negative terms on the other side: V > N b, theta < 1. */
function arranged(x: Expression): Relation {
  const isNegative = (term: Expression): boolean =>
    (term.kind === 'number' && Q.sign(term.value) < 0) ||
    (term.kind === 'product' && Q.sign(term.coefficient) < 0);
  const addends = C.addendsOf(x);
  const left = C.sum(addends.filter((addend) => !isNegative(addend)));
  const right = C.sum(addends.filter(isNegative).map(C.negate));
  if (left.kind === 'number') return { left: right, sign: '<', right: left };
  return { left, sign: '>', right };
}

function hasBinder(e: Expression, seen = new Set<Expression>()): boolean {
  if (seen.has(e)) return false;
  seen.add(e);
  if (e.kind === 'summation' || e.kind === 'productOver' || e.kind === 'integral') return true;
  return childrenOf(e).some((child) => hasBinder(child, seen));
}

function valueAt(x: Expression, state: DiluteState): number | undefined {
  // A sum or an integral costs more than the answer is worth.
  if (hasBinder(x)) return undefined;
  const names = [...symbolsOf(x)].map(({ name }) => name).filter((name) => name !== 'pi');
  const values = names.map((name) => state.get(name));
  if (values.some((value) => value === undefined)) return undefined;
  try {
    const [value] = compile([x], names)(values.map((value) => value ?? NaN));
    return value === undefined || Number.isNaN(value) ? undefined : value;
  } catch {
    return undefined;
  }
}
