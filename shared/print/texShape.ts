/** How large typeset mathematics comes out: what decides between (, [ and {, between eˣ and exp(x). */
import * as Q from '../algebra/rational.ts';
import { isShort, type Arranged } from './arranged.ts';

type Call = Extract<Arranged, { kind: 'call' }>;

/** An exponent of more characters than this is set on the line, as exp(…). */
const LONGEST_EXPONENT = 15;

/** Functions whose short argument needs no parentheses: ln V, sinh x. */
const BARE: ReadonlySet<string> = new Set([
  'ln',
  'log10',
  'sinh',
  'cosh',
  'tanh',
  'coth',
  'sin',
  'cos',
  'tan',
]);

/** True where the argument of a function stands without delimiters: ln V, ln of a fraction. */
export function isBareArgument(name: string, x: Arranged): boolean {
  return BARE.has(name) && (isShort(x) || x.kind === 'fraction');
}

/** True where exp(x) is set as a power of e. */
export function isRaised({ name, arguments: args }: Call): boolean {
  const [x] = args;
  return name === 'exp' && x !== undefined && fitsOnLine(x) && width(x) <= LONGEST_EXPONENT;
}

/** True where the only fractions are such as a slash can write: a/b, −(a + b)/(c d). */
export function fitsOnLine(a: Arranged): boolean {
  switch (a.kind) {
    case 'negative':
      return fitsOnLine(a.inside);
    case 'sum':
      return a.terms.every(({ term }) => fitsOnLine(term));
    case 'fraction':
      return levels(a.above) === 0 && levels(a.below) === 0;
    case 'number':
      return true;
    default:
      return levels(a) === 0;
  }
}

function partsOf(a: Arranged): readonly Arranged[] {
  switch (a.kind) {
    case 'number':
    case 'name':
    case 'infinity':
      return [];
    case 'negative':
    case 'root':
      return [a.inside];
    case 'sum':
      return a.terms.map(({ term }) => term);
    case 'product':
      return a.factors;
    case 'fraction':
      return [a.above, a.below];
    case 'power':
      return [a.base];
    case 'call':
      return isRaised(a) ? [] : a.arguments;
    case 'summation':
    case 'productOver':
    case 'integral':
      return [a.body];
    case 'cases':
      return [...a.branches.map(({ value }) => value), a.otherwise];
    case 'element':
      return [];
  }
}

function largest(parts: readonly Arranged[], of: (a: Arranged) => number): number {
  let result = 0;
  for (const part of parts) result = Math.max(result, of(part));
  return result;
}

/** How many fraction bars and big signs stand above each other: 0 for a flat line. */
export function levels(a: Arranged): number {
  const inner = largest(partsOf(a), levels);
  switch (a.kind) {
    case 'fraction':
    case 'summation':
    case 'productOver':
    case 'integral':
    case 'cases':
      return inner + 1;
    case 'number':
      return Q.isInteger(a.value) ? 0 : 1;
    case 'call':
      return a.name === 'binomial' || a.name === 'partial' ? inner + 1 : inner;
    default:
      return inner;
  }
}

/** How many pairs of delimiters stand inside each other; the bars of ln (a/b) count as one pair. */
export function nesting(a: Arranged): number {
  const inner = largest(partsOf(a), nesting);
  switch (a.kind) {
    case 'product':
      return Math.max(
        inner,
        largest(a.factors, (f) => (f.kind === 'sum' || f.kind === 'negative' ? nesting(f) + 1 : 0)),
      );
    case 'power':
      return isShort(a.base) || a.base.kind === 'call' ? inner : inner + 1;
    case 'call': {
      const [x] = a.arguments;
      if (isRaised(a) || !x) return inner;
      if (isShort(x) && (a.name === 'factorial' || isBareArgument(a.name, x))) return inner;
      return isBareArgument(a.name, x) ? Math.max(inner, 1) : inner + 1;
    }
    default:
      return inner;
  }
}

/** Characters side by side, small ones counted half. */
function width(a: Arranged): number {
  switch (a.kind) {
    case 'number':
      return Q.toText(a.value).length;
    case 'name': {
      const [, ...below] = a.name.split('_');
      return 1 + below.join('').length / 2;
    }
    case 'infinity':
      return 1;
    case 'negative':
      return 1 + width(a.inside);
    case 'sum':
      return a.terms.reduce((sum, { term }) => sum + 2 + width(term), 0);
    case 'product':
      return a.factors.reduce(
        (sum, factor) => sum + width(factor) + (factor.kind === 'sum' ? 2 : 0),
        0,
      );
    case 'fraction':
      return width(a.above) + 1 + width(a.below) + (isShort(a.below) ? 0 : 2);
    case 'power':
      return width(a.base) + width(a.exponent) / 2 + (isShort(a.base) ? 0 : 2);
    case 'root':
      return 1 + width(a.inside);
    case 'call':
      return a.arguments.reduce(
        (sum, argument) => sum + width(argument),
        a.name === 'exp' ? 1 : a.name.length + 1,
      );
    case 'element':
      return 1 + width(a.index) / 2;
    default:
      return Infinity;
  }
}
