/**
 * One way to space a text. The order of the words, comments and numbers stay as they are.
 *
 * `tidy` is for the author: names as he types them, lines where he broke them. `normalize` is for
 * the identity of a version: ASCII spellings, one line a statement, so that texts which differ only
 * in spacing or in how Greek letters are typed come out the same.
 */
import { Findings } from './findings.ts';
import { isBuiltInFunction } from './parseExpression.ts';
import { parse, type Parsed } from './parser.ts';
import { splitStatements } from './splitStatements.ts';
import { EXPRESSION_WORDS, type Token } from './token.ts';

const INDENT = '    ';

interface Manner {
  readonly isAscii: boolean;
  readonly keepsLines: boolean;
}

/** The text spaced evenly; unchanged where it cannot be read. Tidying twice changes nothing more. */
export function tidy(source: string): string {
  const findings = new Findings(source);
  const parsed = parse(source, findings);
  if (findings.errorCount > 0) return source;
  return write(parsed, { isAscii: false, keepsLines: true });
}

/** The normal form of a text that has been read without fault. */
export function normalize(parsed: Parsed): string {
  return write(parsed, { isAscii: true, keepsLines: false });
}

function write({ tokens, callable }: Parsed, manner: Manner): string {
  const inside = new Set<Token>();
  const tight = new Set<Token>();
  for (const statement of splitStatements(tokens)) {
    const end = statement.at(-1);
    for (const token of statement) if (token !== end) inside.add(token);
    fractionsIn(statement, tight);
  }
  const lines: string[] = [];
  let line = '';
  let before: Token | undefined;
  let beforeThat: Token | undefined;
  let isOpen = false;
  let blank = 0;
  let held: string[] = [];
  const finishLine = (): void => {
    if (line !== '') lines.push(line);
    line = '';
    lines.push(...held);
    held = [];
  };
  for (const token of tokens) {
    if (token.kind === 'end') break;
    if (token.kind === 'newline') {
      if (isOpen && manner.keepsLines) {
        if (line.trim() !== '') {
          lines.push(line);
          line = INDENT;
        }
      } else if (!isOpen) {
        if (line === '' && ++blank === 1 && manner.keepsLines && lines.length > 0) lines.push('');
        finishLine();
      }
      continue;
    }
    if (token.kind === 'comment') {
      const comment = token.text.trimEnd();
      blank = 0;
      if (!manner.keepsLines) held.push(comment);
      else line += line.trim() === '' ? comment : `  ${comment}`;
      if (!manner.keepsLines && !isOpen) finishLine();
      continue;
    }
    blank = 0;
    const text = spelled(token, manner);
    const isFirst = !isOpen;
    if (isFirst) before = beforeThat = undefined;
    const isLineStart = line.trim() === '';
    const gap =
      isLineStart || !before ? '' : gapBetween(beforeThat, before, token, tight, callable);
    line += gap + text;
    beforeThat = before;
    before = token;
    isOpen = inside.has(token);
  }
  finishLine();
  while (lines.at(-1) === '') lines.pop();
  return lines.length === 0 ? '' : `${lines.join('\n')}\n`;
}

function spelled(token: Token, { isAscii }: Manner): string {
  switch (token.kind) {
    case 'name':
      return isAscii ? token.value : token.text;
    case 'unit':
      return `[${token.value.trim().replace(/\s+/g, ' ')}]`;
    case 'operator':
      return token.value;
    default:
      return token.text;
  }
}

function isOperator(token: Token | undefined, ...values: string[]): boolean {
  return token?.kind === 'operator' && values.includes(token.value);
}

/** True where a sign behind `before` belongs to what follows alone. */
function isPrefixBehind(before: Token | undefined): boolean {
  if (!before) return true;
  if (before.kind === 'operator') return !isOperator(before, ')', '}', '!');
  return before.kind === 'name' && EXPRESSION_WORDS.has(before.value) && before.value !== 'inf';
}

function gapBetween(
  beforeThat: Token | undefined,
  before: Token,
  token: Token,
  tight: ReadonlySet<Token>,
  callable: ReadonlySet<string>,
): string {
  if (isOperator(before, '(', '^') || isOperator(token, ')', '^', '!', ',', ';', ':')) return '';
  if (isOperator(before, '-', '+') && isPrefixBehind(beforeThat)) return '';
  if (isOperator(token, '(') && before.kind === 'name') {
    const { value } = before;
    const isCall = isBuiltInFunction(value) || callable.has(value) || value === 'partial';
    return isCall ? '' : ' ';
  }
  if (tight.has(before) || tight.has(token)) return '';
  // isothermal-isobaric is one word.
  if (isOperator(token, '-') && before.value === 'isothermal') return '';
  if (isOperator(before, '-') && beforeThat?.value === 'isothermal') return '';
  return ' ';
}

/** The divisions of two plain numbers: 3/2 is written as one. */
function fractionsIn(statement: readonly Token[], found: Set<Token>): void {
  statement.forEach((token, i) => {
    if (!isOperator(token, '/')) return;
    const isFraction =
      statement[i - 1]?.kind === 'number' &&
      statement[i + 1]?.kind === 'number' &&
      !isOperator(statement[i - 2], '^', '/') &&
      !isOperator(statement[i + 2], '^', '!');
    if (isFraction) found.add(token);
  });
}
