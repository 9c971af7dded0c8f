import { describe, expect, it } from 'vitest';
import { readAssignments } from '../../../shared/thermodynamics/commandLine/assignments.ts';
import { dimension } from '../../../shared/units/index.ts';

const known = [
  { name: 'V', dimension: dimension(3) },
  { name: 'T', dimension: dimension(0, 0, 0, 0, 1) },
  { name: 'a', dimension: dimension(5, 1, -2) },
];

describe('assignments on the command line', () => {
  it('are read in their units and given in SI units', () => {
    expect(readAssignments('N=6.02214076e23, V = 22.4 [L], T=273.15 [K]', known)).toEqual({
      values: { N: 6.02214076e23, V: 0.0224, T: 273.15 },
      faults: [],
    });
  });

  it('are in SI units without one', () => {
    expect(readAssignments('V=1e-3', known).values).toEqual({ V: 0.001 });
  });

  it.each([
    ['V=1 [K]', 'V is a volume'],
    ['V=1 [parsnip]', 'In the unit of V'],
    ['V=abc', 'is not a number'],
    ['V', 'is not of the kind'],
    ['V=1, V=2', 'V is given twice'],
    ['T=1e99999', 'is not a number'],
  ])('are refused in words: %s', (text, message) => {
    expect(readAssignments(text, known).faults.join(' ')).toContain(message);
  });
});
