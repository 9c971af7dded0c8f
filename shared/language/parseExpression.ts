/**
 * Expressions by precedence: sums, products, powers, factorials, and what stands by itself.
 *
 * Products may be written side by side, and the language does not guess: a factor beside the
 * divisor of a division is refused, with both readings as repairs. Chains of sums and products are
 * flat lists, so that a long text makes no deep tree; depth comes from nesting alone and is limited.
 */
import { FUNCTIONS, isFunctionName } from '../algebra/functions.ts';
import * as Q from '../algebra/rational.ts';
import {
  isFraction,
  refuseAdjacentNumbers,
  refuseDivision,
  type Factor,
} from './ambiguousProduct.ts';
import type { Cursor } from './cursor.ts';
import type { Span } from './diagnostic.ts';
import { DEEPEST_NESTING } from './limits.ts';
import type { BinderTree, ConditionTree, ExpressionTree, NameTree, NumberTree } from './syntax.ts';
import type { Token } from './token.ts';

/** True for the functions that are part of the language, `sqrt` among them. */
export function isBuiltInFunction(name: string): boolean {
  return (
    name === 'sqrt' || (isFunctionName(name) && FUNCTIONS[name].writable && name !== 'partial')
  );
}

const RELATIONS: ReadonlySet<string> = new Set(['<', '<=', '=', '>=', '>']);
const PARTITION_FUNCTION_NAMES: ReadonlySet<string> = new Set(['Q', 'Xi', 'Delta', 'W']);

export class ExpressionParser {
  readonly cursor: Cursor;
  /** Names that the author defines as functions or lists, so that `u(r)` is no product. */
  private readonly callable: ReadonlySet<string>;
  private depth = 0;

  constructor(cursor: Cursor, callable: ReadonlySet<string>) {
    this.cursor = cursor;
    this.callable = callable;
  }

  expression(): ExpressionTree {
    const { cursor } = this;
    this.enter();
    const start = cursor.start;
    let isNegative = false;
    if (cursor.acceptOperator('-')) isNegative = true;
    else cursor.acceptOperator('+');
    const terms = [{ isNegative, term: this.product() }];
    while (cursor.isOperator('+') || cursor.isOperator('-')) {
      isNegative = cursor.isOperator('-');
      cursor.advance();
      terms.push({ isNegative, term: this.product() });
    }
    this.leave();
    const [first] = terms;
    if (first && terms.length === 1) {
      if (!first.isNegative) return first.term;
      return { kind: 'negation', of: first.term, span: this.from(start) };
    }
    return { kind: 'sum', terms, span: this.from(start) };
  }

  /** left (sign) right. */
  condition(): ConditionTree {
    const { cursor } = this;
    const start = cursor.start;
    const left = this.expression();
    const { token } = cursor;
    if (token?.kind !== 'operator' || !RELATIONS.has(token.value)) {
      return cursor.expected('a relation (=, <, <=, >=, >)');
    }
    cursor.advance();
    const right = this.expression();
    return { left, sign: token.value as ConditionTree['sign'], right, span: this.from(start) };
  }

  private enter(): void {
    if (++this.depth > DEEPEST_NESTING) {
      return this.cursor.fail('too-deep', this.cursor.here(), {
        what: 'This',
        limit: String(DEEPEST_NESTING),
      });
    }
  }

  private leave(): void {
    this.depth--;
  }

  private from(start: number): Span {
    return { start, end: Math.max(start, this.cursor.end) };
  }

  private product(): ExpressionTree {
    const { cursor } = this;
    const start = cursor.start;
    const factors: Factor[] = [{ joint: 'first', factor: this.power() }];
    let isAmbiguous = false;
    const refuse = (): void => {
      refuseDivision(factors, this.cursor.findings);
      isAmbiguous = true;
    };
    for (;;) {
      if (cursor.isOperator('*') || cursor.isOperator('/')) {
        const isDivision = cursor.isOperator('/');
        cursor.advance();
        const factor = this.signedPower();
        factors.push({ joint: isDivision ? '/' : '*', factor });
        if (isDivision && factors.at(-2)?.joint === '/') refuse();
      } else if (this.beginsFactor(cursor.token)) {
        const last = factors.at(-1);
        const factor = this.power();
        factors.push({ joint: 'beside', factor });
        if (last?.joint === '/' && !isFraction(factors)) refuse();
        else if (last) refuseAdjacentNumbers(last.factor, factor, this.cursor.findings);
      } else {
        break;
      }
    }
    const [first] = factors;
    if (first && factors.length === 1) return first.factor;
    return {
      kind: 'product',
      factors,
      ...(isAmbiguous ? { isAmbiguous } : {}),
      span: this.from(start),
    };
  }

  private beginsFactor(token: Token | undefined): boolean {
    if (!token) return false;
    if (token.kind === 'number') return true;
    if (token.kind === 'operator') return token.value === '(';
    if (token.kind === 'unit') {
      return this.cursor.fail('unit-out-of-place', token.span);
    }
    if (token.kind !== 'name') return false;
    switch (token.value) {
      case 'from':
      case 'to':
      case 'between':
      case 'and':
      case 'as':
      case 'for':
      case 'in':
      case 'otherwise':
        return false;
      default:
        return true;
    }
  }

  private signedPower(): ExpressionTree {
    const { cursor } = this;
    if (!cursor.isOperator('-') && !cursor.isOperator('+')) return this.power();
    this.enter();
    const start = cursor.start;
    const isNegative = cursor.isOperator('-');
    cursor.advance();
    const of = this.signedPower();
    this.leave();
    return isNegative ? { kind: 'negation', of, span: this.from(start) } : of;
  }

  private power(): ExpressionTree {
    const { cursor } = this;
    const start = cursor.start;
    const base = this.postfix();
    if (!cursor.isOperator('^')) return base;
    cursor.advance();
    this.enter();
    const exponent = this.signedPower();
    this.leave();
    return { kind: 'power', base, exponent, span: this.from(start) };
  }

  private postfix(): ExpressionTree {
    const { cursor } = this;
    const start = cursor.start;
    let result = this.primary();
    let count = 0;
    while (cursor.isOperator('!')) {
      cursor.advance();
      if (++count > 8) {
        return cursor.fail('too-deep', this.from(start), { what: 'A factorial', limit: '8' });
      }
      result = { kind: 'factorial', of: result, span: this.from(start) };
    }
    return result;
  }

  private primary(): ExpressionTree {
    const { cursor } = this;
    const { token } = cursor;
    if (token?.kind === 'number') return this.number(token);
    if (token?.kind === 'operator' && token.value === '(') {
      cursor.advance();
      const of = this.expression();
      cursor.close(')', token.span);
      return { kind: 'group', of, span: this.from(token.span.start) };
    }
    if (token?.kind === 'name') return this.named(token);
    return cursor.expected('a number, a name or a parenthesis');
  }

  private number(token: Token): NumberTree {
    const { cursor } = this;
    cursor.advance();
    const unit = cursor.acceptUnit();
    return {
      kind: 'number',
      value: token.number ?? Q.ZERO,
      ...(token.uncertainty ? { uncertainty: token.uncertainty } : {}),
      ...(unit ? { unit } : {}),
      span: this.from(token.span.start),
    };
  }

  private named(token: Token): ExpressionTree {
    const { cursor } = this;
    switch (token.value) {
      case 'sum':
      case 'product':
      case 'integral':
        return this.binder(token, token.value);
      case 'cases':
        return this.cases(token);
      case 'partial':
        return this.partial(token);
      case 'inf':
        cursor.advance();
        return { kind: 'infinity', span: token.span };
      default:
    }
    const name = cursor.expectName('a name');
    if (cursor.isOperator('(')) {
      if (name.name === 'log') {
        this.refuseLog(name);
        return this.call({ ...name, name: 'ln' });
      }
      if (isBuiltInFunction(name.name) || this.callable.has(name.name)) return this.call(name);
      return { kind: 'name', ...name };
    }
    if (name.name === 'ln' && cursor.token?.kind === 'name') {
      const next = cursor.token;
      if (PARTITION_FUNCTION_NAMES.has(next.value)) {
        cursor.advance();
        return {
          kind: 'lnFunction',
          name: { name: next.value, spelled: next.text, span: next.span },
          span: this.from(token.span.start),
        };
      }
    }
    if (name.name === 'log') {
      this.refuseLog(name);
      this.withoutParentheses(name);
    }
    if (isBuiltInFunction(name.name)) this.withoutParentheses(name);
    return { kind: 'name', ...name };
  }

  private refuseLog({ span }: NameTree): void {
    this.cursor.findings.add('log-is-ambiguous', span, {}, [
      { title: 'write ln', edits: [{ span, text: 'ln' }] },
      { title: 'write log10', edits: [{ span, text: 'log10' }] },
    ]);
  }

  private withoutParentheses(name: NameTree): never {
    const { cursor } = this;
    const next = cursor.token;
    const simple = next?.kind === 'name' || next?.kind === 'number' ? next : undefined;
    return cursor.fail(
      'function-without-parentheses',
      name.span,
      { name: name.spelled },
      simple
        ? [
            {
              title: `write ${name.spelled}(${simple.text})`,
              edits: [
                { span: { start: name.span.end, end: simple.span.start }, text: '(' },
                { span: { start: simple.span.end, end: simple.span.end }, text: ')' },
              ],
            },
          ]
        : [],
    );
  }

  private call(name: NameTree): ExpressionTree {
    const { cursor } = this;
    const opened = cursor.here();
    cursor.advance();
    const args: ExpressionTree[] = [];
    if (!cursor.isOperator(')')) {
      args.push(this.expression());
      while (cursor.acceptOperator(',')) args.push(this.expression());
    }
    cursor.close(')', opened);
    return { kind: 'call', name, arguments: args, span: this.from(name.span.start) };
  }

  /** partial(X, Y; Z, …) */
  private partial(token: Token): ExpressionTree {
    const { cursor } = this;
    cursor.advance();
    const opened = cursor.here();
    const usage = 'Write partial(X, Y; Z, …): X by Y at constant Z, ….';
    cursor.expectOperator('(', usage);
    const of = this.expression();
    cursor.expectOperator(',', usage);
    const by = this.expression();
    const held: ExpressionTree[] = [];
    if (cursor.acceptOperator(';')) {
      do held.push(this.expression());
      while (cursor.acceptOperator(','));
    }
    cursor.close(')', opened);
    return { kind: 'partial', of, by, held, span: this.from(token.span.start) };
  }

  private binder(token: Token, what: BinderTree['what']): ExpressionTree {
    const { cursor } = this;
    const usage = `Write ${what} i from … to … { … }.`;
    cursor.advance();
    const variable = cursor.expectName('the running variable', usage);
    const unit = cursor.acceptUnit();
    cursor.expectWord('from', usage);
    const from = this.expression();
    cursor.expectWord('to', usage);
    const to = this.expression();
    const opened = cursor.here();
    cursor.expectOperator('{', usage);
    const body = this.expression();
    cursor.close('}', opened);
    const span = this.from(token.span.start);
    return { kind: 'binder', what, variable, ...(unit ? { unit } : {}), from, to, body, span };
  }

  private cases(token: Token): ExpressionTree {
    const { cursor } = this;
    const usage = 'Write cases { r < s: …; otherwise: … }.';
    cursor.advance();
    const opened = cursor.here();
    cursor.expectOperator('{', usage);
    const branches: { condition: ConditionTree; value: ExpressionTree }[] = [];
    while (!cursor.isWord('otherwise')) {
      const condition = this.condition();
      cursor.expectOperator(':', usage);
      branches.push({ condition, value: this.expression() });
      cursor.expectOperator(';', usage);
    }
    cursor.advance();
    cursor.expectOperator(':', usage);
    const otherwise = this.expression();
    cursor.acceptOperator(';');
    cursor.close('}', opened);
    return { kind: 'cases', branches, otherwise, span: this.from(token.span.start) };
  }
}
