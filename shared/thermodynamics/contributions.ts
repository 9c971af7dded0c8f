/**
 * Which part of ln Q brings what: every term of ln Q has its share in each property that is linear
 * in ln Q, and terms that speak of the same thing are put together under one label.
 */
import { multiply, number, product, sum } from '../algebra/construct.ts';
import type { Expression, SymbolNode } from '../algebra/expression.ts';
import { abbreviationsOf, symbolsOf } from '../algebra/traverse.ts';
import type { DeclaredQuantity, Formulation } from '../language/formulation.ts';
import { equalDimensions } from '../units/dimension.ts';
import type { Notation } from './notation.ts';
import { MASS } from './catalogue/dimensions.ts';
import type { Surroundings } from './catalogue/index.ts';

export interface TermGroup {
  readonly label: string;
  /** The sum of the terms of ln Q under this label. */
  readonly f: Expression;
}

/** The addends of ln Q, with sizes multiplied into sums: N (x + y) is N x + N y. */
export function termsOf(f: Expression, sizes: ReadonlySet<Expression>): Expression[] {
  if (f.kind === 'sum') {
    const constant = number(f.constant);
    const terms = f.terms.flatMap((term) => termsOf(term, sizes));
    return f.constant.numerator === 0n ? terms : [...terms, constant];
  }
  if (f.kind === 'product') {
    const inner = f.factors.find((factor) => factor.kind === 'sum');
    const rest = f.factors.filter((factor) => factor !== inner);
    if (inner?.kind === 'sum' && rest.every((factor) => sizes.has(factor))) {
      const outside = product([number(f.coefficient), ...rest]);
      return termsOf(inner, sizes).map((term) => multiply(outside, term));
    }
  }
  return [f];
}

/** The symbols of the sizes of the system: numbers, extent, and numbers of sites. */
export function sizesOf(surroundings: Surroundings): ReadonlySet<Expression> {
  return new Set(
    surroundings.naturals
      .filter(({ role }) => role === 'number' || role === 'extent')
      .map(({ symbol }) => symbol),
  );
}

/**
 * The terms of ln Q by label, in the order in which a reader meets them. A label is the
 * description of the parameter or abbreviation that the term contains; `translation` for the
 * thermal wavelength and what belongs to it; else the term itself as text.
 */
export function groupTerms(
  formulation: Formulation,
  surroundings: Surroundings,
  notation: Pick<Notation, 'text' | 'inOrder'>,
): TermGroup[] {
  const sizes = sizesOf(surroundings);
  const terms = notation.inOrder(termsOf(formulation.lnPartitionFunction, sizes));
  const naming = namingOf(formulation, surroundings, terms, sizes);
  const groups = new Map<string, Expression[]>();
  for (const term of terms) {
    const label = labelOf(term, naming) ?? notation.text(term);
    const group = groups.get(label);
    if (group) group.push(term);
    else groups.set(label, [term]);
  }
  const place = (members: readonly Expression[]): number => placeOf(members, naming);
  return [...groups]
    .sort(([, a], [, b]) => place(a) - place(b))
    .map(([label, members]) => ({ label, f: sum(members) }));
}

/**
 * What has no parameter comes first, then terms with a logarithm, the frame of a model, before what
 * is added to it; otherwise the parameters follow each other as the author's products name them.
 */
function placeOf(members: readonly Expression[], naming: Naming): number {
  const { nameOrder } = naming.formulation;
  const places = naming.quantities
    .filter(({ symbol }) => !naming.masses.has(symbol))
    .filter(({ symbol }) => members.some((term) => symbolsOf(term).has(symbol)))
    .map(({ name }) => nameOrder.indexOf(name));
  if (places.length === 0) return -1;
  const hasFunction = members.some((term) =>
    (term.kind === 'product' ? term.factors : [term]).some((factor) => factor.kind === 'call'),
  );
  return Math.min(...places) + (hasFunction ? 0 : nameOrder.length + 1);
}

interface Naming {
  readonly formulation: Formulation;
  readonly quantities: readonly DeclaredQuantity[];
  readonly masses: ReadonlySet<SymbolNode>;
  readonly sizes: ReadonlySet<Expression>;
  readonly numbers: ReadonlySet<Expression>;
  readonly hasTranslation: boolean;
  readonly hasFactorial: boolean;
  /** Whether a term counts ways of placing molecules on an extent, such as M ln M. */
  readonly hasArrangement: boolean;
  readonly planck: SymbolNode | undefined;
}

function namingOf(
  formulation: Formulation,
  surroundings: Surroundings,
  terms: readonly Expression[],
  sizes: ReadonlySet<Expression>,
): Naming {
  const masses = new Set(
    formulation.quantities
      .filter(({ dimension }) => equalDimensions(dimension, MASS))
      .map(({ symbol }) => symbol),
  );
  const planck = formulation.naturalConstants.find(({ name }) => name === 'h')?.symbol;
  const hasTranslation =
    planck !== undefined &&
    terms.some((term) => symbolsOf(term).has(planck)) &&
    terms.some((term) => [...symbolsOf(term)].some((s) => masses.has(s)));
  return {
    formulation,
    quantities: formulation.quantities,
    masses,
    sizes,
    numbers: new Set(surroundings.components.map(({ number: n }) => n)),
    hasTranslation,
    hasFactorial: terms.some((term) => isOfFactorial(term)),
    hasArrangement: terms.some((term) => {
      const symbols = [...symbolsOf(term)];
      return symbols.every((s) => sizes.has(s)) && symbols.some((s) => s === surroundings.extent);
    }),
    planck,
  };
}

/** −N ln N or −ln Γ(N + 1). */
function isOfFactorial(term: Expression): boolean {
  const factors = term.kind === 'product' ? term.factors : [term];
  return factors.some(
    (factor) =>
      factor.kind === 'call' &&
      (factor.name === 'lnGamma' ||
        (factor.name === 'ln' && factors.includes(factor.arguments[0] as Expression))),
  );
}

function labelOf(term: Expression, naming: Naming): string | undefined {
  const symbols = [...symbolsOf(term)];
  const declared = naming.quantities.filter(
    ({ symbol }) => symbols.includes(symbol) && !naming.masses.has(symbol),
  );
  const abbreviations = abbreviationsOf(term).flatMap((used) =>
    used.kind === 'abbreviation'
      ? naming.formulation.abbreviations.filter(({ name }) => name === used.name)
      : [],
  );
  const described = abbreviations.filter(({ description }) => description !== '');
  if (described.length > 0) return described.map(({ description }) => description).join(', ');
  const parameters = declared.filter(({ kind }) => kind === 'parameter');
  const chosen = parameters.length > 0 ? parameters : declared;
  if (chosen.length > 0) {
    const words = chosen.filter(({ description }) => description !== '');
    if (words.length > 0) return words.map(({ description }) => description).join(', ');
    if (abbreviations.length > 0) return abbreviations.map(({ name }) => name).join(', ');
    return chosen.map(({ name }) => name).join(', ');
  }
  const isOfMass = symbols.some((s) => naming.masses.has(s));
  const isOfPlanck = naming.planck !== undefined && symbols.includes(naming.planck);
  if (isOfMass || (naming.hasTranslation && isOfPlanck)) return 'translation';
  if (symbols.every((s) => naming.sizes.has(s))) return labelOfSizes(symbols, naming);
  // ln T and ln k stand alone where the wavelength was written out.
  if (naming.hasTranslation && symbols.every((s) => naming.sizes.has(s) || isOfWavelength(s))) {
    return 'translation';
  }
  return undefined;
}

/** What a term of numbers, sites and volume alone counts. */
function labelOfSizes(symbols: readonly SymbolNode[], naming: Naming): string {
  const isOfNumbers = symbols.every((s) => naming.numbers.has(s));
  if (naming.numbers.size > 1 && isOfNumbers) {
    return naming.hasTranslation && symbols.length === 1 ? 'indistinguishable molecules' : 'mixing';
  }
  if (!naming.hasTranslation && naming.hasArrangement) return 'arrangement';
  if (isOfNumbers) return naming.hasFactorial ? 'indistinguishable molecules' : 'degeneracy';
  return 'translation';
}

function isOfWavelength(s: SymbolNode): boolean {
  return s.name === 'k' || s.name === 'T' || s.name === 'pi';
}
