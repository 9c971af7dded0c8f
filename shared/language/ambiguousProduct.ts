/** Products that could be read in two ways, with both readings as repairs. */
import type { Span } from './diagnostic.ts';
import type { Findings } from './findings.ts';
import type { ExpressionTree, ProductTree } from './syntax.ts';

export type Factor = ProductTree['factors'][number];

/** `2 3` is hardly meant as 6. */
export function refuseAdjacentNumbers(
  left: ExpressionTree,
  right: ExpressionTree,
  findings: Findings,
): void {
  if (left.kind !== 'number' || right.kind !== 'number' || left.unit) return;
  const span = { start: left.span.start, end: right.span.end };
  findings.add('adjacent-numbers', span, { text: findings.textAt(span) }, [
    {
      title: 'write * between them',
      edits: [{ span: { start: left.span.end, end: right.span.start }, text: ' * ' }],
    },
  ]);
}

/** `a / b c` and `a / b / c`: the last of the factors is the one too many. */
export function refuseDivision(factors: readonly Factor[], findings: Findings): void {
  const divisor = factors.at(-2)?.factor;
  const last = factors.at(-1);
  if (!divisor || !last) return;
  let head = factors.length - 3;
  while (head > 0 && factors[head]?.joint === 'beside') head--;
  const start = factors[Math.max(0, head)]?.factor.span.start ?? divisor.span.start;
  const span = { start, end: last.factor.span.end };
  const between = { start: divisor.span.end, end: last.factor.span.start };
  const before = (offset: number): Span => ({ start: offset, end: offset });
  const words = {
    divisor: findings.textAt(divisor.span),
    last: findings.textAt(last.factor.span),
  };
  const { end } = last.factor.span;
  const repairs =
    last.joint === '/'
      ? [
          {
            title: `divide by both: / (${words.divisor} * ${words.last})`,
            edits: [
              { span: before(divisor.span.start), text: '(' },
              { span: between, text: ' * ' },
              { span: before(end), text: ')' },
            ],
          },
          {
            title: `divide by the quotient: / (${words.divisor} / ${words.last})`,
            edits: [
              { span: before(divisor.span.start), text: '(' },
              { span: before(end), text: ')' },
            ],
          },
        ]
      : [
          {
            title: `divide by both: / (${words.divisor} ${words.last})`,
            edits: [
              { span: before(divisor.span.start), text: '(' },
              { span: before(end), text: ')' },
            ],
          },
          {
            title: `multiply by ${words.last}: / ${words.divisor} * ${words.last}`,
            edits: [{ span: between, text: ' * ' }],
          },
        ];
  findings.add('ambiguous-division', span, { text: findings.textAt(span) }, repairs);
}

function isPlainNumber(tree: ExpressionTree | undefined): boolean {
  return tree?.kind === 'number' && !tree.unit && !tree.uncertainty;
}

/** True where the factor before the last closes a quotient of two numbers that begins a product. */
export function isFraction(factors: readonly Factor[]): boolean {
  const numerator = factors.at(-3);
  const divisor = factors.at(-2);
  return (
    isPlainNumber(numerator?.factor) &&
    isPlainNumber(divisor?.factor) &&
    (numerator?.joint === 'first' || numerator?.joint === '*')
  );
}
