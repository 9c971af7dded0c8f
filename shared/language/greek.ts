/**
 * Spellings of names. Greek letters may be typed as letters or by name: `θ_r` is `theta_r`. Inside
 * the product every name has its ASCII spelling, and `eps` stands for epsilon.
 */

const LETTERS: Readonly<Record<string, string>> = {
  α: 'alpha',
  β: 'beta',
  γ: 'gamma',
  δ: 'delta',
  ε: 'eps',
  ϵ: 'eps',
  ζ: 'zeta',
  η: 'eta',
  θ: 'theta',
  ϑ: 'theta',
  ι: 'iota',
  κ: 'kappa',
  ϰ: 'kappa',
  λ: 'lambda',
  μ: 'mu',
  '\u00b5': 'mu',
  ν: 'nu',
  ξ: 'xi',
  π: 'pi',
  ρ: 'rho',
  ϱ: 'rho',
  σ: 'sigma',
  ς: 'sigma',
  τ: 'tau',
  υ: 'upsilon',
  φ: 'phi',
  ϕ: 'phi',
  χ: 'chi',
  ψ: 'psi',
  ω: 'omega',
  Γ: 'Gamma',
  Δ: 'Delta',
  Θ: 'Theta',
  Λ: 'Lambda',
  Ξ: 'Xi',
  Π: 'Pi',
  Σ: 'Sigma',
  Φ: 'Phi',
  Ψ: 'Psi',
  Ω: 'Omega',
  ħ: 'hbar',
  ℏ: 'hbar',
};

const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';

/** What a name may be made of; a name begins with a letter. */
export const NAME_START = /[A-Za-zΑ-Ωα-ωϑϕϵϰϱµħℏ]/;
export const NAME_PART = /[A-Za-z0-9_Α-Ωα-ωϑϕϵϰϱµħℏ₀-₉]/;

/** The ASCII spelling of a name as typed. */
export function asciiName(spelled: string): string {
  if (/^[\x21-\x7e]*$/.test(spelled) && !spelled.includes('epsilon')) return spelled;
  let result = '';
  let wasSubscript = false;
  for (const character of spelled) {
    const digit = SUBSCRIPTS.indexOf(character);
    if (digit >= 0) {
      result += (wasSubscript || result.endsWith('_') ? '' : '_') + String(digit);
      wasSubscript = true;
    } else {
      result += Object.hasOwn(LETTERS, character) ? (LETTERS[character] ?? '') : character;
      wasSubscript = false;
    }
  }
  return result
    .split('_')
    .map((part) => (part === 'epsilon' ? 'eps' : part))
    .join('_');
}

/** Names of the Greek letters with the letter, for completion and hover. */
export const GREEK_NAMES: ReadonlyMap<string, string> = new Map(
  Object.entries(LETTERS)
    .filter(([letter]) => !/[ϵϑϰϱςϕµħℏ]/.test(letter))
    .map(([letter, name]) => [name, letter]),
);
