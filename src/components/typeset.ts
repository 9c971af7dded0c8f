/**
 * TeX to markup by KaTeX. The input may stem from a person's text, so everything that could leave
 * the formula's box is off (trust), macros and sizes are bounded, the length is capped before
 * KaTeX sees it (its time grows with it without bound), and whatever it throws is caught.
 */
import katex from 'katex';

/** TeX longer than this is shown as text: KaTeX takes 0.5 s for ten thousand characters. */
export const LONGEST_TEX = 10_000;
const REMEMBERED = 600;

const memory = new Map<string, string | null>();

/** Markup made by KaTeX, or null where it cannot be typeset. */
export function typeset(tex: string, isDisplay: boolean): string | null {
  if (tex.length > LONGEST_TEX) return null;
  const key = `${isDisplay ? 'd' : 'i'}${tex}`;
  const known = memory.get(key);
  if (known !== undefined) return known;
  let markup: string | null;
  try {
    markup = katex.renderToString(tex, {
      displayMode: isDisplay,
      output: 'htmlAndMathml',
      throwOnError: true,
      strict: 'ignore',
      trust: false,
      maxExpand: 200,
      maxSize: 20,
    });
  } catch {
    markup = null;
  }
  if (memory.size >= REMEMBERED) {
    const [oldest] = memory.keys();
    if (oldest !== undefined) memory.delete(oldest);
  }
  memory.set(key, markup);
  return markup;
}
