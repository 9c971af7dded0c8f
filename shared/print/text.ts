/**
 * Expressions in the notation of the language: what is printed here is read back by the parser as
 * the same expression. After a division nothing follows without parentheses. The one exception is
 * the polygamma function, which the core writes but the language does not know.
 */
import type { Expression, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { arrange, arrangeRelation } from './arrange.ts';
import { isShort, type Arranged } from './arranged.ts';
import type { NameStyle } from './nameStyle.ts';
import { asDecimal } from './numerals.ts';

/** `N k T/(V - N b) - a N^2/V^2` */
export function toText(e: Expression, style: NameStyle): string {
  return textOf(arrange(e, style));
}

/** `V > N b` */
export function relationToText(relation: Relation, style: NameStyle): string {
  const { left, sign, right } = arrangeRelation(relation, style);
  return `${textOf(left)} ${sign} ${textOf(right)}`;
}

const WORDS = { summation: 'sum', productOver: 'product', integral: 'integral' } as const;

function textOf(a: Arranged): string {
  switch (a.kind) {
    case 'number':
      return numberText(a.value);
    case 'name':
      return a.name;
    case 'infinity':
      return 'inf';
    case 'negative':
      return `-${termText(a.inside)}`;
    case 'sum':
      return a.terms
        .map(({ minus, term }, i) => {
          const sign = i === 0 ? (minus ? '-' : '') : minus ? ' - ' : ' + ';
          return sign + termText(term);
        })
        .join('');
    case 'product':
      return a.factors.map(factorText).join(' ');
    case 'fraction':
      return `${aboveText(a.above)}/${operandText(a.below)}`;
    case 'power':
      return `${isAtom(a.base) ? textOf(a.base) : parenthesized(a.base)}^${exponentText(a.exponent)}`;
    case 'root':
      return `sqrt(${textOf(a.inside)})`;
    case 'call':
      return callText(a);
    case 'summation':
    case 'productOver':
    case 'integral':
      return `${WORDS[a.kind]} ${a.variable} from ${textOf(a.from)} to ${textOf(a.to)} { ${textOf(a.body)} }`;
    case 'cases': {
      const branches = a.branches.map(
        ({ condition: { left, sign, right }, value }) =>
          `${textOf(left)} ${sign} ${textOf(right)}: ${textOf(value)}`,
      );
      return `cases { ${[...branches, `otherwise: ${textOf(a.otherwise)}`].join('; ')} }`;
    }
    case 'element':
      return `${a.list}(${textOf(a.index)})`;
  }
}

function numberText(value: Q.Rational): string {
  const decimal = asDecimal(value);
  if (!decimal) return Q.toText(value);
  return decimal.exponent === 0 ? decimal.mantissa : `${decimal.mantissa}e${decimal.exponent}`;
}

function callText(a: Extract<Arranged, { kind: 'call' }>): string {
  const [x, y, ...held] = a.arguments;
  if (a.name === 'factorial' && x) return `${isAtom(x) ? textOf(x) : parenthesized(x)}!`;
  if (a.name === 'partial' && x && y && held.length > 0) {
    return `partial(${textOf(x)}, ${textOf(y)}; ${held.map(textOf).join(', ')})`;
  }
  return `${a.name}(${a.arguments.map(textOf).join(', ')})`;
}

function parenthesized(a: Arranged): string {
  return `(${textOf(a)})`;
}

function isFactorial(a: Arranged): boolean {
  return a.kind === 'call' && a.name === 'factorial';
}

/** What is one word to the parser: it may be raised to a power or stand below a bar as it is. */
function isAtom(a: Arranged): boolean {
  if (a.kind === 'number') return Q.isInteger(a.value) || asDecimal(a.value) !== undefined;
  return isShort(a) || a.kind === 'root' || (a.kind === 'call' && !isFactorial(a));
}

function termText(a: Arranged): string {
  return a.kind === 'sum' || a.kind === 'negative' ? parenthesized(a) : textOf(a);
}

function operandText(a: Arranged): string {
  return isAtom(a) || isFactorial(a) || a.kind === 'power' ? textOf(a) : parenthesized(a);
}

function factorText(a: Arranged, index: number): string {
  // A quotient of plain numbers may be followed by a product, but only in front.
  if (a.kind === 'number') return index === 0 ? textOf(a) : parenthesized(a);
  const text = operandText(a);
  return index > 0 && /^\d/.test(text) ? `* ${text}` : text;
}

function aboveText(a: Arranged): string {
  return a.kind === 'product' ? textOf(a) : operandText(a);
}

function exponentText(a: Arranged): string {
  return a.kind === 'name' || (a.kind === 'number' && isAtom(a)) ? textOf(a) : parenthesized(a);
}
