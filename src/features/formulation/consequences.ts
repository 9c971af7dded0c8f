/** The properties that are derived while one types; the Properties section has all. */
export const CONSEQUENCES: readonly string[] = ['p', 'U', 'S', 'A', 'mu', 'C_V', 'C_p', 'N', 'Z'];
