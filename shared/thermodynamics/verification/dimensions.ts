/** The dimension of a derived expression, worked out again from those of its symbols. */
import type { Expression } from '../../algebra/expression.ts';
import { expandAbbreviations } from '../../algebra/traverse.ts';
import type { VerificationCheck } from '../../contracts/derivation.ts';
import {
  DIMENSIONLESS,
  equalDimensions,
  isDimensionless,
  multiplyDimensions,
  powerDimension,
  type Dimension,
} from '../../units/dimension.ts';
import { ENTROPY, unitOf, type Entry } from '../catalogue/index.ts';
import type { Model } from '../model.ts';

/** A sum of unlike things, or a function of something with a unit. */
class Mismatch extends Error {
  override name = 'Mismatch';
}

/** Whether the derived expression has the dimension that its entry states. */
export function checkDimension(model: Model, entry: Entry): VerificationCheck {
  const report = (status: VerificationCheck['status'], detail: string): VerificationCheck => ({
    kind: 'dimension',
    title: `dimension ${unitOf(entry.dimension)}`,
    status,
    detail,
  });
  try {
    const found = dimensionIn(model)(expandAbbreviations(model.worked(entry.symbol).value));
    if (found === undefined || equalDimensions(found, entry.dimension)) return report('passed', '');
    return report('failed', `The expression has the dimension ${unitOf(found)}.`);
  } catch (fault) {
    if (fault instanceof Mismatch) return report('failed', fault.message);
    throw fault;
  }
}

/** The dimension of expressions of a model; undefined for 0, which has every dimension. */
function dimensionIn(model: Model): (e: Expression) => Dimension | undefined {
  const known = new Map<string, Dimension>([['k', ENTROPY]]);
  const { naturalConstants, quantities, variables } = model.formulation;
  for (const { name, dimension } of [...naturalConstants, ...quantities, ...variables]) {
    known.set(name, dimension);
  }
  const memory = new Map<Expression, Dimension | undefined>();
  const of = (e: Expression): Dimension | undefined => {
    if (memory.has(e)) return memory.get(e);
    const result = work(e);
    memory.set(e, result);
    return result;
  };
  const number = (e: Expression, what: string): void => {
    const found = of(e);
    if (found && !isDimensionless(found)) {
      throw new Mismatch(`${what} has the dimension ${unitOf(found)}.`);
    }
  };
  const same = (parts: readonly (Dimension | undefined)[]): Dimension | undefined => {
    const [first, ...rest] = parts.filter((part) => part !== undefined);
    for (const other of rest) {
      if (first && !equalDimensions(first, other)) {
        throw new Mismatch(`A sum joins ${unitOf(first)} and ${unitOf(other)}.`);
      }
    }
    return first;
  };
  const work = (e: Expression): Dimension | undefined => {
    switch (e.kind) {
      case 'number':
        return e.value.numerator === 0n ? undefined : DIMENSIONLESS;
      case 'infinity':
        return undefined;
      case 'symbol':
        return known.get(e.name) ?? DIMENSIONLESS;
      case 'abbreviation':
        return of(e.definition);
      case 'sum':
        return same([...e.terms.map(of), e.constant.numerator === 0n ? undefined : DIMENSIONLESS]);
      case 'product':
        return e.factors
          .map((factor) => of(factor) ?? DIMENSIONLESS)
          .reduce(multiplyDimensions, DIMENSIONLESS);
      case 'power': {
        number(e.exponent, 'An exponent');
        const base = of(e.base) ?? DIMENSIONLESS;
        if (e.exponent.kind === 'number') return powerDimension(base, e.exponent.value);
        number(e.base, 'The base of a power');
        return DIMENSIONLESS;
      }
      case 'call':
        if (e.name === 'abs' || e.name === 'min' || e.name === 'max') {
          return same(e.arguments.map(of));
        }
        // ln V − ln N Λ³ is a number though ln V alone is none: shares of terms may be so written.
        for (const argument of e.arguments) number(argument, `The argument of ${e.name}`);
        return DIMENSIONLESS;
      case 'summation':
        return of(e.body);
      case 'productOver':
        number(e.body, 'A factor of a product');
        return DIMENSIONLESS;
      case 'integral': {
        const ends = same([of(e.from), of(e.to)]);
        if (!ends) return undefined;
        known.set(e.variable.name, ends);
        return multiplyDimensions(of(e.body) ?? DIMENSIONLESS, ends);
      }
      case 'piecewise':
        return same([...e.branches.map(({ value }) => of(value)), of(e.otherwise)]);
      case 'element':
        return DIMENSIONLESS;
    }
  };
  return of;
}
