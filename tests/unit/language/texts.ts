/** Formulations that several tests read: the examples of the language. */

export const FLUID = `# Hard-core fluid with mean-field attraction
ensemble canonical

constant  m [u]      = 39.948                            "molecular mass"
parameter a [J m^3]  = 3.7e-49  between 0 and 1e-47      "attraction"
parameter b [m^3]    = 5.3e-29  between 1e-30 and 1e-27  "excluded volume per molecule"

let Lambda = h / sqrt(2 pi m k T)

q = (V - N b) / Lambda^3 * exp(a N / (V k T))
Q = q^N / N!

molar a_m [Pa m^6 mol^-2] = N_Av^2 a
molar b_m [m^3 mol^-1]    = N_Av b

claim "ideal when dilute"    p V / (N k T) -> 1   as V -> inf
claim "internal pressure"    partial(U, V; T, N) = a N^2 / V^2
claim "mechanically stable"  kappa_T > 0          for T in 300 .. 600 [K], V/N in 1e-27 .. 1e-25 [m^3]
`;

export const LATTICE_GAS = `# Lattice gas, Bragg-Williams, on M sites of coordination z
ensemble grand canonical
extent M [1]  "adsorption sites"
constant  z = 4
parameter eps [J] = k 150 [K]
order theta between 0 and 1  "coverage"
ln Xi = M ( - theta ln(theta) - (1 - theta) ln(1 - theta)
            + theta mu/(k T) + z eps theta^2 / (2 k T) )
report n_ads = N / M  "molecules per site"
`;

export const DIATOMIC_GAS = `# Diatomic gas
ensemble canonical
constant m [u] = 28.0134
constant Theta_r [K] = 2.88
constant Theta_v [K] = 3374
constant sigma = 2
let Lambda = h / sqrt(2 pi m k T)
let q_rot = 1/sigma * sum J from 0 to inf { (2 J + 1) exp(-J (J + 1) Theta_r / T) }
let q_vib = exp(-Theta_v/(2 T)) / (1 - exp(-Theta_v/T))
Q = (V / Lambda^3 * q_rot * q_vib)^N / N!
`;
