import { describe, expect, it } from 'vitest';
import { alignOnPoint, figure, table } from '../../../shared/thermodynamics/commandLine/table.ts';

describe('a table of text', () => {
  it('pads every column to its widest cell and leaves no spaces at the end', () => {
    expect(
      table([
        ['p', '1', 'Pa'],
        ['C_V', '12', ''],
      ]),
    ).toBe('p    1   Pa\nC_V  12');
  });

  it('sets numbers on their decimal points', () => {
    expect(alignOnPoint(['1.5', '-12', '0.001'])).toEqual(['  1.5  ', '-12    ', '  0.001']);
  });

  it('writes numbers in nine figures', () => {
    expect(figure(0)).toBe('0');
    expect(figure(101325.0001)).toBe('101325');
    expect(figure(-1.23456789012e-21)).toBe('-1.23456789e-21');
    expect(figure(6.02214076e23)).toBe('6.02214076e23');
  });
});
