/** Definitions in the order in which each needs only what stands before it, and the circles. */

import type { Findings } from './findings.ts';
import type { NameTree } from './syntax.ts';

export interface Ordered<T> {
  readonly order: readonly T[];
  /** Each circle once, in the order in which its members refer to one another. */
  readonly circles: readonly (readonly T[])[];
}

/** Depth-first without recursion, so that a long chain of definitions is no deep stack. */
export function orderDefinitions<T>(
  definitions: readonly T[],
  needs: (definition: T) => readonly T[],
): Ordered<T> {
  const state = new Map<T, 'open' | 'done'>();
  const order: T[] = [];
  const circles: T[][] = [];
  for (const root of definitions) {
    if (state.has(root)) continue;
    const path: { definition: T; needed: readonly T[]; next: number }[] = [];
    const open = (definition: T): void => {
      state.set(definition, 'open');
      path.push({ definition, needed: needs(definition), next: 0 });
    };
    open(root);
    for (let top = path.at(-1); top; top = path.at(-1)) {
      const needed = top.needed[top.next++];
      if (needed === undefined) {
        state.set(top.definition, 'done');
        order.push(top.definition);
        path.pop();
      } else if (!state.has(needed)) {
        open(needed);
      } else if (state.get(needed) === 'open') {
        const from = path.findIndex(({ definition }) => definition === needed);
        circles.push(path.slice(from).map(({ definition }) => definition));
      }
    }
  }
  return { order, circles };
}

/** Reports a circle of definitions by its names, where the first of them stands. */
export function refuseCircle(circle: readonly NameTree[], findings: Findings): void {
  const [first] = circle;
  if (!first) return;
  const names = circle.map(({ spelled }) => spelled);
  const words =
    names.length === 1
      ? `${first.spelled} is defined by itself`
      : `${names.slice(0, -1).join(', ')} and ${names.at(-1) ?? ''} are defined by one another`;
  findings.add('circular-definition', first.span, { names: words });
}
