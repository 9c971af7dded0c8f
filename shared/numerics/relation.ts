/** Relations between two numbers. */
import type { Relation } from '../algebra/expression.ts';

/** True where left and right stand as the sign says. */
export function relationHolds(left: number, sign: Relation['sign'], right: number): boolean {
  switch (sign) {
    case '<':
      return left < right;
    case '<=':
      return left <= right;
    case '=':
      return left === right;
    case '>=':
      return left >= right;
    case '>':
      return left > right;
  }
}
