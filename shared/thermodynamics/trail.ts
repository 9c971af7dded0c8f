/**
 * The derivation of a property as numbered lines, each a true equation with the rule that led to
 * it, so that a colleague can follow with pencil and paper.
 */
import { negate, number, one, product, splitCoefficient, sum } from '../algebra/construct.ts';
import { differentiate, rulesUsed } from '../algebra/differentiate.ts';
import {
  childrenOf,
  type CallNode,
  type Expression,
  type SymbolNode,
} from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { dependsOn, substitute } from '../algebra/traverse.ts';
import type { DerivationStep } from '../contracts/derivation.ts';
import type { Entry } from './catalogue/index.ts';
import { sizesOf, termsOf } from './contributions.ts';
import type { Model } from './model.ts';
import type { Notation } from './notation.ts';

/** The steps from the definition to the form in which the property is shown. */
export function trailOf(model: Model, entry: Entry, notation: Notation): DerivationStep[] {
  const left = notation.tex(notation.nameOf(entry.symbol));
  const steps: DerivationStep[] = [];
  const say = (rule: string, leftSide: string, rightSide: string): void => {
    const tex = `${leftSide} = ${rightSide}`;
    if (steps.at(-1)?.tex !== tex) steps.push({ rule, tex });
  };
  say('definition', left, notation.definitionTex(entry.definition));
  if (entry.working)
    say(entry.working.rule, left, notation.definitionTex(entry.working.expression));
  const chosen = entry.working?.expression ?? entry.definition;

  const derivatives = derivativesIn(chosen);
  const lnFunction = model.surroundings.lnFunction;
  const isOfFunction = contains(chosen, lnFunction);
  if (isOfFunction) say(statementRule(model), notation.tex(lnFunction), notation.tex(model.f));
  for (const derivative of derivatives) {
    if (derivative.arguments[0] === lnFunction) ofFunction(model, derivative, notation, say);
    else ofProperty(model, derivative, notation, say);
  }
  const { raw, value } = model.worked(entry.symbol);
  say(ruleOfReturn(chosen, derivatives, lnFunction, notation), left, notation.tex(raw));
  say('collected', left, notation.tex(value));
  return steps;
}

type Say = (rule: string, left: string, right: string) => void;

/** How ln Q is had from the statement of the author. */
function statementRule({ formulation }: Model): string {
  const name = formulation.partitionFunction;
  const isLogarithm = new RegExp(`^[ \\t]*ln[ \\t]*${name}[ \\t]*=`, 'm').test(
    formulation.normalizedSource,
  );
  const usesStirling =
    formulation.factorials === 'Stirling' && formulation.normalizedSource.includes('!');
  const rules = [
    isLogarithm ? 'as stated' : 'logarithm of a product',
    ...(usesStirling ? ['Stirling’s formula'] : []),
  ];
  return rules.join(', ');
}

/** ∂ ln Q/∂x term by term, then worked out. */
function ofFunction(model: Model, derivative: CallNode, notation: Notation, say: Say): void {
  const x = derivative.arguments[1] as SymbolNode;
  const left = notation.derivative(model.surroundings.lnFunction, x);
  const terms = notation.inOrder(
    termsOf(model.f, sizesOf(model.surroundings)).filter((term) => dependsOn(term, x)),
  );
  if (terms.length > 1)
    say('term by term', left, terms.map((t, i) => operator(t, x, i, notation)).join(' '));
  const worked = sum(terms.map((term) => differentiate(term, x)));
  const rules = [...new Set(terms.flatMap((term) => rulesUsed(term, x)))].filter(
    (rule) => rule !== 'sum' || terms.length === 1,
  );
  say(rules.length > 0 ? rules.join(', ') : 'derivative', left, notation.tex(worked));
}

/** `+ \frac{\partial}{\partial V} (…)` with the sign in front. */
function operator(term: Expression, x: SymbolNode, index: number, notation: Notation): string {
  const isNegative = Q.sign(splitCoefficient(term).coefficient) < 0;
  const sign = isNegative ? '-' : index > 0 ? '+' : '';
  const magnitude = notation.tex(isNegative ? negate(term) : term);
  return `${sign} \\frac{\\partial}{\\partial ${notation.tex(x)}} \\left(${magnitude}\\right)`.trim();
}

/** A derivative of another property: by what it is known to be, then worked out. */
function ofProperty(model: Model, derivative: CallNode, notation: Notation, say: Say): void {
  const [of, by, ...held] = derivative.arguments;
  if (!of || !by) return;
  const left = notation.tex(derivative);
  const resolved = model.resolveDefinition(of);
  const isNatural = model.naturals.includes(by as SymbolNode);
  const isAlong = isNatural && held.every((z) => model.naturals.includes(z as SymbolNode));
  if (isAlong) {
    const x = by as SymbolNode;
    say(
      'substituted',
      left,
      `\\frac{\\partial}{\\partial ${notation.tex(x)}} \\left(${notation.tex(resolved)}\\right)`,
    );
    const rules = rulesUsed(resolved, x).join(', ');
    say(rules === '' ? 'derivative' : rules, left, notation.tex(differentiate(resolved, x)));
    return;
  }
  const unique = (list: readonly Expression[]): string =>
    list.map((e) => notation.tex(e)).join(', ');
  const natural = unique(model.naturals);
  say(
    'Jacobians',
    left,
    `\\frac{\\partial(${unique([of, ...held])})}{\\partial(${natural})} \\bigg/ ` +
      `\\frac{\\partial(${unique([by, ...held])})}{\\partial(${natural})}`,
  );
  say('worked out', left, notation.tex(model.resolveDefinition(derivative)));
}

/** What is done with the derivative to come back to the property. */
function ruleOfReturn(
  chosen: Expression,
  derivatives: readonly CallNode[],
  lnFunction: Expression,
  notation: Notation,
): string {
  const [derivative] = derivatives;
  if (!derivative || derivatives.length > 1) return 'substituted';
  if (
    contains(substitute(chosen, new Map<Expression, Expression>([[derivative, one]])), lnFunction)
  ) {
    return 'substituted';
  }
  if (chosen.kind === 'product' && chosen.factors.includes(derivative)) {
    const rest = chosen.factors.filter((part) => part !== derivative);
    return `times ${notation.text(product([number(chosen.coefficient), ...rest]))}`;
  }
  return 'substituted';
}

function derivativesIn(e: Expression): CallNode[] {
  if (e.kind === 'call' && e.name === 'partial') return [e];
  return [...new Set(childrenOf(e).flatMap(derivativesIn))];
}

function contains(e: Expression, part: Expression): boolean {
  if (e === part) return true;
  return childrenOf(e).some((child) => contains(child, part));
}
