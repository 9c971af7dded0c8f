/** A quantity of the author's own, shown among the derived properties. */
import { NotDifferentiable } from '../algebra/differentiate.ts';
import type { DerivedProperty } from '../contracts/derivation.ts';
import type { Report } from '../language/formulation.ts';
import { unitOf } from './catalogue/index.ts';
import type { Model } from './model.ts';
import type { Notation } from './notation.ts';
import { NoSuchDerivative } from './partialDerivative.ts';

/** The report worked out, or a sentence on why it cannot be. */
export function reportProperty(
  model: Model,
  report: Report,
  notation: Notation,
): DerivedProperty | string {
  try {
    const value = model.simplify(model.resolve(report.expression));
    const symbolTex = notation.tex(notation.nameOf(report.name));
    const definitionTex = notation.tex(report.expression);
    const tex = notation.tex(value);
    return {
      symbol: report.name,
      symbolTex,
      name: report.description === '' ? 'report' : report.description,
      unit: unitOf(report.dimension),
      definitionTex,
      tex,
      text: notation.text(value),
      tree: notation.json(value),
      forms: [],
      contributions: [],
      steps: [
        { rule: 'definition', tex: `${symbolTex} = ${definitionTex}` },
        ...(tex === definitionTex ? [] : [{ rule: 'substituted', tex: `${symbolTex} = ${tex}` }]),
      ],
      notes: [],
    };
  } catch (fault) {
    if (fault instanceof NoSuchDerivative || fault instanceof NotDifferentiable)
      return fault.message;
    throw fault;
  }
}
