/** The values of properties at one state, in SI units. */
import type { Expression } from '../algebra/expression.ts';
import { NotDifferentiable } from '../algebra/differentiate.ts';
import * as Q from '../algebra/rational.ts';
import type { Diagnostic } from '../language/diagnostic.ts';
import { createCalculator } from './calculator.ts';
import { unitOf } from './catalogue/index.ts';
import type { Model } from './model.ts';
import { createNotation } from './notation.ts';
import { inWords } from './numbers.ts';
import { NoSuchDerivative } from './partialDerivative.ts';

export interface EvaluatedValue {
  readonly symbol: string;
  /** In coherent SI units. */
  readonly value: number;
  readonly unit: string;
}

export interface Evaluation {
  readonly diagnostics: readonly Diagnostic[];
  /** Empty where the state cannot be evaluated; a value is always a finite number. */
  readonly values: readonly EvaluatedValue[];
}

/**
 * Evaluates quantities of a model at a state: properties, reports, abbreviations, declared numbers
 * by their names; every property and report that exists where `quantities` is left out.
 *
 * `state` gives the natural variables and `overrides` other values of constants and parameters, all
 * in SI units. `valueOf` evaluates an expression in place of the calculation in doubles, with more
 * digits say. Faults are diagnostics: `missing-variable`, `unknown-name`, `outside-domain` with the
 * relation that does not hold, `outside-bounds` (a warning), `no-value`.
 */
export function evaluate(
  model: Model,
  state: Readonly<Record<string, number>>,
  overrides: Readonly<Record<string, number>> = {},
  quantities?: readonly string[],
  valueOf?: (e: Expression, values: ReadonlyMap<string, number>) => number,
): Evaluation {
  const { formulation } = model;
  const diagnostics: Diagnostic[] = [];
  const fault = (
    code: string,
    message: string,
    hint = '',
    severity: Diagnostic['severity'] = 'error',
  ): void => {
    // The fault is none of the text: it stands nowhere in it.
    const span = { start: 0, end: 0 };
    diagnostics.push({ code, severity, span, line: 0, column: 0, message, hint, repairs: [] });
  };

  const naturals = model.surroundings.naturals;
  for (const variable of naturals) {
    if (state[variable.name] !== undefined) continue;
    const unit = unitOf(variable.dimension);
    fault(
      'missing-variable',
      `The state lacks ${variable.name}.`,
      `Give ${variable.name} = …${unit === '1' ? '' : ` [${unit}]`}.`,
    );
  }
  const known = new Set(formulation.variables.map(({ name }) => name));
  for (const name of Object.keys(state)) {
    if (!known.has(name)) {
      fault(
        'unknown-name',
        `${name} is no natural variable of this formulation.`,
        `Its natural variables are ${naturals.map((v) => v.name).join(', ')}.`,
      );
    }
  }
  for (const [name, value] of Object.entries(overrides)) {
    const quantity = formulation.quantities.find((q) => q.name === name);
    if (!quantity) {
      fault(
        'unknown-name',
        `${name} is neither a constant nor a parameter of this formulation.`,
        `Declared are ${formulation.quantities.map((q) => q.name).join(', ')}.`,
      );
    } else if (
      quantity.bounds &&
      (value < Q.toNumber(quantity.bounds.lower) || value > Q.toNumber(quantity.bounds.upper))
    ) {
      fault(
        'outside-bounds',
        `${name} = ${inWords(value)} lies outside its bounds.`,
        '',
        'warning',
      );
    }
  }
  for (const [name, value] of [...Object.entries(state), ...Object.entries(overrides)]) {
    if (!Number.isFinite(value)) fault('no-value', `${name} needs a finite number.`);
  }
  if (diagnostics.some(({ severity }) => severity === 'error')) return { diagnostics, values: [] };

  const calculator = createCalculator(model, overrides);
  const notation = createNotation(formulation);
  const at = new Map(naturals.map(({ name }) => [name, state[name] ?? NaN]));
  const violated = calculator.violated(at);
  if (violated) {
    const { relation, left, right } = violated;
    fault(
      'outside-domain',
      `The state lies outside the domain of the formulation: ${notation.relationText(relation)} does not hold.`,
      `Here the left side is ${inWords(left)} and the right side ${inWords(right)} in SI units.`,
    );
    return { diagnostics, values: [] };
  }

  const values: EvaluatedValue[] = [];
  const isAll = quantities === undefined;
  const names = quantities ?? [
    ...model.entries.map((entry) => entry.symbol),
    ...formulation.reports.map((report) => report.name),
  ];
  for (const name of names) {
    try {
      const found = lookUp(model, name);
      if (!found) {
        fault(
          'unknown-name',
          `This model has no ${name}.`,
          `It has ${model.entries.map((entry) => entry.symbol).join(', ')}.`,
        );
        continue;
      }
      const value = valueOf
        ? valueOf(found.expression, calculator.valuesAt(at))
        : calculator.value(found.expression, at);
      if (Number.isFinite(value)) values.push({ symbol: name, value, unit: found.unit });
      else if (!isAll) fault('no-value', `${name} has no finite value at this state.`);
      else fault('no-value', `${name} has no finite value at this state.`, '', 'warning');
    } catch (error) {
      if (!(error instanceof NoSuchDerivative) && !(error instanceof NotDifferentiable))
        throw error;
      if (!isAll) fault('no-value', `This model has no ${name}: ${error.message}`);
    }
  }
  return { diagnostics, values };
}

function lookUp(model: Model, name: string): { expression: Expression; unit: string } | undefined {
  const entry = model.entry(name);
  if (entry) return { expression: model.worked(name).value, unit: unitOf(entry.dimension) };
  const { reports, abbreviations, quantities, molar } = model.formulation;
  const report = [...reports, ...molar].find((r) => r.name === name);
  if (report) {
    return { expression: model.resolve(report.expression), unit: unitOf(report.dimension) };
  }
  const named = abbreviations.find((a) => a.name === name);
  if (named) return { expression: named.expression, unit: unitOf(named.dimension) };
  const quantity = quantities.find((q) => q.name === name);
  return quantity && { expression: quantity.symbol, unit: unitOf(quantity.dimension) };
}
