/** What a formulation may be at most; beyond it the text is refused in plain words. */

/** Bytes of the source in UTF-8. */
export const LARGEST_SOURCE = 65_536;
/** How deep parentheses, exponents, signs and bodies may stand in one another. */
export const DEEPEST_NESTING = 200;
/** How deep an expression may be once its abbreviations and functions are put in. */
export const DEEPEST_EXPRESSION = 400;
/** How many parts of expressions are read with functions put in for each of their calls. */
export const MOST_PARTS = 200_000;
/** Binary digits of an exact number. */
export const LONGEST_NUMBER_BITS = 8192;
/** The largest power of ten in a number as written. */
export const LARGEST_DECIMAL_EXPONENT = 400;
/** Digits of a number as written. */
export const MOST_DIGITS = 400;
/** Findings that are reported of one text. */
export const MOST_FINDINGS = 100;
