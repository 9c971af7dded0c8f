/** The words of a text by kind, for colouring. */
import type { Span } from './diagnostic.ts';
import { Findings } from './findings.ts';
import { lex } from './lexer.ts';
import { EXPRESSION_WORDS, STATEMENT_WORDS, type Token } from './token.ts';

export type HighlightKind =
  'keyword' | 'unit' | 'text' | 'comment' | 'number' | 'name' | 'operator';

export interface HighlightToken {
  readonly kind: HighlightKind;
  readonly span: Span;
}

/** Words that belong to one statement and are names everywhere else. */
const WORDS_OF_STATEMENTS: Readonly<Record<string, readonly string[]>> = {
  field: ['response'],
  order: ['saddle'],
  factorials: ['exact'],
};

/** In the order of the text; spaces and line ends are left out. Works on any text. */
export function tokensOf(source: string): HighlightToken[] {
  const result: HighlightToken[] = [];
  let statement = '';
  let isFirst = true;
  for (const token of lex(source, new Findings(source))) {
    if (token.kind === 'end') break;
    if (token.kind === 'newline') {
      isFirst = true;
      continue;
    }
    if (isFirst && token.kind !== 'comment') {
      isFirst = false;
      if (STATEMENT_WORDS.has(token.value)) statement = token.value;
    }
    result.push({ kind: kindOf(token, statement), span: token.span });
  }
  return result;
}

function kindOf(token: Token, statement: string): HighlightKind {
  if (token.kind !== 'name') {
    return token.kind === 'newline' || token.kind === 'end' ? 'operator' : token.kind;
  }
  const { value } = token;
  if (STATEMENT_WORDS.has(value) || EXPRESSION_WORDS.has(value)) return 'keyword';
  return WORDS_OF_STATEMENTS[statement]?.includes(value) ? 'keyword' : 'name';
}
