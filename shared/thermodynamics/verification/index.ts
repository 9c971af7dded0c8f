/**
 * The verification of a model: every derived property against an independent library, against
 * numerical derivatives to many digits, against the identities that must hold and by its dimension;
 * and checks of the model as a whole. What could not be decided is said so, never passed.
 *
 * The independent library is imported here and nowhere else, so that whoever only derives does not
 * carry it.
 */
import { BudgetExceeded, withBudget } from '../../algebra/budget.ts';
import type {
  CheckStatus,
  PropertyVerification,
  Verification,
  VerificationCheck,
} from '../../contracts/derivation.ts';
import { isCostly } from '../../numerics/index.ts';
import { createCalculator } from '../calculator.ts';
import type { Entry } from '../catalogue/index.ts';
import { homogeneityOf } from '../homogeneity.ts';
import type { Model } from '../model.ts';
import { NoSuchDerivative } from '../partialDerivative.ts';
import { drawState, seededNumbers, type State } from '../sampling.ts';
import { dimensionChecks } from './dimensions.ts';
import { generalChecks } from './general.ts';
import { checkIdentities } from './checkIdentities.ts';
import { secondOpinion } from './secondOpinion.ts';
import { numericalDerivatives } from './numericalDerivative.ts';

export interface VerifyOptions {
  /** Called with what is being checked and the fraction done, from 0 to 1. */
  readonly onProgress?: (stage: string, fraction: number) => void;
}

/** At how many states values are compared. */
const STATES = 8;
const SEED = 7_919;
const STEPS = 20_000_000;

/** Verifies every property of the model that exists. The same model gives the same result. */
export function verify(model: Model, { onProgress }: VerifyOptions = {}): Verification {
  const say = onProgress ?? (() => undefined);
  const calculator = createCalculator(model);
  const states = statesOf(model, (state) => calculator.isInDomain(state));
  const entries = model.entries.filter((entry) => isWorked(model, entry));

  say('taking the derivatives again', 0);
  const opinions = secondOpinion(model, entries, states);
  say('differentiating ln Q numerically', 0.2);
  const numerical = numericalDerivatives(model, entries, states, (done) =>
    say('differentiating ln Q numerically', 0.2 + 0.4 * done),
  );
  say('checking identities', 0.6);
  const isExtensive = homogeneityOf(model) === 'extensive';
  const identities = checkIdentities(model, isExtensive, calculator, (done) =>
    say('checking identities', 0.6 + 0.3 * done),
  );
  say('checking dimensions and limits', 0.9);
  const dimensions = dimensionChecks(model, states.slice(0, isCostly(model.f) ? 1 : 3));
  const properties: PropertyVerification[] = entries.map((entry) => {
    const checks = [opinions(entry), numerical(entry), ...identities(entry), dimensions(entry)];
    return { symbol: entry.symbol, status: overall(checks), checks };
  });
  const general = within(() => generalChecks(model, calculator)) ?? [];
  say('verified', 1);
  return {
    properties,
    general,
    status: overall([...properties, ...general]),
  };
}

/** Failed where one failed, else undecided where one is undecided. */
function overall(checks: readonly { readonly status: CheckStatus }[]): CheckStatus {
  if (checks.some(({ status }) => status === 'failed')) return 'failed';
  return checks.some(({ status }) => status === 'undecided') ? 'undecided' : 'passed';
}

function isWorked(model: Model, entry: Entry): boolean {
  try {
    withBudget(STEPS, () => model.worked(entry.symbol));
    return true;
  } catch (fault) {
    if (fault instanceof NoSuchDerivative || fault instanceof BudgetExceeded) return false;
    throw fault;
  }
}

function within(work: () => VerificationCheck[]): VerificationCheck[] | undefined {
  try {
    return withBudget(STEPS, work);
  } catch (fault) {
    if (fault instanceof BudgetExceeded) return undefined;
    throw fault;
  }
}

/** Up to eight random states inside the domain, the same for the same model. */
function statesOf(model: Model, isInDomain: (state: State) => boolean): State[] {
  const next = seededNumbers(SEED);
  const states: State[] = [];
  for (let i = 0; i < 4000 && states.length < STATES; i++) {
    const state = drawState(model, next);
    if (isInDomain(state)) states.push(state);
  }
  return states;
}
