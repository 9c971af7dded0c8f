/** Whether a claim holds, by what method that was found, and where it does not. */
import { infinity, negate, subtract } from '../../algebra/construct.ts';
import { equal } from '../../algebra/equality.ts';
import type { Expression, Relation } from '../../algebra/expression.ts';
import { limitAt } from '../../algebra/limit.ts';
import * as Q from '../../algebra/rational.ts';
import { BudgetExceeded } from '../../algebra/budget.ts';
import { NotDifferentiable } from '../../algebra/differentiate.ts';
import type { CheckStatus, ClaimResult } from '../../contracts/derivation.ts';
import type { Claim } from '../../language/formulation.ts';
import { BASE_UNITS } from '../../units/dimension.ts';
import { holds, type Calculator } from '../calculator.ts';
import { unitOf } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import type { Notation } from '../notation.ts';
import { inWords } from '../numbers.ts';
import { NoSuchDerivative } from '../partialDerivative.ts';
import { drawState, seededNumbers, type State } from '../sampling.ts';
import { RangeOutOfReach, stateGenerator } from './states.ts';

interface Verdict {
  readonly status: CheckStatus;
  readonly method: string;
  readonly detail: string;
}

/** How many states an inequality is tried at. */
const STATES_OF_RANGE = 4096;
/** How many states an equality is tried at where it cannot be decided by algebra. */
const STATES_OF_EQUALITY = 64;
const TOLERANCE = 1e-9;
const SEED = 20_240;

/** Decides one claim; `lineOf` gives the line of a position in the source. */
export function decideClaim(
  model: Model,
  claim: Claim,
  calculator: Calculator,
  notation: Notation,
  lineOf: (position: number) => number,
): ClaimResult {
  return {
    title: claim.title,
    text: claim.text,
    line: lineOf(claim.span.start),
    ...verdictOf(model, claim, calculator, notation),
  };
}

function verdictOf(
  model: Model,
  claim: Claim,
  calculator: Calculator,
  notation: Notation,
): Verdict {
  try {
    switch (claim.kind) {
      case 'equality':
        return decideEquality(model, claim.left, claim.right, calculator);
      case 'limit':
        return decideLimit(model, claim, calculator, notation);
      case 'inequality':
        return decideInequality(model, claim, calculator, notation);
    }
  } catch (fault) {
    if (
      fault instanceof NoSuchDerivative ||
      fault instanceof NotDifferentiable ||
      fault instanceof RangeOutOfReach
    ) {
      return { status: 'undecided', method: '', detail: sentence(fault.message) };
    }
    if (fault instanceof BudgetExceeded || fault instanceof RangeError) {
      return { status: 'undecided', method: '', detail: 'The claim is too large to be decided.' };
    }
    throw fault;
  }
}

function sentence(text: string): string {
  const whole = text.charAt(0).toUpperCase() + text.slice(1);
  return whole.endsWith('.') ? whole : `${whole}.`;
}

/** left = right over the whole domain: by algebra, else at random states. */
export function decideEquality(
  model: Model,
  left: Expression,
  right: Expression,
  calculator: Calculator,
): Verdict {
  const a = model.resolve(left);
  const b = model.resolve(right);
  const symbolic = equal(a, b);
  if (symbolic === 'equal') return { status: 'passed', method: 'symbolically', detail: '' };
  const numerical = compareAtStates(model, a, b, calculator);
  if (symbolic === 'different') {
    return {
      status: 'failed',
      method: 'symbolically',
      detail: numerical.status === 'failed' ? numerical.detail : 'The two sides differ.',
    };
  }
  return numerical;
}

function compareAtStates(
  model: Model,
  a: Expression,
  b: Expression,
  calculator: Calculator,
): Verdict {
  const next = seededNumbers(SEED);
  let tried = 0;
  for (let i = 0; tried < STATES_OF_EQUALITY && i < 40 * STATES_OF_EQUALITY; i++) {
    const state = drawState(model, next);
    if (!calculator.isInDomain(state)) continue;
    const left = calculator.value(a, state);
    const right = calculator.value(b, state);
    if (!Number.isFinite(left) || !Number.isFinite(right)) continue;
    tried++;
    const scale = Math.max(Math.abs(left), Math.abs(right));
    if (Math.abs(left - right) > TOLERANCE * scale) {
      return {
        status: 'failed',
        method: `numerically at ${tried} ${tried === 1 ? 'state' : 'states'}`,
        detail: `The left side is ${inWords(left)}, the right side ${inWords(right)} at ${describe(model, state)}.`,
      };
    }
  }
  if (tried === 0) {
    return {
      status: 'undecided',
      method: '',
      detail: 'No state inside the domain was found to try it at.',
    };
  }
  return {
    status: 'passed',
    method: `numerically at ${tried} states`,
    detail: `Not decided by algebra; equal to 9 digits at ${tried} random states of the domain.`,
  };
}

/** `T = 300 K, V = 0.0224 m^3`, in SI units. */
export function describe(model: Model, state: State): string {
  return model.surroundings.naturals
    .map(({ name, dimension }) => {
      const unit = unitOf(dimension.length === BASE_UNITS.length ? dimension : []);
      return `${name} = ${inWords(state.get(name) ?? NaN)}${unit === '1' ? '' : ` ${unit}`}`;
    })
    .join(', ');
}

function decideLimit(
  model: Model,
  claim: Extract<Claim, { kind: 'limit' }>,
  calculator: Calculator,
  notation: Notation,
): Verdict {
  const of = model.resolve(claim.of);
  const value = model.resolve(claim.value);
  const found = limitAt(of, claim.variable, claim.towards);
  if (found) {
    const verdict = found === value ? 'equal' : equal(found, value);
    if (verdict === 'equal') return { status: 'passed', method: 'by limit', detail: '' };
    const isInfinite = found === infinity || found === negate(infinity);
    if (verdict === 'different' || isInfinite) {
      return {
        status: 'failed',
        method: 'by limit',
        detail: `The limit is ${notation.text(found)}.`,
      };
    }
  }
  return extrapolate(model, claim, of, value, calculator);
}

/** Steps towards the place, each a tenth of the way that is left. */
const STEPS = 12;

function extrapolate(
  model: Model,
  claim: Extract<Claim, { kind: 'limit' }>,
  of: Expression,
  value: Expression,
  calculator: Calculator,
): Verdict {
  const next = seededNumbers(SEED);
  const name = claim.variable.name;
  for (let i = 0; i < 200; i++) {
    const state = drawState(model, next);
    const start = state.get(name);
    if (start === undefined || !calculator.isInDomain(state)) continue;
    const distances: number[] = [];
    for (let step = 0; step < STEPS; step++) {
      const place = placeOf(claim.towards, start, step, state, calculator);
      const there = new Map(state).set(name, place);
      const wanted = calculator.value(value, there);
      const distance =
        Math.abs(calculator.value(of, there) - wanted) / Math.max(1e-300, Math.abs(wanted) || 1);
      if (Number.isFinite(distance)) distances.push(distance);
    }
    const last = distances.at(-1);
    const first = distances[0];
    if (last === undefined || first === undefined || distances.length < STEPS / 2) continue;
    const method = 'by extrapolation';
    if (Math.min(...distances.slice(-4)) < 1e-6) {
      return {
        status: 'passed',
        method,
        detail: 'Not decided by algebra; approached to 6 digits in steps of ten.',
      };
    }
    return {
      status: last < first / 10 ? 'undecided' : 'failed',
      method,
      detail: `The distance from the value is ${inWords(last)} of it after ${distances.length} steps.`,
    };
  }
  return {
    status: 'undecided',
    method: '',
    detail: 'No state inside the domain was found to start from.',
  };
}

function placeOf(
  towards: Expression,
  start: number,
  step: number,
  state: State,
  calculator: Calculator,
): number {
  if (towards === infinity) return Math.abs(start) * 10 ** step;
  if (towards === negate(infinity)) return -Math.abs(start) * 10 ** step;
  const end = calculator.value(towards, state);
  return end + (start - end) * 10 ** -step;
}

function decideInequality(
  model: Model,
  claim: Extract<Claim, { kind: 'inequality' }>,
  calculator: Calculator,
  notation: Notation,
): Verdict {
  const { sign } = claim.relation;
  const relation: Relation = {
    left: model.resolve(claim.relation.left),
    sign,
    right: model.resolve(claim.relation.right),
  };
  const difference = subtract(relation.left, relation.right);
  if (difference.kind === 'number') {
    const isTrue = holds(Q.toNumber(difference.value), sign, 0);
    return { status: isTrue ? 'passed' : 'failed', method: 'symbolically', detail: '' };
  }
  const stateAt = stateGenerator(model, claim.ranges, calculator);
  let tried = 0;
  let outside = 0;
  let without = 0;
  for (let i = 1; i <= STATES_OF_RANGE; i++) {
    const state = stateAt(i);
    if (!calculator.isInDomain(state)) {
      outside++;
      continue;
    }
    const left = calculator.value(relation.left, state);
    const right = calculator.value(relation.right, state);
    if (Number.isNaN(left) || Number.isNaN(right)) {
      without++;
      continue;
    }
    tried++;
    if (!holds(left, sign, right)) {
      return {
        status: 'failed',
        method: `at ${tried} ${tried === 1 ? 'state' : 'states'}`,
        detail: `${notation.text(claim.relation.left)} is ${inWords(left)} at ${describe(model, state)}.`,
      };
    }
  }
  if (tried === 0) {
    return {
      status: 'undecided',
      method: '',
      detail: 'No state of the ranges lies inside the domain.',
    };
  }
  const remarks = [
    ...(outside > 0 ? [`${outside} states of the ranges lie outside the domain`] : []),
    ...(without > 0 ? [`at ${without} states there was no value`] : []),
  ];
  return {
    status: without > 0 ? 'undecided' : 'passed',
    method: `at ${tried} states`,
    detail: remarks.length > 0 ? sentence(remarks.join('; ')) : '',
  };
}
