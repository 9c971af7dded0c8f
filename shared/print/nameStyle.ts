/** How names are typeset and in which order they stand in a product. */

export interface NameStyle {
  /** TeX of a name; letters, digits and our own commands only, whatever the name holds. */
  texOf(name: string): string;
  /** Names of lower rank stand further left in a product. */
  rankOf(name: string): number;
}

const GREEK: ReadonlySet<string> = new Set([
  'alpha',
  'beta',
  'gamma',
  'delta',
  'zeta',
  'eta',
  'iota',
  'kappa',
  'lambda',
  'mu',
  'nu',
  'xi',
  'pi',
  'rho',
  'sigma',
  'tau',
  'upsilon',
  'chi',
  'psi',
  'omega',
  'Gamma',
  'Delta',
  'Theta',
  'Lambda',
  'Xi',
  'Pi',
  'Sigma',
  'Upsilon',
  'Phi',
  'Psi',
  'Omega',
]);

/** Spellings whose TeX is not simply a backslash before them. */
const LETTERS: Readonly<Record<string, string>> = {
  eps: '\\varepsilon',
  epsilon: '\\varepsilon',
  theta: '\\theta',
  vartheta: '\\vartheta',
  phi: '\\varphi',
  hbar: '\\hbar',
  ell: '\\ell',
};

/** Whole names with a typography of their own, after ISO 80000 and IUPAC's Green Book. */
const NAMES: Readonly<Record<string, string>> = {
  N_Av: 'N_{\\mathrm{A}}',
  mu_JT: '\\mu_{\\mathrm{JT}}',
  m_e: 'm_{\\mathrm{e}}',
  m_u: 'm_{\\mathrm{u}}',
  eps_0: '\\varepsilon_{0}',
  mu_0: '\\mu_{0}',
};

/** Subscripts that are quantities themselves and so stand in italics: C_V, κ_T. */
const QUANTITIES: ReadonlySet<string> = new Set([
  'V',
  'T',
  'p',
  'S',
  'N',
  'x',
  'i',
  'j',
  'n',
  'H',
  'U',
  'M',
  'L',
  'B',
]);

function stripped(text: string): string {
  return text.replace(/[^A-Za-z0-9]/g, '');
}

function letterTex(text: string): string | undefined {
  if (Object.hasOwn(LETTERS, text)) return LETTERS[text];
  return GREEK.has(text) ? `\\${text}` : undefined;
}

/** Text of a name that is no letter of its own: upright, and never empty, so that TeX has a base. */
function uprightTex(clean: string): string {
  return `\\mathrm{${clean === '' ? '?' : clean}}`;
}

function headTex(head: string): string {
  const letter = letterTex(head);
  if (letter) return letter;
  const clean = stripped(head);
  return clean.length === 1 ? clean : uprightTex(clean);
}

function subscriptTex(subscript: string): string {
  const letter = letterTex(subscript);
  if (letter) return letter;
  const clean = stripped(subscript);
  return QUANTITIES.has(clean) || /^\d+$/.test(clean) ? clean : uprightTex(clean);
}

/** The typography of a name by itself: `Theta_E` is Θ with an upright E below. */
export function texOfName(name: string): string {
  if (Object.hasOwn(NAMES, name)) return NAMES[name] ?? '';
  const [whole = '', ...subscripts] = name.split('_');
  // A letter with digits behind it, as in B2 and x1, is the letter with a numeral below.
  const [, letter, numeral] = /^([A-Za-z]+?)(\d+)$/.exec(whole) ?? [];
  const isNumbered = letter !== undefined && (letter.length === 1 || letterTex(letter));
  const head = isNumbered ? letter : whole;
  const below = subscripts.filter((part) => part !== '').map(subscriptTex);
  if (isNumbered && numeral !== undefined) below.unshift(numeral);
  return below.length === 0 ? headTex(head) : `${headTex(head)}_{${below.join(',')}}`;
}

/** Where the author's products say nothing: quantities of the model first, then N, k, T, then V. */
const DEFAULT_ORDER = ['N', 'k', 'T', 'V'];

/**
 * The style of a formulation: products follow the order of its names as the author writes them;
 * names that are not in it come first, N, k, T and V last.
 */
export function nameStyle(nameOrder: readonly string[] = []): NameStyle {
  const ranks = new Map(nameOrder.map((name, i) => [name, i + 1]));
  const behind = nameOrder.length + 1;
  const written = new Map<string, string>();
  return {
    texOf(name) {
      let tex = written.get(name);
      if (tex === undefined) written.set(name, (tex = texOfName(name)));
      return tex;
    },
    rankOf(name) {
      const rank = ranks.get(name);
      if (rank !== undefined) return rank;
      const standard = DEFAULT_ORDER.indexOf(name);
      return standard >= 0 ? behind + standard : 0.5;
    },
  };
}
