/** States at which a formulation is tried out while it is read. */
import * as Q from '../algebra/rational.ts';
import type {
  DeclaredQuantity,
  NaturalConstant,
  NaturalVariable,
  OrderParameter,
} from './formulation.ts';

type Role = NaturalVariable['role'];

/** In SI units: ten molecules in a large box at a high temperature. */
const DILUTE: Readonly<Record<Role, number>> = {
  temperature: 1000,
  extent: 1e6,
  number: 10,
  'chemical potential': -1e-18,
  pressure: 1e-6,
  energy: 1e-19,
  field: 1,
};

/** Widely different states, so that what has no value at any of them has none at all. */
const TRIAL_STATES: readonly Readonly<Record<Role, number>>[] = [
  DILUTE,
  {
    temperature: 10,
    extent: 1e-3,
    number: 1e22,
    'chemical potential': -1e-16,
    pressure: 1e5,
    energy: 1e2,
    field: 0.01,
  },
  {
    temperature: 1e5,
    extent: 1e-9,
    number: 1e3,
    'chemical potential': -1e-20,
    pressure: 1e9,
    energy: 1e-12,
    field: -10,
  },
];

/** What has a number, or can be given one. */
export interface Known {
  readonly constants: readonly NaturalConstant[];
  readonly quantities: readonly DeclaredQuantity[];
  readonly orderParameters: readonly OrderParameter[];
  readonly variables: readonly NaturalVariable[];
}

/** The numbers behind the names that are no natural variables; order parameters in mid-range. */
function standingNumbers({ constants, quantities, orderParameters }: Known): Map<string, number> {
  const numbers = new Map<string, number>();
  for (const { name, value } of [...constants, ...quantities]) numbers.set(name, Q.toNumber(value));
  for (const { name, lower, upper } of orderParameters) {
    numbers.set(name, Q.toNumber(Q.divide(Q.add(lower, upper), Q.rational(2))));
  }
  return numbers;
}

function stateAt(known: Known, roles: Readonly<Record<Role, number>>): Map<string, number> {
  const state = standingNumbers(known);
  for (const { name, role } of known.variables) state.set(name, roles[role]);
  return state;
}

/** Values at which a dilute system exists, for the sign of denominators. */
export function diluteState(known: Known): Map<string, number> {
  return stateAt(known, DILUTE);
}

export function trialStates(known: Known): Map<string, number>[] {
  return TRIAL_STATES.map((roles) => stateAt(known, roles));
}
