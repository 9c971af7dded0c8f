/** From the exact trees of a derivation to functions of temperature and volume, for one mole. */
import { differentiate } from '../../../shared/algebra/differentiate.ts';
import type { Expression, SymbolNode } from '../../../shared/algebra/expression.ts';
import { symbolsOf } from '../../../shared/algebra/traverse.ts';
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { compile } from '../../../shared/numerics/compile.ts';
import { fromJson } from '../../../shared/print/json.ts';
import type { Fluid } from './criticalPoint.ts';

/** Exact by the definition of the SI. */
const AVOGADRO = 6.02214076e23;
const BOLTZMANN = 1.380649e-23;

type OfState = (temperature: number, volume: number) => number;

/**
 * The fluid of a canonical formulation in T, V and one N. Undefined where its variables are others,
 * or where an expression cannot be evaluated.
 */
export function compileFluid(derivation: Derivation): Fluid | undefined {
  const nameOf = (role: string): string | undefined => {
    const found = derivation.variables.filter((variable) => variable.role === role);
    return found.length === 1 ? found[0]?.name : undefined;
  };
  const temperature = nameOf('temperature');
  const volume = nameOf('extent');
  const number = nameOf('number');
  const pressure = derivation.properties.find(({ symbol }) => symbol === 'p');
  if (temperature === undefined || volume !== 'V' || number === undefined || !pressure) {
    return undefined;
  }

  const constants = new Map([...Object.entries(derivation.values), [number, AVOGADRO] as const]);
  const evaluator = (expressions: readonly Expression[]): OfState => {
    // π is none of the inputs: it is known to whoever evaluates.
    const known = new Set([...constants.keys(), temperature, volume]);
    const symbols = expressions.flatMap((e) => [...symbolsOf(e)].map(({ name }) => name));
    const names = [...new Set(symbols)].filter((name) => known.has(name));
    const code = compile(expressions, names);
    const values = names.map((name) => constants.get(name) ?? Number.NaN);
    const results = [Number.NaN, Number.NaN];
    const atTemperature = names.indexOf(temperature);
    const atVolume = names.indexOf(volume);
    return (t, v) => {
      if (atTemperature >= 0) values[atTemperature] = t;
      if (atVolume >= 0) values[atVolume] = v;
      code.into(values, results);
      const [wanted, lnQ] = results;
      // Outside the domain ln Q has no value, though the pressure may seem to have one.
      return lnQ !== undefined && Number.isFinite(lnQ) ? (wanted ?? Number.NaN) : Number.NaN;
    };
  };

  try {
    const p = fromJson(pressure.tree);
    const lnQ = fromJson(derivation.lnPartitionFunction.tree);
    const byVolume: SymbolNode | undefined = [...symbolsOf(p)].find(({ name }) => name === volume);
    if (!byVolume) return undefined;
    return {
      pressure: evaluator([p, lnQ]),
      slope: evaluator([differentiate(p, byVolume), lnQ]),
      lnQ: evaluator([lnQ, lnQ]),
      gasConstant: AVOGADRO * BOLTZMANN,
    };
  } catch {
    // A function that has no numerical evaluation or no derivative: then no plot is drawn.
    return undefined;
  }
}
