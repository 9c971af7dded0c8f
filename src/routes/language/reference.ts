/**
 * The reference of the formulation language, as it is shown and searched. Every example is a text
 * of the language.
 */

export interface Entry {
  /** What is written: `parameter`, `sum`. */
  readonly name: string;
  readonly says: string;
  readonly example?: string;
}

export interface Chapter {
  readonly id: string;
  readonly title: string;
  readonly opening: string;
  readonly entries: readonly Entry[];
}

const statements: Chapter = {
  id: 'statements',
  title: 'Statements',
  opening:
    'A formulation states one model. Each statement begins a line of its own; an expression may go on over the next line where it cannot have ended. What follows # is a comment, and a comment on the first line is the title.',
  entries: [
    {
      name: 'ensemble',
      says: 'Fixes the natural variables and the function: canonical N, V, T and Q; grand canonical μ, V, T and Xi; isothermal-isobaric N, p, T and Delta; microcanonical N, V, U and W.',
      example: 'ensemble canonical',
    },
    {
      name: 'species',
      says: 'Several components. Their numbers N_w, N_e, their sum N and the mole fractions x_w, x_e are then known.',
      example: 'species w "water", e "ethanol"',
    },
    {
      name: 'extent',
      says: 'Another extensive variable in place of V: sites, an area, a length. Its conjugate takes the place of the pressure.',
      example: 'extent M [1] "adsorption sites"',
    },
    {
      name: 'field',
      says: 'One more natural variable, with the name of its response.',
      example: 'field B [T] response M_B',
    },
    {
      name: 'constant',
      says: 'A fixed number with its unit and a word on what it is. Its standard uncertainty may stand in parentheses and counts in the last digits.',
      example: 'constant m [u] = 83.798(2)  "mass of a molecule"',
    },
    {
      name: 'parameter',
      says: 'An adjustable number with a start and, after between, its bounds.',
      example: 'parameter b [m^3] = 6.6e-29 between 1e-30 and 1e-27  "room taken by a molecule"',
    },
    {
      name: 'let',
      says: 'An abbreviation. It is kept as a symbol of its own in the results wherever that reads better.',
      example: 'let Lambda = h / sqrt(2 pi m k T)',
    },
    {
      name: 'let u(r)',
      says: 'A function of arguments, for potentials and the like.',
      example: 'let u(r) = 4 eps ((s/r)^12 - (s/r)^6)',
    },
    {
      name: 'list',
      says: 'Numbers of one unit, addressed as g(i), E(i) with i from 1.',
      example: 'list g = 5, 3, 1\nlist E [cm^-1] = 0, 158.3, 227.0',
    },
    {
      name: 'order',
      says: 'An internal variable at which ln of the partition function is stationary. It is read and checked; properties of such models are not derived yet.',
      example: 'order theta between 0 and 1  "coverage"',
    },
    {
      name: 'q and Q',
      says: 'The partition function: of one molecule and then of all, or of all at once, or its logarithm. Exactly one is stated.',
      example: 'q = V / Lambda^3\nQ = q^N / N!',
    },
    {
      name: 'ln Q',
      says: 'The same, where the logarithm is what one has.',
      example: 'ln Q = N ln(V / (N Lambda^3)) + N',
    },
    {
      name: 'factorials exact',
      says: 'Keeps ln N! as ln Gamma(N + 1). Without it Stirling’s N ln N − N is taken, and the thermodynamic limit is meant.',
      example: 'factorials exact',
    },
    {
      name: 'molar',
      says: 'How a parameter is stated per mole; the molar forms of all results use it.',
      example: 'molar b_m [m^3 mol^-1] = N_Av b',
    },
    {
      name: 'report',
      says: 'A derived quantity of one’s own, named and treated like the others.',
      example: 'report packing = N b / V  "share of the volume that is taken"',
    },
    {
      name: 'claim',
      says: 'A statement that is checked with every version: an equality, a limit, or an inequality over a range.',
      example:
        'claim "internal pressure"  partial(U, V; T, N) = a N^2 / V^2\nclaim "ideal when dilute"  p V / (N k T) -> 1  as V -> inf\nclaim "stable"  kappa_T > 0  for T in 300 .. 600 [K], V/N in 1e-27 .. 1e-25 [m^3]',
    },
  ],
};

const expressions: Chapter = {
  id: 'expressions',
  title: 'Expressions',
  opening:
    'Expressions are written as in a paper. A product may be written by putting its factors side by side; ^ binds tightest and to the right. Where a reader could take a text in two ways it is refused, with both readings offered.',
  entries: [
    { name: 'products', says: 'Side by side or with *.', example: 'let x = 2 pi m k T' },
    {
      name: 'quotients',
      says: 'After a division the next factor needs * or parentheses: h / 2 pi is refused, since it may mean h/(2 pi) or (h/2) pi. A quotient of two plain numbers is one number and may be followed by a factor.',
      example: 'let y = 3/2 N k T',
    },
    {
      name: 'factorial',
      says: 'Written with an exclamation mark behind.',
      example: 'Q = q^N / N!',
    },
    {
      name: 'calls',
      says: 'A name before parentheses is a call if it names a function, otherwise a factor: exp(x) is the exponential, N (V − b) is a product.',
      example: 'let z = exp(-eps / (k T))',
    },
    {
      name: 'sum, product',
      says: 'Over a whole number, whose upper end may be inf.',
      example: 'let q_rot = sum J from 0 to inf { (2 J + 1) exp(-J (J + 1) Theta_r / T) }',
    },
    {
      name: 'integral',
      says: 'Over a variable, which has the dimension of its ends or the one said in brackets.',
      example: 'let I = integral r [m] from 0 to inf { r^2 exp(-u(r)/(k T)) }',
    },
    {
      name: 'cases',
      says: 'The first branch whose condition holds.',
      example: 'let u(r) = cases { r < s: inf;  r < 2 s: -eps;  otherwise: 0 }',
    },
    {
      name: 'Greek letters',
      says: 'As letters or by name: θ and theta are the same. What follows _ is a subscript.',
      example: 'let Λ = h / sqrt(2 π m k T)',
    },
    {
      name: 'partial',
      says: 'The derivative of one property by another with the rest held: X, Y; then what stays constant.',
      example: 'claim "of the text"  partial(U, V; T, N) = a N^2 / V^2',
    },
  ],
};

const functions: Chapter = {
  id: 'functions',
  title: 'Functions',
  opening: 'The arguments of all of them are plain numbers, without a unit.',
  entries: [
    { name: 'exp(x)', says: 'Exponential function. e alone is the elementary charge.' },
    { name: 'ln(x), log10(x)', says: 'Natural and decimal logarithm; log alone is refused.' },
    { name: 'sqrt(x)', says: 'Square root; its argument may carry a unit.' },
    { name: 'sinh, cosh, tanh, coth', says: 'Hyperbolic functions.' },
    { name: 'sin, cos, tan', says: 'Circular functions of an angle in radian.' },
    { name: 'arcsinh, arctanh', says: 'Inverse hyperbolic functions.' },
    { name: 'erf(x)', says: 'Error function.' },
    {
      name: 'polylog(s, z), besselI(n, x), debye(n, x)',
      says: 'Polylogarithm, modified Bessel function of the first kind, Debye function.',
    },
    { name: 'heaviside(x)', says: 'The unit step.' },
    {
      name: 'Gamma, lnGamma, digamma',
      says: 'Gamma function, its logarithm, the derivative of that.',
    },
    { name: 'binomial(n, k)', says: 'Binomial coefficient.' },
    { name: 'min, max, abs', says: 'The least, the greatest, the magnitude; units are kept.' },
  ],
};

const units: Chapter = {
  id: 'units',
  title: 'Units',
  opening:
    'Units stand in square brackets and nowhere else. They are the symbols of the SI with their prefixes and the usual accepted ones; a space multiplies, ^ raises, / divides. Every line is checked for dimensions: sums of like and like, plain numbers in exp and ln, every property in its own unit.',
  entries: [
    { name: 'base units', says: 'm, kg, s, A, K, mol, cd.' },
    { name: 'named units', says: 'N, Pa, J, W, C, V, Ω, T, Hz and the others of the SI.' },
    { name: 'accepted besides', says: 'u, eV, Å, bar, atm, cal, L, D, cm^-1.' },
    { name: 'prefixes', says: 'From f to T: nm, kJ, MPa, GHz.' },
    {
      name: 'powers and quotients',
      says: 'Both ways of writing mean the same.',
      example: 'parameter a [J m^3] = 3.7e-49\nmolar a_m [Pa m^6 mol^-2] = N_Av^2 a',
    },
    {
      name: 'numbers of molecules',
      says: 'N counts molecules and has no unit; mol is a dimension of its own, reached by N_Av.',
    },
  ],
};

const constants: Chapter = {
  id: 'constants',
  title: 'Constants of nature',
  opening:
    'Known without declaration. Those that define the SI are exact; the others have the values of CODATA 2022. pi, k, h and N_Av cannot be declared anew.',
  entries: [
    { name: 'k', says: 'Boltzmann constant, 1.380649 × 10⁻²³ J/K, exact.' },
    { name: 'h', says: 'Planck constant, 6.62607015 × 10⁻³⁴ J s, exact.' },
    { name: 'hbar', says: 'Planck constant over 2 π.' },
    { name: 'N_Av', says: 'Avogadro constant, 6.02214076 × 10²³ mol⁻¹, exact.' },
    { name: 'R', says: 'Molar gas constant, N_Av k.' },
    { name: 'c', says: 'Speed of light in vacuum, 299 792 458 m/s, exact.' },
    { name: 'e', says: 'Elementary charge, 1.602176634 × 10⁻¹⁹ C, exact.' },
    { name: 'm_e, m_u', says: 'Masses of the electron and of the atomic mass unit.' },
    { name: 'eps_0, mu_0', says: 'Electric and magnetic constant.' },
    { name: 'pi', says: 'Circumference over diameter; π is the same.' },
  ],
};

const properties: Chapter = {
  id: 'properties',
  title: 'What derives from it',
  opening:
    'From ln Q follow, by their definitions, these properties. Claims and reports may use them by these names.',
  entries: [
    { name: 'p', says: 'Pressure, or the conjugate of another extent.' },
    {
      name: 'U, S, A, G, H, Omega',
      says: 'Internal energy, entropy, Helmholtz and Gibbs energy, enthalpy, grand potential.',
    },
    { name: 'mu', says: 'Chemical potential; mu_w for a species w.' },
    {
      name: 'C_V, C_p, gamma',
      says: 'Heat capacities at constant volume and pressure; their ratio.',
    },
    {
      name: 'kappa_T, kappa_S, alpha',
      says: 'Isothermal and isentropic compressibility, cubic expansion coefficient.',
    },
    { name: 'pi_T', says: 'Internal pressure, (∂U/∂V) at constant temperature.' },
    { name: 'mu_JT', says: 'Joule–Thomson coefficient.' },
    { name: 'w', says: 'Speed of sound, where a mass m is given.' },
    { name: 'Z', says: 'Compression factor, p V/(N k T).' },
  ],
};

export const CHAPTERS: readonly Chapter[] = [
  statements,
  expressions,
  functions,
  units,
  constants,
  properties,
];

/** The chapters with those entries in which every word of the query occurs. */
export function searchReference(query: string): Chapter[] {
  const words = query.toLowerCase().split(/\s+/).filter(Boolean);
  if (words.length === 0) return [...CHAPTERS];
  return CHAPTERS.flatMap((chapter) => {
    const entries = chapter.entries.filter((entry) => {
      const text =
        `${chapter.title} ${entry.name} ${entry.says} ${entry.example ?? ''}`.toLowerCase();
      return words.every((word) => text.includes(word));
    });
    return entries.length > 0 ? [{ ...chapter, entries }] : [];
  });
}
