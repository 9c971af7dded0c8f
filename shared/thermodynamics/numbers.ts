/** Numbers put to the names of a model. */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import type { Formulation } from '../language/formulation.ts';

/** Exact by the definition of the SI (2019); present in results even where the author used none. */
const DEFINED: readonly (readonly [string, string])[] = [
  ['k', '1.380649e-23'],
  ['N_Av', '6.02214076e23'],
];

/** The exact values of everything that is no natural variable, by name. */
export function constantsOf(formulation: Formulation): Map<string, Rational> {
  const values = new Map<string, Rational>();
  for (const [name, value] of DEFINED) values.set(name, Q.fromDecimal(value));
  values.set('R', Q.multiply(values.get('k') ?? Q.ONE, values.get('N_Av') ?? Q.ONE));
  for (const { name, value } of formulation.naturalConstants) values.set(name, value);
  for (const { name, value } of formulation.quantities) values.set(name, value);
  return values;
}

/** The same as doubles. */
export function constantNumbersOf(formulation: Formulation): Map<string, number> {
  return new Map([...constantsOf(formulation)].map(([name, value]) => [name, Q.toNumber(value)]));
}

/** `3.7e-49` in six figures for sentences. */
export function inWords(value: number): string {
  return String(Number(value.toPrecision(6)));
}
