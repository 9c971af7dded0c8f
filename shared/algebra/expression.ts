/**
 * Expressions: immutable, interned trees with exact coefficients.
 *
 * Interned means that structurally equal expressions are the same object, so that equality is `===`
 * and whatever is computed of an expression can be remembered with it. N k T/V is
 *
 *     product 1 · [ k, N, T, power(V, −1) ]
 *
 * and 3/2 N k T − a N²/V is
 *
 *     sum 0 + [ product 3/2 · [k, N, T],  product −1 · [a, power(N, 2), power(V, −1)] ]
 *
 * Quotients, differences and square roots have no node of their own: they are products, sums and
 * powers, and printing finds them again. The order of terms and factors is that of a hash of their
 * structure: total, fast, the same on every machine, and of no meaning to a reader; printing puts
 * them into a human order.
 *
 * This file holds the nodes and their interning. `construct.ts` builds them in canonical form; no
 * other file makes nodes from the raw functions here.
 */
import type { Rational } from './rational.ts';

/** Functions of the language. The number of arguments stands in `functions.ts`. */
export type FunctionName =
  | 'exp'
  | 'ln'
  | 'log10'
  | 'sinh'
  | 'cosh'
  | 'tanh'
  | 'coth'
  | 'sin'
  | 'cos'
  | 'tan'
  | 'arcsinh'
  | 'arctanh'
  | 'erf'
  | 'Gamma'
  | 'lnGamma'
  | 'digamma'
  | 'polygamma'
  | 'factorial'
  | 'binomial'
  | 'polylog'
  | 'besselI'
  | 'debye'
  | 'min'
  | 'max'
  | 'abs'
  | 'heaviside'
  | 'partial';

export type RelationSign = '<' | '<=' | '=' | '>=' | '>';

/** left (sign) right; a condition of a piecewise expression or a part of a domain. */
export interface Relation {
  readonly left: Expression;
  readonly sign: RelationSign;
  readonly right: Expression;
}

interface Node {
  /** Serial number of the interning; for keys of caches only, since it depends on history. */
  readonly id: number;
  /** 53-bit hash of the structure: the same on every machine. */
  readonly hash: number;
}

export interface NumberNode extends Node {
  readonly kind: 'number';
  readonly value: Rational;
}

/** +∞; −∞ is the product of −1 and this. It may stand at the ends of sums, integrals and limits only. */
export interface InfinityNode extends Node {
  readonly kind: 'infinity';
}

export interface SymbolNode extends Node {
  readonly kind: 'symbol';
  readonly name: string;
  /** Known to be above zero over the whole domain (T, V, N, a parameter between 0 and …). */
  readonly positive: boolean;
  /** Takes whole numbers only (the index of a sum). */
  readonly integer: boolean;
}

/**
 * A name that the author gave to an expression (`let Lambda = …`). It carries its definition, so
 * that differentiation and evaluation need no table of names beside the expression.
 */
export interface AbbreviationNode extends Node {
  readonly kind: 'abbreviation';
  readonly name: string;
  readonly definition: Expression;
}

/** constant + Σ terms; at least two addends in all, none of the terms a number or a sum. */
export interface SumNode extends Node {
  readonly kind: 'sum';
  readonly constant: Rational;
  readonly terms: readonly Expression[];
}

/** coefficient · Π factors; coefficient ≠ 0, no factor a number or a product, no base twice. */
export interface ProductNode extends Node {
  readonly kind: 'product';
  readonly coefficient: Rational;
  readonly factors: readonly Expression[];
}

export interface PowerNode extends Node {
  readonly kind: 'power';
  readonly base: Expression;
  readonly exponent: Expression;
}

export interface CallNode extends Node {
  readonly kind: 'call';
  readonly name: FunctionName;
  readonly arguments: readonly Expression[];
}

/** Σ, Π and ∫ bind `variable` in `body`; `from` and `to` are outside its scope. */
export interface BindingNode extends Node {
  readonly kind: 'summation' | 'productOver' | 'integral';
  readonly variable: SymbolNode;
  readonly from: Expression;
  readonly to: Expression;
  readonly body: Expression;
}

export interface PiecewiseNode extends Node {
  readonly kind: 'piecewise';
  readonly branches: readonly { readonly condition: Relation; readonly value: Expression }[];
  readonly otherwise: Expression;
}

/** list(index), counted from 1; the numbers of the list are part of the node. */
export interface ElementNode extends Node {
  readonly kind: 'element';
  readonly list: string;
  readonly values: readonly Rational[];
  readonly index: Expression;
}

export type Expression =
  | NumberNode
  | InfinityNode
  | SymbolNode
  | AbbreviationNode
  | SumNode
  | ProductNode
  | PowerNode
  | CallNode
  | BindingNode
  | PiecewiseNode
  | ElementNode;

/** A node before it has got its number and hash. */
type Raw = Expression extends infer E ? (E extends Node ? Omit<E, 'id' | 'hash'> : never) : never;

const KIND_SEED: Record<Expression['kind'], number> = {
  number: 11,
  infinity: 23,
  symbol: 37,
  abbreviation: 41,
  sum: 53,
  product: 67,
  power: 79,
  call: 97,
  summation: 101,
  productOver: 113,
  integral: 127,
  piecewise: 139,
  element: 151,
};

/** Two independent 32-bit lanes make the 53-bit hash; `low` and `high` are its running state. */
let low = 0;
let high = 0;

function mix(word: number): void {
  low = Math.imul(low ^ word, 0x01000193);
  low ^= low >>> 15;
  high = Math.imul(high + word, 0x85ebca6b);
  high ^= high >>> 13;
}

function mixText(text: string): void {
  for (let i = 0; i < text.length; i++) mix(text.charCodeAt(i));
  mix(text.length);
}

function mixBigint(n: bigint): void {
  if (n >= -0x40000000n && n < 0x40000000n) mix(Number(n));
  else mixText(n.toString(36));
}

function mixNumber(r: Rational): void {
  mixBigint(r.numerator);
  mixBigint(r.denominator);
}

function mixNode(e: Expression): void {
  mix(e.hash | 0);
  mix((e.hash / 0x100000000) | 0);
}

function hashOf(raw: Raw): number {
  low = KIND_SEED[raw.kind];
  high = low;
  switch (raw.kind) {
    case 'number':
      mixNumber(raw.value);
      break;
    case 'infinity':
      break;
    case 'symbol':
      mixText(raw.name);
      mix((raw.positive ? 1 : 0) + (raw.integer ? 2 : 0));
      break;
    case 'abbreviation':
      mixText(raw.name);
      mixNode(raw.definition);
      break;
    case 'sum':
      mixNumber(raw.constant);
      for (const term of raw.terms) mixNode(term);
      break;
    case 'product':
      mixNumber(raw.coefficient);
      for (const factor of raw.factors) mixNode(factor);
      break;
    case 'power':
      mixNode(raw.base);
      mixNode(raw.exponent);
      break;
    case 'call':
      mixText(raw.name);
      for (const argument of raw.arguments) mixNode(argument);
      break;
    case 'summation':
    case 'productOver':
    case 'integral':
      mixNode(raw.variable);
      mixNode(raw.from);
      mixNode(raw.to);
      mixNode(raw.body);
      break;
    case 'piecewise':
      for (const { condition, value } of raw.branches) {
        mixNode(condition.left);
        mixText(condition.sign);
        mixNode(condition.right);
        mixNode(value);
      }
      mixNode(raw.otherwise);
      break;
    case 'element':
      mixText(raw.list);
      for (const value of raw.values) mixNumber(value);
      mixNode(raw.index);
      break;
  }
  return (high >>> 0) * 0x200000 + ((low >>> 0) & 0x1fffff);
}

function sameNumber(a: Rational, b: Rational): boolean {
  return a.numerator === b.numerator && a.denominator === b.denominator;
}

function sameList(a: readonly Expression[], b: readonly Expression[]): boolean {
  return a.length === b.length && a.every((e, i) => e === b[i]);
}

/** Equality of structure, one level deep: the children are interned already. */
function same(raw: Raw, e: Expression): boolean {
  switch (raw.kind) {
    case 'number':
      return e.kind === 'number' && sameNumber(raw.value, e.value);
    case 'infinity':
      return e.kind === 'infinity';
    case 'symbol':
      return (
        e.kind === 'symbol' &&
        raw.name === e.name &&
        raw.positive === e.positive &&
        raw.integer === e.integer
      );
    case 'abbreviation':
      return e.kind === 'abbreviation' && raw.name === e.name && raw.definition === e.definition;
    case 'sum':
      return (
        e.kind === 'sum' && sameNumber(raw.constant, e.constant) && sameList(raw.terms, e.terms)
      );
    case 'product':
      return (
        e.kind === 'product' &&
        sameNumber(raw.coefficient, e.coefficient) &&
        sameList(raw.factors, e.factors)
      );
    case 'power':
      return e.kind === 'power' && raw.base === e.base && raw.exponent === e.exponent;
    case 'call':
      return e.kind === 'call' && raw.name === e.name && sameList(raw.arguments, e.arguments);
    case 'summation':
    case 'productOver':
    case 'integral':
      return (
        e.kind === raw.kind &&
        raw.variable === e.variable &&
        raw.from === e.from &&
        raw.to === e.to &&
        raw.body === e.body
      );
    case 'piecewise':
      return (
        e.kind === 'piecewise' &&
        raw.otherwise === e.otherwise &&
        raw.branches.length === e.branches.length &&
        raw.branches.every((branch, i) => {
          const other = e.branches[i];
          return (
            other !== undefined &&
            branch.value === other.value &&
            branch.condition.left === other.condition.left &&
            branch.condition.sign === other.condition.sign &&
            branch.condition.right === other.condition.right
          );
        })
      );
    case 'element':
      return (
        e.kind === 'element' &&
        raw.list === e.list &&
        raw.index === e.index &&
        raw.values.length === e.values.length &&
        raw.values.every((value, i) => sameNumber(value, e.values[i] as Rational))
      );
  }
}

const table = new Map<number, Expression[]>();
let count = 0;

/** How many different expressions this process has made; long-lived workers restart on it. */
export function internedCount(): number {
  return count;
}

/** The one expression with this structure. The parts must be canonical: `construct.ts` sees to it. */
export function intern<R extends Raw>(raw: R): Extract<Expression, { kind: R['kind'] }> {
  type Result = Extract<Expression, { kind: R['kind'] }>;
  const hash = hashOf(raw);
  const bucket = table.get(hash);
  if (bucket) {
    for (const known of bucket) if (same(raw, known)) return known as Result;
  }
  const node = { ...raw, id: ++count, hash } as unknown as Result;
  if (bucket) bucket.push(node);
  else table.set(hash, [node]);
  return node;
}

/**
 * The canonical order: by hash, and by the written structure where two hashes collide.
 * Negative, zero or positive; zero only for the same expression.
 */
export function compareExpressions(a: Expression, b: Expression): number {
  if (a === b) return 0;
  if (a.hash !== b.hash) return a.hash < b.hash ? -1 : 1;
  const left = describe(a);
  const right = describe(b);
  return left < right ? -1 : left > right ? 1 : 0;
}

/** A text of the whole structure, for the rare collision of two hashes. */
function describe(e: Expression): string {
  return JSON.stringify(e, (key, value: unknown) =>
    key === 'id' || key === 'hash' ? undefined : typeof value === 'bigint' ? String(value) : value,
  );
}

/** The expressions directly inside, in a fixed order; a bound variable is not among them. */
export function childrenOf(e: Expression): readonly Expression[] {
  switch (e.kind) {
    case 'number':
    case 'infinity':
    case 'symbol':
      return [];
    case 'abbreviation':
      return [e.definition];
    case 'sum':
      return e.terms;
    case 'product':
      return e.factors;
    case 'power':
      return [e.base, e.exponent];
    case 'call':
      return e.arguments;
    case 'summation':
    case 'productOver':
    case 'integral':
      return [e.from, e.to, e.body];
    case 'piecewise':
      return [
        ...e.branches.flatMap(({ condition, value }) => [condition.left, condition.right, value]),
        e.otherwise,
      ];
    case 'element':
      return [e.index];
  }
}
