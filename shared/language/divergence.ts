/**
 * Sums and integrals that have no value, found by how the summand or integrand falls off.
 *
 * A sum is refused only if its terms do not fall off at all, or more slowly than 1/n, at every one
 * of several widely different states; an integral likewise with x f(x). What the double-precision
 * ladder suspects is looked at again with 64 digits, so that cancellation refuses nothing. What
 * cannot be decided passes.
 */
import { childrenOf, type Expression, type SymbolNode } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { symbolsOf } from '../algebra/traverse.ts';
import { compile } from '../numerics/compile.ts';
import { big } from '../numerics/bigNumber.ts';
import { evaluatePrecisely } from '../numerics/precise.ts';

import type { Findings } from './findings.ts';
import type { BinderTree } from './syntax.ts';
import { trialStates, type Known } from './trialStates.ts';

/** A sum, product or integral with an infinite end, or an integral from 0. */
export interface OpenBinder {
  readonly what: 'sum' | 'product' | 'integral';
  readonly variable: SymbolNode;
  readonly from: Expression;
  readonly to: Expression;
  readonly body: Expression;
}

/** Values of all symbols but the running variable. */
export type State = ReadonlyMap<string, number>;

const FAR = [1e3, 1e6, 1e12, 1e25, 1e50, 1e100];
const PRECISE = ['1e3', '1e6', '1e12', '1e24'];

/** Reports every sum and integral that surely has no value. */
export function refuseDivergence(
  openBinders: readonly { readonly tree: BinderTree; readonly binder: OpenBinder }[],
  known: Known,
  findings: Findings,
): void {
  if (openBinders.length === 0) return;
  const states = trialStates(known);
  for (const { tree, binder } of openBinders) {
    const end = divergence(binder, states);
    if (end === undefined) continue;
    const name = tree.variable.spelled;
    if (tree.what === 'integral') findings.add('divergent-integral', tree.span, { name, end });
    else findings.add('divergent-sum', tree.span, { what: tree.what, name });
  }
}

/** At which end it surely diverges: `inf`, `0`, or undefined where nothing is known. */
export function divergence(binder: OpenBinder, states: readonly State[]): 'inf' | '0' | undefined {
  const { what, variable, from, to, body } = binder;
  if (hasBinder(body)) return undefined;
  if (what === 'integral' && divergesAtZero(binder)) return '0';
  if (to.kind !== 'infinity' || from.kind === 'infinity' || what === 'product') return undefined;
  const names = [...symbolsOf(body)].map(({ name }) => name);
  if (!names.includes(variable.name)) return 'inf';
  const others = names.filter((name) => name !== variable.name && name !== 'pi');
  let f: ReturnType<typeof compile>;
  try {
    f = compile([body], [variable.name, ...others]);
  } catch {
    return undefined;
  }
  for (const state of states) {
    const values = others.map((name) => state.get(name));
    if (values.some((value) => value === undefined)) return undefined;
    const given = values.map((value) => value ?? NaN);
    const term = (x: number): number => f([x, ...given])[0] ?? NaN;
    const isSteady = !falls(FAR.map(term), undefined);
    const isSlow = hasOneSign([1000, 1001, 1002, 1003].map(term)) && !falls(FAR.map(term), FAR);
    if (!(what === 'integral' ? isSlow : isSteady || isSlow)) return undefined;
    const precise = preciseTerms(body, variable, state);
    if (
      !precise ||
      falls(precise, isSteady && what !== 'integral' ? undefined : PRECISE.map(Number))
    ) {
      return undefined;
    }
  }
  return states.length > 0 ? 'inf' : undefined;
}

/** True unless the magnitudes, times the weights, surely stay above zero without falling. */
function falls(terms: readonly number[], weights: readonly number[] | undefined): boolean {
  let last = 0;
  for (let i = 0; i < terms.length; i++) {
    const size = Math.abs(terms[i] ?? NaN) * (weights?.[i] ?? 1);
    if (!(size > 0) || size < last * (1 - 1e-9)) return true;
    last = size;
  }
  return weights !== undefined && !hasOneSign(terms);
}

function hasOneSign(terms: readonly number[]): boolean {
  return terms.every((t) => t > 0) || terms.every((t) => t < 0);
}

function preciseTerms(body: Expression, variable: SymbolNode, state: State): number[] | undefined {
  const terms: number[] = [];
  for (const x of PRECISE) {
    const values = new Map<string, number | ReturnType<typeof big>>(state);
    values.set(variable.name, big(x));
    try {
      const value = evaluatePrecisely(body, values);
      if (!value) return undefined;
      terms.push(value.toNumber());
    } catch {
      return undefined;
    }
  }
  return terms;
}

/** ∫ from 0 of c x^r with r ≤ −1. */
function divergesAtZero({ variable, from, to, body }: OpenBinder): boolean {
  if (from.kind !== 'number' || !Q.isZero(from.value) || to === from) return false;
  const factors = body.kind === 'product' ? body.factors : [body];
  const dependent = factors.filter((factor) => symbolsOf(factor).has(variable));
  const [only] = dependent;
  return (
    dependent.length === 1 &&
    only?.kind === 'power' &&
    only.base === variable &&
    only.exponent.kind === 'number' &&
    Q.compare(only.exponent.value, Q.MINUS_ONE) <= 0
  );
}

function hasBinder(e: Expression, seen = new Set<Expression>()): boolean {
  if (seen.has(e)) return false;
  seen.add(e);
  if (e.kind === 'summation' || e.kind === 'productOver' || e.kind === 'integral') return true;
  return childrenOf(e).some((child) => hasBinder(child, seen));
}
