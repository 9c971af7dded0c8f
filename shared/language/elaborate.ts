/** From the tree of a source text to the checked formulation. */
import * as C from '../algebra/construct.ts';
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { dependsOn } from '../algebra/traverse.ts';
import { DIMENSIONLESS, equalDimensions, dimension } from '../units/dimension.ts';
import { describeDimension, formatDimension } from '../units/formatDimension.ts';
import { elaborateClaims } from './claims.ts';
import { declaredValue, type ConstantValue, type KnownValues } from './constantValue.ts';
import { collectDeclarations, type Declarations } from './declarations.ts';
import { closed, PURE } from './dimensionCheck.ts';
import { divergence } from './divergence.ts';
import { domainOf } from './domain.ts';
import { ExpressionElaborator } from './elaborateExpression.ts';
import type { Findings } from './findings.ts';
import type {
  Abbreviation,
  DeclaredQuantity,
  Formulation,
  OrderParameter,
  Report,
} from './formulation.ts';
import { FormulationScope } from './formulationScope.ts';
import { logarithmOf, takeApart } from './logarithm.ts';
import { nameOrder } from './nameOrder.ts';
import { orderDefinitions } from './orderDefinitions.ts';
import type { Typed } from './scope.ts';
import {
  PARTITION_FUNCTIONS,
  type ExpressionTree,
  type SourceTree,
  type Statement,
  type UnitTree,
} from './syntax.ts';
import { visitNames } from './walkTree.ts';

type Definition = Statement<'let'> | Statement<'function'>;

export interface Elaborated {
  /** Undefined where there are errors. */
  readonly formulation: Formulation | undefined;
  readonly scope: FormulationScope;
}

/** Names, dimensions and meaning of a whole text; `normalizedSource` is passed through. */
export function elaborate(
  tree: SourceTree,
  findings: Findings,
  normalizedSource: string,
): Elaborated {
  return new Elaboration(tree, findings).run(normalizedSource);
}

class Elaboration {
  private readonly tree: SourceTree;
  private readonly findings: Findings;
  private readonly declarations: Declarations;
  private readonly scope: FormulationScope;
  private readonly expressions: ExpressionElaborator;
  private readonly constants = new Map<string, ConstantValue | 'poisoned'>();

  constructor(tree: SourceTree, findings: Findings) {
    this.tree = tree;
    this.findings = findings;
    this.declarations = collectDeclarations(tree, findings);
    const { variables, isEnsembleKnown } = this.declarations;
    this.scope = new FormulationScope(this.declarations, variables, findings, isEnsembleKnown);
    this.expressions = new ExpressionElaborator(this.scope, findings);
    if (this.declarations.of('factorials').length > 0) this.expressions.factorials = 'exact';
  }

  run(normalizedSource: string): Elaborated {
    const { declarations, scope, findings } = this;
    for (const statement of declarations.named.values()) {
      if (statement.kind === 'faulty' && statement.name) {
        scope.define(statement.name.name, { kind: 'poisoned' });
      }
    }
    this.checkUnitsOfVariables();
    const quantities = this.quantities();
    this.lists();
    const orderParameters = this.orderParameters();
    const abbreviations = this.definitions();
    const stated = this.partitionFunction();
    scope.lnValue = stated && { e: stated.lnFunction, d: PURE };
    this.checkOrderParameters(orderParameters, stated?.lnFunction);
    scope.allowsProperties = true;
    const molar = this.reports('molar');
    const reports = this.reports('report');
    const claims = elaborateClaims(declarations.of('claim'), this.expressions, scope);
    if (findings.errorCount === 0) {
      this.refuseDivergence(quantities, orderParameters);
      this.warnOfUnusedNames();
    }
    if (findings.errorCount > 0 || !stated) return { formulation: undefined, scope };
    const { ensemble, species, variables } = declarations;
    const formulation: Formulation = {
      title: this.tree.title,
      ensemble,
      partitionFunction: PARTITION_FUNCTIONS[ensemble],
      species,
      variables,
      quantities,
      naturalConstants: scope.naturalConstants(),
      abbreviations,
      orderParameters,
      factorials: this.expressions.factorials,
      lnPartitionFunction: stated.lnFunction,
      span: stated.span,
      molar,
      reports,
      claims,
      domain: domainOf(
        stated.lnFunction,
        this.diluteState(quantities, orderParameters),
        orderParameters.map(({ symbol }) => symbol),
      ),
      nameOrder: nameOrder(this.trees(), [
        ...quantities.map(({ name }) => name),
        ...orderParameters.map(({ name }) => name),
      ]),
      normalizedSource,
    };
    return { formulation, scope };
  }

  /** The unit as a value of one of it; the fault in it is reported once. */
  private unitOf(unit: UnitTree | undefined): ConstantValue | undefined {
    if (!unit) return { value: Q.ONE, dimension: DIMENSIONLESS };
    const found = this.expressions.unit(unit);
    return found && { value: found.factor, dimension: found.dimension };
  }

  private checkUnitsOfVariables(): void {
    for (const { unit } of [...this.declarations.of('extent'), ...this.declarations.of('field')]) {
      this.unitOf(unit);
    }
  }

  private readonly knownConstant: KnownValues = (name) => this.constants.get(name.name);

  private quantities(): DeclaredQuantity[] {
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
      this.refuseCircle(circle);
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

  private lists(): void {
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

  private orderParameters(): OrderParameter[] {
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

  /** Abbreviations, functions and q, each after what it needs. */
  private definitions(): Abbreviation[] {
    const lets = this.declarations.of('let');
    const definitions: Definition[] = [
      ...lets,
      ...this.declarations.of('function').filter(({ name }) => name.name === 'q'),
    ];
    const byName = new Map(definitions.map((d) => [d.name.name, d]));
    const { order, circles } = orderDefinitions(definitions, (definition) => {
      const needed: Definition[] = [];
      const own = new Set(
        definition.kind === 'let' ? definition.parameters?.map(({ name }) => name) : [],
      );
      visitNames(
        definition.value,
        ({ name }) => {
          const other = byName.get(name);
          if (other) needed.push(other);
        },
        own,
      );
      return needed;
    });
    for (const circle of circles) {
      this.refuseCircle(circle);
      for (const { name } of circle) this.scope.define(name.name, { kind: 'poisoned' });
    }
    const abbreviations = new Map<Definition, Abbreviation>();
    for (const definition of order) {
      const { name, value: tree, description, span } = definition;
      if (this.scope.entities.get(name.name)?.kind === 'poisoned') continue;
      if (definition.kind === 'let' && definition.parameters) {
        const { parameters } = definition;
        this.scope.define(name.name, { kind: 'function', parameters, body: tree });
        continue;
      }
      const value = this.expressions.elaborate(tree);
      const found = value && this.named(definition, value);
      if (!value || !found) {
        this.scope.define(name.name, { kind: 'poisoned' });
        continue;
      }
      this.scope.define(name.name, {
        kind: 'value',
        value: found,
        what: `the abbreviation ${name.spelled}`,
      });
      if (definition.kind === 'function') continue;
      abbreviations.set(definition, {
        name: name.name,
        expression: found.e,
        dimension: this.expressions.solver.settle(value.d) ?? DIMENSIONLESS,
        description,
        span,
      });
    }
    return lets.flatMap((statement) => abbreviations.get(statement) ?? []);
  }

  /** q stands for its expression; a let stays a symbol of its own unless it is a plain number. */
  private named(definition: Definition, { e, d }: Typed): Typed {
    const resolved = this.expressions.solver.resolve(d);
    if (definition.kind === 'function') {
      return { e: definition.isLogarithm ? C.exp(e) : e, d: resolved };
    }
    const isPlain = e.kind === 'number' || e.kind === 'infinity';
    return { e: isPlain ? e : C.abbreviation(definition.name.name, e), d: resolved };
  }

  private refuseCircle(circle: readonly Pick<Definition, 'name'>[]): void {
    const [first] = circle;
    if (!first) return;
    const names = circle.map(({ name }) => name.spelled);
    const words =
      names.length === 1
        ? `${names[0] ?? ''} is defined by itself`
        : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''} are defined by one another`;
    this.findings.add('circular-definition', first.name.span, { names: words });
  }

  private partitionFunction():
    { readonly lnFunction: Typed['e']; readonly span: Statement<'function'>['span'] } | undefined {
    const { declarations, findings, expressions } = this;
    const expected = PARTITION_FUNCTIONS[declarations.ensemble];
    const statements = declarations.of('function').filter(({ name }) => name.name !== 'q');
    const [first, ...others] = statements;
    for (const other of others) {
      findings.add('two-partition-functions', other.span, {
        where: first ? findings.lineWords(first.span) : '',
      });
    }
    if (!first) {
      const isFaulty = this.tree.statements.some(
        (s) =>
          s.kind === 'faulty' &&
          (s.word === 'ln' || s.name?.name === expected || s.name === undefined),
      );
      const end = findings.source.trimEnd().length;
      if (!isFaulty && declarations.isEnsembleKnown) {
        findings.add('no-partition-function', { start: end, end }, { function: expected });
      }
      return undefined;
    }
    if (first.name.name !== expected && declarations.isEnsembleKnown) {
      findings.add('wrong-partition-function', first.name.span, {
        ensemble: declarations.ensemble,
        function: expected,
        name: first.name.spelled,
      });
      return undefined;
    }
    const subject = first.isLogarithm
      ? `ln ${expected} must be a number`
      : `${expected} must be a number`;
    const value = expressions.pure(first.value, subject);
    if (!value) return undefined;
    if (!first.isLogarithm && value === C.zero) {
      findings.add('logarithm-of-zero', first.value.span);
      return undefined;
    }
    const { factorials } = expressions;
    const lnFunction = first.isLogarithm
      ? takeApart(value, factorials)
      : logarithmOf(value, factorials);
    return { lnFunction, span: first.span };
  }

  private checkOrderParameters(
    orderParameters: readonly OrderParameter[],
    lnFunction: Typed['e'] | undefined,
  ): void {
    if (!lnFunction) return;
    for (const { symbol, name, span } of orderParameters) {
      if (dependsOn(lnFunction, symbol)) continue;
      this.findings.add('order-parameter-not-used', span, {
        name,
        function: PARTITION_FUNCTIONS[this.declarations.ensemble],
      });
    }
  }

  private reports(kind: 'molar' | 'report'): Report[] {
    const { expressions, findings, scope } = this;
    return this.declarations.of(kind).flatMap((statement): Report[] => {
      const { name, unit, description, span } = statement;
      const one = this.unitOf(unit);
      const value = expressions.elaborate(statement.value);
      if (!one || !value) {
        scope.define(name.name, { kind: 'poisoned' });
        return [];
      }
      if (unit && !expressions.solver.unify(value.d, closed(one.dimension))) {
        findings.add('dimension', statement.value.span, {
          message: `${name.spelled} is declared as ${describeDimension(one.dimension)}, but ${findings.textAt(statement.value.span)} is ${expressions.words(value.d)}.`,
          hint: 'Change the unit or the expression.',
        });
        scope.define(name.name, { kind: 'poisoned' });
        return [];
      }
      const of = expressions.solver.settle(value.d) ?? DIMENSIONLESS;
      scope.define(name.name, {
        kind: 'value',
        value: { e: value.e, d: closed(of) },
        what: `the report ${name.spelled}`,
      });
      scope.used.add(name.name);
      return [
        {
          name: name.name,
          expression: value.e,
          dimension: of,
          unit: unit ? unit.text.trim() : formatDimension(of),
          unitFactor: one.value,
          description,
          span,
        },
      ];
    });
  }

  private refuseDivergence(
    quantities: readonly DeclaredQuantity[],
    orderParameters: readonly OrderParameter[],
  ): void {
    const { openBinders } = this.expressions;
    if (openBinders.length === 0) return;
    const values = this.knownNumbers(quantities, orderParameters);
    const states = TRIAL_STATES.map((roles) => {
      const state = new Map(values);
      for (const { name, role } of this.declarations.variables) state.set(name, roles[role]);
      return state;
    });
    for (const { tree, binder } of openBinders) {
      const end = divergence(binder, states);
      if (end === undefined) continue;
      const name = tree.variable.spelled;
      if (tree.what === 'integral') {
        this.findings.add('divergent-integral', tree.span, { name, end });
      } else {
        this.findings.add('divergent-sum', tree.span, { what: tree.what, name });
      }
    }
  }

  private warnOfUnusedNames(): void {
    const { declarations, scope, findings } = this;
    const mass = dimension(0, 1);
    for (const statement of [
      ...declarations.of('constant'),
      ...declarations.of('parameter'),
      ...declarations.of('list'),
      ...declarations.of('let'),
    ]) {
      const { name } = statement;
      if (scope.used.has(name.name)) continue;
      const entity = scope.entities.get(name.name);
      // The speed of sound needs the mass, whether ln Q does or not.
      const isMass =
        entity?.kind === 'value' &&
        /^m(_|$)/.test(name.name) &&
        equalDimensions(entity.value.d.known, mass);
      if (isMass || entity?.kind === 'poisoned') continue;
      findings.add('unused-name', name.span, { name: name.spelled });
    }
  }

  /** The numbers behind the names that are no natural variables; order parameters in mid-range. */
  private knownNumbers(
    quantities: readonly DeclaredQuantity[],
    orderParameters: readonly OrderParameter[],
  ): Map<string, number> {
    const numbers = new Map<string, number>();
    for (const constant of this.scope.naturalConstants()) {
      numbers.set(constant.name, Q.toNumber(constant.value));
    }
    for (const { name, value } of quantities) numbers.set(name, Q.toNumber(value));
    for (const { name, lower, upper } of orderParameters) {
      numbers.set(name, Q.toNumber(Q.divide(Q.add(lower, upper), Q.rational(2))));
    }
    return numbers;
  }

  /** Values at which a dilute system exists, for the sign of denominators. */
  private diluteState(
    quantities: readonly DeclaredQuantity[],
    orderParameters: readonly OrderParameter[],
  ): Map<string, number> {
    const state = this.knownNumbers(quantities, orderParameters);
    for (const { name, role } of this.declarations.variables) state.set(name, DILUTE[role]);
    return state;
  }

  private trees(): ExpressionTree[] {
    return this.tree.statements.flatMap((statement): ExpressionTree[] => {
      switch (statement.kind) {
        case 'let':
        case 'function':
        case 'molar':
        case 'report':
          return [statement.value];
        case 'claim': {
          const { statement: claim } = statement;
          return claim.kind === 'limit'
            ? [claim.of, claim.value]
            : [claim.relation.left, claim.relation.right];
        }
        default:
          return [];
      }
    });
  }
}

type Role = Formulation['variables'][number]['role'];

/** In SI units: ten molecules in a large box at a high temperature. */
const DILUTE: Readonly<Record<Role, number>> = {
  temperature: 1000,
  extent: 1e6,
  number: 10,
  'chemical potential': -1e-18,
  pressure: 1e-6,
  energy: 1e-19,
  field: 1,
};

/** Widely different states, so that what has no value at any of them has none at all. */
const TRIAL_STATES: readonly Readonly<Record<Role, number>>[] = [
  DILUTE,
  {
    temperature: 10,
    extent: 1e-3,
    number: 1e22,
    'chemical potential': -1e-16,
    pressure: 1e5,
    energy: 1e2,
    field: 0.01,
  },
  {
    temperature: 1e5,
    extent: 1e-9,
    number: 1e3,
    'chemical potential': -1e-20,
    pressure: 1e9,
    energy: 1e-12,
    field: -10,
  },
];

/** The value without the uncertainty that a plain number may carry. */
function withoutUncertainty(tree: ExpressionTree): {
  value: ExpressionTree;
  uncertainty?: Rational;
} {
  if (tree.kind !== 'number' || !tree.uncertainty) return { value: tree };
  const { uncertainty, ...value } = tree;
  return { value, uncertainty };
}
