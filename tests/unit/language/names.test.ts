/** What names stand for, and what is said of those that stand for nothing. */
import { describe, expect, it } from 'vitest';
import { asciiName } from '../../../shared/language/greek.ts';
import { analyse } from '../../../shared/language/index.ts';
import { mended, onlyError } from './mend.ts';

const codesOf = (text: string): string[] =>
  analyse(`ensemble canonical\n${text}`).diagnostics.map(({ code }) => code);

describe('Greek letters', () => {
  it.each([
    ['θ', 'theta'],
    ['Λ_1', 'Lambda_1'],
    ['ε', 'eps'],
    ['epsilon_0', 'eps_0'],
    ['ħ', 'hbar'],
    ['x₁₂', 'x_12'],
    ['µ', 'mu'],
    ['alpha', 'alpha'],
  ])('%s is %s', (spelled, name) => {
    expect(asciiName(spelled)).toBe(name);
  });

  it('mean the same by letter and by name', () => {
    const byName = analyse('ensemble canonical\nparameter theta = 1\nln Q = N theta pi\n');
    const byLetter = analyse('ensemble canonical\nparameter θ=1\n\nln Q =  N theta π');
    expect(byLetter.formulation?.normalizedSource).toBe(byName.formulation?.normalizedSource);
    expect(codesOf('let θ = 2\nlet theta = 3\nln Q = N theta')).toEqual(['double-definition']);
  });
});

describe('an unknown name', () => {
  it('is answered with the nearest known one', () => {
    const source = 'ensemble canonical\nlet Lambda = 2\nln Q = N ln(Lamda) + Lambda N';
    const error = onlyError(source, 'unknown-name');
    expect(error.hint).toBe('Did you mean Lambda?');
    const [repair] = error.repairs;
    expect(repair && analyse(mended(source, repair)).diagnostics).toEqual([]);
  });

  it('is taken apart where it is a product without spaces', () => {
    const source = 'ensemble canonical\nconstant w [J] = 1\nln Q = N w/(kT)';
    const [repair] = onlyError(source, 'unknown-name').repairs;
    expect(repair?.title).toBe('write k T');
  });

  it('is reported once where it stands, and nothing that follows from it', () => {
    expect(codesOf('let x = y_1 + 1\nlet z = x^2\nlet v = x + 2\nln Q = N v')).toEqual([
      'unknown-name',
    ]);
  });
});

describe('definitions', () => {
  it('may stand in any order', () => {
    expect(
      codesOf(
        'ln Q = N x\nlet x = y + 1\nlet y = f(2)\nlet f(t) = t z\nconstant z = z_2\nconstant z_2 = 2',
      ),
    ).toEqual([]);
  });

  it.each([
    ['let x = x + 1\nln Q = N x', 'x is defined by itself.'],
    ['let x = y\nlet y = z\nlet z = x\nln Q = N x', 'x, y and z are defined by one another.'],
    [
      'let f(t) = g_1(t)\nlet g_1(t) = f(t)\nln Q = N f(1)',
      'f and g_1 are defined by one another.',
    ],
    ['constant x = y\nconstant y = x\nln Q = N x', 'x and y are defined by one another.'],
  ])('may not go round in circles: %s', (text, message) => {
    const errors = analyse(`ensemble canonical\n${text}`).diagnostics;
    expect(errors.map((e) => [e.code, e.message])).toEqual([['circular-definition', message]]);
  });

  it.each([
    ['constant T = 3\nln Q = N', 'double-definition'],
    ['constant k = 3\nln Q = N k', 'fixed-name'],
    ['let N_Av = 3\nln Q = N N_Av', 'fixed-name'],
    ['let pi = 3\nln Q = N pi', 'fixed-name'],
    ['let f(x) = x\nlet f(y) = y\nln Q = N f(1)', 'double-definition'],
    ['let exp = 3\nln Q = N', 'reserved-name'],
    ['let from = 3\nln Q = N', 'reserved-name'],
    ['let Q = 3\nln Q = N', 'reserved-name'],
    ['ln Q = N sum k from 1 to 3 { k }', 'fixed-name'],
    ['ln Q = N mu', 'foreign-variable'],
    ['ln Q = N U', 'foreign-variable'],
    ['ln Q = N\nln Q = N', 'two-partition-functions'],
    ['q = 2', 'no-partition-function'],
    ['ln Xi = N', 'wrong-partition-function'],
    ['ensemble canonical\nln Q = N', 'two-ensembles'],
    ['order s between 0 and 1\nln Q = N', 'order-parameter-not-used'],
    ['parameter s = 1 between 3 and 2\nln Q = N s', 'bounds-reversed'],
    ['x = 3\nln Q = N', 'unknown-statement'],
    ['lett x = 3\nln Q = N', 'unknown-statement'],
  ])('are refused: %s', (text, code) => {
    expect(codesOf(text)).toContain(code);
    expect(analyse(`ensemble canonical\n${text}`).formulation).toBeUndefined();
  });

  it.each([
    ['constant c = 3\nln Q = N c', ['constant-replaced']],
    ['constant x = 3\nln Q = N', ['unused-name']],
    ['parameter i = 2\nln Q = N i + N sum i from 1 to 3 { i }', ['name-shadowed']],
    ['parameter s = 5 between 0 and 1\nln Q = N s', ['start-outside-bounds']],
    ['constant m [u] = 3\nln Q = N', []],
    ['constant N_A = 3\nln Q = N N_A', []],
    ['constant e_1 = 3\nln Q = N e_1 e/e', []],
  ])('are warned of: %s', (text, codes) => {
    expect(codesOf(text)).toEqual(codes);
  });

  it('without an ensemble are answered with the one that is meant', () => {
    const source = '# Title\nln Xi = M\nextent M [1]\n';
    const error = onlyError(source, 'no-ensemble');
    const [repair] = error.repairs;
    expect(repair && mended(source, repair)).toBe(
      '# Title\nensemble grand canonical\nln Xi = M\nextent M [1]\n',
    );
  });
});

describe('a running variable', () => {
  it('may take the name of a parameter without being it', () => {
    const { formulation } = analyse(
      'ensemble canonical\nparameter i = 2\nln Q = N i + N sum i from 1 to 3 { i } + N sum i from i to 4 { i }',
    );
    expect(formulation).toBeDefined();
  });
});
