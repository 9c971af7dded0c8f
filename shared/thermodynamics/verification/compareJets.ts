/** A property as derived held against the same property read off jets of ln Q. */
import type { CheckStatus, VerificationCheck } from '../../contracts/derivation.ts';
import { describe } from '../claims/decide.ts';
import type { BigNumber } from '../../numerics/bigNumber.ts';
import type { Entry } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import { inWords } from '../numbers.ts';
import type { State } from '../sampling.ts';
import { JetReader, type Jet } from './jet.ts';

export interface JetAtState {
  readonly state: State;
  readonly jet: Jet;
  /** The state and all constants by name. */
  readonly values: ReadonlyMap<string, BigNumber>;
}

/** Digits that must agree beyond the error that the jet itself carries. */
const TOLERANCE = 1e-9;
/** Errors of jets are estimates; this much more is forgiven. */
const MARGIN = 100;
/** An error above this part of what a value is made of says nothing. */
const MEANINGLESS = 1e-9;

/** Compares at every state; `ours` gives the derived property's value. */
export function compareWithJets(
  model: Model,
  entry: Entry,
  jets: readonly JetAtState[],
  readers: ReadonlyMap<JetAtState, JetReader>,
  ours: (entry: Entry, state: State) => number,
  kind: string,
  title: string,
): VerificationCheck {
  const result = (status: CheckStatus, detail: string): VerificationCheck => ({
    kind,
    title,
    status,
    detail,
  });
  let compared = 0;
  let worst = 0;
  let unclear = 0;
  for (const at of jets) {
    const reader = readers.get(at) ?? new JetReader(model, at.jet, at.values);
    const derived = ours(entry, at.state);
    const read = reader.property(entry.symbol);
    const other = Number(read.value.toString());
    if (!Number.isFinite(derived) || !Number.isFinite(other)) continue;
    const size = Math.max(Math.abs(derived), Math.abs(other));
    const difference = Math.abs(derived - other);
    if (!(MARGIN * read.error <= MEANINGLESS * read.scale) && read.scale > 0) {
      unclear++;
      continue;
    }
    if (difference > TOLERANCE * size + MARGIN * read.error) {
      return result(
        'failed',
        `${inWords(derived)} as derived, ${inWords(other)} by this check, at ${describe(model, at.state)}.`,
      );
    }
    compared++;
    if (difference > MARGIN * read.error) worst = Math.max(worst, difference / size);
  }
  if (compared === 0) {
    return result(
      'undecided',
      unclear > 0
        ? 'The values cancel to below the digits of this check.'
        : 'No state inside the domain was found at which both have a value.',
    );
  }
  const digits = worst === 0 ? 15 : Math.min(15, Math.floor(-Math.log10(worst)));
  return result('passed', `Agrees to ${digits} digits at ${compared} states.`);
}
