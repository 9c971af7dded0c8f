/** From the tree of a source text to the checked formulation. */
import * as C from '../algebra/construct.ts';
import { dependsOn } from '../algebra/traverse.ts';
import { DIMENSIONLESS, equalDimensions, dimension } from '../units/dimension.ts';
import { describeDimension, formatDimension } from '../units/formatDimension.ts';
import { elaborateClaims } from './claims.ts';
import { collectDeclarations, type Declarations } from './declarations.ts';
import { DeclaredNumbers } from './declaredNumbers.ts';
import { closed, PURE } from './dimensionCheck.ts';
import { refuseDivergence } from './divergence.ts';
import { domainOf } from './domain.ts';
import { ExpressionElaborator } from './elaborateExpression.ts';
import type { Findings } from './findings.ts';
import type { Abbreviation, Formulation, OrderParameter, Report } from './formulation.ts';
import { FormulationScope } from './formulationScope.ts';
import { logarithmOf, takeApart } from './logarithm.ts';
import { nameOrder } from './nameOrder.ts';
import { orderDefinitions, refuseCircle } from './orderDefinitions.ts';
import type { Typed } from './scope.ts';
import { diluteState } from './trialStates.ts';
import {
  PARTITION_FUNCTIONS,
  type ExpressionTree,
  type SourceTree,
  type Statement,
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
  private readonly numbers: DeclaredNumbers;

  constructor(tree: SourceTree, findings: Findings) {
    this.tree = tree;
    this.findings = findings;
    this.declarations = collectDeclarations(tree, findings);
    const { variables, isEnsembleKnown } = this.declarations;
    this.scope = new FormulationScope(this.declarations, variables, findings, isEnsembleKnown);
    this.expressions = new ExpressionElaborator(this.scope, findings);
    this.numbers = new DeclaredNumbers(this.declarations, this.scope, this.expressions);
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
    const quantities = this.numbers.quantities();
    this.numbers.lists();
    const orderParameters = this.numbers.orderParameters();
    const abbreviations = this.definitions();
    const stated = this.partitionFunction();
    scope.lnValue = stated && { e: stated.lnFunction, d: PURE };
    this.checkOrderParameters(orderParameters, stated?.lnFunction);
    scope.allowsProperties = true;
    const molar = this.reports('molar');
    const reports = this.reports('report');
    const claims = elaborateClaims(declarations.of('claim'), this.expressions, scope);
    const { ensemble, species, variables } = declarations;
    const constants = scope.naturalConstants();
    const known = { constants, quantities, orderParameters, variables };
    if (findings.errorCount === 0) {
      refuseDivergence(this.expressions.openBinders, known, findings);
      this.warnOfUnusedNames();
    }
    if (findings.errorCount > 0 || !stated) return { formulation: undefined, scope };
    const formulation: Formulation = {
      title: this.tree.title,
      ensemble,
      partitionFunction: PARTITION_FUNCTIONS[ensemble],
      species,
      variables,
      quantities,
      naturalConstants: constants,
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
        diluteState(known),
        orderParameters.map(({ symbol }) => symbol),
      ),
      nameOrder: nameOrder(
        this.trees(),
        [...quantities.map(({ name }) => name), ...orderParameters.map(({ name }) => name)],
        abbreviations.map(({ name }) => name),
      ),
      normalizedSource,
    };
    return { formulation, scope };
  }

  private checkUnitsOfVariables(): void {
    for (const { unit } of [...this.declarations.of('extent'), ...this.declarations.of('field')]) {
      this.numbers.unitOf(unit);
    }
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
      refuseCircle(
        circle.map(({ name }) => name),
        this.findings,
      );
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
      const one = this.numbers.unitOf(unit);
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
