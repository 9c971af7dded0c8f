/**
 * From a syntax tree to an expression of the algebra with its dimension, in one pass.
 *
 * A part at fault is reported where it stands and gives `undefined`; whatever contains it is then
 * undefined without a further word, so that one mistake is one finding.
 */
import * as C from '../algebra/construct.ts';
import { childrenOf, type Expression, type Relation } from '../algebra/expression.ts';
import { FUNCTIONS, isFunctionName } from '../algebra/functions.ts';
import * as Q from '../algebra/rational.ts';
import { isPositive } from '../algebra/sign.ts';
import { parseUnit, type UnitValue } from '../units/parseUnit.ts';
import { closed, PURE, type OpenDimension } from './dimensionCheck.ts';
import { DimensionDemands } from './dimensionDemands.ts';
import type { OpenBinder } from './divergence.ts';
import { bitsOf, bitsOfNumber } from './exactSize.ts';
import type { Findings } from './findings.ts';
import { hasFactorial, logarithmOf, type Factorials } from './logarithm.ts';
import { DEEPEST_EXPRESSION, LONGEST_NUMBER_BITS, MOST_PARTS } from './limits.ts';
import { FIXED_NAMES, type Entity, type Typed } from './scope.ts';
import type {
  BinderTree,
  CallTree,
  CasesTree,
  ConditionTree,
  ExpressionTree,
  NameTree,
  PartialTree,
  PowerTree,
  ProductTree,
  SumTree,
  UnitTree,
} from './syntax.ts';

/** Where names lead; reports a name that leads nowhere. */
export interface Names {
  look(name: NameTree): Entity | undefined;
  /** What the name is outside a binder, in words, without a report: `the constant m`. */
  meaningOf(name: string): string | undefined;
  /** ln of the partition function, where it may be referred to. */
  lnFunction(name: NameTree): Typed | undefined;
}

/** By the serial number of the expression, which is never given twice. */
const depthKnown: number[] = [];

/** Levels of an expression, through the definitions of its abbreviations. */
function depthOf(e: Expression): number {
  const known = depthKnown[e.id];
  if (known !== undefined) return known;
  let depth = 0;
  for (const child of childrenOf(e)) depth = Math.max(depth, depthOf(child));
  depthKnown[e.id] = depth + 1;
  return depth + 1;
}

export class ExpressionElaborator extends DimensionDemands {
  factorials: Factorials = 'Stirling';
  /** Sums and integrals that may have no value, for when the values of constants are known. */
  readonly openBinders: { readonly tree: BinderTree; readonly binder: OpenBinder }[] = [];
  private readonly names: Names;
  private readonly local = new Map<string, Entity[]>();
  private parts = 0;
  private calls = 0;
  private mayBeInfinite = false;

  constructor(names: Names, findings: Findings) {
    super(findings);
    this.names = names;
  }

  /** The expression of a tree; inf is allowed at its top where `mayBeInfinite`. */
  elaborate(tree: ExpressionTree, mayBeInfinite = false): Typed | undefined {
    const before = this.mayBeInfinite;
    this.mayBeInfinite = mayBeInfinite;
    try {
      const result = this.visit(tree);
      if (!result) return undefined;
      if (depthOf(result.e) > DEEPEST_EXPRESSION) {
        this.findings.add('too-deep', tree.span, {
          what: 'This expression with its abbreviations',
          limit: String(DEEPEST_EXPRESSION),
        });
        return undefined;
      }
      return result;
    } catch (fault) {
      // The constructors' word for a division by zero.
      if (!(fault instanceof RangeError)) throw fault;
      this.findings.add('division-by-zero', tree.span);
      return undefined;
    } finally {
      this.mayBeInfinite = before;
    }
  }

  /** The same, which has to be a number without unit; `subject` names it in the complaint. */
  pure(tree: ExpressionTree, subject: string): Expression | undefined {
    const typed = this.elaborate(tree);
    if (!typed) return undefined;
    return this.isPure(typed.d, tree, subject) ? typed.e : undefined;
  }

  /** Both sides, which have to agree in dimension. */
  relation(tree: ConditionTree): { relation: Relation; d: OpenDimension } | undefined {
    const left = this.elaborate(tree.left);
    const right = this.elaborate(tree.right);
    if (!left || !right) return undefined;
    if (!this.agree(left.d, right.d, tree.left, tree.right, 'Both sides must agree')) {
      return undefined;
    }
    return { relation: { left: left.e, sign: tree.sign, right: right.e }, d: left.d };
  }

  /** The value of a unit, or undefined with its fault reported. */
  unit(tree: UnitTree): UnitValue | undefined {
    const { unit, fault } = parseUnit(tree.text);
    if (unit) return unit;
    const offset = tree.span.start + 1;
    const span = { start: offset + fault.start, end: offset + fault.end };
    const { message, hint, replacement } = fault;
    this.findings.add(
      'unit',
      span,
      { message, hint },
      replacement === undefined
        ? []
        : [{ title: `write ${replacement}`, edits: [{ span, text: replacement }] }],
    );
    return undefined;
  }

  private visit(tree: ExpressionTree): Typed | undefined {
    if (++this.parts > MOST_PARTS) {
      this.findings.add('too-large', tree.span);
      return undefined;
    }
    const result = this.dispatch(tree);
    if (result && bitsOfNumber(result.e) > LONGEST_NUMBER_BITS) {
      this.findings.add('number-too-large', tree.span);
      return undefined;
    }
    return result;
  }

  private dispatch(tree: ExpressionTree): Typed | undefined {
    switch (tree.kind) {
      case 'number': {
        if (tree.uncertainty) {
          this.findings.add('uncertainty-out-of-place', tree.span);
          return undefined;
        }
        if (tree.unit) {
          const unit = this.unit(tree.unit);
          return (
            unit && {
              e: C.number(Q.multiply(tree.value, unit.factor)),
              d: closed(unit.dimension),
            }
          );
        }
        // Nothing is nothing in any unit.
        return {
          e: C.number(tree.value),
          d: Q.isZero(tree.value) ? this.solver.fresh() : PURE,
        };
      }
      case 'infinity':
        if (this.mayBeInfinite) return { e: C.infinity, d: this.solver.fresh() };
        this.findings.add('infinity-out-of-place', tree.span);
        return undefined;
      case 'name':
        return this.reference(tree);
      case 'group':
        return this.visit(tree.of);
      case 'negation': {
        const of = this.visit(tree.of);
        return of && { e: C.negate(of.e), d: of.d };
      }
      case 'sum':
        return this.sum(tree);
      case 'product':
        return this.product(tree);
      case 'power':
        return this.power(tree);
      case 'factorial': {
        const of = this.finite(tree.of);
        if (!of || !this.isPure(of.d, tree.of, 'What stands before ! must be a number')) {
          return undefined;
        }
        return { e: C.call('factorial', [of.e]), d: PURE };
      }
      case 'call':
        return this.call(tree);
      case 'partial':
        return this.partial(tree);
      case 'binder':
        return this.binder(tree);
      case 'cases':
        return this.cases(tree);
      case 'lnFunction':
        return this.names.lnFunction(tree.name);
    }
  }

  /** A part in which inf has no meaning. */
  private finite(tree: ExpressionTree): Typed | undefined {
    const before = this.mayBeInfinite;
    this.mayBeInfinite = false;
    const result = this.visit(tree);
    this.mayBeInfinite = before;
    return result;
  }

  private entity(name: NameTree): Entity | undefined {
    return this.local.get(name.name)?.at(-1) ?? this.names.look(name);
  }

  private reference(name: NameTree): Typed | undefined {
    const entity = this.entity(name);
    switch (entity?.kind) {
      case 'value':
        return entity.value;
      case 'property':
        return { e: entity.symbol, d: closed(entity.dimension) };
      case 'function':
      case 'list':
        this.findings.add('function-without-parentheses', name.span, { name: name.spelled });
        return undefined;
      default:
        return undefined;
    }
  }

  private sum(tree: SumTree): Typed | undefined {
    const addends: Expression[] = [];
    let first: { typed: Typed; tree: ExpressionTree } | undefined;
    let isSound = true;
    for (const { isNegative, term } of tree.terms) {
      const typed = this.finite(term);
      if (!typed) {
        isSound = false;
        continue;
      }
      addends.push(isNegative ? C.negate(typed.e) : typed.e);
      if (!first) first = { typed, tree: term };
      else if (
        !this.agree(first.typed.d, typed.d, first.tree, term, 'The terms of a sum must agree')
      ) {
        isSound = false;
      }
    }
    return isSound && first ? { e: C.sum(addends), d: first.typed.d } : undefined;
  }

  private product(tree: ProductTree): Typed | undefined {
    const multiplicands: Expression[] = [];
    let d = PURE;
    let bits = 0;
    // What it would mean is not guessed, but its factors are looked at.
    let isSound = tree.isAmbiguous !== true;
    for (const { joint, factor } of tree.factors) {
      const typed = this.finite(factor);
      if (!typed) {
        isSound = false;
        continue;
      }
      bits += bitsOfNumber(typed.e);
      if (bits > LONGEST_NUMBER_BITS) {
        this.findings.add('number-too-large', factor.span);
        return undefined;
      }
      if (joint !== '/') {
        multiplicands.push(typed.e);
        d = this.solver.multiply(d, typed.d);
      } else if (typed.e === C.zero) {
        this.findings.add('division-by-zero', factor.span);
        isSound = false;
      } else {
        multiplicands.push(C.power(typed.e, C.minusOne));
        d = this.solver.divide(d, typed.d);
      }
    }
    return isSound ? { e: C.product(multiplicands), d } : undefined;
  }

  private power(tree: PowerTree): Typed | undefined {
    const base = this.finite(tree.base);
    const exponent = this.finite(tree.exponent);
    if (!base || !exponent) return undefined;
    if (!this.isPure(exponent.d, tree.exponent, 'An exponent must be a number')) return undefined;
    if (exponent.e.kind === 'number') {
      const { value } = exponent.e;
      if (base.e === C.zero && Q.sign(value) < 0) {
        this.findings.add('division-by-zero', tree.span);
        return undefined;
      }
      const size = Math.abs(Q.toNumber(value));
      if (bitsOfNumber(base.e) * size > LONGEST_NUMBER_BITS || bitsOf(value) > 64) {
        this.findings.add('number-too-large', tree.span);
        return undefined;
      }
      return { e: C.power(base.e, exponent.e), d: this.solver.power(base.d, value) };
    }
    const d = this.solver.symbolicPower(base.d, exponent.e);
    if (!d) {
      this.complain(tree.base, 'What is raised to this exponent must be a number', base.d);
      return undefined;
    }
    return { e: C.power(base.e, exponent.e), d };
  }

  private call(tree: CallTree): Typed | undefined {
    const entity = this.local.get(tree.name.name)?.at(-1);
    if (!entity && tree.name.name === 'sqrt') return this.squareRoot(tree);
    if (!entity && isFunctionName(tree.name.name)) return this.builtIn(tree, tree.name.name);
    const found = entity ?? this.names.look(tree.name);
    switch (found?.kind) {
      case 'function':
        return this.ownFunction(tree, found);
      case 'list':
        return this.element(tree, found);
      case 'value':
      case 'property':
        this.findings.add('not-a-function', tree.name.span, { name: tree.name.spelled });
        return undefined;
      default:
        return undefined;
    }
  }

  private squareRoot(tree: CallTree): Typed | undefined {
    const [only] = tree.arguments;
    if (!this.hasCount(tree, 1, 'sqrt(x)') || !only) return undefined;
    const of = this.finite(only);
    if (!of) return undefined;
    if (of.e.kind === 'number' && Q.sign(of.e.value) < 0) {
      return { e: C.power(of.e, C.half), d: this.solver.power(of.d, Q.HALF) };
    }
    return { e: C.sqrt(of.e), d: this.solver.power(of.d, Q.HALF) };
  }

  private hasCount(tree: CallTree, count: number, usage: string): boolean {
    if (tree.arguments.length === count) return true;
    this.findings.add('number-of-arguments', tree.span, {
      name: tree.name.spelled,
      expected: count === 1 ? 'one argument' : `${count} arguments`,
      found: String(tree.arguments.length),
      usage,
    });
    return false;
  }

  private builtIn(tree: CallTree, name: keyof typeof FUNCTIONS): Typed | undefined {
    const facts = FUNCTIONS[name];
    const usage = `${name}(${facts.parameters.join(', ')})`;
    const count = facts.arity ?? Math.max(1, tree.arguments.length);
    if (!this.hasCount(tree, count, usage)) return undefined;
    const args = tree.arguments.map((argument) => this.finite(argument));
    // min, max and abs take any dimension, all the same.
    const isUniform = name === 'min' || name === 'max' || name === 'abs';
    const [first] = args;
    const expressions: Expression[] = [];
    let isSound = true;
    tree.arguments.forEach((argument, i) => {
      const typed = args[i];
      if (!typed) isSound = false;
      else if (isUniform) {
        const [head] = tree.arguments;
        if (first && head && i > 0) {
          isSound =
            this.agree(first.d, typed.d, head, argument, `The arguments of ${name} must agree`) &&
            isSound;
        }
        expressions.push(typed.e);
      } else if (!this.isPure(typed.d, argument, `The argument of ${name} must be a number`)) {
        isSound = false;
      } else {
        expressions.push(typed.e);
      }
    });
    const [x] = expressions;
    if (!isSound || !x) return undefined;
    if (name === 'ln' || name === 'log10') {
      if (x === C.zero) {
        this.findings.add('logarithm-of-zero', tree.span);
        return undefined;
      }
      if (name === 'ln' && hasFactorial(x)) return { e: logarithmOf(x, this.factorials), d: PURE };
    }
    return { e: C.call(name, expressions), d: isUniform && first ? first.d : PURE };
  }

  private ownFunction(
    tree: CallTree,
    { parameters, body }: Extract<Entity, { kind: 'function' }>,
  ): Typed | undefined {
    const usage = `${tree.name.spelled}(${parameters.map(({ spelled }) => spelled).join(', ')})`;
    if (!this.hasCount(tree, parameters.length, usage)) return undefined;
    const args = tree.arguments.map((argument) => this.finite(argument));
    if (args.some((argument) => !argument)) return undefined;
    if (this.calls >= 30) {
      this.findings.add('too-deep', tree.span, { what: 'Calls of functions', limit: '30' });
      return undefined;
    }
    // The body knows the names of the formulation and its own arguments, not those of the caller.
    const outside = new Map(this.local);
    this.local.clear();
    parameters.forEach(({ name }, i) => {
      const value = args[i];
      if (value) this.local.set(name, [{ kind: 'value', value, what: 'an argument' }]);
    });
    this.calls++;
    const result = this.finite(body);
    this.calls--;
    this.local.clear();
    for (const [name, entities] of outside) this.local.set(name, entities);
    if (result && depthOf(result.e) > DEEPEST_EXPRESSION) {
      this.findings.add('too-large', tree.span);
      return undefined;
    }
    return result;
  }

  private element(
    tree: CallTree,
    { values, dimension }: Extract<Entity, { kind: 'list' }>,
  ): Typed | undefined {
    const [only] = tree.arguments;
    if (!this.hasCount(tree, 1, `${tree.name.spelled}(i)`) || !only) return undefined;
    const index = this.finite(only);
    if (!index || !this.isPure(index.d, only, 'The index of a list must be a number')) {
      return undefined;
    }
    if (index.e.kind === 'number') {
      const position = Q.toNumber(index.e.value);
      if (!Number.isInteger(position) || position < 1 || position > values.length) {
        this.findings.add('list-index', tree.span, {
          name: tree.name.spelled,
          count: String(values.length),
          index: Q.toText(index.e.value),
        });
        return undefined;
      }
    }
    return { e: C.element(tree.name.name, values, index.e), d: closed(dimension) };
  }

  private partial(tree: PartialTree): Typed | undefined {
    const of = this.finite(tree.of);
    const by = this.finite(tree.by);
    const held = tree.held.map((part) => this.finite(part));
    if (!of || !by) return undefined;
    const expressions: Expression[] = [of.e, by.e];
    for (const part of held) {
      if (!part) return undefined;
      expressions.push(part.e);
    }
    return { e: C.call('partial', expressions), d: this.solver.divide(of.d, by.d) };
  }

  private binder(tree: BinderTree): Typed | undefined {
    const from = this.elaborate(tree.from, true);
    const to = this.elaborate(tree.to, true);
    if (!from || !to) return undefined;
    const isIntegral = tree.what === 'integral';
    let d: OpenDimension = PURE;
    if (isIntegral) {
      if (!this.agree(from.d, to.d, tree.from, tree.to, 'The ends of an integral must agree')) {
        return undefined;
      }
      d = from.d;
      if (tree.unit) {
        const unit = this.unit(tree.unit);
        if (!unit) return undefined;
        if (!this.solver.unify(d, closed(unit.dimension))) {
          this.complain(tree.from, `The ends must be in the unit [${tree.unit.text}]`, d);
          return undefined;
        }
      }
    } else if (!this.areWholeEnds(tree, from, to)) {
      return undefined;
    }
    // An index from 0 counts as positive: 2 J + 1 is, and J itself vanishes at one point only.
    const isAbove = from.e === C.zero || isPositive(from.e);
    const variable = C.symbol(this.freshName(tree.variable), {
      integer: !isIntegral,
      positive: isAbove && from.e !== C.infinity,
    });
    const stack = this.local.get(tree.variable.name) ?? [];
    const entity: Entity = { kind: 'value', value: { e: variable, d }, what: 'a running variable' };
    this.local.set(tree.variable.name, [...stack, entity]);
    const body = this.finite(tree.body);
    this.local.set(tree.variable.name, stack);
    if (!body) return undefined;
    if (to.e === C.infinity || (isIntegral && from.e === C.zero)) {
      this.openBinders.push({
        tree,
        binder: { what: tree.what, variable, from: from.e, to: to.e, body: body.e },
      });
    }
    if (isIntegral) {
      return {
        e: C.integral(variable, from.e, to.e, body.e),
        d: this.solver.multiply(body.d, d),
      };
    }
    if (tree.what === 'sum') {
      return { e: C.summation(variable, from.e, to.e, body.e), d: body.d };
    }
    if (!this.isPure(body.d, tree.body, 'The factors of a product must be numbers')) {
      return undefined;
    }
    return { e: C.productOver(variable, from.e, to.e, body.e), d: PURE };
  }

  /** A running variable is a symbol of its own even where its name is taken outside. */
  private freshName({ name, spelled, span }: NameTree): string {
    const depth = this.local.get(name)?.length ?? 0;
    const meaning = this.names.meaningOf(name);
    if (FIXED_NAMES.includes(name)) {
      this.findings.add('fixed-name', span, { name: spelled, what: meaning ?? name });
    } else if (meaning !== undefined) {
      this.findings.add('name-shadowed', span, { name: spelled, what: meaning });
    }
    if (depth > 0) return `${name}_run${depth}`;
    return meaning === undefined ? name : `${name}_run`;
  }

  private areWholeEnds(tree: BinderTree, from: Typed, to: Typed): boolean {
    for (const [end, typed] of [
      [tree.from, from],
      [tree.to, to],
    ] as const) {
      if (!this.isPure(typed.d, end, `The ends of a ${tree.what} must be numbers`)) return false;
      if (typed.e.kind === 'number' && !Q.isInteger(typed.e.value)) {
        this.findings.add('integer-bounds', end.span, {
          what: tree.what,
          text: this.findings.textAt(end.span),
        });
        return false;
      }
    }
    if (from.e !== C.infinity) return true;
    this.findings.add('infinity-out-of-place', tree.from.span);
    return false;
  }

  private cases(tree: CasesTree): Typed | undefined {
    const branches: { condition: Relation; value: Expression }[] = [];
    let isSound = true;
    const otherwise = this.elaborate(tree.otherwise, true);
    for (const { condition, value } of tree.branches) {
      const relation = this.relation(condition);
      const typed = this.elaborate(value, true);
      if (!relation || !typed || !otherwise) {
        isSound = false;
      } else if (!this.agree(typed.d, otherwise.d, value, tree.otherwise, 'The cases must agree')) {
        isSound = false;
      } else {
        branches.push({ condition: relation.relation, value: typed.e });
      }
    }
    return isSound && otherwise
      ? { e: C.piecewise(branches, otherwise.e), d: otherwise.d }
      : undefined;
  }
}
