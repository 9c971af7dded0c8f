/** Collects what is found of one source text and puts it into its final form. */
import { CATALOGUE, type Code } from './catalogue.ts';
import type { Diagnostic, Repair, Span } from './diagnostic.ts';
import { MOST_FINDINGS } from './limits.ts';

/** Offsets at which the lines of a text begin. */
export function lineStartsOf(source: string): number[] {
  const starts = [0];
  for (let at = source.indexOf('\n'); at >= 0; at = source.indexOf('\n', at + 1)) {
    starts.push(at + 1);
  }
  return starts;
}

/** Line and column, both counted from 1, of an offset. */
export function placeOf(
  starts: readonly number[],
  offset: number,
): { line: number; column: number } {
  let low = 0;
  let high = starts.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((starts[middle] ?? 0) <= offset) low = middle;
    else high = middle - 1;
  }
  return { line: low + 1, column: offset - (starts[low] ?? 0) + 1 };
}

function fill(template: string, values: Readonly<Record<string, string>>): string {
  if (!template.includes('{')) return template;
  return template.replace(/\{(\w+)\}/g, (whole, key: string) =>
    Object.hasOwn(values, key) ? (values[key] ?? '') : whole,
  );
}

export class Findings {
  readonly source: string;
  private readonly starts: readonly number[];
  private readonly found = new Map<string, Diagnostic>();
  private errors = 0;

  constructor(source: string) {
    this.source = source;
    this.starts = lineStartsOf(source);
  }

  get errorCount(): number {
    return this.errors;
  }

  /** Reports a fault; the same fault at the same place is reported once. */
  add(
    code: Code,
    span: Span,
    values: Readonly<Record<string, string>> = {},
    repairs: readonly Repair[] = [],
  ): void {
    const { severity, message, hint } = CATALOGUE[code];
    if (severity === 'error') this.errors++;
    const key = `${code} ${span.start}`;
    if (this.found.has(key) || this.found.size > MOST_FINDINGS) return;
    if (this.found.size === MOST_FINDINGS && code !== 'too-many-findings') {
      this.add('too-many-findings', span);
      return;
    }
    this.found.set(key, {
      code,
      severity,
      span,
      ...placeOf(this.starts, span.start),
      message: fill(message, values),
      hint: fill(hint, values),
      repairs,
    });
  }

  /** `in line 4`. */
  lineWords(span: Span): string {
    return `in line ${placeOf(this.starts, span.start).line}`;
  }

  textAt(span: Span): string {
    return this.source.slice(span.start, span.end).replace(/\s+/g, ' ');
  }

  /** All that was found, in the order of the text. */
  all(): Diagnostic[] {
    return [...this.found.values()].sort(
      (a, b) => a.span.start - b.span.start || a.span.end - b.span.end,
    );
  }
}
