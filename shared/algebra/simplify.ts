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

interface Term {
  readonly factored: Factored;
  readonly written: Expression;
}

interface Merger {
  readonly term: Term;
  /** Characters saved by writing one term in place of two. */
  readonly saving: number;
}

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
    const single: Term[] = [];
    for (const addend of addends) {
      const factored = workspace.factored(addend);
      if (Q.isZero(factored.coefficient)) continue;
      single.push({ factored, written: shortest([addend, workspace.write(factored)]) });
    }
    const terms = this.gatherAtOnce(single);
    const asDerived = gatherLogarithms(sum(single.map(({ written }) => written)));
    if (terms.length > MOST_PAIRED_TERMS) return asDerived;
    // A pair is tried once: what it gives does not depend on the other terms.
    const tried = new Map<Term, Map<Term, Merger | undefined>>();
    const merge = (a: Term, b: Term): Merger | undefined => {
      let known = tried.get(a);
      if (!known) tried.set(a, (known = new Map<Term, Merger | undefined>()));
      if (!known.has(b)) known.set(b, this.merge(a, b));
      return known.get(b);
    };
    for (;;) {
      let best: { i: number; j: number; merger: Merger } | undefined;
      for (let i = 0; i < terms.length; i++) {
        for (let j = i + 1; j < terms.length; j++) {
          const a = terms[i];
          const b = terms[j];
          const merger = a && b && merge(a, b);
          if (merger && merger.saving > (best?.merger.saving ?? 0)) best = { i, j, merger };
        }
      }
      if (!best) break;
      terms[best.i] = best.merger.term;
      terms.splice(best.j, 1);
    }
    return shortest([asDerived, gatherLogarithms(sum(terms.map(({ written }) => written)))]);
  }

  /**
   * Terms that differ only in their logarithms put together in one step. Pair by pair it would be
   * the same in the end, with a sum of logarithms factored for every pair.
   */
  private gatherAtOnce(terms: readonly Term[]): Term[] {
    const groups = new Map<string, { hasLogarithm: boolean; members: Term[] }>();
    for (const term of terms) {
      const { key, hasLogarithm } = this.workspace.cofactorOf(term.factored);
      const group = groups.get(key) ?? { hasLogarithm: false, members: [] };
      group.hasLogarithm ||= hasLogarithm;
      group.members.push(term);
      groups.set(key, group);
    }
    return [...groups.values()].flatMap(({ hasLogarithm, members }) => {
      if (!hasLogarithm || members.length < 2) return members;
      const factored = this.workspace.add(members.map((member) => member.factored));
      if (Q.isZero(factored.coefficient)) return [];
      const written = this.workspace.write(factored);
      const apart = readingCost(sum(members.map((member) => member.written)));
      return readingCost(written) < apart ? [{ factored, written }] : members;
    });
  }

  /** Two terms as one, and what that saves; undefined where it is not worth a trial. */
  private merge(a: Term, b: Term): Merger | undefined {
    if (!this.mayShorten(a.factored, b.factored)) return undefined;
    const factored = this.workspace.add([a.factored, b.factored]);
    const written = this.workspace.write(factored);
    const saving = readingCost(sum([a.written, b.written])) - readingCost(written);
    return { term: { factored, written }, saving };
  }

  /** Terms that share nothing, or whose sum multiplies out to much, are not worth a trial. */
  private mayShorten(a: Factored, b: Factored): boolean {
    if (a.exponents.size === 0 || b.exponents.size === 0) return true;
    const isRelated = [...a.exponents.keys()].some((base) => b.exponents.has(base));
    return isRelated && this.workspace.sizeOfSum([a, b]) <= MOST_TERMS_OF_PAIR;
  }
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
