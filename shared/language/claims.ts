/** Claims: limits, equalities and inequalities over properties. */
import * as Q from '../algebra/rational.ts';
import { closed } from './dimensionCheck.ts';
import { constantValue } from './constantValue.ts';
import type { ExpressionElaborator } from './elaborateExpression.ts';
import type { Claim, RangeOfVariable } from './formulation.ts';
import type { FormulationScope } from './formulationScope.ts';
import type { ClaimTree, ExpressionTree, RangeTree, Statement } from './syntax.ts';

/** The claims of a text, without those at fault, which are reported. */
export function elaborateClaims(
  statements: readonly Statement<'claim'>[],
  expressions: ExpressionElaborator,
  scope: FormulationScope,
): Claim[] {
  return statements.flatMap(({ title, span, statement }) => {
    const content = elaborateStatement(statement, expressions, scope);
    if (!content) return [];
    const text = expressions.findings.textAt(statement.span);
    return [{ title, span, text, ...content }];
  });
}

type Content = Claim extends infer C
  ? C extends Claim
    ? Omit<C, 'title' | 'span' | 'text'>
    : never
  : never;

/** A claim without its title. */
export function elaborateStatement(
  statement: ClaimTree,
  expressions: ExpressionElaborator,
  scope: FormulationScope,
): Content | undefined {
  const { findings, solver } = expressions;
  if (statement.kind === 'limit') {
    const of = expressions.elaborate(statement.of);
    const value = expressions.elaborate(statement.value, true);
    const towards = expressions.elaborate(statement.towards, true);
    const variable = scope.look(statement.variable);
    if (!of || !value || !towards || !variable) return undefined;
    if (variable.kind !== 'value' || variable.value.e.kind !== 'symbol') {
      findings.add('syntax', statement.variable.span, {
        expected: 'A variable of the ensemble or a parameter',
        found: statement.variable.spelled,
        hint: 'Write … -> … as V -> inf.',
      });
      return undefined;
    }
    const isSound =
      agrees(of.d, value.d, statement.value, 'A limit has the dimension of what tends to it') &&
      agrees(
        variable.value.d,
        towards.d,
        statement.towards,
        'A variable tends to a value of its own dimension',
      );
    if (!isSound) return undefined;
    return {
      kind: 'limit',
      of: of.e,
      value: value.e,
      variable: variable.value.e,
      towards: towards.e,
    };
  }
  const found = expressions.relation(statement.relation);
  if (!found) return undefined;
  const { relation } = found;
  const ranges: RangeOfVariable[] = [];
  for (const tree of statement.ranges) {
    const range = elaborateRange(tree, expressions);
    if (!range) return undefined;
    ranges.push(range);
  }
  return relation.sign === '='
    ? { kind: 'equality', left: relation.left, right: relation.right }
    : { kind: 'inequality', relation, ranges };

  function agrees(
    a: Parameters<typeof solver.unify>[0],
    b: Parameters<typeof solver.unify>[0],
    tree: ExpressionTree,
    rule: string,
  ): boolean {
    if (solver.unify(a, b)) return true;
    findings.add('dimension', tree.span, {
      message: `${rule}, but ${findings.textAt(tree.span)} is ${expressions.words(b)}, and not ${expressions.words(a)}.`,
      hint: 'Write the value with its unit, as in 300 [K].',
    });
    return false;
  }
}

function elaborateRange(
  tree: RangeTree,
  expressions: ExpressionElaborator,
): RangeOfVariable | undefined {
  const { findings, solver } = expressions;
  const of = expressions.elaborate(tree.of);
  const unit = tree.unit ? expressions.unit(tree.unit) : undefined;
  if (tree.unit && !unit) return undefined;
  const lower = constantValue(tree.lower, findings);
  const upper = constantValue(tree.upper, findings);
  if (!of || !lower || !upper) return undefined;
  const isBare = tree.lower.kind === 'number' && !tree.lower.unit;
  const low =
    unit && isBare
      ? { value: Q.multiply(lower.value, unit.factor), dimension: unit.dimension }
      : lower;
  for (const [end, value] of [
    [tree.lower, low],
    [tree.upper, upper],
  ] as const) {
    if (!solver.unify(of.d, closed(value.dimension))) {
      findings.add('dimension', end.span, {
        message: `The ends of a range have the dimension of what it is of, but ${findings.textAt(tree.of.span)} is ${expressions.words(of.d)}, and ${findings.textAt(end.span)} is ${expressions.words(closed(value.dimension))}.`,
        hint: 'Write a unit behind the upper end; it is that of both.',
      });
      return undefined;
    }
  }
  if (Q.compare(low.value, upper.value) > 0) {
    findings.add('bounds-reversed', { start: tree.lower.span.start, end: tree.upper.span.end });
    return undefined;
  }
  return { expression: of.e, lower: low.value, upper: upper.value };
}
