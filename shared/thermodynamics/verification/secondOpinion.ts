/** Every property from derivatives that an independent library took. */
import { NotDifferentiable } from '../../algebra/differentiate.ts';
import type { VerificationCheck } from '../../contracts/derivation.ts';
import { preciseCalculator, preciseConstants, preciseValuesAt } from './preciseValue.ts';
import type { Entry } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import type { State } from '../sampling.ts';
import { compareWithJets, type JetAtState } from './compareJets.ts';
import { BeyondLibrary, jetByLibrary, LIBRARY } from './independentLibrary.ts';
import { JetReader } from './jet.ts';

const KIND = 'second opinion';
const TITLE = `derivatives of ln Q taken by ${LIBRARY}`;

/** The check of each entry. */
export function secondOpinion(
  model: Model,
  entries: readonly Entry[],
  states: readonly State[],
): (entry: Entry) => VerificationCheck {
  const undecided = (detail: string) => (): VerificationCheck => ({
    kind: KIND,
    title: TITLE,
    status: 'undecided',
    detail,
  });
  if (entries.length === 0) return undecided('There is nothing to check.');
  try {
    const jetAt = jetByLibrary(model.f, model.naturals);
    const constants = preciseConstants(model.formulation);
    const jets = states.map((state): JetAtState => {
      const values = preciseValuesAt(constants, state);
      return { state, values, jet: jetAt(values) };
    });
    const readers = new Map(jets.map((at) => [at, new JetReader(model, at.jet, at.values)]));
    const ours = preciseCalculator(model);
    return (entry) => compareWithJets(model, entry, jets, readers, ours, KIND, TITLE);
  } catch (fault) {
    if (fault instanceof BeyondLibrary || fault instanceof NotDifferentiable) {
      return undecided(`Not decided: ${fault.message}.`);
    }
    throw fault;
  }
}
