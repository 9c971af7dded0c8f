/**
 * The order in which products name their factors: as the author writes them.
 *
 * Neighbours in a product, `a N` or `k T`, each give an arrow from the first to the second; the
 * names are sorted along the arrows, a later arrow that would close a circle being left out. Where
 * the arrows leave a choice, pi comes first, then what the author declared, then N, k, T, V, and
 * abbreviations last: N Λ³.
 */
import { isBuiltInFunction } from './parseExpression.ts';
import { visitNames, partsOf } from './walkTree.ts';
import type { ExpressionTree, ProductTree } from './syntax.ts';

/** The name that a factor is known by in a product. */
function nameOfFactor(tree: ExpressionTree): string | undefined {
  if (tree.kind === 'name') return tree.name;
  if (tree.kind === 'power' || tree.kind === 'factorial') {
    return nameOfFactor(tree.kind === 'power' ? tree.base : tree.of);
  }
  return undefined;
}

function collectPairs(tree: ExpressionTree, pairs: [string, string][]): void {
  if (tree.kind === 'product') pairsOf(tree, pairs);
  for (const part of partsOf(tree)) collectPairs(part, pairs);
}

function pairsOf({ factors }: ProductTree, pairs: [string, string][]): void {
  let last: string | undefined;
  for (const { joint, factor } of factors) {
    if (joint === '/') continue;
    const name = nameOfFactor(factor);
    if (name !== undefined && last !== undefined && name !== last) pairs.push([last, name]);
    if (name !== undefined) last = name;
  }
}

/** Beyond this many neighbours the rest say nothing new of how the author writes. */
const MOST_PAIRS = 1000;

const LAST = ['N', 'k', 'T', 'V'];

/**
 * The order for printing; `trees` in the order of the text, `declared` the numbers of the author,
 * `abbreviations` the names of his lets.
 */
export function nameOrder(
  trees: readonly ExpressionTree[],
  declared: readonly string[],
  abbreviations: readonly string[] = [],
): string[] {
  const pairs: [string, string][] = [];
  const met = new Set<string>();
  for (const tree of trees) {
    collectPairs(tree, pairs);
    visitNames(tree, ({ name }) => {
      if (!isBuiltInFunction(name)) met.add(name);
    });
  }
  const all = [
    'pi',
    ...declared,
    ...[...met].filter(
      (n) => !LAST.includes(n) && !abbreviations.includes(n) && !/^(N|mu)_/.test(n),
    ),
    ...[...met].filter((n) => /^(N|mu)_/.test(n)),
    ...LAST,
    ...abbreviations,
  ];
  const names = [...new Set(all)];
  const behind = new Map<string, Set<string>>(names.map((name) => [name, new Set()]));
  const leads = (from: string, to: string): boolean => {
    const seen = new Set([from]);
    const open = [from];
    for (let name = open.pop(); name !== undefined; name = open.pop()) {
      if (name === to) return true;
      for (const next of behind.get(name) ?? []) {
        if (seen.has(next)) continue;
        seen.add(next);
        open.push(next);
      }
    }
    return false;
  };
  const incoming = new Map(names.map((name) => [name, 0]));
  for (const [first, second] of pairs.slice(0, MOST_PAIRS)) {
    const after = behind.get(first);
    if (!after || !behind.has(second) || after.has(second) || leads(second, first)) continue;
    after.add(second);
    incoming.set(second, (incoming.get(second) ?? 0) + 1);
  }
  // The lowest of the names that no arrow holds back, again and again.
  const order: string[] = [];
  const left = new Set(names);
  while (left.size > 0) {
    let next: string | undefined;
    for (const name of left) {
      if (incoming.get(name) === 0) {
        next = name;
        break;
      }
    }
    if (next === undefined) break;
    left.delete(next);
    order.push(next);
    for (const after of behind.get(next) ?? []) {
      incoming.set(after, (incoming.get(after) ?? 1) - 1);
    }
  }
  return order;
}
