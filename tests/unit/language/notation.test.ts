/** What the notation means, and what it refuses to guess. */
import { describe, expect, it } from 'vitest';
import { analyse, parseExpressionFor } from '../../../shared/language/index.ts';
import { nameStyle, toText } from '../../../shared/print/index.ts';
import { mended, onlyError } from './mend.ts';

const HEAD = `ensemble canonical
parameter a = 2 between 0 and 9
parameter b = 3 between 0 and 9
parameter c_1 = 5 between 0 and 9
let f(x) = x^2
list g = 2, 3, 5
`;
const { formulation } = analyse(`${HEAD}ln Q = N a b c_1 f(1) g(1)`);

function meaning(text: string): string {
  if (!formulation) throw new Error('no formulation');
  const { statement, diagnostics } = parseExpressionFor(formulation, text);
  if (statement?.kind !== 'expression') return diagnostics.map(({ code }) => code).join(' ');
  return toText(statement.expression, nameStyle(['a', 'b', 'c_1', 'N']));
}

describe('products and divisions', () => {
  it.each([
    ['a b c_1', 'a * b * c_1'],
    ['2 a (b + c_1)', '2 * a * (b + c_1)'],
    ['a/b * c_1', '(a / b) * c_1'],
    ['a c_1 / b', '(a * c_1) / b'],
    ['a/(b c_1)', 'a / (b * c_1)'],
    ['a/b + c_1/2', '(a / b) + (c_1 / 2)'],
    ['3/2 a b', '1.5 * a * b'],
    ['b * 3/2 a', '1.5 * a * b'],
    ['1/2 sum i from 1 to 2 { i } a', '0.5 * a * (sum i from 1 to 2 { i })'],
    ['a^-2 b', 'b / (a^2)'],
    ['-a^2', '-(a^2)'],
    ['2^3^2', '512'],
    ['a / -b', '-(a / b)'],
    ['a·b − c_1', '(a * b) - c_1'],
    ['(a)(b)', 'a * b'],
    ['f(3) a', '9 * a'],
    ['g(2) g(3)', '15'],
    ['a(b)', 'a * b'],
    ['3!', '6'],
    ['(1 + 1)! a', '2 * a'],
  ])('reads %s as %s', (text, expected) => {
    expect(meaning(text)).toBe(meaning(expected));
    expect(meaning(text)).not.toMatch(/^[a-z]+(-[a-z]+)+/);
  });

  it.each([
    'a / b c_1',
    'a / 2 b',
    '(1 + a)/2 ln(a)',
    'a / b / c_1',
    'a/b^2 c_1',
    'a 3/2 b',
    '1/2/3 a',
    'a / f(2) b',
  ])('refuses %s with both readings', (text) => {
    const source = `${HEAD}ln Q = N g(1) f(2) c_1 a b * (${text})`;
    const errors = analyse(source).diagnostics.filter(({ severity }) => severity === 'error');
    const [error] = errors;
    expect(error?.code).toBe('ambiguous-division');
    expect(error?.repairs.length).toBe(2);
    const readings = (error?.repairs ?? []).map((repair) => {
      const { formulation: sound, diagnostics } = analyse(mended(source, repair));
      if (errors.length === 1) expect(diagnostics).toEqual([]);
      return sound?.lnPartitionFunction ?? repair.title;
    });
    expect(readings[0]).not.toBe(readings[1]);
  });

  it.each([
    ['log(a)', 'log-is-ambiguous'],
    ['exp a', 'function-without-parentheses'],
    ['exp(a, b)', 'number-of-arguments'],
    ['a 2 3', 'adjacent-numbers'],
    ['2(3)', 'uncertainty-out-of-place'],
    ['a [K]', 'unit-out-of-place'],
    ['a + inf', 'infinity-out-of-place'],
    ['a²', 'unexpected-character'],
    ['(a', 'unclosed-bracket'],
    ['a + ', 'syntax'],
    ['g(4)', 'list-index'],
    ['1/(a - a)', 'division-by-zero'],
    ['ln(0)', 'logarithm-of-zero'],
  ])('refuses %s', (text, code) => {
    expect(meaning(text).split(' ')[0]).toBe(code);
  });

  it('offers the close of a parenthesis and the power of a superscript', () => {
    for (const [text, code] of [
      ['N (a b', 'unclosed-bracket'],
      ['N a² b', 'unexpected-character'],
      ['N exp a * b', 'function-without-parentheses'],
    ] as const) {
      const source = `ensemble canonical\nparameter a = 2\nparameter b = 3\nln Q = ${text}`;
      const [repair] = onlyError(source, code).repairs;
      if (!repair) throw new Error('no repair');
      expect(analyse(mended(source, repair)).diagnostics).toEqual([]);
    }
  });
});

describe('statements over several lines', () => {
  const lnOf = (text: string): unknown =>
    analyse(`${HEAD}${text}`).formulation?.lnPartitionFunction;

  it('go on inside parentheses, before and behind operators', () => {
    const expected = lnOf('ln Q = N (a + b - c_1) g(1) f(1)');
    expect(expected).toBeDefined();
    expect(lnOf('ln Q = N (a + b\n  - c_1)\n  * g(1) f(1)')).toBe(expected);
    expect(lnOf('ln Q =\n  N (a\n\n + b - # why\n c_1) g(1) *\n f(1)')).toBe(expected);
  });

  it('end where a new statement surely begins', () => {
    const { diagnostics } = analyse(`ensemble canonical\nlet x = (1 + 2\nln Q = N y`);
    expect(diagnostics.map(({ code }) => code)).toEqual(['unclosed-bracket', 'unknown-name']);
  });

  it('each report their own faults', () => {
    const { diagnostics } = analyse(
      'ensemble canonical\nconstant x [Jj] = 3\nlet y = 2 +\nlet z = exp(\nln Q = N log(2) / 3 N',
    );
    expect(diagnostics.map(({ code, line }) => `${line} ${code}`)).toEqual([
      '2 unit',
      '3 syntax',
      '4 syntax',
      '5 ambiguous-division',
      '5 log-is-ambiguous',
    ]);
  });
});
