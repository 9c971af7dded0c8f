/** The identities of a model decided by algebra, else at random states. */
import { BudgetExceeded, withBudget } from '../../algebra/budget.ts';
import { NotDifferentiable } from '../../algebra/differentiate.ts';
import type { VerificationCheck } from '../../contracts/derivation.ts';
import type { Calculator } from '../calculator.ts';
import type { Entry } from '../catalogue/index.ts';
import { decideEquality } from '../claims/decide.ts';
import type { Model } from '../model.ts';
import { NoSuchDerivative } from '../partialDerivative.ts';
import { identitiesFor, type Identity } from './identities.ts';

const STEPS = 5_000_000;

/** The identities that speak of an entry, each with its outcome. */
export function checkIdentities(
  model: Model,
  isExtensive: boolean,
  calculator: Calculator,
  onProgress: (done: number) => void,
): (entry: Entry) => VerificationCheck[] {
  const identities = identitiesFor(model, isExtensive);
  const outcomes = identities.map((identity, i) => {
    onProgress(i / identities.length);
    return { identity, check: decide(model, identity, calculator) };
  });
  return (entry) =>
    outcomes.filter(({ identity }) => identity.of.includes(entry.symbol)).map(({ check }) => check);
}

function decide(model: Model, identity: Identity, calculator: Calculator): VerificationCheck {
  const report = (status: VerificationCheck['status'], detail: string): VerificationCheck => ({
    kind: 'identity',
    title: identity.title,
    status,
    detail,
  });
  try {
    return withBudget(STEPS, () => {
      const { status, method, detail } = decideEquality(
        model,
        model.resolveDefinition(identity.left),
        model.resolveDefinition(identity.right),
        calculator,
      );
      return report(status, [method === '' ? '' : `Decided ${method}.`, detail].join(' ').trim());
    });
  } catch (fault) {
    if (fault instanceof NoSuchDerivative || fault instanceof NotDifferentiable) {
      return report('undecided', `Not decided: ${fault.message}`);
    }
    if (fault instanceof BudgetExceeded) {
      return report('undecided', 'Not decided: the expressions are too large.');
    }
    throw fault;
  }
}
