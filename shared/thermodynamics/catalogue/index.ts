/** The properties that exist for a formulation, in the order in which the sheet shows them. */
import type { Formulation } from '../../language/formulation.ts';
import type { Entry } from './entry.ts';
import { primaryEntries } from './primary.ts';
import { responseEntries } from './responses.ts';
import type { Surroundings } from './surroundings.ts';

export type { Entry } from './entry.ts';
export { isProperty, partialOf, property } from './entry.ts';
export { surroundingsOf, type Surroundings } from './surroundings.ts';
export { AMOUNT, ENTROPY, unitOf, unitPerMole } from './dimensions.ts';

/** Every entry of the catalogue that the formulation's variables allow. */
export function entriesFor(surroundings: Surroundings, formulation: Formulation): Entry[] {
  return [...primaryEntries(surroundings), ...responseEntries(surroundings, formulation)];
}
