/** The states at which a claim over ranges is tried: evenly spread, inside the ranges. */
import { divide } from '../../algebra/construct.ts';
import type { Expression, SymbolNode } from '../../algebra/expression.ts';
import * as Q from '../../algebra/rational.ts';
import { dependsOn } from '../../algebra/traverse.ts';
import type { RangeOfVariable } from '../../language/formulation.ts';
import type { Calculator } from '../calculator.ts';
import type { Model } from '../model.ts';
import { drawState, type State } from '../sampling.ts';

/** A range that no natural variable can be set to meet. */
export class RangeOutOfReach extends Error {
  override name = 'RangeOutOfReach';
}

/** Above this ratio of its ends a range is divided evenly in the logarithm. */
const LOGARITHMIC_FROM = 20;

/**
 * The i-th state. The coordinates are multiples of powers of the root of x^(d+1) = x + 1, which
 * fill the cube evenly for any number of states (Kronecker's sequence).
 */
export function stateGenerator(
  model: Model,
  ranges: readonly RangeOfVariable[],
  calculator: Calculator,
): (i: number) => State {
  const free = model.naturals.length + 2;
  const dimensions = ranges.length + free;
  const root = rootOf(dimensions);
  const coordinate = (i: number, j: number): number => {
    const x = 0.5 + i * root ** -(j + 1);
    return x - Math.floor(x);
  };
  const plans = planOf(model, ranges, calculator);
  return (i) => {
    let j = ranges.length;
    const state = new Map(drawState(model, () => coordinate(i, j++ % dimensions)));
    plans.forEach(({ range, settle }, index) => {
      const low = Q.toNumber(range.lower);
      const high = Q.toNumber(range.upper);
      const x = coordinate(i, index);
      const value =
        low > 0 && high / low > LOGARITHMIC_FROM ? low * (high / low) ** x : low + (high - low) * x;
      settle(state, value);
    });
    return state;
  };
}

function rootOf(dimensions: number): number {
  let x = 2;
  for (let i = 0; i < 64; i++) x = (1 + x) ** (1 / (dimensions + 1));
  return x;
}

interface Plan {
  readonly range: RangeOfVariable;
  readonly settle: (state: Map<string, number>, value: number) => void;
}

/** Which variable each range sets: V/N in … sets V for the N that stands. */
function planOf(model: Model, ranges: readonly RangeOfVariable[], calculator: Calculator): Plan[] {
  const isSet = new Set<SymbolNode>();
  const direct = (e: Expression): SymbolNode | undefined => model.naturals.find((x) => x === e);
  const ordered = [...ranges].sort(
    (a, b) =>
      Number(direct(b.expression) !== undefined) - Number(direct(a.expression) !== undefined),
  );
  return ordered.map((range) => {
    const natural = direct(range.expression);
    if (natural) {
      isSet.add(natural);
      return { range, settle: (state, value) => void state.set(natural.name, value) };
    }
    const resolved = model.resolve(range.expression);
    const candidates = model.naturals.filter((x) => dependsOn(resolved, x) && !isSet.has(x));
    for (const x of [...candidates].sort((a, b) => rank(model, a) - rank(model, b))) {
      const exponent = exponentOf(resolved, x);
      if (exponent === undefined) continue;
      isSet.add(x);
      return {
        range,
        settle: (state, value) => {
          const now = calculator.value(resolved, state);
          const old = state.get(x.name) ?? NaN;
          state.set(x.name, old * (value / now) ** (1 / exponent));
        },
      };
    }
    throw new RangeOutOfReach(
      'A range is set through a variable of the ensemble or a product of such.',
    );
  });
}

/** Extents are set before numbers. */
function rank(model: Model, x: SymbolNode): number {
  const role = model.surroundings.naturals.find(({ symbol }) => symbol === x)?.role;
  return role === 'extent' ? 0 : role === 'number' ? 2 : 1;
}

/** n where e is x^n times something without x. */
function exponentOf(e: Expression, x: SymbolNode): number | undefined {
  const factors: readonly Expression[] = e.kind === 'product' ? e.factors : [e];
  for (const factor of factors) {
    if (!dependsOn(factor, x)) continue;
    const isPower =
      factor.kind === 'power' && factor.base === x && factor.exponent.kind === 'number';
    const rest = divide(e, factor);
    if (dependsOn(rest, x)) return undefined;
    if (factor === x) return 1;
    return isPower && factor.exponent.kind === 'number'
      ? Q.toNumber(factor.exponent.value)
      : undefined;
  }
  return undefined;
}
