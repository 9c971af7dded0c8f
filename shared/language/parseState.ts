/** States as a person types them: `N=6.02214076e23, V=0.0224 [m^3], T=273.15 [K]`. */
import type { Rational } from '../algebra/rational.ts';
import type { Dimension } from '../units/dimension.ts';
import { parseUnit } from '../units/parseUnit.ts';
import { constantValue } from './constantValue.ts';
import { Cursor, SyntaxFault } from './cursor.ts';
import type { Diagnostic } from './diagnostic.ts';
import { Findings } from './findings.ts';
import { lex } from './lexer.ts';
import { ExpressionParser } from './parseExpression.ts';
import type { ExpressionTree } from './syntax.ts';
import type { Token } from './token.ts';

export interface StateValue {
  /** In coherent SI units. */
  readonly value: Rational;
  readonly dimension: Dimension;
}

export interface ParsedState {
  readonly values: ReadonlyMap<string, StateValue>;
  readonly diagnostics: readonly Diagnostic[];
}

const LONGEST = 4096;
const NOTHING_CALLABLE: ReadonlySet<string> = new Set();

/**
 * The values by ASCII name. A value may be built from numbers with units, constants of nature and
 * + - * / ^ (`mu = -2 k 300 [K]`). Whether names and dimensions fit a model is the caller's to say.
 * Never throws.
 */
export function parseState(text: string): ParsedState {
  const findings = new Findings(text);
  const values = new Map<string, StateValue>();
  if (text.length > LONGEST) {
    findings.add('too-long', { start: 0, end: 0 });
    return { values, diagnostics: findings.all() };
  }
  for (const part of assignmentsIn(lex(text, findings))) {
    try {
      readAssignment(new Cursor(part, findings), values);
    } catch (fault) {
      if (!(fault instanceof SyntaxFault)) throw fault;
    }
  }
  return { values, diagnostics: findings.all() };
}

function assignmentsIn(tokens: readonly Token[]): Token[][] {
  const parts: Token[][] = [[]];
  for (const token of tokens) {
    if (token.kind === 'comment' || token.kind === 'end' || token.kind === 'newline') continue;
    if (token.kind === 'operator' && /^[,;]$/.test(token.value)) parts.push([]);
    else parts.at(-1)?.push(token);
  }
  return parts.filter((part) => part.length > 0);
}

function readAssignment(cursor: Cursor, values: Map<string, StateValue>): void {
  const { findings } = cursor;
  const usage = 'Write V=0.0224 [m^3].';
  const name = cursor.expectName('a name', usage);
  cursor.expectOperator('=', usage);
  const tree = new ExpressionParser(cursor, NOTHING_CALLABLE).expression();
  if (cursor.token) cursor.expected('a comma', usage);
  if (!unitsAreSound(tree, findings)) return;
  const found = constantValue(tree, findings);
  if (!found) return;
  if (values.has(name.name)) {
    findings.add('double-definition', name.span, { name: name.spelled, where: 'before' });
  }
  values.set(name.name, found);
}

function unitsAreSound(tree: ExpressionTree, findings: Findings): boolean {
  switch (tree.kind) {
    case 'number': {
      const fault = tree.unit && parseUnit(tree.unit.text).fault;
      if (!fault || !tree.unit) return true;
      findings.add('unit', tree.unit.span, { message: fault.message, hint: fault.hint });
      return false;
    }
    case 'product':
      return tree.factors.every(({ factor }) => unitsAreSound(factor, findings));
    case 'sum':
      return tree.terms.every(({ term }) => unitsAreSound(term, findings));
    case 'negation':
    case 'group':
      return unitsAreSound(tree.of, findings);
    case 'power':
      return unitsAreSound(tree.base, findings);
    default:
      return true;
  }
}
