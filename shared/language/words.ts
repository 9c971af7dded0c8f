/** The words of the language with what they are for, for completion and hovering. */

export interface WordFacts {
  readonly usage: string;
  readonly description: string;
}

export const STATEMENT_FACTS: Readonly<Record<string, WordFacts>> = {
  ensemble: {
    usage: 'ensemble canonical',
    description: 'Fixes the natural variables and the partition function.',
  },
  species: { usage: 'species w "water", e "ethanol"', description: 'Several components.' },
  extent: {
    usage: 'extent M [1] "sites"',
    description: 'An extensive variable in place of the volume.',
  },
  field: {
    usage: 'field B [T] response M_B',
    description: 'A further natural variable with its response.',
  },
  constant: { usage: 'constant m [u] = 39.948 "molecular mass"', description: 'A fixed number.' },
  parameter: {
    usage: 'parameter a [J m^3] = 3e-49 between 0 and 1e-47 "attraction"',
    description: 'An adjustable number.',
  },
  list: {
    usage: 'list E [cm^-1] = 0, 158.3',
    description: 'Numbers addressed as E(i), counted from 1.',
  },
  let: {
    usage: 'let Lambda = h / sqrt(2 pi m k T)',
    description: 'An abbreviation, or with arguments a function.',
  },
  order: {
    usage: 'order theta between 0 and 1 "coverage"',
    description: 'An internal variable at which ln of the partition function is stationary.',
  },
  factorials: {
    usage: 'factorials exact',
    description: "Keeps ln N! as it is, in place of Stirling's formula.",
  },
  molar: {
    usage: 'molar a_m [J m^3/mol^2] = N_Av^2 a',
    description: 'A parameter stated per mole.',
  },
  report: { usage: 'report rho = N/V "density"', description: 'A derived quantity of your own.' },
  claim: {
    usage: 'claim "ideal when dilute" p V / (N k T) -> 1 as V -> inf',
    description: 'A statement that is checked with every version.',
  },
};

export const EXPRESSION_FACTS: Readonly<Record<string, WordFacts>> = {
  sum: { usage: 'sum i from 0 to inf { … }', description: 'The sum over whole numbers.' },
  product: { usage: 'product i from 1 to n { … }', description: 'The product over whole numbers.' },
  integral: { usage: 'integral r [m] from 0 to inf { … }', description: 'The definite integral.' },
  cases: { usage: 'cases { r < s: inf; otherwise: 0 }', description: 'A piecewise function.' },
  partial: {
    usage: 'partial(X, Y; Z, N)',
    description: 'The derivative of a property X by Y at constant Z, N.',
  },
  inf: { usage: 'inf', description: 'Infinity, at the ends of sums and integrals and in limits.' },
};
