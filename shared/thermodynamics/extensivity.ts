/** Extensivity decided by algebra, and where that fails by doubling the system in numbers. */
import type { Expression } from '../algebra/expression.ts';
import type { Calculator } from './calculator.ts';
import { extensiveVariables, homogeneityOf, type Homogeneity } from './homogeneity.ts';
import type { Model } from './model.ts';
import { drawState, seededNumbers } from './sampling.ts';

const STATES = 6;
const SEED = 104_729;
/** ln N/N is of this order at a mole with exact factorials; a missing N! shows in the first digits. */
const TOLERANCE = 1e-9;

/** Whether f doubles with the sizes of the system, and how that was found. */
export function homogeneityAt(
  model: Model,
  calculator: Calculator,
  f: Expression = model.f,
): { verdict: Homogeneity; method: string } {
  const symbolic = homogeneityOf(model, f);
  if (symbolic !== 'undecided') return { verdict: symbolic, method: 'Decided by Euler’s theorem.' };
  const sizes = extensiveVariables(model);
  if (sizes.length === 0) {
    return { verdict: 'undecided', method: 'No size of the system is a natural variable.' };
  }
  const next = seededNumbers(SEED);
  let tried = 0;
  for (let i = 0; i < 400 && tried < STATES; i++) {
    const state = drawState(model, next);
    if (!calculator.isInDomain(state)) continue;
    const doubled = new Map(state);
    for (const { name } of sizes) doubled.set(name, 2 * (state.get(name) ?? NaN));
    const once = calculator.value(f, state);
    const twice = calculator.value(f, doubled);
    if (!Number.isFinite(once) || !Number.isFinite(twice)) continue;
    tried++;
    if (Math.abs(twice - 2 * once) > TOLERANCE * Math.abs(twice)) {
      return { verdict: 'not extensive', method: 'Found by doubling the system.' };
    }
  }
  return tried === 0
    ? { verdict: 'undecided', method: 'No state inside the domain was found.' }
    : { verdict: 'extensive', method: `Found by doubling the system at ${tried} states.` };
}
