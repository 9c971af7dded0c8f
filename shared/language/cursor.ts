/** Reads through the tokens of one statement; a fault that ends it is thrown as `SyntaxFault`. */
import type { Code } from './catalogue.ts';
import type { Repair, Span } from './diagnostic.ts';
import type { Findings } from './findings.ts';
import type { DescriptionTree, NameTree, UnitTree } from './syntax.ts';
import { isReserved, type Token } from './token.ts';

/** Ends the reading of a statement; the fault has been reported. */
export class SyntaxFault extends Error {
  override name = 'SyntaxFault';
}

export class Cursor {
  readonly findings: Findings;
  private readonly tokens: readonly Token[];
  private position = 0;

  constructor(tokens: readonly Token[], findings: Findings) {
    this.tokens = tokens;
    this.findings = findings;
  }

  get token(): Token | undefined {
    return this.tokens[this.position];
  }

  ahead(count: number): Token | undefined {
    return this.tokens[this.position + count];
  }

  /** The end of what was read last. */
  get end(): number {
    return this.tokens[this.position - 1]?.span.end ?? this.tokens[0]?.span.start ?? 0;
  }

  get start(): number {
    return this.token?.span.start ?? this.end;
  }

  advance(): void {
    this.position++;
  }

  /** The place of the present token, or the place behind the last. */
  here(): Span {
    return this.token?.span ?? { start: this.end, end: this.end };
  }

  isOperator(value: string): boolean {
    return this.token?.kind === 'operator' && this.token.value === value;
  }

  /** True where one of the operators stands anywhere outside braces. */
  hasOperator(...values: string[]): boolean {
    let depth = 0;
    for (const { kind, value } of this.tokens) {
      if (kind !== 'operator') continue;
      if (value === '{') depth++;
      else if (value === '}') depth--;
      else if (depth === 0 && values.includes(value)) return true;
    }
    return false;
  }

  isWord(value: string): boolean {
    return this.token?.kind === 'name' && this.token.value === value;
  }

  acceptOperator(value: string): boolean {
    if (!this.isOperator(value)) return false;
    this.position++;
    return true;
  }

  acceptWord(value: string): boolean {
    if (!this.isWord(value)) return false;
    this.position++;
    return true;
  }

  expectOperator(value: string, hint = ''): void {
    if (!this.acceptOperator(value)) this.expected(value, hint);
  }

  expectWord(value: string, hint = ''): void {
    if (!this.acceptWord(value)) this.expected(value, hint);
  }

  /** Closes what was opened at `opened`. */
  close(value: ')' | '}', opened: Span): void {
    if (this.acceptOperator(value)) return;
    if (this.token) this.expected(value);
    const bracket = value === ')' ? 'parenthesis' : 'brace';
    const end = this.end;
    this.fail('unclosed-bracket', opened, { bracket, closing: value }, [
      {
        title: `close with ${value}`,
        edits: [{ span: { start: end, end }, text: value === '}' ? ' }' : value }],
      },
    ]);
  }

  /** A name that is being defined or bound. */
  expectName(what: string, hint = ''): NameTree {
    const { token } = this;
    if (token?.kind !== 'name') this.expected(what, hint);
    if (isReserved(token.value)) {
      this.fail('reserved-name', token.span, {
        name: token.text,
        what: 'a word of the language',
      });
    }
    this.position++;
    return { name: token.value, spelled: token.text, span: token.span };
  }

  acceptUnit(): UnitTree | undefined {
    const { token } = this;
    if (token?.kind !== 'unit') return undefined;
    this.position++;
    return { text: token.value, span: token.span };
  }

  acceptText(): DescriptionTree | undefined {
    const { token } = this;
    if (token?.kind !== 'text') return undefined;
    this.position++;
    return { text: token.value, span: token.span };
  }

  expected(what: string, hint = ''): never {
    const found = this.token ? this.token.text : 'the end of the statement';
    this.fail('syntax', this.here(), { expected: capitalized(what), found, hint });
  }

  fail(
    code: Code,
    span: Span,
    values: Readonly<Record<string, string>> = {},
    repairs: readonly Repair[] = [],
  ): never {
    this.findings.add(code, span, values, repairs);
    throw new SyntaxFault();
  }
}

function capitalized(text: string): string {
  return text.slice(0, 1).toUpperCase() + text.slice(1);
}
