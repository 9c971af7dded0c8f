/** What the language demands of dimensions, and its words where a demand is not met. */
import { dimension, equalDimensions, isDimensionless, type Dimension } from '../units/dimension.ts';
import { describeDimension } from '../units/formatDimension.ts';
import type { Repair, Span } from './diagnostic.ts';
import { DimensionSolver, PURE, type OpenDimension } from './dimensionCheck.ts';
import type { Findings } from './findings.ts';
import { ENERGY, TEMPERATURE } from './properties.ts';
import type { ExpressionTree } from './syntax.ts';

/** Of a wavenumber divided by k T. */
const PER_ENERGY_AND_LENGTH = dimension(-3, -1, 2);

export class DimensionDemands {
  readonly findings: Findings;
  readonly solver = new DimensionSolver();

  constructor(findings: Findings) {
    this.findings = findings;
  }

  /** Words for a dimension: `an energy, J`. */
  words(d: OpenDimension): string {
    const known = this.solver.settle(d);
    return known
      ? describeDimension(known)
      : 'no number: a unit in it has an exponent that does not cancel';
  }

  /** Demands that both have one dimension; `rule` begins the complaint. */
  agree(
    a: OpenDimension,
    b: OpenDimension,
    left: ExpressionTree,
    right: ExpressionTree,
    rule: string,
  ): boolean {
    if (this.solver.unify(a, b)) return true;
    const text = (tree: ExpressionTree): string => shortened(this.findings.textAt(tree.span));
    this.findings.add('dimension', right.span, {
      message: `${rule}, but ${text(left)} is ${this.words(a)}, and ${text(right)} is ${this.words(b)}.`,
      hint: 'Look for a missing or a superfluous factor in one of them.',
    });
    return false;
  }

  /** Demands that something is a number without unit. */
  isPure(d: OpenDimension, tree: ExpressionTree, rule: string): boolean {
    if (this.solver.unify(d, PURE)) return true;
    this.complain(tree, rule, d);
    return false;
  }

  /** Something that should be a number is not; an energy is divided by k T, a temperature by T. */
  protected complain(tree: ExpressionTree, rule: string, d: OpenDimension): void {
    const { span } = tree;
    const known = this.solver.settle(d);
    const { hint, repairs } = wayOut(tree, span, known);
    this.findings.add(
      'dimension',
      span,
      {
        message: `${rule}, but ${shortened(this.findings.textAt(span))} is ${this.words(d)}.`,
        hint,
      },
      repairs,
    );
  }
}

function shortened(text: string): string {
  return text.length <= 60 ? text : `${text.slice(0, 57)}…`;
}

function wayOut(
  tree: ExpressionTree,
  span: Span,
  known: Dimension | undefined,
): { hint: string; repairs: Repair[] } {
  if (known && equalDimensions(known, PER_ENERGY_AND_LENGTH)) {
    return { hint: 'A wavenumber times h c is an energy.', repairs: [] };
  }
  const divisor = !known
    ? undefined
    : equalDimensions(known, ENERGY)
      ? { words: 'k T', text: '(k T)' }
      : equalDimensions(known, TEMPERATURE)
        ? { words: 'T', text: 'T' }
        : undefined;
  if (!divisor) {
    const isNumber = known !== undefined && isDimensionless(known);
    return { hint: isNumber ? '' : 'Divide it by a quantity of the same dimension.', repairs: [] };
  }
  const isSingle = tree.kind === 'name' || tree.kind === 'group' || tree.kind === 'call';
  const at = (offset: number): Span => ({ start: offset, end: offset });
  const edits = [
    ...(isSingle ? [] : [{ span: at(span.start), text: '(' }]),
    { span: at(span.end), text: `${isSingle ? '' : ')'} / ${divisor.text}` },
  ];
  return {
    hint: `Divide it by ${divisor.words}.`,
    repairs: [{ title: `divide by ${divisor.words}`, edits }],
  };
}
