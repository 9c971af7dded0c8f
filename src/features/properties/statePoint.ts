/** A state at which the sheet shows numbers, and the values of expressions there. */
import type { Derivation } from '../../../shared/contracts/derivation.ts';
import { symbolsOf } from '../../../shared/algebra/traverse.ts';
import { compile } from '../../../shared/numerics/compile.ts';
import { fromJson } from '../../../shared/print/json.ts';
import { raised } from '../../components/index.ts';

export type StatePoint = Readonly<Record<string, number>>;

type Variable = Derivation['variables'][number];

/** One mole at room temperature and about one bar, as far as a variable has such a value. */
const USUAL: Readonly<Record<string, number>> = {
  temperature: 298.15,
  number: 6.02214076e23,
  pressure: 1e5,
  'chemical potential': -5e-20,
  energy: 3718,
  field: 1,
};

const MOLAR_VOLUME = 0.02479;
/** An extent that is counted (sites) has room for twice the molecules. */
const SITES = 1.204428152e24;

function usual({ role, unit }: Variable): number {
  if (role === 'extent') return unit === '1' ? SITES : MOLAR_VOLUME;
  return USUAL[role] ?? 1;
}

/** The state written in an address, `T=300,V=0.02`, completed by usual values. */
export function readStatePoint(variables: readonly Variable[], written: string | null): StatePoint {
  const given = new Map(
    (written ?? '').split(',').map((part) => {
      const [name = '', value = ''] = part.split('=');
      return [name.trim(), Number(value)] as const;
    }),
  );
  return Object.fromEntries(
    variables.map((variable) => {
      const value = given.get(variable.name);
      return [
        variable.name,
        value !== undefined && Number.isFinite(value) && value !== 0 ? value : usual(variable),
      ];
    }),
  );
}

export function writeStatePoint(state: StatePoint): string {
  return Object.entries(state)
    .map(([name, value]) => `${name}=${value}`)
    .join(',');
}

/** The value of a stored expression at the state; undefined where it has none. */
export function valueAt(
  tree: unknown,
  derivation: Derivation,
  state: StatePoint,
): number | undefined {
  try {
    const e = fromJson(tree);
    // π has its value from the evaluation itself.
    const names = [...new Set([...symbolsOf(e)].map(({ name }) => name))].filter(
      (name) => name !== 'pi',
    );
    const values = names.map((name) => state[name] ?? derivation.values[name] ?? NaN);
    const [value = NaN] = compile([e], names)(values);
    return Number.isFinite(value) ? value : undefined;
  } catch {
    // An expression of a later version of the language: the formula stands, the number is missing.
    return undefined;
  }
}

/** Six significant digits, with a power of ten where the number is long. */
export function writtenValue(value: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e-3 && size < 1e6) return String(Number(value.toPrecision(6)));
  const [mantissa = '', exponent = ''] = value.toExponential(5).split('e');
  return `${Number(mantissa)} × 10${raised(exponent.replace('+', ''))}`;
}
