/**
 * How many different nodes the trees have together: equal subtrees count once, as they are stored
 * once. A node is whatever object of the JSON has a `kind`; a tree without any counts its arrays.
 */
export function distinctNodes(trees: readonly unknown[]): number {
  const seen = new Set<string>();
  const visit = (value: unknown): void => {
    if (typeof value !== 'object' || value === null) return;
    const text = JSON.stringify(value);
    if (seen.has(text)) return;
    seen.add(text);
    for (const part of Object.values(value)) visit(part);
  };
  for (const tree of trees) visit(tree);
  return seen.size;
}
