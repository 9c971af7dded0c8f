/** Whatever the text, reading it gives a result and never an exception. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  analyse,
  completionsAt,
  format,
  hoverAt,
  parseExpressionFor,
  parseState,
  tokensOf,
} from '../../../shared/language/index.ts';
import { LARGEST_SOURCE } from '../../../shared/language/limits.ts';
import { parseUnit } from '../../../shared/units/parseUnit.ts';
import { FLUID } from './texts.ts';

const WORDS = (
  'ensemble canonical grand species extent field response constant parameter list let order saddle ' +
  'factorials exact molar report claim between and as for in from to inf otherwise sum product ' +
  'integral cases partial q Q ln Xi Delta W exp log sqrt a b x y T V N k h mu p U pi θ Λ_1 u(r) ' +
  '+ - * / ^ ! = -> .. < <= > >= ( ) { } , ; : [m^3] [J] [kJ/mol] [ "text" " # 0 1 2 3/2 1e9 ' +
  '4096 1.5(2) 1e-300 . § \n \n \n'
).split(' ');

const soup = fc.array(fc.constantFrom(...WORDS), { maxLength: 60 }).map((words) => words.join(' '));

/** The fluid with a piece taken out, doubled or replaced. */
const damaged = fc
  .tuple(
    fc.nat(FLUID.length),
    fc.nat(12),
    fc.oneof(fc.constant(''), fc.constantFrom(...WORDS), fc.string({ maxLength: 4 })),
  )
  .map(([at, length, text]) => FLUID.slice(0, at) + text + FLUID.slice(at + length));

function readsAll(text: string): void {
  const { formulation, diagnostics } = analyse(text);
  const isFaulty = diagnostics.some(({ severity }) => severity === 'error');
  expect(formulation === undefined).toBe(isFaulty);
  for (const { span, line, column, message, repairs } of diagnostics) {
    expect(span.start).toBeGreaterThanOrEqual(0);
    expect(span.end).toBeLessThanOrEqual(text.length);
    expect(span.start).toBeLessThanOrEqual(span.end);
    expect(line).toBeGreaterThan(0);
    expect(column).toBeGreaterThan(0);
    expect(message).not.toMatch(/undefined|\{\w+\}/);
    for (const { edits } of repairs) {
      for (const edit of edits) expect(edit.span.end).toBeLessThanOrEqual(text.length);
    }
  }
  for (const { span } of tokensOf(text)) expect(span.end).toBeLessThanOrEqual(text.length);
  const tidied = format(text);
  expect(format(tidied)).toBe(tidied);
  const middle = Math.floor(text.length / 2);
  completionsAt(text, middle);
  hoverAt(text, middle);
  parseState(text);
  parseUnit(text);
  if (formulation) {
    const again = analyse(formulation.normalizedSource).formulation;
    expect(again?.normalizedSource).toBe(formulation.normalizedSource);
    expect(again?.lnPartitionFunction).toBe(formulation.lnPartitionFunction);
  }
}

describe('any text', () => {
  it('is read without an exception when it is made of words of the language', () => {
    fc.assert(fc.property(soup, readsAll), { numRuns: 400 });
  });

  it('is read without an exception when it is a damaged formulation', () => {
    fc.assert(fc.property(damaged, readsAll), { numRuns: 400 });
  });

  it('is read without an exception when it is anything at all', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 80 }), readsAll), {
      numRuns: 300,
    });
  });

  it('is read beside a formulation', () => {
    const { formulation } = analyse(FLUID);
    expect(formulation).toBeDefined();
    if (!formulation) return;
    fc.assert(
      fc.property(soup, (text) => {
        const { statement, diagnostics } = parseExpressionFor(formulation, text);
        expect(statement === undefined).toBe(diagnostics.length > 0);
      }),
      { numRuns: 300 },
    );
  });
});

describe('the limits', () => {
  const inFluid = (expression: string): string =>
    `ensemble canonical\nparameter a = 2\nln Q = N ${expression}\n`;
  const codesOf = (text: string): string[] => analyse(text).diagnostics.map(({ code }) => code);

  const deep = 20_000;
  it.each([
    ['parentheses', inFluid('('.repeat(deep) + 'a' + ')'.repeat(deep))],
    ['open parentheses', inFluid('('.repeat(deep))],
    ['calls', inFluid('exp('.repeat(8000) + 'a' + ')'.repeat(8000))],
    ['signs', inFluid(`* ${'-'.repeat(deep)}a`)],
    ['exponents', inFluid(`* ${'a^'.repeat(deep)}a`)],
    ['factorials', inFluid(`* a${'!'.repeat(deep)}`)],
    ['sums', inFluid('sum i from 0 to 1 { '.repeat(2000))],
    ['cases', inFluid('cases { a < 1: '.repeat(3000))],
    ['derivatives', inFluid('partial('.repeat(6000))],
  ])('refuse %s nested too deep', (_, text) => {
    expect(codesOf(text).some((code) => code === 'too-deep' || code === 'syntax')).toBe(true);
  });

  it('allow long flat sums and products', () => {
    expect(codesOf(inFluid(`(1${' + a'.repeat(14_000)})`))).toEqual([]);
    expect(codesOf(inFluid(`(1${' a'.repeat(20_000)})`))).toEqual([]);
  });

  it('refuse a chain of abbreviations that is too deep', () => {
    const chain = Array.from({ length: 2000 }, (_, i) => `let x${i + 1} = exp(x${i})`).join('\n');
    const text = `ensemble canonical\nlet x0 = N/2\n${chain}\nln Q = N x2000\n`;
    expect(codesOf(text)).toContain('too-deep');
  });

  it('refuse functions that grow without end', () => {
    const chain = Array.from(
      { length: 40 },
      (_, i) => `let f${i + 1}(x, y) = f${i}(x, 2 y) + f${i}(x, 2 y + 1)`,
    ).join('\n');
    const text = `ensemble canonical\nlet f0(x, y) = sin(x y)\n${chain}\nln Q = N f25(1, 1)\n`;
    expect(codesOf(text)).toContain('too-large');
  });

  it('refuse numbers that would fill the memory', () => {
    for (const number of [
      '1e999999',
      '9^9^9^9',
      '(1e400^4000)^4000',
      `2${' * 1e300'.repeat(5000)}`,
      '1'.repeat(5000),
    ]) {
      expect(codesOf(inFluid(`(${number})`))).toContain('number-too-large');
      expect(codesOf(`ensemble canonical\nconstant c_1 = ${number}\nln Q = N c_1`)).toContain(
        'number-too-large',
      );
    }
  });

  it('refuse more text than 64 KiB', () => {
    const fits = `${FLUID}#${'x'.repeat(LARGEST_SOURCE - FLUID.length - 1)}`;
    expect(codesOf(fits)).toEqual([]);
    expect(codesOf(`${fits}x`)).toEqual(['too-long']);
    expect(codesOf(`${FLUID}#${'é'.repeat(LARGEST_SOURCE / 2)}`)).toEqual(['too-long']);
  });

  it('show no more faults than a person can read', () => {
    expect(codesOf('§'.repeat(5000)).length).toBeLessThanOrEqual(101);
  });
});
