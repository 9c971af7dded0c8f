/** Equality decided by the normal form. */
import { BudgetExceeded, withBudget } from './budget.ts';
import { subtract } from './construct.ts';
import { childrenOf, type Expression } from './expression.ts';
import * as Q from './rational.ts';
import { expandAbbreviations } from './traverse.ts';
import { Workspace } from './workspace.ts';

export type Verdict = 'zero' | 'nonzero' | 'undecided';

/** Enough for every model met so far by two orders of magnitude. */
const STEPS = 2_000_000;

/**
 * Whether an expression is identically zero. `zero` is a proof. `nonzero` is one too: it is said
 * only of rational functions of symbols, where the normal form is unique. Of anything else that
 * does not vanish the answer is `undecided`, and so it is where the work would not end.
 */
export function isZero(e: Expression): Verdict {
  const expanded = expandAbbreviations(e);
  try {
    return withBudget(STEPS, () => {
      const workspace = new Workspace({ mode: 'equality' });
      workspace.prepare(expanded);
      const { coefficient } = workspace.factored(expanded);
      if (Q.isZero(coefficient)) return 'zero';
      return isRational(expanded) ? 'nonzero' : 'undecided';
    });
  } catch (fault) {
    if (fault instanceof BudgetExceeded || fault instanceof RangeError) return 'undecided';
    throw fault;
  }
}

/** Whether two expressions are equal wherever both have a value; see `isZero`. */
export function equal(a: Expression, b: Expression): 'equal' | 'different' | 'undecided' {
  if (a === b) return 'equal';
  const verdict = isZero(subtract(a, b));
  return verdict === 'zero' ? 'equal' : verdict === 'nonzero' ? 'different' : 'undecided';
}

/** Built from symbols and numbers by + − · / and whole powers alone. */
function isRational(e: Expression): boolean {
  switch (e.kind) {
    case 'number':
    case 'symbol':
      return true;
    case 'sum':
    case 'product':
      return childrenOf(e).every(isRational);
    case 'power':
      return e.exponent.kind === 'number' && Q.isInteger(e.exponent.value) && isRational(e.base);
    default:
      return false;
  }
}
