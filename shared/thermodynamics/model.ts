/**
 * A model: a checked formulation together with the properties that follow from it, each worked out
 * when it is first asked for and remembered.
 */
import { divide, sum } from '../algebra/construct.ts';
import type { Expression, SymbolNode } from '../algebra/expression.ts';
import { Simplifier } from '../algebra/simplify.ts';
import { rebuild } from '../algebra/traverse.ts';
import type { Formulation } from '../language/formulation.ts';
import {
  entriesFor,
  isProperty,
  surroundingsOf,
  type Entry,
  type Surroundings,
} from './catalogue/index.ts';
import { homogeneityOf } from './homogeneity.ts';
import { NoSuchDerivative, partialDerivative } from './partialDerivative.ts';
import { shieldOf, takeOutOfRoots } from './roots.ts';

export interface Worked {
  /** By the definition, canonical only: what the trail shows before it is put together. */
  readonly raw: Expression;
  /** The shortest form known. */
  readonly value: Expression;
}

export interface Model {
  readonly formulation: Formulation;
  readonly surroundings: Surroundings;
  /** ln of the partition function. */
  readonly f: Expression;
  /** What ln of the partition function depends on: the variables of every derivative. */
  readonly naturals: readonly SymbolNode[];
  readonly entries: readonly Entry[];
  entry(name: string): Entry | undefined;
  /** Throws NoSuchDerivative, NotDifferentiable or BudgetExceeded where it cannot be had. */
  worked(name: string): Worked;
  /**
   * The expression with names of properties and `partial(…)` worked out in the natural variables.
   * Names that the author declared stand for what he declared. Throws like `worked`.
   */
  resolve(e: Expression): Expression;
  /** The same for an expression over names of the catalogue, as in definitions. */
  resolveDefinition(e: Expression): Expression;
  /** Whether ln Q is known to be of degree one in the sizes of the system, by algebra. */
  isExtensive(): boolean;
  /** The shortest form of an expression of this model. */
  simplify(e: Expression): Expression;
}

/**
 * The model of a formulation. `f` may be given in place of ln of its partition function: the share
 * of some of its terms in a property is that property of those terms alone.
 */
export function createModel(
  formulation: Formulation,
  {
    f = formulation.lnPartitionFunction,
    surroundings = surroundingsOf(formulation),
    shorten,
  }: {
    f?: Expression;
    surroundings?: Surroundings;
    shorten?: (e: Expression) => Expression;
  } = {},
): Model {
  const naturals = surroundings.naturals.map((variable) => variable.symbol);
  const simplifier = shorten
    ? undefined
    : new Simplifier({ known: [f], dominant: dominantOf(surroundings) });
  const shield = shieldOf(formulation.domain);
  const finish =
    shorten ?? ((e: Expression) => takeOutOfRoots(simplifier?.simplify(e) ?? e, shield));
  const entries = entriesFor(surroundings, formulation);
  const byName = new Map(entries.map((entry) => [entry.symbol, entry]));
  const declared = declaredNames(formulation);
  const totalNumber = sum(surroundings.components.map(({ number }) => number));
  const numbers = surroundings.components.map(({ number }) => number);
  const known = new Map<string, Worked | Error>();

  const worked = (name: string): Worked => {
    const remembered = known.get(name);
    if (remembered instanceof Error) throw remembered;
    if (remembered) return remembered;
    const entry = byName.get(name);
    if (!entry) throw new NoSuchDerivative(`This model has no ${name}.`);
    // Stands until the work is done: a definition that needed itself would else never end.
    known.set(name, new NoSuchDerivative(`${name} is defined by itself.`));
    try {
      const raw = resolve(entry.working?.expression ?? entry.definition, true);
      const result = { raw, value: finish(raw) };
      known.set(name, result);
      return result;
    } catch (error) {
      known.delete(name);
      // The constructors' answer to a division by zero, such as by ∂p/∂V of a photon gas.
      const isDivision = error instanceof RangeError && error.message.startsWith('division');
      const fault = isDivision ? new NoSuchDerivative('It divides by what is always zero.') : error;
      if (fault instanceof NoSuchDerivative) known.set(name, fault);
      throw fault;
    }
  };

  /** `ofCatalogue`: names in definitions mean properties even where the author took the name. */
  const resolve = (e: Expression, ofCatalogue: boolean): Expression => {
    if (e === surroundings.lnFunction) return f;
    if (e.kind === 'abbreviation' || naturals.includes(e as SymbolNode)) return e;
    if (e.kind === 'symbol') {
      const variable = formulation.variables.find(({ name }) => name === e.name);
      if (variable) return variable.symbol;
      if (ofCatalogue ? !isProperty(e) : declared.has(e.name)) return e;
      if (byName.has(e.name)) return worked(e.name).value;
      if (/^B[2-5]$/.test(e.name) || e.name.startsWith('gamma_')) {
        throw new NoSuchDerivative(`${e.name} is not derived yet.`);
      }
      return ofMixture(e.name) ?? e;
    }
    if (e.kind === 'call' && e.name === 'partial') {
      const [of, by, ...held] = e.arguments;
      if (!of || !by) throw new NoSuchDerivative('A derivative needs what and by what.');
      return partialDerivative(
        naturals,
        resolve(of, ofCatalogue),
        resolve(by, ofCatalogue),
        heldConditions(
          by,
          held.map((z) => resolve(z, ofCatalogue)),
        ),
      );
    }
    return rebuild(e, (part) => resolve(part, ofCatalogue));
  };

  /** The total number N and the mole fractions x_w of a mixture. */
  const ofMixture = (name: string): Expression | undefined => {
    if (name === 'N') return resolve(totalNumber, true);
    const component = surroundings.components.find(({ species }) => name === `x_${species}`);
    return component && resolve(divide(component.number, totalNumber), true);
  };

  /**
   * The total N held means every number held; what ln Q does not depend on needs no holding; and
   * fields of which nothing is said are held.
   */
  const heldConditions = (by: Expression, held: readonly Expression[]): Expression[] => {
    const conditions = new Set(held.flatMap((z) => (z === totalNumber ? numbers : [z])));
    for (const variable of formulation.variables) {
      if (!naturals.includes(variable.symbol)) conditions.delete(variable.symbol);
    }
    for (const { variable } of surroundings.fields) {
      if (conditions.size < naturals.length - 1 && variable.symbol !== by) {
        conditions.add(variable.symbol);
      }
    }
    return [...conditions];
  };

  let extensive: boolean | undefined;
  const model: Model = {
    formulation,
    surroundings,
    f,
    naturals,
    entries,
    entry: (name) => byName.get(name),
    worked,
    resolve: (e) => resolve(e, false),
    resolveDefinition: (e) => resolve(e, true),
    isExtensive: () => (extensive ??= homogeneityOf(model) === 'extensive'),
    simplify: finish,
  };
  return model;
}

/** The extent is what is large: V − N b is written so, not as −(N b − V). */
function dominantOf({ extent, naturals }: Surroundings): SymbolNode[] {
  return naturals.filter(({ symbol }) => symbol === extent).map(({ symbol }) => symbol);
}

function declaredNames(formulation: Formulation): ReadonlySet<string> {
  return new Set([
    ...formulation.quantities.map(({ name }) => name),
    ...formulation.naturalConstants.map(({ name }) => name),
    ...formulation.variables.map(({ name }) => name),
    ...formulation.abbreviations.map(({ name }) => name),
  ]);
}
