/** ln of a partition function taken apart, with Stirling's formula for its factorials. */
import {
  addendsOf,
  call,
  integer,
  ln,
  multiply,
  negate,
  number,
  product,
  subtract,
  sum,
} from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import { expandLn } from '../algebra/logarithm.ts';
import { symbolsOf } from '../algebra/traverse.ts';

export type Factorials = 'Stirling' | 'exact';

/** ln x! by Stirling's formula, x ln x − x, or exactly. */
function lnFactorial(x: Expression, factorials: Factorials): Expression {
  if (x.kind === 'number') return ln(call('factorial', [x]));
  // The index of a sum is no large number.
  const isIndexed = [...symbolsOf(x)].some((s) => s.integer);
  if (factorials === 'exact' || isIndexed) return call('lnGamma', [sum([x, integer(1)])]);
  return subtract(multiply(x, ln(x)), x);
}

/** ln n! or ln of a binomial coefficient written out; undefined for any other expression. */
function lnOfCount(e: Expression, factorials: Factorials): Expression | undefined {
  if (e.kind !== 'call' || e.name !== 'ln') return undefined;
  const [inner] = e.arguments;
  if (inner?.kind !== 'call') return undefined;
  const [n, k] = inner.arguments;
  if (inner.name === 'factorial' && n) return lnFactorial(n, factorials);
  if (inner.name === 'binomial' && n && k) {
    return sum([
      lnFactorial(n, factorials),
      negate(lnFactorial(k, factorials)),
      negate(lnFactorial(subtract(n, k), factorials)),
    ]);
  }
  return undefined;
}

function replaceInAddend(addend: Expression, factorials: Factorials): Expression {
  const alone = lnOfCount(addend, factorials);
  if (alone) return alone;
  if (addend.kind !== 'product') return addend;
  for (const factor of addend.factors) {
    const replaced = lnOfCount(factor, factorials);
    if (!replaced) continue;
    const others = product([
      number(addend.coefficient),
      ...addend.factors.filter((other) => other !== factor),
    ]);
    return sum(addendsOf(replaced).map((part) => multiply(others, part)));
  }
  return addend;
}

/** ln x with products and powers taken apart and ln N! replaced, addend by addend. */
export function logarithmOf(x: Expression, factorials: Factorials): Expression {
  return sum(addendsOf(expandLn(x)).map((addend) => replaceInAddend(addend, factorials)));
}

/** True where ln of e has factorials to be replaced. */
export function hasFactorial(e: Expression): boolean {
  if (e.kind === 'call') return e.name === 'factorial' || e.name === 'binomial';
  if (e.kind === 'product') return e.factors.some(hasFactorial);
  return e.kind === 'power' && hasFactorial(e.base);
}

/**
 * A logarithm that the author stated as a sum, its addends with exactly one logarithm taken apart,
 * so that N ln(V/Λ³) and ln((V/Λ³)^N) come out the same.
 */
export function takeApart(lnFunction: Expression, factorials: Factorials): Expression {
  return sum(
    addendsOf(lnFunction).map((addend) => {
      const factors = addend.kind === 'product' ? addend.factors : [addend];
      const logarithms = factors.filter((factor) => factor.kind === 'call' && factor.name === 'ln');
      const [logarithm] = logarithms;
      if (logarithms.length !== 1 || logarithm?.kind !== 'call') return addend;
      const [x] = logarithm.arguments;
      if (!x) return addend;
      const others = product([
        ...(addend.kind === 'product' ? [number(addend.coefficient)] : []),
        ...factors.filter((factor) => factor !== logarithm),
      ]);
      const apart = logarithmOf(x, factorials);
      return sum(addendsOf(apart).map((part) => multiply(others, part)));
    }),
  );
}
