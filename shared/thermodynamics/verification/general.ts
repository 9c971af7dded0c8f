/** Checks of a model as a whole. */
import { infinity, negate, one, zero } from '../../algebra/construct.ts';
import { limitAt } from '../../algebra/limit.ts';
import { equal } from '../../algebra/equality.ts';
import type { SymbolNode } from '../../algebra/expression.ts';
import { symbolsOf } from '../../algebra/traverse.ts';
import type { VerificationCheck } from '../../contracts/derivation.ts';
import { equalDimensions } from '../../units/dimension.ts';
import { MASS } from '../catalogue/dimensions.ts';
import type { Calculator } from '../calculator.ts';
import { homogeneityAt } from '../extensivity.ts';
import type { Model } from '../model.ts';
import { drawState, seededNumbers } from '../sampling.ts';
import { preciseValue } from './preciseValue.ts';

/** Extensivity, the ideal limit, the third law, dependence on the natural variables. */
export function generalChecks(model: Model, calculator: Calculator): VerificationCheck[] {
  return [
    ...extensivity(model, calculator),
    ...idealLimit(model),
    ...thirdLaw(model, calculator),
    dependence(model),
  ];
}

function extensivity(model: Model, calculator: Calculator): VerificationCheck[] {
  const { verdict, method } = homogeneityAt(model, calculator);
  return [
    {
      kind: 'extensivity',
      title: 'ln of the partition function is of degree one in the sizes',
      status:
        verdict === 'extensive' ? 'passed' : verdict === 'not extensive' ? 'failed' : 'undecided',
      detail: method,
    },
  ];
}

/** p V/(N k T) → 1 as V → ∞, where there is a V. */
function idealLimit(model: Model): VerificationCheck[] {
  const { extent, extentName, components } = model.surroundings;
  const isClosed = components.some(({ number }) => model.naturals.includes(number as SymbolNode));
  if (!isClosed || !model.naturals.includes(extent as SymbolNode) || !model.entry('Z')) return [];
  const title = `ideal when dilute, Z → 1 as ${extentName} → ∞`;
  const found = limitAt(model.worked('Z').value, extent as SymbolNode, infinity);
  if (!found) {
    return [{ kind: 'limit', title, status: 'undecided', detail: 'The limit was not found.' }];
  }
  const isOne = found === one || equal(found, one) === 'equal';
  return [
    {
      kind: 'limit',
      title,
      status: isOne ? 'passed' : 'failed',
      detail: isOne ? 'Decided by limit.' : 'The limit is another.',
    },
  ];
}

/**
 * S/(N k) → 0 as T → 0. Classical translation ends in −∞ there by its nature, so the check is for
 * models without a thermal wavelength.
 */
function thirdLaw(model: Model, calculator: Calculator): VerificationCheck[] {
  const { components, temperature } = model.surroundings;
  const x = temperature as SymbolNode;
  const isClassical = model.formulation.quantities.some(
    ({ dimension, symbol: s }) => equalDimensions(dimension, MASS) && symbolsOf(model.f).has(s),
  );
  if (isClassical || components.length === 0 || !model.naturals.includes(x)) return [];
  const title = 'third law, S tends to a constant as T → 0';
  const found = limitAt(model.worked('S').value, x, zero);
  if (!found) return [{ kind: 'limit', title, ...settlesAtZero(model, calculator, x) }];
  const isFinite = found !== infinity && found !== negate(infinity);
  return [
    {
      kind: 'limit',
      title,
      status: isFinite ? 'passed' : 'failed',
      detail:
        found === zero ? 'S tends to 0.' : isFinite ? 'S tends to a constant.' : 'S diverges.',
    },
  ];
}

/** Temperatures in kelvin, down to where nothing of this trade is thermally excited. */
const COOLING = [1, 0.1, 0.01, 0.001];

/** Whether S stops changing on the way to T = 0, from values. */
function settlesAtZero(
  model: Model,
  calculator: Calculator,
  x: SymbolNode,
): Pick<VerificationCheck, 'status' | 'detail'> {
  const entropy = model.worked('S').value;
  const state = drawState(model, seededNumbers(SEED));
  const values = COOLING.map((t) =>
    preciseValue(entropy, calculator.valuesAt(new Map(state).set(x.name, t))),
  );
  const [last, previous] = [values.at(-1) ?? NaN, values.at(-2) ?? NaN];
  if (!Number.isFinite(last) || !Number.isFinite(previous)) {
    return { status: 'undecided', detail: 'The limit was not found.' };
  }
  const size = Math.abs(preciseValue(entropy, calculator.valuesAt(state)));
  const settles = Math.abs(last - previous) <= 1e-6 * size;
  return settles
    ? { status: 'passed', detail: 'Found by extrapolation from 1 K to 1 mK.' }
    : { status: 'undecided', detail: 'S still changes at 1 mK.' };
}

const SEED = 3_571;

function dependence(model: Model): VerificationCheck {
  const absent = model.formulation.variables.filter(({ symbol: s }) => !model.naturals.includes(s));
  return {
    kind: 'dependence',
    title: 'dependence on the natural variables',
    status: 'passed',
    detail:
      absent.length === 0
        ? 'Depends on every one.'
        : `Does not depend on ${absent.map(({ name }) => name).join(', ')}: what would follow from it is left out.`,
  };
}
