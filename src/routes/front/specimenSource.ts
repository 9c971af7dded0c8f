/** The formulation that stands on the front door, and that a new model may begin from. */
export const SPECIMEN = `ensemble canonical

constant  m [u] = 39.948  "molecular mass"
parameter a [J m^3] = 3.7e-49 between 0 and 1e-47 "attraction"
parameter b [m^3] = 5.3e-29 between 1e-30 and 1e-27 "excluded volume"

let Λ = h / sqrt(2 π m k T)

q = (V - N b) / Λ^3 * exp(a N / (V k T))
Q = q^N / N!
claim "ideal when dilute"  p V / (N k T) -> 1  as V -> inf`;

/** The properties that the specimen shows; only these are derived while one types. */
export const SPECIMEN_PROPERTIES: readonly string[] = ['p', 'U', 'S', 'C_V', 'C_p'];
