import { describe, expect, it } from 'vitest';
import * as Q from '../../../shared/algebra/rational.ts';
import { analyse, parseExpressionFor, parseState } from '../../../shared/language/index.ts';
import { formatDimension } from '../../../shared/units/formatDimension.ts';
import { fluid } from '../thermodynamics/fixtures.ts';
import { FLUID } from './texts.ts';

describe('a state', () => {
  it('is read exactly, in SI units', () => {
    const { values, diagnostics } = parseState(
      'N=6.02214076e23, V = 22.4 [L], T=273.15 [K]; μ=-2 k 300 [K]',
    );
    expect(diagnostics).toEqual([]);
    expect([...values.keys()]).toEqual(['N', 'V', 'T', 'mu']);
    expect(values.get('V')?.value).toEqual(Q.fromDecimal('0.0224'));
    expect([...values.values()].map(({ dimension }) => formatDimension(dimension))).toEqual([
      '1',
      'm^3',
      'K',
      'J',
    ]);
  });

  it.each([
    ['N=', 'syntax'],
    ['N', 'syntax'],
    ['N=1, N=2', 'double-definition'],
    ['V=1 [mm^]', 'unit'],
    ['V=x', 'value-not-constant'],
    ['=3', 'syntax'],
  ])('is refused: %s', (text, code) => {
    expect(parseState(text).diagnostics.map((d) => d.code)).toEqual([code]);
  });
});

describe('an expression beside a formulation', () => {
  const { formulation } = analyse(FLUID);
  if (!formulation) throw new Error('no formulation');

  it('may be an equation, an inequality, a limit or a value', () => {
    const kinds = ['p = N k T/V', 'kappa_T > 0', 'Z -> 1 as V -> inf', 'p V'].map(
      (text) => parseExpressionFor(formulation, text).statement?.kind,
    );
    expect(kinds).toEqual(['equality', 'inequality', 'limit', 'expression']);
  });

  it('names the constants of nature that it adds', () => {
    const { naturalConstants } = parseExpressionFor(formulation, 'c U/(4 V T^4)');
    expect(naturalConstants.map(({ name }) => name)).toContain('c');
  });

  it('has its faults counted within its own text', () => {
    const { statement, diagnostics } = parseExpressionFor(formulation, 'p + pressure');
    expect(statement).toBeUndefined();
    expect(diagnostics[0]?.span).toEqual({ start: 4, end: 12 });
  });

  it('works for a formulation that was built by hand', () => {
    const { statement, diagnostics } = parseExpressionFor(
      fluid(),
      'p = N k T/(V - N b) - a N^2/V^2',
    );
    expect(diagnostics).toEqual([]);
    expect(statement?.kind).toBe('equality');
  });
});
