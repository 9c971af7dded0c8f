/**
 * Ten models of rising size, each in two spellings: a formulation, and ln Q as a plain expression
 * for the peers. The coefficients are invented; only the shape of the models matters here.
 */
export interface BenchModel {
  readonly name: string;
  /**
   * The formulation with `tag` behind every declared name, so that a second run meets a model that
   * is new to everything remembered from the first.
   */
  readonly source: (tag: string) => string;
  /** ln Q in N, V, T, k, h, pi, m and the names of `parameters`; `^`, log, exp and sqrt as usual. */
  readonly lnQ: string;
  readonly parameters: readonly string[];
}

const IDEAL_LNQ = 'N*log(V/N) + N + 3/2*N*log(2*pi*m*k*T/h^2)';

const preamble = (title: string, tag: string): string => `# ${title}
ensemble canonical
constant m${tag} [u] = 39.948 "molecular mass"
let Lambda${tag} = h / sqrt(2 pi m${tag} k T)
`;

/** Σ of `count` terms of the density expansion, in the language and for the peers. */
function virialTerms(count: number, x: string, t: string): string[] {
  return Array.from({ length: count }, (_, index) => {
    const power = index + 1;
    const steady = `${power % 3}.${String((power * 37) % 100).padStart(2, '0')}`;
    const thermal = `${power % 2}.${String((power * 53) % 100 || 1).padStart(2, '0')}`;
    return `(${steady} - ${thermal}/${t}) * ${x}^${power}`;
  });
}

function virial(count: number): BenchModel {
  return {
    name: `virial expansion, ${count} terms`,
    source: (tag) => `${preamble(`Virial expansion with ${count} terms`, tag)}
parameter v_0${tag} [m^3] = 5e-29 between 1e-30 and 1e-27 "molecular volume"
parameter T_0${tag} [K] = 150 between 10 and 1000 "characteristic temperature"
let x${tag} = N v_0${tag} / V
let t${tag} = T / T_0${tag}
ln Q = N ln(V / (N Lambda${tag}^3)) + N - N * (${virialTerms(count, `x${tag}`, `t${tag}`).join(' + ')})
`,
    lnQ: `${IDEAL_LNQ} - N*(${virialTerms(count, '(N*v_0/V)', '(T/T_0)').join(' + ')})`,
    parameters: ['v_0', 'T_0'],
  };
}

const DISPERSION = [0.91, 0.64, 2.69, 26.5, 97.8, 159.6, 91.3];
const SECOND_DISPERSION = [0.72, 2.24, 4.0, 21.5, 65.3, 206.6, 355.6];
const polynomial = (coefficients: readonly number[], x: string): string =>
  coefficients
    .map((c, i) => (i === 0 ? String(c) : `${c} * ${x}${i === 1 ? '' : `^${i}`}`))
    .join(' - ');

const PEER_DIAMETER = '(s*(1 - 0.12*exp(-3*e/T)))';
const PEER_ETA = `(pi*r*N*${PEER_DIAMETER}^3/(6*V))`;

export const MODELS: readonly BenchModel[] = [
  {
    name: 'ideal gas',
    source: (tag) => `${preamble('Ideal gas', tag)}
Q = (V / Lambda${tag}^3)^N / N!
`,
    lnQ: IDEAL_LNQ,
    parameters: [],
  },
  {
    name: 'two levels',
    source: (tag) => `${preamble('Gas of two-level atoms', tag)}
constant g${tag} = 3 "degeneracy of the upper level"
constant D${tag} [K] = 1200 "temperature of the upper level"
Q = (V / Lambda${tag}^3 * (1 + g${tag} exp(-D${tag} / T)))^N / N!
`,
    lnQ: `${IDEAL_LNQ} + N*log(1 + g*exp(-D/T))`,
    parameters: ['g', 'D'],
  },
  {
    name: 'Einstein crystal',
    source: (tag) => `# Einstein crystal that stiffens on compression
ensemble canonical
parameter Theta_0${tag} [K] = 240 between 10 and 2000 "characteristic temperature"
parameter v_0${tag} [m^3] = 1.2e-29 between 1e-30 and 1e-28 "volume per atom"
parameter G${tag} = 2 between 0 and 5 "stiffening exponent"
parameter E_0${tag} [J] = 1.1e-19 between 0 and 1e-17 "cohesive energy"
let Theta${tag} = Theta_0${tag} (N v_0${tag} / V)^G${tag}
ln Q = N E_0${tag} N v_0${tag} / (V k T) - 3 N Theta${tag} / (2 T) - 3 N ln(1 - exp(-Theta${tag} / T))
`,
    lnQ: 'N*E_0*N*v_0/(V*k*T) - 3*N*A_0*(N*v_0/V)^G/(2*T) - 3*N*log(1 - exp(-A_0*(N*v_0/V)^G/T))',
    parameters: ['A_0', 'v_0', 'G', 'E_0'],
  },
  {
    name: 'van der Waals',
    source: (tag) => `${preamble('Hard-core fluid with mean-field attraction', tag)}
parameter a${tag} [J m^3] = 3.7e-49 between 0 and 1e-47 "attraction"
parameter b${tag} [m^3] = 5.3e-29 between 1e-30 and 1e-27 "excluded volume per molecule"
q = (V - N b${tag}) / Lambda${tag}^3 * exp(a${tag} N / (V k T))
Q = q^N / N!
`,
    lnQ: 'N*log((V - N*b)/N) + N + 3/2*N*log(2*pi*m*k*T/h^2) + a*N^2/(V*k*T)',
    parameters: ['a', 'b'],
  },
  {
    name: 'lattice fluid',
    source: (tag) => `${preamble('Lattice fluid with pair attraction', tag)}
parameter v_0${tag} [m^3] = 3e-29 between 1e-30 and 1e-27 "volume of a cell"
parameter w_0${tag} [J] = 2e-21 between 0 and 1e-19 "pair attraction"
constant z${tag} = 6 "coordination"
let M${tag} = V / v_0${tag}
ln Q = N ln(v_0${tag} / Lambda${tag}^3) + M${tag} ln(M${tag}) - N ln(N) - (M${tag} - N) ln(M${tag} - N)
     + z${tag} w_0${tag} N^2 / (2 M${tag} k T)
`,
    lnQ: 'N*log(v_0) + 3/2*N*log(2*pi*m*k*T/h^2) + V/v_0*log(V/v_0) - N*log(N) - (V/v_0 - N)*log(V/v_0 - N) + z*w_0*N^2*v_0/(2*V*k*T)',
    parameters: ['v_0', 'w_0', 'z'],
  },
  {
    name: 'Carnahan-Starling, mean field',
    source: (tag) => `${preamble('Hard spheres with mean-field attraction', tag)}
parameter a${tag} [J m^3] = 3.7e-49 between 0 and 1e-47 "attraction"
parameter b${tag} [m^3] = 5.3e-29 between 1e-30 and 1e-27 "four times the volume of a sphere"
let eta${tag} = N b${tag} / (4 V)
ln Q = N ln(V / (N Lambda${tag}^3)) + N - N eta${tag} (4 - 3 eta${tag}) / (1 - eta${tag})^2
     + a${tag} N^2 / (V k T)
`,
    lnQ: `${IDEAL_LNQ} - N*(N*b/(4*V))*(4 - 3*(N*b/(4*V)))/(1 - N*b/(4*V))^2 + a*N^2/(V*k*T)`,
    parameters: ['a', 'b'],
  },
  {
    name: 'diatomic gas, closed form',
    source: (tag) => `${preamble('Diatomic gas with two electronic levels', tag)}
constant Theta_r${tag} [K] = 2.88 "rotation"
constant Theta_v${tag} [K] = 3374 "vibration"
constant Theta_e${tag} [K] = 11400 "electronic level"
constant g${tag} = 3 "degeneracy of the electronic level"
let q_rot${tag} = T / (2 Theta_r${tag}) * (1 + Theta_r${tag} / (3 T) + Theta_r${tag}^2 / (15 T^2))
let q_vib${tag} = exp(-Theta_v${tag} / (2 T)) / (1 - exp(-Theta_v${tag} / T))
let q_el${tag} = 1 + g${tag} exp(-Theta_e${tag} / T)
Q = (V / Lambda${tag}^3 * q_rot${tag} * q_vib${tag} * q_el${tag})^N / N!
`,
    lnQ: `${IDEAL_LNQ} + N*log(T/(2*A)*(1 + A/(3*T) + A^2/(15*T^2))) - N*B/(2*T) - N*log(1 - exp(-B/T)) + N*log(1 + g*exp(-C/T))`,
    parameters: ['A', 'B', 'C', 'g'],
  },
  virial(10),
  {
    name: 'chain fluid, dispersion of order 6',
    source: (tag) => `${preamble('Chains of spheres with dispersion of sixth order', tag)}
parameter r${tag} = 2.1 between 1 and 20 "segments in a chain"
parameter s${tag} [m] = 3.7e-10 between 1e-10 and 1e-9 "diameter of a segment"
parameter E${tag} [K] = 240 between 10 and 1000 "depth of the attraction"
let d${tag} = s${tag} (1 - 0.12 exp(-3 E${tag} / T))
let eta${tag} = pi r${tag} N d${tag}^3 / (6 V)
let g${tag} = (1 - eta${tag} / 2) / (1 - eta${tag})^3
let I_1${tag} = ${polynomial(DISPERSION, `eta${tag}`)}
let I_2${tag} = ${polynomial(SECOND_DISPERSION, `eta${tag}`)}
let C_1${tag} = 1 / (1 + r${tag} (8 eta${tag} - 2 eta${tag}^2) / (1 - eta${tag})^4)
ln Q = N ln(V / (N Lambda${tag}^3)) + N
     - N r${tag} eta${tag} (4 - 3 eta${tag}) / (1 - eta${tag})^2
     + N (r${tag} - 1) ln(g${tag})
     + 2 pi N^2 r${tag}^2 E${tag} s${tag}^3 I_1${tag} / (V T)
     + pi N^2 r${tag}^3 C_1${tag} E${tag}^2 s${tag}^3 I_2${tag} / (V T^2)
`,
    lnQ: [
      IDEAL_LNQ,
      ` - N*r*${PEER_ETA}*(4 - 3*${PEER_ETA})/(1 - ${PEER_ETA})^2`,
      ` + N*(r - 1)*log((1 - ${PEER_ETA}/2)/(1 - ${PEER_ETA})^3)`,
      ` + 2*pi*N^2*r^2*e*s^3*(${polynomial(DISPERSION, PEER_ETA)})/(V*T)`,
      ` + pi*N^2*r^3*e^2*s^3*(${polynomial(SECOND_DISPERSION, PEER_ETA)})/(V*T^2)`,
      `/(1 + r*(8*${PEER_ETA} - 2*${PEER_ETA}^2)/(1 - ${PEER_ETA})^4)`,
    ].join(''),
    parameters: ['r', 's', 'e'],
  },
  virial(50),
];
