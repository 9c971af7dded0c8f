/** Every expression has a dimension, and what does not fit is said in plain words. */
import { describe, expect, it } from 'vitest';
import { analyse, parseExpressionFor } from '../../../shared/language/index.ts';
import { formatDimension } from '../../../shared/units/formatDimension.ts';
import { mended, onlyError } from './mend.ts';
import { FLUID } from './texts.ts';

const HEAD = `ensemble canonical
constant m [u] = 40
parameter a [J m^3] = 3e-49 between 0 and 1
parameter w [J] = 1e-21
parameter s [m] = 3e-10 between 0 and 1
let Lambda = h / sqrt(2 pi m k T)
`;
const codesOf = (text: string): string[] =>
  analyse(`${HEAD}${text}`)
    .diagnostics.filter(({ severity }) => severity === 'error')
    .map(({ code }) => code);

describe('a complaint', () => {
  it('names the argument, what it is and the way out', () => {
    const source = `${HEAD}Q = (V/Lambda^3 * exp(a N/V))^N/N! * exp(w s/(s k T))`;
    const error = onlyError(source, 'dimension');
    expect(error.message).toBe('The argument of exp must be a number, but a N/V is an energy, J.');
    const [repair] = error.repairs;
    expect(repair?.title).toBe('divide by k T');
    expect(repair && analyse(mended(source, repair)).diagnostics).toEqual([]);
  });

  it.each([
    ['ln Q = N ln(V)', 'V is a volume, m^3'],
    ['ln Q = N + V', 'V is a volume, m^3'],
    ['ln Q = N T', 'N T is a temperature, K'],
    ['ln Q = N (V/s)^s', 's is a length, m'],
    ['Q = V^N', 'does not cancel'],
    ['ln Q = N s!', 's is a length, m'],
    ['ln Q = N sum i from 0 to s { i }', 's is a length, m'],
    ['ln Q = N integral r from 0 to s { 1 }', 'is a length, m'],
    ['ln Q = N integral r from s to T { 1/r }', 'T is a temperature, K'],
    ['ln Q = N cases { s < T: 1; otherwise: 2 }', 'T is a temperature, K'],
    ['ln Q = N cases { s < 1 [m]: T; otherwise: s }', 's is a length, m'],
    ['ln Q = N min(s, T)', 'T is a temperature, K'],
    ['ln Q = N\nclaim "x" p = U', 'U is an energy, J'],
    ['ln Q = N\nclaim "x" p V/N -> 1 as V -> inf', '1 is a number'],
    ['ln Q = N\nclaim "x" p V/N -> k T as V -> 3', '3 is a number'],
    ['ln Q = N\nclaim "x" p > 0 for T in 300 .. 400', '300 is a number'],
    ['ln Q = N\nreport y [Pa] = U/N', 'U/N is an energy, J'],
    ['ln Q = N\nconstant y [K] = 3 [J]', 'The value is an energy, J'],
    ['ln Q = N\nconstant y = k', 'The value is an entropy, J/K'],
    ['ln Q = N\nlist E [J] = 1, 2 [K]', 'The value is a temperature, K'],
  ])('is made of %s', (text, words) => {
    const { diagnostics } = analyse(`${HEAD}${text}`);
    const error = diagnostics.find(({ severity }) => severity === 'error');
    expect(error?.code).toBe('dimension');
    expect(error?.message).toContain(words);
    expect(error?.hint).not.toBe('');
  });

  it('is not made twice of what is at fault', () => {
    expect(codesOf('let x = s + T\nlet y = x s\nln Q = N y')).toEqual(['dimension']);
  });
});

describe('dimensions', () => {
  it.each([
    'Q = V^N/Lambda^(3 N)',
    'Q = (V/Lambda^3)^(N + 1)/N!',
    'Q = (V/s^3)^(N/2) * (s^3/V)^(N/2)',
    'ln Q = N (V/s^3)^(1/3)',
    'ln Q = N sqrt(V s)/s^2',
    'ln Q = N + 0',
    'ln Q = N integral r from 0 to inf { exp(-r^2/s^2) }/s',
    'ln Q = N integral x from 0 to inf { exp(-x) }',
    'ln Q = N integral r [m] from 0 to inf { exp(-(r/s)^2) }/s',
    'let u(r) = cases { r < s: inf; r < 2 s: -w; otherwise: 0 }\nln Q = N/s^3 * integral r from 0 to inf { r^2 (1 - exp(-u(r)/(k T))) }',
    'list E [cm^-1] = 0, 158.3, 227.0\nln Q = N ln(sum i from 1 to 3 { exp(-h c E(i)/(k T)) })',
    'let f(x) = x^2\nln Q = N f(s)/f(2 s) * f(T)/T^2',
    'ln Q = N max(s, 3e-10 [m])/s * abs(T)/T',
    'ln Q = N e^2/(eps_0 s k T)',
    'ln Q = N hbar^2/(m s^2 k T) * R/(N_Av k)',
  ])('fit in %s', (text) => {
    expect(codesOf(text)).toEqual([]);
  });

  it('of properties follow from the extent', () => {
    const { formulation } = analyse(FLUID);
    if (!formulation) throw new Error('no formulation');
    const unitOf = (text: string): string => {
      const { statement } = parseExpressionFor(formulation, text);
      return statement?.kind === 'expression' ? formatDimension(statement.dimension) : '';
    };
    expect(unitOf('p')).toBe('Pa');
    expect(unitOf('partial(U, V; T, N)')).toBe('Pa');
    expect(unitOf('mu_JT')).toBe('K/Pa');
    expect(unitOf('c U/(4 V T^4)')).toBe('kg/(s^3 K^4)');
    expect(unitOf('ln Q / N')).toBe('1');
    expect(unitOf('a_m')).toBe('J m^3/mol^2');
    expect(unitOf('B3')).toBe('m^6');
  });
});
