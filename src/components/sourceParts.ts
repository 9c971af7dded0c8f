/** A source text cut into the parts that are coloured differently. */

export type SourceKind = 'plain' | 'keyword' | 'unit' | 'text' | 'comment';

export interface SourcePart {
  readonly kind: SourceKind;
  readonly text: string;
}

const PART =
  /(#[^\n]*)|("[^"\n]*"?)|(\[[^\]\n]*\]?)|\b(ensemble|species|extent|field|response|constant|parameter|between|and|list|let|order|saddle|factorials|molar|report|claim|as|for|in|sum|product|integral|from|to|cases|otherwise)\b/g;

/** The parts of the source in order; together they are the source again. */
export function sourceParts(source: string): SourcePart[] {
  const parts: SourcePart[] = [];
  let end = 0;
  for (const match of source.matchAll(PART)) {
    const [text, comment, quoted, unit] = match;
    if (match.index > end) parts.push({ kind: 'plain', text: source.slice(end, match.index) });
    const kind = comment ? 'comment' : quoted ? 'text' : unit ? 'unit' : 'keyword';
    parts.push({ kind, text });
    end = match.index + text.length;
  }
  if (end < source.length) parts.push({ kind: 'plain', text: source.slice(end) });
  return parts;
}

/** The parts of each line; a part that spans lines is cut at their ends. */
export function sourceLines(source: string): SourcePart[][] {
  const lines: SourcePart[][] = [[]];
  for (const part of sourceParts(source)) {
    part.text.split('\n').forEach((text, index) => {
      if (index > 0) lines.push([]);
      if (text !== '') lines.at(-1)?.push({ kind: part.kind, text });
    });
  }
  return lines;
}
