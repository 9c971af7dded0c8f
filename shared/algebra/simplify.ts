/**
 * The shortest correct form: candidates that are equal by construction, and the one that reads
 * shortest among them.
 */
import { addendsOf, multiply, number, product, splitPower, sum, zero } from './construct.ts';
import { readingCost } from './cost.ts';
import type { Expression, SymbolNode } from './expression.ts';
import type { Factored } from './factored.ts';
import { gatherLogarithms } from './logarithm.ts';
import * as Q from './rational.ts';
import { Workspace } from './workspace.ts';

/** Pairs of terms are tried against each other up to this many terms. */
const MOST_PAIRED_TERMS = 14;
/** A numerator of more terms than this is never shorter than the two terms that it comes from. */
const MOST_TERMS_OF_PAIR = 10;

export interface SimplifyOptions {
  /** Expressions met before (ln Q, say), whose sums later results are factored by. */
  readonly known?: readonly Expression[];
  /** Symbols in which differences are to be positive when they are large; see the workspace. */
  readonly dominant?: readonly SymbolNode[];
}

/** Brings expressions of one model to their shortest form; what it has met helps with the next. */
export class Simplifier {
  private readonly workspace: Workspace;
  private readonly memory = new Map<Expression, Expression>();

  constructor(options: SimplifyOptions = {}) {
    this.workspace = new Workspace({ mode: 'display', dominant: options.dominant ?? [] });
    for (const e of options.known ?? []) this.workspace.prepare(e);
    for (const e of options.known ?? []) this.workspace.factored(e);
  }

  /**
   * An expression equal to e, as short as the candidates allow. Throws RangeError where e divides
   * by what is identically zero.
   */
  simplify(e: Expression): Expression {
    const known = this.memory.get(e);
    if (known) return known;
    const result = this.search(e);
    this.memory.set(e, result);
    return result;
  }

  private search(e: Expression): Expression {
    const { workspace } = this;
    workspace.prepare(e);
    const factored = workspace.factored(e);
    if (Q.isZero(factored.coefficient)) return zero;
    const candidates = [e, workspace.write(factored)];
    const termwise = this.termwise(e);
    if (termwise) candidates.push(termwise);
    return shortest(candidates);
  }

  /**
   * The terms each by itself, and terms put together wherever two are shorter as one:
   * N k ln V − N k ln N + N k becomes N k (1 + ln(V/N)) in two such steps.
   */
  private termwise(e: Expression): Expression | undefined {
    const { workspace } = this;
    const addends = addendsOf(sum(addendsOf(distribute(e)).map(distribute)));
    if (addends.length < 2) return undefined;
    const terms: { factored: Factored; written: Expression }[] = [];
    for (const addend of addends) {
      const factored = workspace.factored(addend);
      if (Q.isZero(factored.coefficient)) continue;
      terms.push({ factored, written: shortest([addend, workspace.write(factored)]) });
    }
    const asDerived = gatherLogarithms(sum(terms.map(({ written }) => written)));
    if (terms.length > MOST_PAIRED_TERMS) return asDerived;
    for (;;) {
      let best:
        { i: number; j: number; merged: (typeof terms)[number]; saving: number } | undefined;
      for (let i = 0; i < terms.length; i++) {
        for (let j = i + 1; j < terms.length; j++) {
          const a = terms[i];
          const b = terms[j];
          if (!a || !b || !this.mayShorten(a.factored, b.factored)) continue;
          const factored = workspace.add([a.factored, b.factored]);
          const written = workspace.write(factored);
          const saving = pairCost(a.written, b.written) - readingCost(written);
          if (saving > (best?.saving ?? 0)) best = { i, j, merged: { factored, written }, saving };
        }
      }
      if (!best) break;
      terms[best.i] = best.merged;
      terms.splice(best.j, 1);
    }
    return shortest([asDerived, gatherLogarithms(sum(terms.map(({ written }) => written)))]);
  }

  /** Terms that share nothing, or whose sum multiplies out to much, are not worth a trial. */
  private mayShorten(a: Factored, b: Factored): boolean {
    if (a.exponents.size === 0 || b.exponents.size === 0) return true;
    const isRelated = [...a.exponents.keys()].some((base) => b.exponents.has(base));
    return isRelated && this.workspace.sizeOfSum([a, b]) <= MOST_TERMS_OF_PAIR;
  }
}

/** What two terms cost side by side, the sign between them included. */
function pairCost(a: Expression, b: Expression): number {
  return readingCost(sum([a, b]));
}

function shortest(candidates: readonly Expression[]): Expression {
  const [first, ...others] = candidates;
  if (!first) throw new RangeError('no candidates');
  let best = first;
  for (const candidate of others) {
    if (readingCost(candidate) < readingCost(best)) best = candidate;
  }
  return best;
}

/** A product over its first sum, x (a + b) as x a + x b; anything else as it is. */
export function distribute(e: Expression): Expression {
  if (e.kind !== 'product') return e;
  const inner = e.factors.find(
    (factor) => splitPower(factor).base === factor && factor.kind === 'sum',
  );
  if (!inner) return e;
  const rest = product([number(e.coefficient), ...e.factors.filter((factor) => factor !== inner)]);
  return sum(addendsOf(inner).map((addend) => multiply(rest, addend)));
}

/** The shortest form of one expression by itself. Throws RangeError as `Simplifier.simplify`. */
export function simplify(e: Expression, options: SimplifyOptions = {}): Expression {
  return new Simplifier(options).simplify(e);
}
