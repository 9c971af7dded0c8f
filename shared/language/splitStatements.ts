/**
 * Where one statement ends and the next begins.
 *
 * A statement ends with its line, unless a parenthesis or brace is open, the line ends with what
 * wants more (an operator, a comma, `between`), or the next line begins with what cannot begin a
 * statement (an operator, a text, `between`).
 */
import { STATEMENT_WORDS, type Token } from './token.ts';

const CONTINUING_WORDS: ReadonlySet<string> = new Set([
  'between',
  'and',
  'as',
  'for',
  'in',
  'from',
  'to',
  'otherwise',
]);

function wantsMore(token: Token | undefined): boolean {
  if (!token) return false;
  if (token.kind === 'operator') return !/^[)}!;]$/.test(token.value);
  return token.kind === 'name' && CONTINUING_WORDS.has(token.value);
}

function cannotBegin(token: Token): boolean {
  if (token.kind === 'operator' || token.kind === 'text' || token.kind === 'unit') return true;
  return token.kind === 'name' && CONTINUING_WORDS.has(token.value);
}

/** True where a line surely begins a new statement, even though a parenthesis is still open. */
function surelyBegins(tokens: readonly Token[], at: number): boolean {
  const first = tokens[at];
  if (first?.kind !== 'name') return false;
  if (STATEMENT_WORDS.has(first.value)) return true;
  const second = tokens[at + 1];
  if (second?.kind === 'operator' && second.value === '=') return true;
  const third = tokens[at + 2];
  return first.value === 'ln' && second?.kind === 'name' && third?.value === '=';
}

/** The tokens of each statement, without comments and line ends; none is empty. */
export function splitStatements(all: readonly Token[]): Token[][] {
  const statements: Token[][] = [];
  const tokens = all.filter(({ kind }) => kind !== 'comment');
  let current: Token[] = [];
  let depth = 0;
  const finish = (): void => {
    if (current.length > 0) statements.push(current);
    current = [];
    depth = 0;
  };
  for (let i = 0; i < tokens.length; i++) {
    const token = tokens[i];
    if (!token || token.kind === 'end') break;
    if (token.kind === 'newline') {
      while (tokens[i + 1]?.kind === 'newline') i++;
      const next = tokens[i + 1];
      if (!next || next.kind === 'end' || surelyBegins(tokens, i + 1)) finish();
      else if (depth === 0 && !wantsMore(current.at(-1)) && !cannotBegin(next)) finish();
      continue;
    }
    if (token.kind === 'operator') {
      if (token.value === '(' || token.value === '{') depth++;
      else if (token.value === ')' || token.value === '}') depth = Math.max(0, depth - 1);
    }
    current.push(token);
  }
  finish();
  return statements;
}
