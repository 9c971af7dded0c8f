/** How long exact numbers are, so that none fills the memory. */
import type { Expression } from '../algebra/expression.ts';
import type { Rational } from '../algebra/rational.ts';

/** Binary digits of numerator and denominator together, to within eight. */
export function bitsOf({ numerator, denominator }: Rational): number {
  if (denominator === 1n && numerator < 0x100000000n && numerator > -0x100000000n) return 32;
  return (numerator.toString(16).length + denominator.toString(16).length) * 4;
}

/** The same for the numbers at the top of an expression. */
export function bitsOfNumber(e: Expression): number {
  if (e.kind === 'number') return bitsOf(e.value);
  if (e.kind === 'product') return bitsOf(e.coefficient);
  if (e.kind === 'sum') {
    let bits = bitsOf(e.constant);
    for (const term of e.terms) if (term.kind === 'product') bits += bitsOf(term.coefficient);
    return bits;
  }
  return 0;
}
