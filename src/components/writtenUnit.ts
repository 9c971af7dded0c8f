/** Units and powers of ten as they are printed: `m^3` with a raised 3. */

const RAISED: Readonly<Record<string, string>> = {
  '-': '⁻',
  0: '⁰',
  1: '¹',
  2: '²',
  3: '³',
  4: '⁴',
  5: '⁵',
  6: '⁶',
  7: '⁷',
  8: '⁸',
  9: '⁹',
};

/** The digits and signs raised: `-23` becomes `⁻²³`. */
export function raised(digits: string): string {
  return [...digits].map((digit) => RAISED[digit] ?? digit).join('');
}

/** `J m^3` as `J m³`; a broken power, `m^(1/2)`, stays as it is typed. */
export function writtenUnit(unit: string): string {
  return unit.replace(/\^(-?\d+)(?!\d|\/)/g, (_, digits: string) => raised(digits));
}
