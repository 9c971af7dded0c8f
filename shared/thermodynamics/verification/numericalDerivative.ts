/** Every property from numerical derivatives of ln Q, taken with many digits. */
import { childrenOf, type Expression } from '../../algebra/expression.ts';
import type { VerificationCheck } from '../../contracts/derivation.ts';
import {
  big,
  evaluatePrecisely,
  isCostly,
  preciseDerivative,
  preciseMixedDerivative,
  type BigNumber,
} from '../../numerics/index.ts';
import type { Entry } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import type { State } from '../sampling.ts';
import { known, type Approximate } from './approximate.ts';
import { compareWithJets, type JetAtState } from './compareJets.ts';
import { JetReader, type Jet } from './jet.ts';
import { preciseCalculator, preciseConstants, preciseValuesAt } from './preciseValue.ts';

const KIND = 'numerical derivative';
const TITLE = 'derivatives of ln Q by differences, with 64 digits';

/** Second derivatives by differences are good to some 26 digits. */
const RELIABLE_DIGITS = 22;
/** Sums and integrals cost hundreds of evaluations each. */
const STATES_OF_COSTLY = 2;

/** The check of each entry. */
export function numericalDerivatives(
  model: Model,
  entries: readonly Entry[],
  states: readonly State[],
  onProgress: (done: number) => void,
): (entry: Entry) => VerificationCheck {
  const constants = preciseConstants(model.formulation);
  const tried =
    isCostly(model.f) || hasSeries(model.f) ? states.slice(0, STATES_OF_COSTLY) : states;
  const jets = tried.flatMap((state, i): JetAtState[] => {
    onProgress(i / tried.length);
    const jet = preciseJet(model, state, constants);
    return jet ? [{ state, jet, values: preciseValuesAt(constants, state) }] : [];
  });
  if (jets.length === 0 || entries.length === 0) {
    return () => ({
      kind: KIND,
      title: TITLE,
      status: 'undecided',
      detail: 'ln of the partition function cannot be had to so many digits.',
    });
  }
  const readers = new Map(jets.map((at) => [at, new JetReader(model, at.jet, at.values)]));
  const ours = preciseCalculator(model);
  return (entry) => compareWithJets(model, entry, jets, readers, ours, KIND, TITLE);
}

/** Functions that are worked out by long series. */
const BY_SERIES: ReadonlySet<string> = new Set(['polylog', 'besselI', 'debye', 'polygamma']);

function hasSeries(e: Expression): boolean {
  return (e.kind === 'call' && BY_SERIES.has(e.name)) || childrenOf(e).some(hasSeries);
}

/** ln Q with first and second derivatives at a state; undefined where a value is missing. */
function preciseJet(
  model: Model,
  state: State,
  constants: ReadonlyMap<string, BigNumber>,
): Jet | undefined {
  const f: Expression = model.f;
  const names = model.naturals.map(({ name }) => name);
  const at = names.map((name) => big(state.get(name) ?? NaN));
  const moved = (changes: readonly (readonly [number, BigNumber])[]): BigNumber | undefined => {
    const values = new Map<string, BigNumber>(constants);
    names.forEach((name, i) => values.set(name, at[i] as BigNumber));
    for (const [i, x] of changes) values.set(names[i] as string, x);
    return evaluatePrecisely(f, values);
  };
  const value = moved([]);
  if (!value) return undefined;
  const gradient = at.map((x, i) => preciseDerivative((y) => moved([[i, y]]), x, 1));
  const hessian = at.map((x, i) =>
    at.map((y, j) => {
      if (j < i) return undefined;
      return i === j
        ? preciseDerivative((z) => moved([[i, z]]), x, 2)
        : preciseMixedDerivative(
            (a, b) =>
              moved([
                [i, a],
                [j, b],
              ]),
            x,
            y,
          );
    }),
  );
  const rounded = (x: BigNumber | undefined): Approximate => known(x ?? big(NaN), RELIABLE_DIGITS);
  const first = gradient.map(rounded);
  const second = hessian.map((row, i) =>
    row.map((_, j) => rounded(hessian[Math.min(i, j)]?.[Math.max(i, j)])),
  );
  const isComplete = [...first, ...second.flat()].every((x) => !x.value.isNaN());
  return value && isComplete
    ? { value: rounded(value), gradient: first, hessian: second }
    : undefined;
}
