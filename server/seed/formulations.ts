/**
 * The formulations of the demonstration. The functional forms are those of the literature; the
 * substance K-7 and all its numbers are invented.
 */
export interface DemonstrationModel {
  readonly title: string;
  readonly source: string;
  /** Why it was frozen; undefined for a model that is only a draft. */
  readonly note?: string;
}

export const DEMONSTRATION_MODELS: readonly DemonstrationModel[] = [
  {
    title: 'Hard core with mean-field attraction',
    note: 'First statement for K-7',
    source: `# Hard core with mean-field attraction
ensemble canonical

constant  m [u] = 39.948  "molecular mass"
parameter a [J m^3] = 3.7e-49 between 0 and 1e-47 "attraction"
parameter b [m^3] = 5.3e-29 between 1e-30 and 1e-27 "excluded volume"

let Lambda = h / sqrt(2 pi m k T)

q = (V - N b) / Lambda^3 * exp(a N / (V k T))
Q = q^N / N!

molar a_m [Pa m^6 mol^-2] = N_Av^2 a
molar b_m [m^3 mol^-1] = N_Av b

claim "ideal when dilute"  p V / (N k T) -> 1  as V -> inf
claim "internal pressure"  partial(U, V; T, N) = a N^2 / V^2
`,
  },
  {
    title: 'Hard spheres with mean-field attraction',
    note: 'The repulsion of Carnahan and Starling in place of the excluded volume',
    source: `# Hard spheres (Carnahan and Starling 1969) with mean-field attraction
ensemble canonical

constant  m [u] = 39.948  "molecular mass"
parameter sigma [Å] = 3.4 between 2 and 6 "diameter"
parameter a [J m^3] = 3.7e-49 between 0 and 1e-47 "attraction"

let Lambda = h / sqrt(2 pi m k T)
let eta = pi N sigma^3 / (6 V)

ln Q = N ln(V / Lambda^3) - ln(N!) - N (4 eta - 3 eta^2)/(1 - eta)^2 + a N^2 / (V k T)

claim "ideal when dilute"  p V / (N k T) -> 1  as V -> inf
`,
  },
  {
    title: 'Carrier gas, rigid rotor and oscillator',
    note: 'High-temperature rotor for the carrier gas',
    source: `# Carrier gas: rigid rotor at high temperature, one harmonic vibration
ensemble canonical

constant m [u] = 28.0134  "molecular mass"
constant Theta_r [K] = 2.88  "rotational temperature"
constant Theta_v [K] = 3374  "vibrational temperature"
constant sigma = 2  "symmetry number"

let Lambda = h / sqrt(2 pi m k T)

q = V / Lambda^3 * T / (sigma Theta_r) * exp(-Theta_v / (2 T)) / (1 - exp(-Theta_v / T))
Q = q^N / N!

claim "equipartition of rotation"  C_V / (N k) -> 5/2  as T -> 0
`,
  },
  {
    title: 'Packing of the store, Einstein solid',
    note: 'Heat capacity of the packing',
    source: `# Packing of the store as independent oscillators (Einstein 1907)
ensemble canonical

parameter Theta_E [K] = 300 between 1 and 5000 "Einstein temperature"

ln Q = - 3 N Theta_E / (2 T) - 3 N ln(1 - exp(-Theta_E / T))

claim "Dulong and Petit"  C_V / (N k) -> 3  as T -> inf
`,
  },
  {
    title: 'Two states of the additive',
    source: `# Two states of the additive, the upper one g-fold
ensemble canonical

parameter eps [J] = k 100 [K]  "gap"
parameter g = 2 between 0 and 100 "weight of the upper state"

Q = (1 + g exp(-eps / (k T)))^N
`,
  },
];
