/** Claims: what is stated behind the title. */
import type { Cursor } from './cursor.ts';
import type { ExpressionParser } from './parseExpression.ts';
import type { ClaimTree, RangeTree } from './syntax.ts';

/** A statement to be checked: a limit, or a relation with or without ranges. */
export function parseClaim(cursor: Cursor, expressions: ExpressionParser): ClaimTree {
  const start = cursor.start;
  const left = expressions.expression();
  const { token } = cursor;
  if (cursor.acceptOperator('->')) {
    const value = expressions.expression();
    cursor.expectWord('as', 'Write … -> … as V -> inf.');
    const variable = cursor.expectName('the variable of the limit');
    cursor.expectOperator('->', 'Write … -> … as V -> inf.');
    const towards = expressions.expression();
    return { kind: 'limit', of: left, value, variable, towards, span: { start, end: cursor.end } };
  }
  if (token?.kind !== 'operator' || !/^(<|<=|=|>=|>)$/.test(token.value)) {
    return cursor.expected('a relation (=, <, <=, >=, >) or ->');
  }
  cursor.advance();
  const right = expressions.expression();
  const relation = {
    left,
    sign: token.value as '<' | '<=' | '=' | '>=' | '>',
    right,
    span: { start, end: cursor.end },
  };
  const ranges: RangeTree[] = [];
  if (cursor.acceptWord('for')) {
    do ranges.push(parseRange(cursor, expressions));
    while (cursor.acceptOperator(','));
  }
  return { kind: 'relation', relation, ranges, span: { start, end: cursor.end } };
}

/** `V/N in 1e-27 .. 1e-25 [m^3]`: a unit behind the upper end is that of both. */
function parseRange(cursor: Cursor, expressions: ExpressionParser): RangeTree {
  const start = cursor.start;
  const usage = 'Write for T in 300 .. 600 [K].';
  const of = expressions.expression();
  cursor.expectWord('in', usage);
  const lower = expressions.expression();
  cursor.expectOperator('..', usage);
  const upper = expressions.expression();
  const unit = upper.kind === 'number' ? upper.unit : undefined;
  return { of, lower, upper, ...(unit ? { unit } : {}), span: { start, end: cursor.end } };
}
