import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  positionOf,
  valueAt,
  writeValue,
  writtenNumber,
} from '../../../src/features/formulation/writeValue.ts';

describe('numbers of the parameter table', () => {
  it.each([
    [3.7e-49, '3.7e-49'],
    [0.5, '0.5'],
    [39.948, '39.948'],
    [6.02214076e23, '6.02214e23'],
    [0, '0'],
    [-1e-10, '-1e-10'],
  ])('%d is written %s', (value, written) => {
    expect(writtenNumber(value)).toBe(written);
  });

  it('replace the number in the text and nothing else', () => {
    const source = 'parameter a [J m^3] = 3.7e-49 between 0 and 1e-47';
    const start = source.indexOf('3.7e-49');
    const written = writeValue(source, { valueSpan: { start, end: start + 7 } }, '4e-49');
    expect(written).toBe('parameter a [J m^3] = 4e-49 between 0 and 1e-47');
  });

  it('stand on the slider where it leads back to them', () => {
    const bounds = fc.record({
      lower: fc.double({ min: 1e-30, max: 1, noNaN: true }),
      ratio: fc.double({ min: 1.5, max: 1e6, noNaN: true }),
      position: fc.double({ min: 0, max: 1, noNaN: true }),
    });
    fc.assert(
      fc.property(bounds, ({ lower, ratio, position }) => {
        const value = valueAt(position, lower, lower * ratio);
        expect(positionOf(value, lower, lower * ratio)).toBeCloseTo(position, 9);
      }),
      { seed: 4, numRuns: 200 },
    );
  });

  it('outside the bounds rest at the nearer end', () => {
    expect(positionOf(5, 0, 1)).toBe(1);
    expect(positionOf(-5, 0, 1)).toBe(0);
    expect(positionOf(-5, 1, 1000)).toBe(0);
  });
});
