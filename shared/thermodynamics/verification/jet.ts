/**
 * The properties from values alone. Given ln Q, its gradient and its second derivatives at one
 * state, as numbers from whatever source, every definition of the catalogue is worked out
 * numerically, by Jacobians. Nothing of the symbolic path (differentiation, simplification, the
 * workings that stand for definitions) has a part in it.
 */
import type { Expression, SymbolNode } from '../../algebra/expression.ts';
import { big, bigOfRational, type BigNumber } from '../../numerics/bigNumber.ts';
import { isProperty } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import {
  ONE,
  ZERO,
  add,
  determinant,
  known,
  multiply,
  power,
  type Approximate,
} from './approximate.ts';

/** ln Q and its first and second derivatives, in the order of the natural variables. */
export interface Jet {
  readonly value: Approximate;
  readonly gradient: readonly Approximate[];
  readonly hessian: readonly (readonly Approximate[])[];
}

/** A value with its gradient over the natural variables; without one it is a second derivative. */
interface Dual {
  readonly value: Approximate;
  readonly gradient: readonly Approximate[] | undefined;
}

/** Reads properties off one jet; `values` holds the state and all constants by name. */
export class JetReader {
  private readonly found = new Map<string, Dual>();
  private readonly model: Model;
  private readonly jet: Jet;
  private readonly values: ReadonlyMap<string, BigNumber>;

  constructor(model: Model, jet: Jet, values: ReadonlyMap<string, BigNumber>) {
    this.model = model;
    this.jet = jet;
    this.values = values;
  }

  /** The property with a bound of its error. Throws RangeError where its definition cannot be read. */
  property(name: string): Approximate {
    return this.dualOf(name).value;
  }

  private dualOf(name: string): Dual {
    const remembered = this.found.get(name);
    if (remembered) return remembered;
    const entry = this.model.entry(name);
    if (!entry) throw new RangeError(`no property ${name}`);
    const dual = this.read(entry.definition);
    this.found.set(name, dual);
    return dual;
  }

  private constant(value: Approximate): Dual {
    return { value, gradient: this.model.naturals.map(() => ZERO) };
  }

  private read(e: Expression): Dual {
    const { naturals, surroundings } = this.model;
    if (e === surroundings.lnFunction) {
      return { value: this.jet.value, gradient: this.jet.gradient };
    }
    switch (e.kind) {
      case 'number':
        return this.constant(known(bigOfRational(e.value)));
      case 'symbol': {
        const index = naturals.indexOf(e);
        const value = this.values.get(e.name);
        if (index >= 0 && value !== undefined) {
          return {
            value: known(value),
            gradient: naturals.map((_, i) => (i === index ? ONE : ZERO)),
          };
        }
        if (isProperty(e) && this.model.entry(e.name)) return this.dualOf(e.name);
        if (value === undefined) throw new RangeError(`no value of ${e.name}`);
        return this.constant(known(value));
      }
      case 'sum':
        return [...e.terms.map((term) => this.read(term))].reduce(
          sumOf,
          this.constant(known(bigOfRational(e.constant))),
        );
      case 'product':
        return e.factors
          .map((factor) => this.read(factor))
          .reduce(productOf, this.constant(known(bigOfRational(e.coefficient))));
      case 'power': {
        if (e.exponent.kind !== 'number') break;
        return powerOf(this.read(e.base), bigOfRational(e.exponent.value));
      }
      case 'call':
        if (e.name === 'partial') return this.partial(e.arguments);
        break;
      default:
        break;
    }
    throw new RangeError('a definition is made of sums, products, powers and derivatives');
  }

  private partial([of, by, ...held]: readonly Expression[]): Dual {
    if (!of || !by) throw new RangeError('a derivative needs what and by what');
    const { naturals, surroundings } = this.model;
    const index = naturals.indexOf(by as SymbolNode);
    if (of === surroundings.lnFunction && index >= 0) {
      const value = this.jet.gradient[index];
      const gradient = this.jet.hessian[index];
      if (value && gradient) return { value, gradient };
    }
    const free = naturals.map((x, i) => ({ x, i })).filter(({ x }) => !held.includes(x));
    const rowOf = (e: Expression): Approximate[] => {
      const { gradient } = this.read(e);
      if (!gradient) throw new RangeError('a third derivative of ln Q is not at hand');
      return free.map(({ i }) => gradient[i] ?? ZERO);
    };
    const rows = held.filter((z) => !naturals.includes(z as SymbolNode)).map(rowOf);
    const above = determinant([rowOf(of), ...rows]);
    const below = determinant([rowOf(by), ...rows]);
    return { value: multiply(above, power(below, big(-1))), gradient: undefined };
  }
}

function sumOf(a: Dual, b: Dual): Dual {
  return {
    value: add(a.value, b.value),
    gradient:
      a.gradient && b.gradient && a.gradient.map((slope, i) => add(slope, b.gradient?.[i] ?? ZERO)),
  };
}

function productOf(a: Dual, b: Dual): Dual {
  return {
    value: multiply(a.value, b.value),
    gradient:
      a.gradient &&
      b.gradient &&
      a.gradient.map((slope, i) =>
        add(multiply(slope, b.value), multiply(a.value, b.gradient?.[i] ?? ZERO)),
      ),
  };
}

function powerOf(a: Dual, n: BigNumber): Dual {
  const outer = multiply(known(n), power(a.value, n.minus(1)));
  return {
    value: power(a.value, n),
    gradient: a.gradient?.map((slope) => multiply(outer, slope)),
  };
}
