/**
 * Expressions as they are read: from the canonical tree to the order and the shape that a colleague
 * would write.
 */
import type { Expression, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { Arranged, ArrangedRelation } from './arranged.ts';
import { arrangeProduct } from './arrangeProduct.ts';
import { arrangeSum } from './arrangeSum.ts';
import type { NameStyle } from './nameStyle.ts';

/** The expression in the order and the shape in which it is read. */
export function arrange(e: Expression, style: NameStyle): Arranged {
  const inner = (part: Expression): Arranged => arrange(part, style);
  switch (e.kind) {
    case 'number':
      return Q.sign(e.value) < 0
        ? { kind: 'negative', inside: { kind: 'number', value: Q.negate(e.value) } }
        : { kind: 'number', value: e.value };
    case 'infinity':
      return { kind: 'infinity' };
    case 'symbol':
    case 'abbreviation':
      return { kind: 'name', name: e.name };
    case 'sum':
      return arrangeSum(e, style, inner);
    case 'product':
    case 'power':
      return arrangeProduct(e, style, inner);
    case 'call':
      return { kind: 'call', name: e.name, arguments: e.arguments.map(inner) };
    case 'summation':
    case 'productOver':
    case 'integral':
      return {
        kind: e.kind,
        variable: e.variable.name,
        from: inner(e.from),
        to: inner(e.to),
        body: inner(e.body),
      };
    case 'piecewise':
      return {
        kind: 'cases',
        branches: e.branches.map(({ condition, value }) => ({
          condition: arrangeRelation(condition, style),
          value: inner(value),
        })),
        otherwise: inner(e.otherwise),
      };
    case 'element':
      return { kind: 'element', list: e.list, index: inner(e.index) };
  }
}

/** Both sides of a relation as they are read. */
export function arrangeRelation(relation: Relation, style: NameStyle): ArrangedRelation {
  return {
    left: arrange(relation.left, style),
    sign: relation.sign,
    right: arrange(relation.right, style),
  };
}
