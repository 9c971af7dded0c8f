/**
 * Expressions in the notation of the language: what is printed here is read back by the parser as
 * the same expression. After a division nothing follows without parentheses.
 */
import type { Expression, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { arrange, arrangeRelation, type Arranged } from './arrange.ts';
import type { NameStyle } from './nameStyle.ts';

/** `N k T/(V - N b) - a N^2/V^2` */
export function toText(e: Expression, style: NameStyle): string {
  return textOf(arrange(e, style));
}

/** `V > N b` */
export function relationToText(relation: Relation, style: NameStyle): string {
  const { left, sign, right } = arrangeRelation(relation, style);
  return `${textOf(left)} ${sign} ${textOf(right)}`;
}

function textOf(a: Arranged): string {
  switch (a.kind) {
    case 'number':
      return Q.toText(a.value);
    case 'name':
      return a.name;
    case 'infinity':
      return 'inf';
    case 'negative':
      return `-${a.inside.kind === 'sum' ? parenthesized(a.inside) : textOf(a.inside)}`;
    case 'sum':
      return a.terms
        .map(({ minus, term }, i) => {
          const sign = i === 0 ? (minus ? '-' : '') : minus ? ' - ' : ' + ';
          return (
            sign +
            (term.kind === 'sum' || term.kind === 'negative' ? parenthesized(term) : textOf(term))
          );
        })
        .join('');
    case 'product':
      return a.factors.map((factor, i) => factorText(factor, i)).join(' ');
    case 'fraction':
      return `${aboveText(a.above)}/${belowText(a.below)}`;
    case 'power':
      return `${isAtom(a.base) ? textOf(a.base) : parenthesized(a.base)}^${exponentText(a.exponent)}`;
    case 'root':
      return `sqrt(${textOf(a.inside)})`;
    case 'call':
      return `${a.name}(${a.arguments.map(textOf).join(a.name === 'partial' ? ', ' : ', ')})`;
    case 'summation':
    case 'productOver':
    case 'integral': {
      const word =
        a.kind === 'summation' ? 'sum' : a.kind === 'productOver' ? 'product' : 'integral';
      return `${word} ${a.variable} from ${textOf(a.from)} to ${textOf(a.to)} { ${textOf(a.body)} }`;
    }
    case 'cases': {
      const branches = a.branches.map(
        ({ condition, value }) =>
          `${textOf(condition.left)} ${condition.sign} ${textOf(condition.right)}: ${textOf(value)}`,
      );
      return `cases { ${[...branches, `otherwise: ${textOf(a.otherwise)}`].join('; ')} }`;
    }
    case 'element':
      return `${a.list}(${textOf(a.index)})`;
  }
}

function parenthesized(a: Arranged): string {
  return `(${textOf(a)})`;
}

/** What may be raised to a power or stand below a bar without parentheses. */
function isAtom(a: Arranged): boolean {
  return (
    a.kind === 'name' ||
    a.kind === 'call' ||
    a.kind === 'root' ||
    a.kind === 'element' ||
    a.kind === 'infinity' ||
    (a.kind === 'number' && Q.isInteger(a.value))
  );
}

function factorText(a: Arranged, index: number): string {
  // A quotient of plain numbers may be followed by a product, but only in front.
  if (a.kind === 'number') return index === 0 ? Q.toText(a.value) : parenthesized(a);
  return isAtom(a) || a.kind === 'power' ? textOf(a) : parenthesized(a);
}

function aboveText(a: Arranged): string {
  if (a.kind === 'product') return textOf(a);
  return isAtom(a) || a.kind === 'power' ? textOf(a) : parenthesized(a);
}

function belowText(a: Arranged): string {
  return isAtom(a) || a.kind === 'power' ? textOf(a) : parenthesized(a);
}

function exponentText(a: Arranged): string {
  return a.kind === 'name' || (a.kind === 'number' && Q.isInteger(a.value))
    ? textOf(a)
    : parenthesized(a);
}
