/** Walks over expressions: which symbols, substitution, abbreviations written out, size. */
import {
  call,
  element,
  exp,
  integral,
  number,
  piecewise,
  power,
  product,
  productOver,
  sum,
  summation,
  symbol,
} from './construct.ts';
import { childrenOf, type Expression, type SymbolNode } from './expression.ts';

const NONE: ReadonlySet<SymbolNode> = new Set();
const symbolsKnown = new WeakMap<Expression, ReadonlySet<SymbolNode>>();

/** The free symbols, those inside the definitions of abbreviations included. */
export function symbolsOf(e: Expression): ReadonlySet<SymbolNode> {
  if (e.kind === 'number' || e.kind === 'infinity') return NONE;
  const known = symbolsKnown.get(e);
  if (known) return known;
  const found = new Set<SymbolNode>();
  if (e.kind === 'symbol') {
    found.add(e);
  } else if (e.kind === 'summation' || e.kind === 'productOver' || e.kind === 'integral') {
    for (const s of symbolsOf(e.body)) if (s !== e.variable) found.add(s);
    for (const s of symbolsOf(e.from)) found.add(s);
    for (const s of symbolsOf(e.to)) found.add(s);
  } else {
    for (const child of childrenOf(e)) for (const s of symbolsOf(child)) found.add(s);
  }
  symbolsKnown.set(e, found);
  return found;
}

/** True where the symbol is free in the expression or in an abbreviation's definition. */
export function dependsOn(e: Expression, s: SymbolNode): boolean {
  return symbolsOf(e).has(s);
}

/** The same expression with every direct part replaced by `change(part)`, canonical again. */
export function rebuild(e: Expression, change: (part: Expression) => Expression): Expression {
  switch (e.kind) {
    case 'number':
    case 'infinity':
    case 'symbol':
      return e;
    case 'abbreviation':
      // A changed definition no longer is what the author named: it is written out.
      return change(e.definition) === e.definition ? e : change(e.definition);
    case 'sum':
      return sum([number(e.constant), ...e.terms.map(change)]);
    case 'product':
      return product([number(e.coefficient), ...e.factors.map(change)]);
    case 'power':
      return power(change(e.base), change(e.exponent));
    case 'call':
      return e.name === 'exp' && e.arguments[0]
        ? exp(change(e.arguments[0]))
        : call(e.name, e.arguments.map(change));
    case 'summation':
      return summation(e.variable, change(e.from), change(e.to), change(e.body));
    case 'productOver':
      return productOver(e.variable, change(e.from), change(e.to), change(e.body));
    case 'integral':
      return integral(e.variable, change(e.from), change(e.to), change(e.body));
    case 'piecewise':
      return piecewise(
        e.branches.map(({ condition, value }) => ({
          condition: {
            left: change(condition.left),
            sign: condition.sign,
            right: change(condition.right),
          },
          value: change(value),
        })),
        change(e.otherwise),
      );
    case 'element':
      return element(e.list, e.values, change(e.index));
  }
}

/**
 * Replaces whole nodes (symbols, abbreviations or anything else) by others, all at once: what is
 * put in is not searched again. A bound variable is never replaced, and is renamed where something
 * put in contains a symbol of its name.
 */
export function substitute(
  e: Expression,
  replacements: ReadonlyMap<Expression, Expression>,
): Expression {
  if (replacements.size === 0) return e;
  const done = new Map<Expression, Expression>();
  const visit = (part: Expression): Expression => {
    const replacement = replacements.get(part);
    if (replacement) return replacement;
    const known = done.get(part);
    if (known) return known;
    const result =
      part.kind === 'summation' || part.kind === 'productOver' || part.kind === 'integral'
        ? underBinder(part)
        : rebuild(part, visit);
    done.set(part, result);
    return result;
  };
  const underBinder = (
    part: Extract<Expression, { kind: 'summation' | 'productOver' | 'integral' }>,
  ): Expression => {
    let { variable, body } = part;
    const inner = new Map(replacements);
    inner.delete(variable);
    const captured = [...inner].some(
      ([old, replacement]) =>
        replacement !== old &&
        (old.kind !== 'symbol' || dependsOn(body, old)) &&
        dependsOn(replacement, variable),
    );
    if (captured) {
      const fresh = freshVariable(variable, [body, ...inner.values()]);
      body = substitute(body, new Map<Expression, Expression>([[variable, fresh]]));
      variable = fresh;
    }
    const build =
      part.kind === 'summation' ? summation : part.kind === 'productOver' ? productOver : integral;
    return build(variable, visit(part.from), visit(part.to), substitute(body, inner));
  };
  return visit(e);
}

function freshVariable(variable: SymbolNode, avoid: readonly Expression[]): SymbolNode {
  for (let n = 1; ; n++) {
    const candidate = symbol(`${variable.name}_${n}`, variable);
    if (!avoid.some((e) => dependsOn(e, candidate))) return candidate;
  }
}

const expandedKnown = new WeakMap<Expression, Expression>();

/** The expression with every abbreviation written out. */
export function expandAbbreviations(e: Expression): Expression {
  if (e.kind === 'symbol' || e.kind === 'number' || e.kind === 'infinity') return e;
  const known = expandedKnown.get(e);
  if (known) return known;
  const result =
    e.kind === 'abbreviation' ? expandAbbreviations(e.definition) : rebuild(e, expandAbbreviations);
  expandedKnown.set(e, result);
  return result;
}

/** The abbreviations met in the expression, outermost first; not those inside definitions. */
export function abbreviationsOf(e: Expression): Expression[] {
  const found = new Set<Expression>();
  const seen = new Set<Expression>();
  const visit = (part: Expression): void => {
    if (seen.has(part)) return;
    seen.add(part);
    if (part.kind === 'abbreviation') found.add(part);
    else childrenOf(part).forEach(visit);
  };
  visit(e);
  return [...found];
}

/** How many different nodes the expression has: its size in memory, not on paper. */
export function nodeCount(e: Expression): number {
  const seen = new Set<Expression>();
  const visit = (part: Expression): void => {
    if (seen.has(part)) return;
    seen.add(part);
    childrenOf(part).forEach(visit);
  };
  visit(e);
  return seen.size;
}
