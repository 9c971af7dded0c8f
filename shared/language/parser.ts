/** Statements: each is read by itself, so that a fault in one leaves the others readable. */
import { nearest } from '../units/nearest.ts';
import { Cursor, SyntaxFault } from './cursor.ts';
import type { Findings } from './findings.ts';
import type { Ensemble } from './formulation.ts';
import { lex } from './lexer.ts';
import { LARGEST_SOURCE } from './limits.ts';
import { parseClaim } from './parseClaim.ts';
import { ExpressionParser } from './parseExpression.ts';
import { splitStatements } from './splitStatements.ts';
import {
  PARTITION_FUNCTIONS,
  type ExpressionTree,
  type NameTree,
  type SourceTree,
  type StatementTree,
} from './syntax.ts';
import { isReserved, STATEMENT_WORDS, type Token } from './token.ts';

/** Names that state the partition function, or `q` from which it is built. */
const FUNCTION_NAMES: ReadonlySet<string> = new Set(['q', ...Object.values(PARTITION_FUNCTIONS)]);

export interface Parsed {
  readonly tree: SourceTree;
  readonly tokens: readonly Token[];
  /** Names that are followed by parentheses because they are functions or lists. */
  readonly callable: ReadonlySet<string>;
}

/** Reads a whole text. Never throws; what could not be read is reported and left out. */
export function parse(source: string, findings: Findings): Parsed {
  if (isTooLong(source)) {
    findings.add('too-long', { start: 0, end: 0 });
    return { tree: { statements: [], title: '' }, tokens: [], callable: new Set() };
  }
  const tokens = lex(source, findings);
  const parts = splitStatements(tokens);
  const callable = callableNames(parts);
  const statements = parts.map((part) => parseStatement(part, callable, findings));
  return { tree: { statements, title: titleOf(tokens) }, tokens, callable };
}

/** UTF-8 bytes, counted without an encoder: shared code knows none. */
function isTooLong(source: string): boolean {
  if (source.length * 3 <= LARGEST_SOURCE) return false;
  let bytes = 0;
  for (let i = 0; i < source.length; i++) {
    const unit = source.charCodeAt(i);
    bytes += unit < 0x80 ? 1 : unit < 0x800 ? 2 : unit >= 0xd800 && unit < 0xe000 ? 2 : 3;
    if (bytes > LARGEST_SOURCE) return true;
  }
  return false;
}

function titleOf(tokens: readonly Token[]): string {
  const [first] = tokens;
  return first?.kind === 'comment' ? first.value.replace(/^#+/, '').trim() : '';
}

function callableNames(parts: readonly (readonly Token[])[]): Set<string> {
  const names = new Set<string>();
  for (const [word, name, bracket] of parts) {
    if (name?.kind !== 'name') continue;
    if (word?.value === 'list') names.add(name.value);
    if (word?.value === 'let' && bracket?.value === '(') names.add(name.value);
  }
  return names;
}

function parseStatement(
  tokens: readonly Token[],
  callable: ReadonlySet<string>,
  findings: Findings,
): StatementTree {
  const cursor = new Cursor(tokens, findings);
  try {
    const statement = new StatementParser(cursor, callable).statement();
    if (cursor.token) return cursor.expected('the end of the statement', hintAtEnd(cursor.token));
    return statement;
  } catch (fault) {
    if (!(fault instanceof SyntaxFault)) throw fault;
    return faulty(tokens);
  }
}

function hintAtEnd(token: Token): string {
  if (token.kind === 'operator' && token.value === '=')
    return 'Begin each statement on a new line.';
  if (token.kind === 'operator' && /^[)}]$/.test(token.value)) return 'It closes nothing.';
  return '';
}

/** What can still be said of a statement that could not be read. */
function faulty(tokens: readonly Token[]): StatementTree {
  const [first, second] = tokens;
  const span = { start: first?.span.start ?? 0, end: tokens.at(-1)?.span.end ?? 0 };
  const word = first?.value ?? '';
  const isStatement = STATEMENT_WORDS.has(word);
  const token = isStatement || word === 'ln' ? second : first;
  if (token?.kind !== 'name' || isReserved(token.value)) return { kind: 'faulty', word, span };
  const name = { name: token.value, spelled: token.text, span: token.span };
  return { kind: 'faulty', word, name, span };
}

class StatementParser {
  private readonly cursor: Cursor;
  private readonly expressions: ExpressionParser;
  private readonly begin: number;

  constructor(cursor: Cursor, callable: ReadonlySet<string>) {
    this.cursor = cursor;
    this.expressions = new ExpressionParser(cursor, callable);
    this.begin = cursor.start;
  }

  statement(): StatementTree {
    const { cursor } = this;
    const { token } = cursor;
    if (token?.kind !== 'name') return cursor.expected('a statement');
    const word = token.value;
    if (!STATEMENT_WORDS.has(word)) return this.definition(token);
    cursor.advance();
    switch (word) {
      case 'ensemble':
        return this.ensemble();
      case 'species':
        return this.species();
      case 'extent':
        return this.extent();
      case 'field':
        return this.field();
      case 'constant':
      case 'parameter':
        return this.quantity(word);
      case 'list':
        return this.list();
      case 'let':
        return this.abbreviation();
      case 'order':
        return this.order();
      case 'factorials':
        cursor.expectWord('exact', 'Write factorials exact.');
        return { kind: 'factorials', span: this.span() };
      case 'molar':
      case 'report':
        return this.report(word);
      default:
        return this.claim();
    }
  }

  private span(): { start: number; end: number } {
    return { start: this.begin, end: this.cursor.end };
  }

  private value(): ExpressionTree {
    return this.expressions.expression();
  }

  private description(): string {
    return this.cursor.acceptText()?.text ?? '';
  }

  /** Name, unit and description as far as they are written at the place of the declaration. */
  private heading(what: string): {
    name: NameTree;
    unit?: { text: string; span: NameTree['span'] };
  } {
    const name = this.cursor.expectName(what);
    const unit = this.cursor.acceptUnit();
    return { name, ...(unit ? { unit } : {}) };
  }

  private ensemble(): StatementTree {
    const { cursor } = this;
    const start = cursor.start;
    let word = '';
    while (cursor.token?.kind === 'name' || cursor.isOperator('-')) {
      const isHyphen = cursor.isOperator('-');
      word += isHyphen
        ? '-'
        : word === '' || word.endsWith('-')
          ? cursor.token?.value
          : ` ${cursor.token?.value ?? ''}`;
      cursor.advance();
    }
    const plain = word.toLowerCase().replace(/[ -]+/g, ' ');
    const known = (Object.keys(PARTITION_FUNCTIONS) as Ensemble[]).find(
      (ensemble) => ensemble.replace(/-/g, ' ') === plain,
    );
    if (known) return { kind: 'ensemble', ensemble: known, span: this.span() };
    const meant = nearest(plain, Object.keys(PARTITION_FUNCTIONS));
    const span = { start, end: Math.max(start, cursor.end) };
    return cursor.fail(
      'unknown-ensemble',
      word === '' ? cursor.here() : span,
      { word: word === '' ? 'This' : word },
      meant ? [{ title: `write ${meant}`, edits: [{ span, text: meant }] }] : [],
    );
  }

  private species(): StatementTree {
    const list: { name: NameTree; description: string }[] = [];
    do {
      const name = this.cursor.expectName('the name of a species', 'Write species A "…", B "…".');
      list.push({ name, description: this.description() });
    } while (this.cursor.acceptOperator(','));
    return { kind: 'species', list, span: this.span() };
  }

  private extent(): StatementTree {
    const heading = this.heading('the name of the extent');
    const description = this.description();
    return { kind: 'extent', ...heading, description, span: this.span() };
  }

  private field(): StatementTree {
    const heading = this.heading('the name of the field');
    this.cursor.expectWord('response', 'Write field B [T] response M_B.');
    const response = this.cursor.expectName('the name of the response');
    const description = this.description();
    return { kind: 'field', ...heading, response, description, span: this.span() };
  }

  private quantity(kind: 'constant' | 'parameter'): StatementTree {
    const heading = this.heading(`the name of the ${kind}`);
    this.cursor.expectOperator('=', `Write ${kind} x [unit] = value.`);
    const value = this.value();
    let bounds: { lower: ExpressionTree; upper: ExpressionTree } | undefined;
    let description = this.description();
    if (this.cursor.acceptWord('between')) bounds = this.bounds();
    if (description === '') description = this.description();
    return {
      kind,
      ...heading,
      value,
      ...(bounds ? { bounds } : {}),
      description,
      span: this.span(),
    };
  }

  private bounds(): { lower: ExpressionTree; upper: ExpressionTree } {
    const lower = this.value();
    this.cursor.expectWord('and', 'Write between … and ….');
    return { lower, upper: this.value() };
  }

  private list(): StatementTree {
    const heading = this.heading('the name of the list');
    this.cursor.expectOperator('=', 'Write list x [unit] = 1, 2, 3.');
    const values: ExpressionTree[] = [];
    do values.push(this.value());
    while (this.cursor.acceptOperator(','));
    return { kind: 'list', ...heading, values, description: this.description(), span: this.span() };
  }

  private abbreviation(): StatementTree {
    const { cursor } = this;
    const name = cursor.expectName('the name of the abbreviation');
    let parameters: NameTree[] | undefined;
    if (cursor.isOperator('(')) {
      const opened = cursor.here();
      cursor.advance();
      parameters = [];
      do parameters.push(cursor.expectName('the name of an argument'));
      while (cursor.acceptOperator(','));
      cursor.close(')', opened);
    }
    cursor.expectOperator('=', 'Write let x = ….');
    const value = this.value();
    return {
      kind: 'let',
      name,
      ...(parameters ? { parameters } : {}),
      value,
      description: this.description(),
      span: this.span(),
    };
  }

  private order(): StatementTree {
    const { cursor } = this;
    const heading = this.heading('the name of the order parameter');
    cursor.expectWord('between', 'Write order x between 0 and 1.');
    const bounds = this.bounds();
    let stationary: 'maximum' | 'saddle' = 'maximum';
    if (cursor.acceptWord('saddle')) stationary = 'saddle';
    const description = this.description();
    return { kind: 'order', ...heading, ...bounds, stationary, description, span: this.span() };
  }

  private report(kind: 'molar' | 'report'): StatementTree {
    const heading = this.heading('a name');
    this.cursor.expectOperator('=', `Write ${kind} x [unit] = ….`);
    const value = this.value();
    const description = this.description();
    return { kind, ...heading, value, description, span: this.span() };
  }

  /** `q = …`, `Q = …`, `ln Q = …`. */
  private definition(first: Token): StatementTree {
    const { cursor } = this;
    const second = cursor.ahead(1);
    const isLogarithm =
      first.value === 'ln' && second?.kind === 'name' && cursor.ahead(2)?.value === '=';
    const isBracketed =
      first.value === 'ln' && second?.value === '(' && cursor.ahead(4)?.value === '=';
    if (isLogarithm || isBracketed) cursor.advance();
    if (isBracketed) cursor.advance();
    const named = cursor.token;
    if (named?.kind !== 'name') return cursor.expected('a name');
    const follows = cursor.ahead(isBracketed ? 2 : 1);
    if (!(follows?.kind === 'operator' && follows.value === '='))
      return this.unknownStatement(first);
    if (!FUNCTION_NAMES.has(named.value)) return this.unknownStatement(named);
    const name = { name: named.value, spelled: named.text, span: named.span };
    cursor.advance();
    if (isBracketed) cursor.expectOperator(')');
    cursor.expectOperator('=');
    const value = this.value();
    return {
      kind: 'function',
      name,
      isLogarithm: isLogarithm || isBracketed,
      value,
      description: this.description(),
      span: this.span(),
    };
  }

  private unknownStatement(token: Token): never {
    const { cursor } = this;
    const at = token.span;
    const next = cursor.ahead(1);
    if (next?.kind === 'operator' && next.value === '=' && !isReserved(token.value)) {
      return cursor.fail(
        'unknown-statement',
        at,
        { word: token.text, hint: `Write let ${token.text} = ….` },
        [
          {
            title: `write let ${token.text} = …`,
            edits: [{ span: { start: at.start, end: at.start }, text: 'let ' }],
          },
        ],
      );
    }
    const meant = nearest(token.value, STATEMENT_WORDS);
    const hint = meant
      ? `Did you mean ${meant}?`
      : `Statements begin with ${[...STATEMENT_WORDS].join(', ')}, or state the partition function.`;
    return cursor.fail(
      'unknown-statement',
      at,
      { word: token.text, hint },
      meant ? [{ title: `write ${meant}`, edits: [{ span: at, text: meant }] }] : [],
    );
  }

  private claim(): StatementTree {
    const { cursor } = this;
    const title = this.description();
    const statement = parseClaim(cursor, this.expressions);
    const late = this.description();
    return {
      kind: 'claim',
      title: title === '' ? late : title,
      statement,
      span: this.span(),
    };
  }
}
