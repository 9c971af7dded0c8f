/** How the expressions of one formulation are written: in its author's order of names. */
import { divide, splitCoefficient, splitPower, symbol } from '../algebra/construct.ts';
import type { Expression, Relation } from '../algebra/expression.ts';
import {
  nameStyle,
  relationToTex,
  relationToText,
  toJson,
  toTex,
  toText,
  type NameStyle,
} from '../print/index.ts';
import * as Q from '../algebra/rational.ts';
import { symbolsOf } from '../algebra/traverse.ts';
import type { FormName } from '../contracts/derivation.ts';
import type { Formulation } from '../language/formulation.ts';

export interface Notation {
  tex(e: Expression): string;
  /** A definition: in the order of textbooks, U + p V. */
  definitionTex(e: Expression): string;
  /** In a form other than the molecular one: R stands where k stood, V_m where V stood. */
  formTex(e: Expression): string;
  formText(e: Expression): string;
  text(e: Expression): string;
  json(e: Expression): unknown;
  relationTex(relation: Relation): string;
  relationText(relation: Relation): string;
  /** The symbol of a property. */
  nameOf(property: string): Expression;
  /** ∂of/∂x without what is held. */
  derivative(of: Expression, x: Expression): string;
  /** The symbol of an extensive property per molecule or per mole. */
  perAmountTex(name: Expression, form: FormName): string;
  /** The symbol of a property of one molecule, per mole. */
  timesAvogadroTex(name: Expression): string;
  /** Terms in the order in which a sum of them is written. */
  inOrder(terms: readonly Expression[]): Expression[];
}

/** State functions first, then k T and p V as they are said. */
const DEFINITION_ORDER = [
  ...['U', 'A', 'F', 'H', 'G', 'Omega', 'C_V', 'C_p', 'mu', 'N', 'k', 'T', 'S', 'p', 'V', 'L', 'M'],
  ...['kappa_T', 'alpha', 'kappa_S', 'm'],
];

/** What stands in the place of a name in a form other than the molecular one. */
function orderInForms(formulation: Formulation): string[] {
  const perMole = new Map(
    formulation.molar.flatMap(({ name, expression }) =>
      [...symbolsOf(expression)].map((s): [string, string] => [s.name, name]),
    ),
  );
  return formulation.nameOrder.flatMap((name) => {
    if (name === 'k') return ['R', 'k'];
    if (name === 'N') return ['N_Av', 'N'];
    if (name === 'V') return ['V_m', 'v', 'V'];
    const molar = perMole.get(name);
    return molar === undefined ? [name] : [molar, name];
  });
}

/** The notation of a formulation. */
export function createNotation(formulation: Formulation): Notation {
  const style = nameStyle(formulation.nameOrder);
  const definitions = nameStyle(DEFINITION_ORDER);
  const forms = nameStyle(orderInForms(formulation));
  const memory = new Map<Expression, string>();
  const tex = (e: Expression): string => {
    let written = memory.get(e);
    if (written === undefined) memory.set(e, (written = toTex(e, style)));
    return written;
  };
  const text = (e: Expression): string => toText(e, style);
  return {
    tex,
    definitionTex: (e) => toTex(e, definitions),
    formTex: (e) => toTex(e, forms),
    formText: (e) => toText(e, forms),
    text,
    json: (e) => toJson(e),
    relationTex: (relation) => relationToTex(relation, style),
    relationText: (relation) => relationToText(relation, style),
    nameOf: (property) => symbol(property),
    derivative: (of, x) => `\\frac{\\partial ${tex(of)}}{\\partial ${tex(x)}}`,
    perAmountTex: (name, form) =>
      tex(divide(name, symbol(form === 'molar' ? 'n' : 'N', { positive: true }))),
    timesAvogadroTex: (name) => `N_{\\mathrm{A}} ${tex(name)}`,
    inOrder: (terms) => inReadingOrder(terms, style),
  };
}

/** Positive terms before negative ones, terms without functions before others, then by names. */
function inReadingOrder(terms: readonly Expression[], style: NameStyle): Expression[] {
  const keyed = terms.map((term) => ({ term, key: keyOf(term, style) }));
  keyed.sort((a, b) => {
    for (let i = 0; i < Math.max(a.key.length, b.key.length); i++) {
      const difference = (a.key[i] ?? -1) - (b.key[i] ?? -1);
      if (difference !== 0) return difference;
    }
    return a.term.hash - b.term.hash;
  });
  return keyed.map(({ term }) => term);
}

function keyOf(term: Expression, style: NameStyle): number[] {
  const { coefficient, rest } = splitCoefficient(term);
  const factors = rest.kind === 'product' ? rest.factors : [rest];
  const bases = factors.map((factor) => splitPower(factor).base);
  const ranks = bases.map((base) =>
    base.kind === 'symbol' || base.kind === 'abbreviation' ? style.rankOf(base.name) : BEHIND_NAMES,
  );
  const hasFunction = bases.some((base) => base.kind === 'call');
  return [Q.sign(coefficient) < 0 ? 1 : 0, hasFunction ? 1 : 0, ...ranks.sort((a, b) => a - b)];
}

const BEHIND_NAMES = 1e4;
