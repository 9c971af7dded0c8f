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

/** Extensivity, the ideal limit, the third law, dependence on the natural variables. */
export function generalChecks(model: Model, calculator: Calculator): VerificationCheck[] {
  return [
    ...extensivity(model, calculator),
    ...idealLimit(model),
    ...thirdLaw(model),
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
  const isFluid = model.naturals.includes(extent as SymbolNode) && components.length > 0;
  if (!isFluid || !model.entry('Z')) return [];
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
function thirdLaw(model: Model): VerificationCheck[] {
  const { components, temperature } = model.surroundings;
  const x = temperature as SymbolNode;
  const isClassical = model.formulation.quantities.some(
    ({ dimension, symbol: s }) => equalDimensions(dimension, MASS) && symbolsOf(model.f).has(s),
  );
  if (isClassical || components.length === 0 || !model.naturals.includes(x)) return [];
  const title = 'third law, S tends to a constant as T → 0';
  const found = limitAt(model.worked('S').value, x, zero);
  if (!found) {
    return [{ kind: 'limit', title, status: 'undecided', detail: 'The limit was not found.' }];
  }
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
