/**
 * Expressions as plain JSON: arrays with the kind in front and exact numbers as text. The same
 * expression gives the same JSON everywhere, and reading it back gives the same interned node.
 */
import * as C from '../algebra/construct.ts';
import type { Expression, Relation, RelationSign } from '../algebra/expression.ts';
import { isFunctionName } from '../algebra/functions.ts';
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';

export type ExpressionJson = string | readonly ExpressionJson[];

/**
 * `["*", "3/2", ["s", "N", "+"], …]`. The definition of an abbreviation stands where it is met first;
 * after that its name alone, since lets that use lets twice would double the text with each.
 */
export function toJson(e: Expression): ExpressionJson {
  return write(e, new Map());
}

function write(e: Expression, written: Map<string, Expression>): ExpressionJson {
  const inner = (part: Expression): ExpressionJson => write(part, written);
  switch (e.kind) {
    case 'number':
      return ['n', Q.toText(e.value)];
    case 'infinity':
      return ['inf'];
    case 'symbol':
      return ['s', e.name, (e.positive ? '+' : '') + (e.integer ? 'i' : '')];
    case 'abbreviation': {
      if (written.get(e.name) === e) return ['let', e.name];
      const definition = inner(e.definition);
      // Reading keeps the same order; a second abbreviation of a name is written out each time.
      if (!written.has(e.name)) written.set(e.name, e);
      return ['let', e.name, definition];
    }
    case 'sum':
      return ['+', Q.toText(e.constant), ...e.terms.map(inner)];
    case 'product':
      return ['*', Q.toText(e.coefficient), ...e.factors.map(inner)];
    case 'power':
      return ['^', inner(e.base), inner(e.exponent)];
    case 'call':
      return ['f', e.name, ...e.arguments.map(inner)];
    case 'summation':
    case 'productOver':
    case 'integral':
      return [e.kind, inner(e.variable), inner(e.from), inner(e.to), inner(e.body)];
    case 'piecewise':
      return [
        'cases',
        ...e.branches.map(({ condition, value }) => [
          inner(condition.left),
          condition.sign,
          inner(condition.right),
          inner(value),
        ]),
        inner(e.otherwise),
      ];
    case 'element':
      return ['list', e.list, e.values.map(Q.toText), inner(e.index)];
  }
}

class Malformed extends Error {
  override name = 'Malformed';
}

function textAt(json: readonly ExpressionJson[], index: number): string {
  const part = json[index];
  if (typeof part !== 'string') throw new Malformed('text expected');
  return part;
}

function rationalOf(text: string): Rational {
  const match = /^(-?\d+)(?:\/(\d+))?$/.exec(text);
  if (!match?.[1]) throw new Malformed(`not a rational number: ${text}`);
  return Q.rational(BigInt(match[1]), BigInt(match[2] ?? '1'));
}

const SIGNS: readonly string[] = ['<', '<=', '=', '>=', '>'];

/** The expression written by `toJson`. Throws an Error for anything else. */
export function fromJson(json: unknown): Expression {
  return read(json, new Map());
}

function read(json: unknown, known: Map<string, Expression>): Expression {
  const inner = (part: unknown): Expression => read(part, known);
  if (!Array.isArray(json)) throw new Malformed('an array expected');
  const parts = json as readonly ExpressionJson[];
  const rest = (from: number): Expression[] => parts.slice(from).map(inner);
  switch (textAt(parts, 0)) {
    case 'n':
      return C.number(rationalOf(textAt(parts, 1)));
    case 'inf':
      return C.infinity;
    case 's': {
      const flags = textAt(parts, 2);
      return C.symbol(textAt(parts, 1), {
        positive: flags.includes('+'),
        integer: flags.includes('i'),
      });
    }
    case 'let': {
      const name = textAt(parts, 1);
      if (parts.length < 3) {
        const abbreviation = known.get(name);
        if (!abbreviation) throw new Malformed(`no definition of ${name}`);
        return abbreviation;
      }
      const abbreviation = C.abbreviation(name, inner(parts[2]));
      if (!known.has(name)) known.set(name, abbreviation);
      return abbreviation;
    }
    case '+':
      return C.sum([C.number(rationalOf(textAt(parts, 1))), ...rest(2)]);
    case '*':
      return C.product([C.number(rationalOf(textAt(parts, 1))), ...rest(2)]);
    case '^':
      return C.power(inner(parts[1]), inner(parts[2]));
    case 'f': {
      const name = textAt(parts, 1);
      if (!isFunctionName(name)) throw new Malformed(`no function ${name}`);
      return C.call(name, rest(2));
    }
    case 'summation':
    case 'productOver':
    case 'integral': {
      const kind = textAt(parts, 0);
      const [variable, from, to, body] = rest(1);
      if (variable?.kind !== 'symbol' || !from || !to || !body) throw new Malformed('a binding');
      const build =
        kind === 'summation' ? C.summation : kind === 'integral' ? C.integral : C.productOver;
      return build(variable, from, to, body);
    }
    case 'cases': {
      const branches = parts.slice(1, -1).map((branch) => {
        if (!Array.isArray(branch)) throw new Malformed('a branch');
        return {
          condition: relationOf(branch as ExpressionJson[], inner),
          value: inner(branch[3]),
        };
      });
      return C.piecewise(branches, inner(parts[parts.length - 1]));
    }
    case 'list': {
      const values = parts[2];
      if (!Array.isArray(values)) throw new Malformed('a list of numbers');
      const numbers = values as ExpressionJson[];
      return C.element(
        textAt(parts, 1),
        numbers.map((_, i) => rationalOf(textAt(numbers, i))),
        inner(parts[3]),
      );
    }
    default:
      throw new Malformed(`no kind ${textAt(parts, 0)}`);
  }
}

function relationOf(
  branch: readonly ExpressionJson[],
  inner: (part: unknown) => Expression,
): Relation {
  const sign = textAt(branch, 1);
  if (!SIGNS.includes(sign)) throw new Malformed(`no relation ${sign}`);
  return { left: inner(branch[0]), sign: sign as RelationSign, right: inner(branch[2]) };
}
