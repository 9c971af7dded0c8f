/** A source text cut into the parts that are coloured differently. */
import { tokensOf } from '../../shared/language/highlight.ts';

export type SourceKind = 'plain' | 'keyword' | 'unit' | 'text' | 'comment';

export interface SourcePart {
  readonly kind: SourceKind;
  readonly text: string;
}

/** The parts of the source in order; together they are the source again. */
export function sourceParts(source: string): SourcePart[] {
  const parts: SourcePart[] = [];
  let end = 0;
  for (const { kind, span } of tokensOf(source)) {
    if (kind === 'number' || kind === 'name' || kind === 'operator') continue;
    if (span.start > end) parts.push({ kind: 'plain', text: source.slice(end, span.start) });
    parts.push({ kind, text: source.slice(span.start, span.end) });
    end = span.end;
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
