/** The exact value of a constant, a parameter, a bound or an element of a list. */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { naturalConstant, PI_VALUE } from '../units/constants.ts';
import {
  DIMENSIONLESS,
  divideDimensions,
  equalDimensions,
  isDimensionless,
  multiplyDimensions,
  powerDimension,
  type Dimension,
} from '../units/dimension.ts';
import { describeDimension } from '../units/formatDimension.ts';
import { parseUnit } from '../units/parseUnit.ts';
import { bitsOf } from './exactSize.ts';
import type { Findings } from './findings.ts';
import { LONGEST_NUMBER_BITS } from './limits.ts';
import type { ExpressionTree, NameTree } from './syntax.ts';

export interface ConstantValue {
  readonly value: Rational;
  readonly dimension: Dimension;
}

/** Values of the constants that are declared, for values built from others. */
export type KnownValues = (name: NameTree) => ConstantValue | 'poisoned' | undefined;

const NOTHING: KnownValues = () => undefined;
const LARGEST_POWER = 1000;

/**
 * The value that a tree states, in the unit that its declaration names: a plain number counts in
 * that unit, anything with a unit or a constant of nature in it has to be of its dimension.
 */
export function declaredValue(
  tree: ExpressionTree,
  unit: ConstantValue,
  findings: Findings,
  known: KnownValues = NOTHING,
): Rational | undefined {
  const found = constantValue(tree, findings, known);
  if (!found) return undefined;
  if (isDimensionless(found.dimension)) return Q.multiply(found.value, unit.value);
  if (equalDimensions(found.dimension, unit.dimension)) return found.value;
  const isBare = isDimensionless(unit.dimension);
  findings.add('dimension', tree.span, {
    message: `The value is ${describeDimension(found.dimension)}, but it is declared as ${describeDimension(unit.dimension)}.`,
    hint: isBare ? 'Write the unit behind the name, in brackets.' : 'Change the unit or the value.',
  });
  return undefined;
}

/** The value of a tree of numbers, units, constants, + - * / and whole powers. */
export function constantValue(
  tree: ExpressionTree,
  findings: Findings,
  known: KnownValues = NOTHING,
): ConstantValue | undefined {
  const visit = (part: ExpressionTree): ConstantValue | undefined => {
    const result = compute(part);
    if (result && bitsOf(result.value) > LONGEST_NUMBER_BITS) {
      findings.add('number-too-large', part.span);
      return undefined;
    }
    return result;
  };

  const compute = (part: ExpressionTree): ConstantValue | undefined => {
    switch (part.kind) {
      case 'number': {
        if (!part.unit) return { value: part.value, dimension: DIMENSIONLESS };
        const { unit } = parseUnit(part.unit.text);
        // Units of values are complained of with the declaration.
        return unit && { value: Q.multiply(part.value, unit.factor), dimension: unit.dimension };
      }
      case 'group':
        return visit(part.of);
      case 'negation': {
        const of = visit(part.of);
        return of && { ...of, value: Q.negate(of.value) };
      }
      case 'name':
        return named(part);
      case 'sum': {
        let total: ConstantValue | undefined;
        for (const { isNegative, term } of part.terms) {
          const found = visit(term);
          if (!found) return undefined;
          const value = isNegative ? Q.negate(found.value) : found.value;
          if (!total) {
            total = { ...found, value };
          } else if (!equalDimensions(total.dimension, found.dimension)) {
            findings.add('dimension', term.span, {
              message: `The terms of a sum must agree, but ${findings.textAt(term.span)} is ${describeDimension(found.dimension)}.`,
              hint: 'Change its unit.',
            });
            return undefined;
          } else {
            total = { ...total, value: Q.add(total.value, value) };
          }
        }
        return total;
      }
      case 'product': {
        let total: ConstantValue = { value: Q.ONE, dimension: DIMENSIONLESS };
        for (const { joint, factor } of part.factors) {
          const found = visit(factor);
          if (!found) return undefined;
          if (joint === '/' && Q.isZero(found.value)) {
            findings.add('division-by-zero', factor.span);
            return undefined;
          }
          total =
            joint === '/'
              ? {
                  value: Q.divide(total.value, found.value),
                  dimension: divideDimensions(total.dimension, found.dimension),
                }
              : {
                  value: Q.multiply(total.value, found.value),
                  dimension: multiplyDimensions(total.dimension, found.dimension),
                };
          if (bitsOf(total.value) > LONGEST_NUMBER_BITS) {
            findings.add('number-too-large', factor.span);
            return undefined;
          }
        }
        return total;
      }
      case 'power': {
        const base = visit(part.base);
        const exponent = visit(part.exponent);
        if (!base || !exponent) return undefined;
        const size = Math.abs(Q.toNumber(exponent.value));
        if (!Q.isInteger(exponent.value) || size > LARGEST_POWER) {
          const isWhole = Q.isInteger(exponent.value);
          findings.add(isWhole ? 'number-too-large' : 'value-not-exact', part.span);
          return undefined;
        }
        if (Q.isZero(base.value) && Q.sign(exponent.value) < 0) {
          findings.add('division-by-zero', part.span);
          return undefined;
        }
        if (bitsOf(base.value) * size > 2 * LONGEST_NUMBER_BITS) {
          findings.add('number-too-large', part.span);
          return undefined;
        }
        return {
          value: Q.power(base.value, Number(exponent.value.numerator)),
          dimension: powerDimension(base.dimension, exponent.value),
        };
      }
      case 'infinity':
        findings.add('infinity-out-of-place', part.span);
        return undefined;
      default:
        findings.add('value-not-exact', part.span);
        return undefined;
    }
  };

  const named = (name: NameTree): ConstantValue | undefined => {
    const found = known(name);
    if (found === 'poisoned') return undefined;
    if (found) return found;
    if (name.name === 'pi') return { value: PI_VALUE, dimension: DIMENSIONLESS };
    const constant = naturalConstant(name.name);
    if (constant) return { value: constant.value, dimension: constant.dimension };
    findings.add('value-not-constant', name.span, { name: name.spelled });
    return undefined;
  };

  return visit(tree);
}
