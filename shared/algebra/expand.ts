/** Products of sums, multiplied out. */
import { spend } from './budget.ts';
import { addendsOf, multiply, number, product, splitPower, sum } from './construct.ts';
import type { Expression } from './expression.ts';
import * as Q from './rational.ts';

/** Products of sums multiplied out, as far as whole positive powers go. */
export function expand(e: Expression): Expression {
  if (e.kind === 'sum') return sum(addendsOf(e).map(expand));
  if (e.kind === 'power' && e.exponent.kind === 'number' && e.base.kind === 'sum') {
    const n = e.exponent.value;
    if (Q.isInteger(n) && n.numerator > 1n && n.numerator <= 8n) {
      return expand(product(Array<Expression>(Number(n.numerator)).fill(e.base)));
    }
  }
  if (e.kind !== 'product') return e;
  const sums: Expression[] = [];
  const others: Expression[] = [number(e.coefficient)];
  for (const factor of e.factors) {
    const { base, exponent } = splitPower(factor);
    const n =
      exponent.kind === 'number' && Q.isInteger(exponent.value) ? exponent.value.numerator : 0n;
    if (base.kind === 'sum' && n > 0n && n <= 8n) {
      for (let i = 0n; i < n; i++) sums.push(base);
    } else {
      others.push(factor);
    }
  }
  let terms: Expression[] = [product(others)];
  for (const factor of sums) {
    spend(terms.length);
    terms = terms.flatMap((term) => addendsOf(factor).map((addend) => multiply(term, addend)));
    terms = [...addendsOf(sum(terms))];
  }
  return sum(terms);
}
