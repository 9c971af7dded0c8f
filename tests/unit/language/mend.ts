/** Applies repairs to a text, as an editor would. */
import type { Diagnostic } from '../../../shared/language/diagnostic.ts';
import { analyse } from '../../../shared/language/index.ts';

export function mended(source: string, repair: Diagnostic['repairs'][number]): string {
  const edits = [...repair.edits].sort((a, b) => b.span.start - a.span.start);
  return edits.reduce(
    (text, { span, text: written }) => text.slice(0, span.start) + written + text.slice(span.end),
    source,
  );
}

/** The error of this code, the only one in the text. */
export function onlyError(source: string, code: string): Diagnostic {
  const errors = analyse(source).diagnostics.filter(({ severity }) => severity === 'error');
  const [error] = errors;
  if (errors.length !== 1 || error?.code !== code) {
    throw new Error(`expected ${code} alone, found ${errors.map((e) => e.code).join(', ')}`);
  }
  return error;
}
