/** Puts the marks of faults and warnings on the parts of coloured lines. */
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import type { SourcePart } from '../../components/sourceParts.ts';

export interface MarkedPart extends SourcePart {
  readonly mark?: 'fault' | 'warning';
}

type Spanned = Pick<Diagnostic, 'severity' | 'span'>;

/** Cuts the parts where a fault begins or ends; a fault outweighs a warning. */
export function markFaults(
  lines: readonly (readonly SourcePart[])[],
  diagnostics: readonly Spanned[],
): MarkedPart[][] {
  const marks = diagnostics
    .filter(({ severity }) => severity !== 'information')
    .map(({ severity, span }) => ({
      start: span.start,
      end: Math.max(span.end, span.start + 1),
      mark: severity === 'error' ? ('fault' as const) : ('warning' as const),
    }));
  let offset = 0;
  return lines.map((parts) => {
    const marked = parts.flatMap((part) => {
      const start = offset;
      const end = start + part.text.length;
      offset = end;
      const cuts = new Set([start, end]);
      for (const mark of marks) {
        if (mark.start > start && mark.start < end) cuts.add(mark.start);
        if (mark.end > start && mark.end < end) cuts.add(mark.end);
      }
      const edges = [...cuts].sort((a, b) => a - b);
      return edges.slice(0, -1).map<MarkedPart>((from, index) => {
        const to = edges[index + 1] ?? end;
        const over = marks.filter((mark) => mark.start < to && mark.end > from);
        const mark = over.find(({ mark }) => mark === 'fault')?.mark ?? over[0]?.mark;
        const text = part.text.slice(from - start, to - start);
        return mark ? { kind: part.kind, text, mark } : { kind: part.kind, text };
      });
    });
    // The line break.
    offset += 1;
    return marked;
  });
}
