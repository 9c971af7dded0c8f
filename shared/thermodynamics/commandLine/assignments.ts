/** `N=6.02214076e23, V=0.0224 [m^3], T=273.15 [K]` read as values in SI units. */
import * as Q from '../../algebra/rational.ts';
import {
  describeDimension,
  equalDimensions,
  parseUnit,
  type Dimension,
} from '../../units/index.ts';

export interface Assignments {
  /** In coherent SI units, by name. */
  readonly values: Readonly<Record<string, number>>;
  /** What could not be read, each a sentence. */
  readonly faults: readonly string[];
}

const ASSIGNMENT = /^\s*([^\s=[\]]+)\s*=\s*([^\s=[\]]+)\s*(?:\[([^\]]*)\])?\s*$/;

/**
 * Reads assignments set apart by commas. A unit must have the dimension of the known name; without
 * one the number is in SI units. Names that are not known are passed on: whoever uses the values
 * says so.
 */
export function readAssignments(
  text: string,
  known: readonly { readonly name: string; readonly dimension: Dimension }[],
): Assignments {
  const values: Record<string, number> = {};
  const faults: string[] = [];
  for (const part of splitOutsideBrackets(text)) {
    const match = ASSIGNMENT.exec(part);
    if (!match) {
      faults.push(`“${part.trim()}” is not of the kind T = 300 [K].`);
      continue;
    }
    const [, name = '', figures = '', unitText] = match;
    if (Object.hasOwn(values, name)) faults.push(`${name} is given twice.`);
    const number = decimal(figures);
    if (!number) {
      faults.push(`“${figures}” is not a number.`);
      continue;
    }
    const factor = unitText === undefined ? Q.ONE : factorOf(unitText, name, known, faults);
    if (factor) values[name] = Q.toNumber(Q.multiply(number, factor));
  }
  return { values, faults };
}

function splitOutsideBrackets(text: string): string[] {
  return text.split(/,(?![^[]*\])/).filter((part) => part.trim() !== '');
}

/** Exponents beyond the range of doubles are no numbers of this trade. */
const DECIMAL = /^[+-]?(?:\d{1,60}(?:\.\d{0,60})?|\.\d{1,60})(?:[eE][+-]?\d{1,3})?$/;

function decimal(figures: string): Q.Rational | undefined {
  return DECIMAL.test(figures) ? Q.fromDecimal(figures) : undefined;
}

function factorOf(
  unitText: string,
  name: string,
  known: readonly { readonly name: string; readonly dimension: Dimension }[],
  faults: string[],
): Q.Rational | undefined {
  const { unit, fault } = parseUnit(unitText);
  if (!unit) {
    faults.push(`In the unit of ${name}: ${fault.message}`);
    return undefined;
  }
  const wanted = known.find((quantity) => quantity.name === name);
  if (wanted && !equalDimensions(wanted.dimension, unit.dimension)) {
    faults.push(
      `${name} is ${describeDimension(wanted.dimension)}, but [${unitText}] is ${describeDimension(unit.dimension)}.`,
    );
    return undefined;
  }
  return unit.factor;
}
