/**
 * Dimensions of expressions while they are being found out.
 *
 * Beside the exponents that are known, a dimension may hold unknowns (that of a running variable
 * between 0 and inf, of a literal 0) and parts raised to a symbolic exponent, as in V^N/Lambda^(3 N),
 * which have to cancel. Equations between dimensions are linear in the unknowns, so that one
 * elimination after another solves them.
 */
import { addendsOf, multiply, one, splitCoefficient } from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import {
  DIMENSIONLESS,
  isDimensionless,
  multiplyDimensions,
  powerDimension,
  type Dimension,
} from '../units/dimension.ts';

export interface OpenDimension {
  readonly known: Dimension;
  /** Exponents of the unknowns by their numbers; none is zero. */
  readonly unknowns: ReadonlyMap<number, Rational>;
  /** What is raised to which exponent that is no number; none is dimensionless. */
  readonly symbolic: ReadonlyMap<Expression, Dimension>;
}

const NO_UNKNOWNS: ReadonlyMap<number, Rational> = new Map();
const NOTHING_SYMBOLIC: ReadonlyMap<Expression, Dimension> = new Map();

export const PURE: OpenDimension = {
  known: DIMENSIONLESS,
  unknowns: NO_UNKNOWNS,
  symbolic: NOTHING_SYMBOLIC,
};

export function closed(known: Dimension): OpenDimension {
  return { known, unknowns: NO_UNKNOWNS, symbolic: NOTHING_SYMBOLIC };
}

function isPlain(d: OpenDimension): boolean {
  return d.unknowns.size === 0 && d.symbolic.size === 0;
}

export class DimensionSolver {
  private readonly solved = new Map<number, OpenDimension>();
  private count = 0;

  fresh(): OpenDimension {
    return {
      known: DIMENSIONLESS,
      unknowns: new Map([[this.count++, Q.ONE]]),
      symbolic: NOTHING_SYMBOLIC,
    };
  }

  /** The dimension with every solved unknown put in. */
  resolve(d: OpenDimension): OpenDimension {
    if (d.unknowns.size === 0) return d;
    let result: OpenDimension = { ...d, unknowns: NO_UNKNOWNS };
    const left = new Map<number, Rational>();
    for (const [unknown, exponent] of d.unknowns) {
      const solution = this.solved.get(unknown);
      if (solution) result = this.multiply(result, this.power(this.resolve(solution), exponent));
      else left.set(unknown, exponent);
    }
    return left.size === 0
      ? result
      : this.multiply(result, { known: DIMENSIONLESS, unknowns: left, symbolic: NOTHING_SYMBOLIC });
  }

  multiply(a: OpenDimension, b: OpenDimension): OpenDimension {
    if (a === PURE) return b;
    if (b === PURE) return a;
    const known = multiplyDimensions(a.known, b.known);
    if (isPlain(a) && isPlain(b)) return closed(known);
    const unknowns = new Map(a.unknowns);
    for (const [unknown, exponent] of b.unknowns) {
      const total = Q.add(unknowns.get(unknown) ?? Q.ZERO, exponent);
      if (Q.isZero(total)) unknowns.delete(unknown);
      else unknowns.set(unknown, total);
    }
    const symbolic = new Map(a.symbolic);
    for (const [exponent, of] of b.symbolic) addSymbolic(symbolic, exponent, of);
    return { known, unknowns, symbolic };
  }

  divide(a: OpenDimension, b: OpenDimension): OpenDimension {
    return b === PURE ? a : this.multiply(a, this.power(b, Q.MINUS_ONE));
  }

  power(d: OpenDimension, exponent: Rational): OpenDimension {
    if (d === PURE || Q.isZero(exponent)) return PURE;
    if (Q.isOne(exponent)) return d;
    return {
      known: powerDimension(d.known, exponent),
      unknowns:
        d.unknowns.size === 0
          ? NO_UNKNOWNS
          : new Map([...d.unknowns].map(([u, e]) => [u, Q.multiply(e, exponent)])),
      symbolic:
        d.symbolic.size === 0
          ? NOTHING_SYMBOLIC
          : new Map([...d.symbolic].map(([e, of]) => [e, powerDimension(of, exponent)])),
    };
  }

  /** d to an exponent that is no number. False where that has no meaning. */
  symbolicPower(d: OpenDimension, exponent: Expression): OpenDimension | undefined {
    const base = this.resolve(d);
    if (base.unknowns.size > 0) return this.unify(base, PURE) ? PURE : undefined;
    if (isPlain(base) && isDimensionless(base.known)) return PURE;
    let known = DIMENSIONLESS;
    const symbolic = new Map<Expression, Dimension>();
    for (const addend of addendsOf(exponent)) {
      const { coefficient, rest } = splitCoefficient(addend);
      const of = powerDimension(base.known, coefficient);
      if (rest === one) known = multiplyDimensions(known, of);
      else addSymbolic(symbolic, rest, of);
      for (const [key, part] of base.symbolic) {
        addSymbolic(symbolic, multiply(key, rest), powerDimension(part, coefficient));
      }
    }
    return { known, unknowns: NO_UNKNOWNS, symbolic };
  }

  /** Makes two dimensions equal by solving for an unknown; false where they cannot be. */
  unify(a: OpenDimension, b: OpenDimension): boolean {
    if (a === b) return true;
    const difference = this.resolve(this.divide(a, b));
    if (difference.symbolic.size > 0) return false;
    for (const [unknown, exponent] of difference.unknowns) {
      const rest = new Map(difference.unknowns);
      rest.delete(unknown);
      const others = { known: difference.known, unknowns: rest, symbolic: NOTHING_SYMBOLIC };
      this.solved.set(unknown, this.power(others, Q.negate(Q.invert(exponent))));
      return true;
    }
    return isDimensionless(difference.known);
  }

  /** The dimension as far as it is known; unknowns that nothing fixed count as numbers. */
  settle(d: OpenDimension): Dimension | undefined {
    const resolved = this.resolve(d);
    return resolved.symbolic.size > 0 ? undefined : resolved.known;
  }
}

function addSymbolic(
  symbolic: Map<Expression, Dimension>,
  exponent: Expression,
  of: Dimension,
): void {
  const total = multiplyDimensions(symbolic.get(exponent) ?? DIMENSIONLESS, of);
  if (isDimensionless(total)) symbolic.delete(exponent);
  else symbolic.set(exponent, total);
}
