/** Constants, parameters, lists and order parameters: the numbers that a text declares. */
import * as C from '../algebra/construct.ts';
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { DIMENSIONLESS } from '../units/dimension.ts';
import { declaredValue, type ConstantValue, type KnownValues } from './constantValue.ts';
import type { Declarations } from './declarations.ts';
import { closed, PURE } from './dimensionCheck.ts';
import type { ExpressionElaborator } from './elaborateExpression.ts';
import type { Findings } from './findings.ts';
import type { DeclaredQuantity, OrderParameter } from './formulation.ts';
import type { FormulationScope } from './formulationScope.ts';
import { orderDefinitions, refuseCircle } from './orderDefinitions.ts';
import type { ExpressionTree, Statement, UnitTree } from './syntax.ts';
import { visitNames } from './walkTree.ts';

/** Reads the declared numbers and gives each its name in the scope. */
export class DeclaredNumbers {
  private readonly declarations: Declarations;
  private readonly findings: Findings;
  private readonly scope: FormulationScope;
  private readonly expressions: ExpressionElaborator;
  private readonly constants = new Map<string, ConstantValue | 'poisoned'>();

  constructor(
    declarations: Declarations,
    scope: FormulationScope,
    expressions: ExpressionElaborator,
  ) {
    this.declarations = declarations;
    this.scope = scope;
    this.expressions = expressions;
    this.findings = expressions.findings;
  }

  /** The unit as a value of one of it; the fault in it is reported once. */
  unitOf(unit: UnitTree | undefined): ConstantValue | undefined {
    if (!unit) return { value: Q.ONE, dimension: DIMENSIONLESS };
    const found = this.expressions.unit(unit);
    return found && { value: found.factor, dimension: found.dimension };
  }

  private readonly knownConstant: KnownValues = (name) => this.constants.get(name.name);

  quantities(): DeclaredQuantity[] {
    const { declarations } = this;
    const statements = [...declarations.of('constant'), ...declarations.of('parameter')].sort(
      (a, b) => a.span.start - b.span.start,
    );
    // Constants may be built from one another, in any order of the lines.
    const byName = new Map(statements.map((s) => [s.name.name, s]));
    const { order, circles } = orderDefinitions(statements, (statement) => {
      const needed: (typeof statements)[number][] = [];
      visitNames(statement.value, ({ name }) => {
        const other = byName.get(name);
        if (other?.kind === 'constant') needed.push(other);
      });
      return needed;
    });
    circles.forEach((circle) => {
      refuseCircle(
        circle.map(({ name }) => name),
        this.findings,
      );
      for (const { name } of circle) this.constants.set(name.name, 'poisoned');
    });
    const found = new Map<Statement<'constant' | 'parameter'>, DeclaredQuantity>();
    for (const statement of order) {
      const { name } = statement;
      const quantity =
        this.constants.get(name.name) === 'poisoned' ? undefined : this.quantity(statement);
      if (!quantity) {
        this.constants.set(name.name, 'poisoned');
        this.scope.define(name.name, { kind: 'poisoned' });
        continue;
      }
      found.set(statement, quantity);
      if (statement.kind === 'constant') this.constants.set(name.name, quantity);
      visitNames(statement.value, (used) => this.scope.used.add(used.name));
      this.scope.define(name.name, {
        kind: 'value',
        value: { e: quantity.symbol, d: closed(quantity.dimension) },
        what: `the ${quantity.kind} ${name.spelled}`,
      });
    }
    return statements.flatMap((statement) => found.get(statement) ?? []);
  }

  private quantity(statement: Statement<'constant' | 'parameter'>): DeclaredQuantity | undefined {
    const { kind, name, unit, description, span } = statement;
    const { findings } = this;
    const one = this.unitOf(unit);
    if (!one) return undefined;
    const { value: tree, uncertainty } = withoutUncertainty(statement.value);
    this.checkUnitsIn(tree);
    const value = declaredValue(tree, one, findings, this.knownConstant);
    if (!value) return undefined;
    let bounds: { lower: Rational; upper: Rational } | undefined;
    if (statement.bounds) {
      this.checkUnitsIn(statement.bounds.lower);
      this.checkUnitsIn(statement.bounds.upper);
      const lower = declaredValue(statement.bounds.lower, one, findings, this.knownConstant);
      const upper = declaredValue(statement.bounds.upper, one, findings, this.knownConstant);
      if (!lower || !upper) return undefined;
      bounds = { lower, upper };
      this.checkBounds(statement, value, bounds);
    }
    const isPositive = bounds
      ? Q.sign(bounds.lower) >= 0
      : kind === 'constant' && Q.sign(value) > 0;
    return {
      kind,
      name: name.name,
      symbol: C.symbol(name.name, { positive: isPositive }),
      dimension: one.dimension,
      unit: unit?.text.trim() ?? '',
      unitFactor: one.value,
      value,
      ...(uncertainty ? { uncertainty: Q.multiply(uncertainty, one.value) } : {}),
      ...(bounds ? { bounds } : {}),
      description,
      span,
      valueSpan: statement.value.span,
    };
  }

  /** Reports faults of units inside a value. */
  private checkUnitsIn(tree: ExpressionTree): void {
    if (tree.kind === 'number' && tree.unit) this.expressions.unit(tree.unit);
    if (tree.kind === 'product') tree.factors.forEach(({ factor }) => this.checkUnitsIn(factor));
    if (tree.kind === 'sum') tree.terms.forEach(({ term }) => this.checkUnitsIn(term));
    if (tree.kind === 'negation' || tree.kind === 'group') this.checkUnitsIn(tree.of);
    if (tree.kind === 'power') this.checkUnitsIn(tree.base);
  }

  private checkBounds(
    { name, value: tree, bounds }: Statement<'constant' | 'parameter'>,
    value: Rational,
    { lower, upper }: { lower: Rational; upper: Rational },
  ): void {
    const { findings } = this;
    if (!bounds) return;
    if (Q.compare(lower, upper) > 0) {
      findings.add('bounds-reversed', {
        start: bounds.lower.span.start,
        end: bounds.upper.span.end,
      });
    } else if (Q.compare(value, lower) < 0 || Q.compare(value, upper) > 0) {
      findings.add('start-outside-bounds', tree.span, {
        name: name.spelled,
        value: findings.textAt(tree.span),
        lower: findings.textAt(bounds.lower.span),
        upper: findings.textAt(bounds.upper.span),
      });
    }
  }

  lists(): void {
    for (const statement of this.declarations.of('list')) {
      const { name } = statement;
      const one = this.unitOf(statement.unit);
      const values: Rational[] = [];
      for (const tree of statement.values) {
        this.checkUnitsIn(tree);
        const value = one && declaredValue(tree, one, this.findings, this.knownConstant);
        if (value) values.push(value);
      }
      const isSound = one && values.length === statement.values.length;
      this.scope.define(
        name.name,
        isSound ? { kind: 'list', values, dimension: one.dimension } : { kind: 'poisoned' },
      );
    }
  }

  orderParameters(): OrderParameter[] {
    const pure: ConstantValue = { value: Q.ONE, dimension: DIMENSIONLESS };
    return this.declarations.of('order').flatMap((statement) => {
      const { name, stationary, description, span } = statement;
      const lower = declaredValue(statement.lower, pure, this.findings, this.knownConstant);
      const upper = declaredValue(statement.upper, pure, this.findings, this.knownConstant);
      if (!lower || !upper) {
        this.scope.define(name.name, { kind: 'poisoned' });
        return [];
      }
      if (Q.compare(lower, upper) > 0) {
        this.findings.add('bounds-reversed', {
          start: statement.lower.span.start,
          end: statement.upper.span.end,
        });
      }
      const symbol = C.symbol(name.name, { positive: Q.sign(lower) >= 0 });
      this.scope.define(name.name, {
        kind: 'value',
        value: { e: symbol, d: PURE },
        what: `the order parameter ${name.spelled}`,
      });
      return [{ name: name.name, symbol, lower, upper, stationary, description, span }];
    });
  }
}

/** The value without the uncertainty that a plain number may carry. */
function withoutUncertainty(tree: ExpressionTree): {
  value: ExpressionTree;
  uncertainty?: Rational;
} {
  if (tree.kind !== 'number' || !tree.uncertainty) return { value: tree };
  const { uncertainty, ...value } = tree;
  return { value, uncertainty };
}
