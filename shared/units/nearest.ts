/** The known word that a mistyped one was probably meant to be. */

/** Changes of one letter, swaps of neighbours included, that lead from a to b. */
function distance(a: string, b: string, limit: number): number {
  if (Math.abs(a.length - b.length) > limit) return limit + 1;
  let beforeLast: number[] = [];
  let last = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const change = a[i - 1] === b[j - 1] ? 0 : 1;
      let best = Math.min(
        (last[j] ?? limit) + 1,
        (row[j - 1] ?? limit) + 1,
        (last[j - 1] ?? limit) + change,
      );
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) {
        best = Math.min(best, (beforeLast[j - 2] ?? limit) + 1);
      }
      row.push(best);
    }
    beforeLast = last;
    last = row;
  }
  return last[b.length] ?? limit + 1;
}

/** Longer words are no names of anybody's and are not searched for. */
const LONGEST = 40;

/**
 * The nearest of the candidates, if it is near enough to be meant: at most a third of the letters
 * changed, another case counting as nothing. Undefined otherwise.
 */
export function nearest(word: string, candidates: Iterable<string>): string | undefined {
  if (word.length > LONGEST) return undefined;
  const limit = Math.max(1, Math.floor(word.length / 3));
  let best: string | undefined;
  let bestDistance = limit + 1;
  for (const candidate of candidates) {
    if (candidate === word || candidate.length > LONGEST) continue;
    if (candidate.toLowerCase() === word.toLowerCase()) return candidate;
    // Of two single letters each is as near to the other as to all the rest.
    if (word.length === 1 || candidate.length === 1) continue;
    const d = distance(word, candidate, limit);
    if (d < bestDistance) {
      best = candidate;
      bestDistance = d;
    }
  }
  return best;
}
