/** The terms of a sum in the order in which they are read. */
import type { Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { Arranged, ArrangedTerm } from './arranged.ts';
import type { NameStyle } from './nameStyle.ts';
import { compareKeys, keyOfTerm, powersOfOneName } from './readingOrder.ts';

type SumNode = Extract<Expression, { kind: 'sum' }>;

interface Term extends ArrangedTerm {
  readonly expression: Expression;
}

/**
 * Positive terms before negative ones, a positive number first and a negative one last; a
 * polynomial in one name by ascending powers (1 − x + x², but x − 1), in an index by descending
 * ones (2 J + 1). `inner` arranges the terms.
 */
export function arrangeSum(
  e: SumNode,
  style: NameStyle,
  inner: (e: Expression) => Arranged,
): Arranged {
  const terms = e.terms.map((expression): Term => {
    const arranged = inner(expression);
    return arranged.kind === 'negative'
      ? { expression, minus: true, term: arranged.inside }
      : { expression, minus: false, term: arranged };
  });
  return { kind: 'sum', terms: polynomial(e, terms) ?? bySignAndName(e, terms, style) };
}

function numberTerm({ constant }: SumNode): ArrangedTerm | undefined {
  if (Q.isZero(constant)) return undefined;
  const minus = Q.sign(constant) < 0;
  return { minus, term: { kind: 'number', value: minus ? Q.negate(constant) : constant } };
}

function polynomial(e: SumNode, terms: readonly Term[]): readonly ArrangedTerm[] | undefined {
  const found = powersOfOneName(e);
  if (!found) return undefined;
  const { powers, isIndex } = found;
  const ascending: { power: number; minus: boolean; term: Arranged }[] = terms.map((term) => ({
    minus: term.minus,
    term: term.term,
    power: powers.get(term.expression) ?? 0,
  }));
  const number = numberTerm(e);
  if (number) ascending.push({ ...number, power: 0 });
  ascending.sort((a, b) => a.power - b.power);
  const [first] = ascending;
  const last = ascending[ascending.length - 1];
  // A sum starts with a plus where one of its ends has one.
  const isDescending = isIndex ? !last?.minus : first?.minus === true && !last?.minus;
  if (isDescending) ascending.reverse();
  return ascending.map(({ minus, term }) => ({ minus, term }));
}

function bySignAndName(
  e: SumNode,
  terms: readonly Term[],
  style: NameStyle,
): readonly ArrangedTerm[] {
  const keyed = terms.map((term) => ({ ...term, key: keyOfTerm(term.expression, style) }));
  keyed.sort(
    (a, b) =>
      Number(a.minus) - Number(b.minus) ||
      compareKeys(a.key, b.key) ||
      a.expression.hash - b.expression.hash,
  );
  const ordered: ArrangedTerm[] = keyed.map(({ minus, term }) => ({ minus, term }));
  const number = numberTerm(e);
  if (number?.minus) ordered.push(number);
  else if (number) ordered.unshift(number);
  return ordered;
}
