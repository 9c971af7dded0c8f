/** Formulations that tests use. */

export const IDEAL_GAS = `# Ideal gas
ensemble canonical
constant m [u] = 39.948 "molecular mass"
let Lambda = h / sqrt(2 pi m k T)
q = V / Lambda^3
Q = q^N / N!
`;

export const HARD_CORE_FLUID = `# Hard-core fluid with mean-field attraction
ensemble canonical
constant  m [u]      = 39.948                            "molecular mass"
parameter a [J m^3]  = 3.7e-49  between 0 and 1e-47      "attraction"
parameter b [m^3]    = 5.3e-29  between 1e-30 and 1e-27  "excluded volume per molecule"
let Lambda = h / sqrt(2 pi m k T)
q = (V - N b) / Lambda^3 * exp(a N / (V k T))
Q = q^N / N!
`;

/** A name that nothing defines. */
export const AT_FAULT = `# At fault
ensemble canonical
Q = (V * nothing)^N / N!
`;
