/** What is to be warned of once a formulation derives. */
import type { Diagnostic } from '../language/diagnostic.ts';
import { createCalculator } from './calculator.ts';
import { homogeneityAt } from './extensivity.ts';
import { extensiveVariables, withFactorials } from './homogeneity.ts';
import type { Model } from './model.ts';

type At = (
  code: string,
  severity: Diagnostic['severity'],
  message: string,
  hint: string,
) => Diagnostic;

/** The warnings of a sound model: not extensive, no dependence on a natural variable. */
export function findings(model: Model, at: At): Diagnostic[] {
  return [...extensivity(model, at), ...dependence(model, at)];
}

function extensivity(model: Model, at: At): Diagnostic[] {
  const calculator = createCalculator(model);
  if (model.isExtensive()) return [];
  const { verdict } = homogeneityAt(model, calculator);
  if (verdict !== 'not extensive') return [];
  const name = model.formulation.partitionFunction;
  const symbolsOfSize = extensiveVariables(model)
    .map((variable) => variable.name)
    .join(', ');
  const isMissingFactorial =
    model.surroundings.components.length > 0 &&
    model.formulation.ensemble !== 'grand canonical' &&
    homogeneityAt(model, calculator, withFactorials(model)).verdict === 'extensive';
  const factorials = model.surroundings.components
    .map(({ numberName }) => `${numberName}!`)
    .join(' ');
  return [
    at(
      'not-extensive',
      'warning',
      `ln ${name} does not double when the system does: it is not homogeneous of degree one in ${symbolsOfSize}.` +
        (isMissingFactorial ? ` Dividing ${name} by ${factorials} would make it so.` : ''),
      isMissingFactorial
        ? `If the molecules are indistinguishable, write ${name} = … / ${factorials}.`
        : 'Look for a size that enters other than as a density or a factor.',
    ),
  ];
}

function dependence(model: Model, at: At): Diagnostic[] {
  return model.formulation.variables
    .filter(({ symbol }) => !model.naturals.includes(symbol))
    .map((variable) =>
      at(
        'no-dependence',
        // A solid without V is a sound model, one without T is hardly meant.
        variable.role === 'temperature' ? 'warning' : 'information',
        `ln ${model.formulation.partitionFunction} does not depend on ${variable.name}; what would follow from it is left out.`,
        '',
      ),
    );
}
