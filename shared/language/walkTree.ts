/** Walks over syntax trees. Their depth is limited by the parser, so that recursion is safe. */
import type { ExpressionTree, NameTree } from './syntax.ts';

/** The expressions directly inside, in the order of the text. */
export function partsOf(tree: ExpressionTree): readonly ExpressionTree[] {
  switch (tree.kind) {
    case 'number':
    case 'name':
    case 'infinity':
    case 'lnFunction':
      return [];
    case 'sum':
      return tree.terms.map(({ term }) => term);
    case 'product':
      return tree.factors.map(({ factor }) => factor);
    case 'power':
      return [tree.base, tree.exponent];
    case 'negation':
    case 'factorial':
    case 'group':
      return [tree.of];
    case 'call':
      return tree.arguments;
    case 'partial':
      return [tree.of, tree.by, ...tree.held];
    case 'binder':
      return [tree.from, tree.to, tree.body];
    case 'cases':
      return [
        ...tree.branches.flatMap(({ condition, value }) => [
          condition.left,
          condition.right,
          value,
        ]),
        tree.otherwise,
      ];
  }
}

/** Calls `visit` with every free name of the tree; names of functions that are called as well. */
export function visitNames(
  tree: ExpressionTree,
  visit: (name: NameTree) => void,
  bound: ReadonlySet<string> = new Set(),
): void {
  if (tree.kind === 'name') {
    if (!bound.has(tree.name)) visit(tree);
    return;
  }
  if (tree.kind === 'lnFunction') visit(tree.name);
  if (tree.kind === 'call' && !bound.has(tree.name.name)) visit(tree.name);
  if (tree.kind === 'binder') {
    visitNames(tree.from, visit, bound);
    visitNames(tree.to, visit, bound);
    visitNames(tree.body, visit, new Set([...bound, tree.variable.name]));
    return;
  }
  for (const part of partsOf(tree)) visitNames(part, visit, bound);
}
