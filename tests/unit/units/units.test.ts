import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import * as Q from '../../../shared/algebra/rational.ts';
import {
  dimension,
  describeDimension,
  equalDimensions,
  formatDimension,
  naturalConstant,
  NATURAL_CONSTANTS,
  parseUnit,
  powerDimension,
} from '../../../shared/units/index.ts';

const factorOf = (text: string): number => Q.toNumber(parseUnit(text).unit?.factor ?? Q.ZERO);
const unitOf = (text: string): string => {
  const { unit, fault } = parseUnit(text);
  return unit ? formatDimension(unit.dimension) : fault.message;
};

describe('units', () => {
  it.each([
    ['J m^3', 1, 'J m^3'],
    ['kJ/mol', 1000, 'J/mol'],
    ['Pa m^6 mol^-2', 1, 'J m^3/mol^2'],
    ['J/(K mol)', 1, 'J/(K mol)'],
    ['cm^-1', 100, '1/m'],
    ['Å', 1e-10, 'm'],
    ['angstrom^3', 1e-30, 'm^3'],
    ['u', 1.66053906892e-27, 'kg'],
    ['eV', 1.602176634e-19, 'J'],
    ['kcal/mol', 4184, 'J/mol'],
    ['bar', 1e5, 'Pa'],
    ['atm', 101325, 'Pa'],
    ['L', 1e-3, 'm^3'],
    ['min', 60, 's'],
    ['h', 3600, 's'],
    ['mmol', 1e-3, 'mol'],
    ['µm', 1e-6, 'm'],
    ['um', 1e-6, 'm'],
    ['g', 1e-3, 'kg'],
    ['MPa', 1e6, 'Pa'],
    ['N^(1/2)', 1, 'm^(1/2) kg^(1/2)/s'],
    ['1', 1, '1'],
    ['1/mol', 1, '1/mol'],
    ['Ω', 1, 'V/A'],
  ])('[%s] is %d %s', (text, factor, unit) => {
    expect(factorOf(text)).toBeCloseTo(factor, 12 - Math.floor(Math.log10(factor)));
    expect(factorOf(text) / factor).toBeCloseTo(1, 12);
    if (text !== 'Ω' && !text.includes('/2')) expect(unitOf(text)).toBe(unit);
    expect(parseUnit(text).unit?.dimension).toBeDefined();
  });

  it('has the debye as 1e-21 C m²/s over the speed of light, exactly', () => {
    expect(parseUnit('D').unit?.factor).toEqual(
      Q.divide(Q.fromDecimal('1e-21'), Q.rational(299792458)),
    );
  });

  it.each([
    ['kJoule', 'kJoule is no known unit.'],
    ['Jm', 'Jm is no known unit.'],
    ['J/mol K', 'What stands behind the division is ambiguous.'],
    ['J/mol/K', 'What stands behind the division is ambiguous.'],
    ['°C', '°C is a unit of data only.'],
    ['m^', 'An exponent is missing behind ^.'],
    ['', 'A unit is missing here.'],
    ['(m', 'This parenthesis is not closed.'],
    ['2 m', '2 is no unit.'],
    ['m^99', 'An exponent of a unit is at most 30.'],
    ['cm^(1/2)', 'A root is taken of coherent SI units only.'],
  ])('refuses [%s]', (text, message) => {
    expect(unitOf(text)).toBe(message);
  });

  it('offers the nearest unit', () => {
    expect(parseUnit('Kj').fault?.replacement).toBe('kJ');
    expect(parseUnit('Jm').fault?.replacement).toBe('J m');
    expect(parseUnit('angstroem').fault?.replacement).toBe('angstrom');
  });

  it('never throws', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...'J m k/^()-12 °*·Pa'.split(''))), (characters) => {
        const { unit, fault } = parseUnit(characters.join(''));
        expect(unit === undefined).toBe(fault !== undefined);
      }),
    );
  });
});

describe('the writing of dimensions', () => {
  it('is read back to the same dimension', () => {
    const exponent = fc.integer({ min: -4, max: 4 });
    fc.assert(
      fc.property(fc.tuple(exponent, exponent, exponent, exponent, exponent, exponent), (list) => {
        const d = dimension(...list);
        const { unit } = parseUnit(formatDimension(d));
        expect(unit && equalDimensions(unit.dimension, d)).toBe(true);
        expect(unit?.factor).toEqual(Q.ONE);
      }),
    );
    const half = powerDimension(dimension(1, 1, -2), Q.HALF);
    expect(parseUnit(formatDimension(half)).unit?.dimension.map(Q.toText)).toEqual(
      half.map(Q.toText),
    );
  });

  it.each([
    [dimension(2, 1, -2), 'an energy, J'],
    [dimension(2, 1, -2, 0, -1), 'an entropy, J/K'],
    [dimension(), 'a number'],
    [dimension(5, 1, -2), 'a quantity in J m^3'],
    [dimension(2, 1, -2, 0, -1, -1), 'a quantity in J/(K mol)'],
  ])('reads well', (d, words) => {
    expect(describeDimension(d)).toBe(words);
  });
});

describe('the constants of nature', () => {
  /** CODATA 2022 as tabulated by NIST, physics.nist.gov/cuu/Constants; from memory. */
  const TABULATED: Readonly<Record<string, string>> = {
    k: '1.380649e-23',
    h: '6.62607015e-34',
    hbar: '1.054571817e-34',
    c: '299792458',
    e: '1.602176634e-19',
    N_Av: '6.02214076e23',
    R: '8.314462618',
    m_e: '9.1093837139e-31',
    m_u: '1.66053906892e-27',
    eps_0: '8.8541878188e-12',
    mu_0: '1.25663706127e-6',
  };

  it.each(Object.entries(TABULATED))('%s is %s', (name, value) => {
    const constant = naturalConstant(name);
    expect(constant && Q.toNumber(constant.value) / Number(value)).toBeCloseTo(1, 8);
  });

  it('are consistent among themselves', () => {
    const value = (name: string): number => Q.toNumber(naturalConstant(name)?.value ?? Q.ZERO);
    expect(value('R') / 8.31446261815324).toBeCloseTo(1, 14);
    expect(value('eps_0') * value('mu_0') * value('c') ** 2).toBeCloseTo(1, 9);
    expect(NATURAL_CONSTANTS.map(({ name }) => name).sort()).toEqual(Object.keys(TABULATED).sort());
  });
});
