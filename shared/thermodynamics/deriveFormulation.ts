/** From a checked formulation to everything that follows from it, as plain JSON. */
import { BudgetExceeded, withBudget } from '../algebra/budget.ts';
import { zero } from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import { NotDifferentiable } from '../algebra/differentiate.ts';
import * as Q from '../algebra/rational.ts';
import type { Derivation, DerivedProperty } from '../contracts/derivation.ts';
import type { Diagnostic } from '../language/diagnostic.ts';
import type { DeclaredQuantity, Formulation } from '../language/formulation.ts';
import { createCalculator } from './calculator.ts';
import { unitOf, unitPerMole, type Entry } from './catalogue/index.ts';
import { decideClaim } from './claims/decide.ts';
import { groupTerms } from './contributions.ts';
import { findings } from './findings.ts';
import { formsOf, inForm, perMole, type Form } from './forms.ts';
import { createModel, type Model } from './model.ts';
import { createNotation, type Notation } from './notation.ts';
import { notesOf } from './notes.ts';
import { constantNumbersOf } from './numbers.ts';
import { NoSuchDerivative } from './partialDerivative.ts';
import { reportProperty } from './reports.ts';
import { trailOf } from './trail.ts';

export interface DeriveOptions {
  /** Called with what is being done and the fraction done, from 0 to 1. */
  readonly onProgress?: (stage: string, fraction: number) => void;
  /**
   * Formulas and claims alone, without forms, contributions, trails and notes: what is shown while
   * somebody types.
   */
  readonly isBrief?: boolean;
  /** Only these properties, by symbol; all without it. */
  readonly properties?: readonly string[];
}

export interface Derived {
  readonly diagnostics: readonly Diagnostic[];
  /** Undefined where the formulation is at fault. */
  readonly derivation: Derivation | undefined;
  /** For `verify` and `evaluate`; undefined where the formulation is at fault. */
  readonly model: Model | undefined;
}

/** The steps of work a derivation may take; the largest models of the bench need a thousandth. */
const STEPS = 30_000_000;

/**
 * Derives every property of a checked formulation; `source` is its text, for lines and columns.
 * Never throws for what an author wrote.
 */
export function deriveFormulation(
  formulation: Formulation,
  source: string,
  options: DeriveOptions = {},
): Derived {
  const lineOf = (position: number): number => source.slice(0, position).split('\n').length;
  const at = (
    code: string,
    severity: Diagnostic['severity'],
    message: string,
    hint: string,
  ): Diagnostic => {
    const { span } = formulation;
    const line = lineOf(span.start);
    const column = span.start - (source.lastIndexOf('\n', span.start - 1) + 1) + 1;
    return { code, severity, span, line, column, message, hint, repairs: [] };
  };
  if (formulation.orderParameters.length > 0) {
    const [order] = formulation.orderParameters;
    return {
      diagnostics: [
        at(
          'not-yet',
          'error',
          `Properties of models with an order parameter (${order?.name ?? ''}) are not derived yet.`,
          'State ln of the partition function without it, at its stationary value.',
        ),
      ],
      derivation: undefined,
      model: undefined,
    };
  }
  let stage = 'ln of the partition function';
  try {
    return withBudget(STEPS, () => {
      const model = createModel(formulation);
      const derivation = assemble(model, lineOf, options, (what) => (stage = what));
      return { diagnostics: findings(model, at), derivation, model };
    });
  } catch (fault) {
    if (fault instanceof BudgetExceeded) {
      return {
        diagnostics: [
          at(
            'too-large',
            'error',
            `The work for ${stage} grew too large to finish${fault.what === '' ? '' : ` (${fault.what})`}.`,
            'Give parts of the formulation names of their own with let, or write powers and products unexpanded.',
          ),
        ],
        derivation: undefined,
        model: undefined,
      };
    }
    if (fault instanceof RangeError) {
      return {
        diagnostics: [
          at(
            'no-value',
            'error',
            `${stage} divides by what is always zero, or is nested too deeply.`,
            'Look for a difference that cancels.',
          ),
        ],
        derivation: undefined,
        model: undefined,
      };
    }
    throw fault;
  }
}

function assemble(
  model: Model,
  lineOf: (position: number) => number,
  { onProgress, properties: wanted, isBrief = false }: DeriveOptions,
  enter: (stage: string) => void,
): Derivation {
  const { formulation, surroundings } = model;
  const notation = createNotation(formulation);
  const calculator = createCalculator(model);
  const about = isBrief ? undefined : aboutProperties(model, notation);

  const chosen = model.entries.filter(({ symbol: s }) => !wanted || wanted.includes(s));
  const properties: DerivedProperty[] = [];
  const absent: { symbol: string; reason: string }[] = [];
  chosen.forEach((entry, i) => {
    enter(entry.symbol);
    onProgress?.(`deriving ${entry.symbol}`, (0.9 * i) / chosen.length);
    try {
      properties.push(deriveProperty(model, entry, about, notation));
    } catch (fault) {
      if (fault instanceof NoSuchDerivative) {
        absent.push({ symbol: entry.symbol, reason: fault.message });
      } else if (fault instanceof NotDifferentiable) {
        absent.push({
          symbol: entry.symbol,
          reason: `There is no closed form of ${fault.message}.`,
        });
      } else {
        throw fault;
      }
    }
  });
  for (const report of formulation.reports) {
    if (wanted && !wanted.includes(report.name)) continue;
    enter(report.name);
    const derived = reportProperty(model, report, notation);
    if (typeof derived === 'string') absent.push({ symbol: report.name, reason: derived });
    else properties.push(derived);
  }
  onProgress?.('deciding the claims', 0.9);
  const claims = formulation.claims.map((claim) => {
    enter(`the claim “${claim.title}”`);
    return decideClaim(model, claim, calculator, notation, lineOf);
  });
  onProgress?.('derived', 1);
  return {
    title: formulation.title,
    ensemble: formulation.ensemble,
    lnPartitionFunction: {
      symbolTex: notation.tex(surroundings.lnFunction),
      tex: notation.tex(model.f),
      text: notation.text(model.f),
      tree: notation.json(model.f),
    },
    variables: formulation.variables.map(({ name, role, symbol, dimension, description }) => ({
      name,
      tex: notation.tex(symbol),
      role,
      unit: unitOf(dimension),
      description,
    })),
    quantities: formulation.quantities.map((quantity) => viewOf(quantity, notation)),
    values: Object.fromEntries(constantNumbersOf(formulation)),
    domain: formulation.domain.map((relation) => ({
      tex: notation.relationTex(relation),
      text: notation.relationText(relation),
    })),
    properties,
    claims,
    absent,
  };
}

interface Group {
  readonly label: string;
  readonly share: Model;
}

/** What stands beside the formulas, made once for all of them. */
interface About {
  readonly forms: readonly Form[];
  readonly groups: readonly Group[];
}

function aboutProperties(model: Model, notation: Notation): About {
  const { formulation, surroundings } = model;
  return {
    forms: model.isExtensive() ? formsOf(model) : [],
    groups: groupTerms(formulation, surroundings, notation).map(({ label, f }) => ({
      label,
      share: createModel(formulation, { f, surroundings, shorten: (e) => e }),
    })),
  };
}

function deriveProperty(
  model: Model,
  entry: Entry,
  about: About | undefined,
  notation: Notation,
): DerivedProperty {
  const { value } = model.worked(entry.symbol);
  const name = notation.nameOf(entry.symbol);
  return {
    symbol: entry.symbol,
    symbolTex: notation.tex(name),
    name: entry.name,
    unit: unitOf(entry.dimension),
    definitionTex: notation.definitionTex(entry.definition),
    tex: notation.tex(value),
    text: notation.text(value),
    tree: notation.json(value),
    forms: about ? about.forms.map((form) => formOf(entry, value, form, notation)) : [],
    contributions:
      about && entry.isLinear ? contributionsTo(model, entry, about.groups, notation) : [],
    steps: about ? trailOf(model, entry, notation) : [],
    notes: about ? notesOf(model, entry, value, notation) : [],
  };
}

function formOf(
  entry: Entry,
  value: Expression,
  form: Form,
  notation: Notation,
): DerivedProperty['forms'][number] {
  const name = notation.nameOf(entry.symbol);
  const isMolar = form.form === 'molar';
  const isOfMolecule = isMolar && entry.isPerMolecule === true;
  const inside = inForm(value, form, isOfMolecule ? perMole : undefined);
  const isPerAmount = entry.isExtensive || isOfMolecule;
  return {
    form: form.form,
    symbolTex: entry.isExtensive
      ? notation.perAmountTex(name, form.form)
      : isOfMolecule
        ? notation.timesAvogadroTex(name)
        : notation.tex(name),
    unit: isMolar && isPerAmount ? unitPerMole(entry.dimension) : unitOf(entry.dimension),
    tex: notation.formTex(inside),
    text: notation.formText(inside),
  };
}

function contributionsTo(
  model: Model,
  entry: Entry,
  groups: readonly Group[],
  notation: Notation,
): DerivedProperty['contributions'] {
  return groups.flatMap(({ label, share }) => {
    const part = model.simplify(share.worked(entry.symbol).raw);
    if (part === zero) return [];
    return [
      { label, tex: notation.tex(part), text: notation.text(part), tree: notation.json(part) },
    ];
  });
}

function viewOf(quantity: DeclaredQuantity, notation: Notation): Derivation['quantities'][number] {
  const inUnit = (value: Q.Rational): number => Q.toNumber(Q.divide(value, quantity.unitFactor));
  return {
    kind: quantity.kind,
    name: quantity.name,
    tex: notation.tex(quantity.symbol),
    unit: quantity.unit,
    value: inUnit(quantity.value),
    uncertainty: quantity.uncertainty ? inUnit(quantity.uncertainty) : null,
    lower: quantity.bounds ? inUnit(quantity.bounds.lower) : null,
    upper: quantity.bounds ? inUnit(quantity.bounds.upper) : null,
    unitFactor: Q.toNumber(quantity.unitFactor),
    description: quantity.description,
    valueSpan: quantity.valueSpan,
  };
}
