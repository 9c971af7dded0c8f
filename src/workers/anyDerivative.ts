/** Any partial derivative of properties of a formulation, worked out on demand. */
import { BudgetExceeded, withBudget } from '../../shared/algebra/budget.ts';
import { NotDifferentiable } from '../../shared/algebra/differentiate.ts';
import { analyse, parseExpressionFor } from '../../shared/language/index.ts';
import { createModel, NoSuchDerivative, unitOf } from '../../shared/thermodynamics/index.ts';
import { createNotation } from '../../shared/thermodynamics/notation.ts';

/** (∂of/∂by) with all of `held` constant; names as in the language. */
export interface DerivativeQuestion {
  readonly of: string;
  readonly by: string;
  readonly held: readonly string[];
}

export type DerivativeAnswer =
  | {
      readonly kind: 'found';
      readonly tex: string;
      readonly text: string;
      /** Coherent SI unit; `1` for a number. */
      readonly unit: string;
      readonly tree: unknown;
    }
  | { readonly kind: 'none'; readonly why: string };

/** Steps of work after which a derivative is given up. */
const STEPS = 10_000_000;

/** Works the derivative out. Never throws for what was asked; `why` is a sentence. */
export function answerDerivative(
  source: string,
  { of, by, held }: DerivativeQuestion,
): DerivativeAnswer {
  const { formulation } = analyse(source);
  if (!formulation) return { kind: 'none', why: 'The formulation is at fault.' };
  const asked = `partial(${of}, ${by}; ${held.join(', ')})`;
  const { statement, diagnostics } = parseExpressionFor(formulation, asked);
  if (statement?.kind !== 'expression') {
    return { kind: 'none', why: diagnostics[0]?.message ?? 'There is no such derivative.' };
  }
  try {
    return withBudget(STEPS, () => {
      const model = createModel(formulation);
      const notation = createNotation(formulation);
      const value = model.simplify(model.resolve(statement.expression));
      return {
        kind: 'found',
        tex: notation.tex(value),
        text: notation.text(value),
        unit: unitOf(statement.dimension),
        tree: notation.json(value),
      };
    });
  } catch (fault) {
    if (fault instanceof NoSuchDerivative) return { kind: 'none', why: fault.message };
    if (fault instanceof NotDifferentiable) {
      return { kind: 'none', why: `There is no closed form of ${fault.message}.` };
    }
    if (fault instanceof BudgetExceeded) {
      return { kind: 'none', why: 'It grew too large to finish.' };
    }
    if (fault instanceof RangeError) {
      return { kind: 'none', why: 'It divides by what is always zero.' };
    }
    throw fault;
  }
}
