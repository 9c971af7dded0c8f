/**
 * Everything that the language can have to say of a source text, by its stable name. Words in
 * braces are filled in. Other parts of the product add findings of their own under other names.
 */
import type { Severity } from './diagnostic.ts';

export interface CatalogueEntry {
  readonly severity: Severity;
  readonly message: string;
  readonly hint: string;
}

const error = (message: string, hint = ''): CatalogueEntry => ({
  severity: 'error',
  message,
  hint,
});
const warning = (message: string, hint = ''): CatalogueEntry => ({
  severity: 'warning',
  message,
  hint,
});

export const CATALOGUE = {
  // The text
  'too-long': error(
    'A formulation has at most 64 KiB of text.',
    'Leave out what is not needed, or split the model.',
  ),
  'too-deep': error('{what} is nested more than {limit} deep.', 'Give inner parts names with let.'),
  'too-large': error(
    'With its functions put in, this grows too large.',
    'Call functions with fewer nested calls, or give results names with let.',
  ),
  'number-too-large': error('This number has too many digits.', 'Write it with a power of ten.'),
  'unexpected-character': error('{character} has no meaning here.', '{hint}'),
  'unclosed-text': error('This text is not closed.', 'Close it with a quotation mark.'),
  'unclosed-unit': error('This unit is not closed.', 'Close it with ].'),
  'unclosed-bracket': error('This {bracket} is not closed.', 'Close it with {closing}.'),
  syntax: error('{expected} is expected here, not {found}.', '{hint}'),
  'unknown-statement': error('No statement begins with {word}.', '{hint}'),
  'too-many-findings': error('There are more faults than are shown.', 'Mend these first.'),

  // Notation
  'ambiguous-division': error(
    'What stands behind a division is ambiguous: {text}.',
    'Write * before the next factor, or put parentheses around the divisor.',
  ),
  'log-is-ambiguous': error(
    'log may mean the natural or the decadic logarithm.',
    'Write ln or log10.',
  ),
  'function-without-parentheses': error(
    'The function {name} needs its argument in parentheses.',
    'Write {name}(…).',
  ),
  'number-of-arguments': error('{name} takes {expected}, not {found}.', 'Write {usage}.'),
  'adjacent-numbers': error(
    'Two numbers stand side by side: {text}.',
    'Write * between them, or take the space out.',
  ),
  'uncertainty-out-of-place': error(
    'An uncertainty in parentheses belongs to the value of a constant or a parameter.',
    'For a product write *.',
  ),
  'unit-out-of-place': error(
    'A unit stands directly behind a number or a declared name.',
    'Write the unit behind the number itself, as in 150 [K].',
  ),
  unit: error('{message}', '{hint}'),
  'infinity-out-of-place': error(
    'inf stands only at the ends of sums and integrals, in limits and as a branch of cases.',
    'Write the number that is meant.',
  ),

  // Names
  'unknown-name': error('{name} is not known.', '{hint}'),
  'reserved-name': error('{name} is {what} and cannot name a quantity.', 'Choose another name.'),
  'double-definition': error('{name} is defined twice; first {where}.', 'Choose another name.'),
  'circular-definition': error('{names}.', 'Take one of them out of the circle.'),
  'foreign-variable': error(
    '{name} is no natural variable of the {ensemble} ensemble: ln {function} depends on {variables}.',
    '{hint}',
  ),
  'not-a-function': error(
    '{name} is no function.',
    'For a product write {name} (…) as {name} * (…).',
  ),
  'list-index': error(
    '{name} has {count} elements, counted from 1; there is no {name}({index}).',
    '',
  ),
  'fixed-name': error(
    '{name} is {what} in every formulation.',
    'Choose another name, with a subscript for instance.',
  ),
  'constant-replaced': warning(
    'In this formulation {name} no longer is the {what}.',
    'Choose another name if that was not meant.',
  ),
  'name-shadowed': warning(
    'Inside these braces {name} no longer is {what}.',
    'Choose another name for the running variable.',
  ),
  'unused-name': warning('{name} is not used.', 'Take it out, or use it.'),

  // Dimensions
  dimension: error('{message}', '{hint}'),
  'dimension-unknown': error('The dimension of {name} does not follow from its use.', '{hint}'),

  // Statements
  'no-ensemble': error(
    'The ensemble is not stated.',
    'Begin with ensemble canonical, or grand canonical, isothermal-isobaric, microcanonical.',
  ),
  'two-ensembles': error('The ensemble is stated twice.', 'Keep one.'),
  'twice-stated': error('{what} is stated twice.', 'Keep one.'),
  'unknown-ensemble': error(
    '{word} is no ensemble.',
    'Write canonical, grand canonical, isothermal-isobaric or microcanonical.',
  ),
  'no-partition-function': error(
    'The partition function is missing.',
    'State {function} = … or ln {function} = ….',
  ),
  'two-partition-functions': error(
    'The partition function is stated twice; first {where}.',
    'Keep one of the two.',
  ),
  'wrong-partition-function': error(
    'The {ensemble} ensemble has the function {function}, not {name}.',
    'State {function} = …, or change the ensemble.',
  ),
  'order-parameter-not-used': error(
    'ln {function} does not contain the order parameter {name}.',
    'Take it out, or write ln {function} as it depends on {name}.',
  ),
  'value-not-constant': error(
    'A value is built from numbers, constants and units only; {name} is none of these.',
    'Write let for what depends on variables or parameters.',
  ),
  'value-not-exact': error(
    'A value is built with + - * / and whole powers only.',
    'Write the number, or use let.',
  ),
  'division-by-zero': error('This divides by zero.', 'Look for a difference that cancels.'),
  'logarithm-of-zero': error('This is the logarithm of zero.', ''),
  'bounds-reversed': error('The lower bound is above the upper one.', 'Swap them.'),
  'start-outside-bounds': warning(
    '{name} = {value} lies outside its bounds, {lower} to {upper}.',
    'Widen the bounds or change the value.',
  ),
  'integer-bounds': error(
    'A {what} runs over whole numbers; {text} is none.',
    'Use integral for a continuous variable.',
  ),
  'divergent-sum': error(
    'This {what} diverges: its terms do not fall off as {name} grows.',
    'Check the sign in the exponent and the upper end.',
  ),
  'divergent-integral': error(
    'This integral diverges as {name} tends to {end}.',
    'Check the integrand and the ends.',
  ),
} as const satisfies Record<string, CatalogueEntry>;

export type Code = keyof typeof CATALOGUE;
