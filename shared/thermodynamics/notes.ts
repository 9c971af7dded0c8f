/** What is to be said beside a property: where it diverges, what was assumed. */
import { negate, number, power, splitCoefficient, sum, subtract } from '../algebra/construct.ts';
import { childrenOf, type Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { isPositive } from '../algebra/sign.ts';
import type { DerivedProperty } from '../contracts/derivation.ts';
import type { Entry } from './catalogue/index.ts';
import type { Model } from './model.ts';
import type { Notation } from './notation.ts';

type Note = DerivedProperty['notes'][number];

/** The notes of one property in its shown form. */
export function notesOf(model: Model, entry: Entry, value: Expression, notation: Notation): Note[] {
  const notes: Note[] = [];
  if (usesStirling(model) && entry.isLinear && isAffectedByStirling(model, entry)) {
    notes.push({
      kind: 'assumes',
      text: 'Stirling’s formula, ln N! = N ln N − N, that is a large number of molecules.',
      tex: '\\ln N! = N \\ln N - N',
    });
  }
  for (const denominator of denominatorsOf(value)) {
    if (isPositive(denominator) || isBoseFactor(denominator) || isInDomain(model, denominator)) {
      continue;
    }
    const { left, right } = bySign(denominator);
    if (right.kind === 'number' && Q.isZero(right.value) && denominator.kind !== 'sum') continue;
    notes.push({
      kind: 'diverges',
      text: `where ${notation.text(left)} = ${notation.text(right)}`,
      tex: `${notation.tex(left)} = ${notation.tex(right)}`,
    });
  }
  return notes;
}

function usesStirling({ formulation }: Model): boolean {
  return formulation.factorials === 'Stirling' && formulation.normalizedSource.includes('!');
}

/** p and U know nothing of N!. */
function isAffectedByStirling(model: Model, entry: Entry): boolean {
  const names = ['S', model.surroundings.helmholtzName, 'G', 'Omega'];
  return names.includes(entry.symbol) || entry.symbol.startsWith('mu');
}

/** Sums below a fraction bar, the outermost ones. */
function denominatorsOf(e: Expression): Expression[] {
  const found = new Set<Expression>();
  const visit = (part: Expression): void => {
    if (
      part.kind === 'power' &&
      part.exponent.kind === 'number' &&
      Q.sign(part.exponent.value) < 0
    ) {
      if (part.base.kind === 'sum') found.add(part.base);
      return;
    }
    if (part.kind === 'abbreviation') return;
    childrenOf(part).forEach(visit);
  };
  visit(e);
  return [...found];
}

/** e^x − 1 and 1 − e^(−x) with a positive x do not vanish. */
function isBoseFactor(e: Expression): boolean {
  if (e.kind !== 'sum' || e.terms.length !== 1 || !e.terms[0]) return false;
  const { coefficient, rest } = splitCoefficient(e.terms[0]);
  if (!Q.isZero(Q.add(coefficient, e.constant))) return false;
  const [x] = rest.kind === 'call' && rest.name === 'exp' ? rest.arguments : [];
  return x !== undefined && (isPositive(x) || isPositive(negate(x)));
}

/** Whether the domain keeps the expression from vanishing. */
function isInDomain({ formulation }: Model, e: Expression): boolean {
  return formulation.domain.some(({ left, right }) => {
    const difference = subtract(left, right);
    return isMultiple(difference, e) || isMultiple(difference, power(e, number(Q.MINUS_ONE)));
  });
}

function isMultiple(a: Expression, b: Expression): boolean {
  if (a === b) return true;
  const ratio = splitCoefficient(a).rest;
  const other = splitCoefficient(b).rest;
  if (ratio === other) return true;
  const sumOf = sum([a, b]);
  return sumOf.kind === 'number';
}

/** x − y = 0 as x = y, both without minus signs. */
function bySign(e: Expression): { left: Expression; right: Expression } {
  if (e.kind !== 'sum') return { left: e, right: number(Q.ZERO) };
  const terms = [...e.terms, ...(Q.isZero(e.constant) ? [] : [number(e.constant)])];
  const isNegative = (term: Expression): boolean => Q.sign(splitCoefficient(term).coefficient) < 0;
  const left = sum(terms.filter((term) => !isNegative(term)));
  const right = subtract(left, e);
  return { left, right };
}
