/** Expressions and equations in the names of a formulation: for claims, checks and calculators. */
import type { Expression, Relation, SymbolNode } from '../algebra/expression.ts';
import { dimension, DIMENSIONLESS, type Dimension } from '../units/dimension.ts';
import { elaborateStatement } from './claims.ts';
import { Cursor, SyntaxFault } from './cursor.ts';
import type { Diagnostic } from './diagnostic.ts';
import { closed, PURE } from './dimensionCheck.ts';
import { ExpressionElaborator } from './elaborateExpression.ts';
import { Findings } from './findings.ts';
import type { Formulation, NaturalConstant, RangeOfVariable } from './formulation.ts';
import { FormulationScope } from './formulationScope.ts';
import { lex } from './lexer.ts';
import { parseClaim } from './parseClaim.ts';
import { ExpressionParser } from './parseExpression.ts';
import { scopeOf } from './study.ts';

export type ParsedStatement =
  | { readonly kind: 'expression'; readonly expression: Expression; readonly dimension: Dimension }
  | { readonly kind: 'equality'; readonly left: Expression; readonly right: Expression }
  | {
      readonly kind: 'inequality';
      readonly relation: Relation;
      readonly ranges: readonly RangeOfVariable[];
    }
  | {
      readonly kind: 'limit';
      readonly of: Expression;
      readonly value: Expression;
      readonly variable: SymbolNode;
      readonly towards: Expression;
    };

export interface ParsedFor {
  /** Undefined where the text is at fault. */
  readonly statement: ParsedStatement | undefined;
  readonly diagnostics: readonly Diagnostic[];
  /** The formulation's constants of nature and those that the text adds. */
  readonly naturalConstants: readonly NaturalConstant[];
}

/** Longest text of an expression beside a formulation. */
const LONGEST = 4096;

/**
 * Reads an expression (`c U/(4 V T^4)`), an equation, an inequality or a limit in the names of a
 * formulation. Properties stand as symbols of their names, and `partial(X, Y; Z, …)` as a call of
 * `partial`. Never throws; spans count within the text.
 */
export function parseExpressionFor(formulation: Formulation, text: string): ParsedFor {
  const findings = new Findings(text);
  if (text.length > LONGEST) {
    findings.add('too-long', { start: 0, end: 0 });
    return {
      statement: undefined,
      diagnostics: findings.all(),
      naturalConstants: formulation.naturalConstants,
    };
  }
  const scope = scopeOf(formulation) ?? scopeFromFields(formulation, findings);
  const callable = new Set(
    [...scope.entities]
      .filter(([, { kind }]) => kind === 'function' || kind === 'list')
      .map(([n]) => n),
  );
  const tokens = lex(text, findings).filter(
    ({ kind }) => kind !== 'comment' && kind !== 'newline' && kind !== 'end',
  );
  const before = { findings: scope.findings, allowsProperties: scope.allowsProperties };
  scope.findings = findings;
  scope.allowsProperties = true;
  const outcome = (statement: ParsedStatement | undefined): ParsedFor => {
    const diagnostics = findings.all();
    return { statement, diagnostics, naturalConstants: scope.naturalConstants() };
  };
  try {
    const statement = read(new Cursor(tokens, findings), callable, scope, formulation);
    const isSound = findings.errorCount === 0;
    return outcome(isSound ? statement : undefined);
  } catch (fault) {
    if (!(fault instanceof SyntaxFault)) throw fault;
    return outcome(undefined);
  } finally {
    scope.findings = before.findings;
    scope.allowsProperties = before.allowsProperties;
  }
}

function read(
  cursor: Cursor,
  callable: ReadonlySet<string>,
  scope: FormulationScope,
  formulation: Formulation,
): ParsedStatement | undefined {
  const expressions = new ExpressionElaborator(scope, cursor.findings);
  expressions.factorials = formulation.factorials;
  const isStatement = cursor.hasOperator('=', '<', '<=', '>', '>=', '->');
  const parser = new ExpressionParser(cursor, callable);
  if (isStatement) {
    const tree = parseClaim(cursor, parser);
    if (cursor.token) cursor.expected('the end of the statement');
    return elaborateStatement(tree, expressions, scope);
  }
  const tree = parser.expression();
  if (cursor.token) cursor.expected('the end of the expression');
  const typed = expressions.elaborate(tree);
  return (
    typed && {
      kind: 'expression',
      expression: typed.e,
      dimension: expressions.solver.settle(typed.d) ?? DIMENSIONLESS,
    }
  );
}

/** For a formulation that was not read from a text here. */
function scopeFromFields(formulation: Formulation, findings: Findings): FormulationScope {
  const { ensemble, species, variables } = formulation;
  const extent = variables.find(({ role }) => role === 'extent');
  const setting = {
    ensemble,
    species,
    extent: extent ?? { name: 'V', dimension: dimension(3) },
    fields: variables.filter(({ role }) => role === 'field'),
  };
  const scope = new FormulationScope(setting, variables, findings);
  for (const { name, symbol, dimension: of } of formulation.quantities) {
    scope.define(name, {
      kind: 'value',
      value: { e: symbol, d: closed(of) },
      what: 'a declared number',
    });
  }
  for (const { name, symbol } of formulation.orderParameters) {
    scope.define(name, {
      kind: 'value',
      value: { e: symbol, d: PURE },
      what: 'an order parameter',
    });
  }
  for (const { name, expression, dimension: of } of [
    ...formulation.abbreviations,
    ...formulation.molar,
    ...formulation.reports,
  ]) {
    scope.define(name, {
      kind: 'value',
      value: { e: expression, d: closed(of) },
      what: 'a name of the formulation',
    });
  }
  scope.lnValue = { e: formulation.lnPartitionFunction, d: PURE };
  return scope;
}
