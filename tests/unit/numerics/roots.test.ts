import { describe, expect, it } from 'vitest';
import { brent, newton } from '../../../shared/numerics/index.ts';

const functions: [string, (x: number) => number, (x: number) => number, number, number, number][] =
  [
    ['√2', (x) => x * x - 2, (x) => 2 * x, 0, 2, Math.SQRT2],
    [
      'a steep exponential',
      (x) => Math.exp(20 * x) - 5,
      (x) => 20 * Math.exp(20 * x),
      -3,
      4,
      Math.log(5) / 20,
    ],
    ['a triple zero', (x) => (x - 1) ** 3, (x) => 3 * (x - 1) ** 2, 0.2, 3, 1],
    [
      'a slope that sends Newton away',
      (x) => Math.atan(x - 7),
      (x) => 1 / (1 + (x - 7) ** 2),
      -100,
      500,
      7,
    ],
    // x³ − 2x − 5, the example that J. Wallis took to show Newton's method (1685).
    ['Wallis’s cubic', (x) => x ** 3 - 2 * x - 5, (x) => 3 * x * x - 2, 2, 3, 2.0945514815423265],
  ];

describe('zeros', () => {
  it.each(functions)('of %s by Brent', (_, f, __, a, b, root) => {
    expect(Math.abs((brent(f, a, b) ?? NaN) - root)).toBeLessThan(1e-5 * Math.abs(root));
    if (root !== 1) expect(brent(f, a, b)).toBeCloseTo(root, 13);
  });

  it.each(functions)('of %s by Newton within a bracket', (_, f, slope, a, b, root) => {
    const found = newton((x) => [f(x), slope(x)], a, b) ?? NaN;
    expect(Math.abs(found - root)).toBeLessThan(1e-5 * Math.abs(root));
    if (root !== 1) expect(found).toBeCloseTo(root, 13);
  });

  it('are not made up where the signs are equal', () => {
    expect(brent((x) => x * x + 1, -1, 1)).toBeUndefined();
    expect(newton((x) => [x * x + 1, 2 * x], -1, 1)).toBeUndefined();
  });
});
