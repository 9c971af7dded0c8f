/** What an editor shows: colours, completions, facts on hovering. */
import { describe, expect, it } from 'vitest';
import { completionsAt, hoverAt, tokensOf } from '../../../shared/language/index.ts';
import { FLUID, LATTICE_GAS } from './texts.ts';

describe('highlighting', () => {
  it('tells the kinds of words apart', () => {
    const text = 'order θ between 0 and 1 saddle "x" # why\nfield B [T] response M_B';
    const kinds = tokensOf(text).map(
      ({ kind, span }) => `${kind}:${text.slice(span.start, span.end)}`,
    );
    expect(kinds).toEqual([
      'keyword:order',
      'name:θ',
      'keyword:between',
      'number:0',
      'keyword:and',
      'number:1',
      'keyword:saddle',
      'text:"x"',
      'comment:# why',
      'keyword:field',
      'name:B',
      'unit:[T]',
      'keyword:response',
      'name:M_B',
    ]);
  });
});

describe('completion', () => {
  const labels = (text: string): string[] =>
    completionsAt(text, text.length).map(({ label }) => label);

  it('offers statements where a line begins', () => {
    expect(labels('ensemble canonical\npar')).toContain('parameter');
    expect(labels('')).toContain('ensemble');
  });

  it('offers units in brackets and nothing in texts and comments', () => {
    expect(labels('constant x [k')).toContain('kJ');
    expect(labels('constant x [J] = 1 "some')).toEqual([]);
    expect(labels('# some')).toEqual([]);
  });

  it('offers ensembles behind their word', () => {
    const text = 'ensemble grand c';
    const [first] = completionsAt(text, text.length).filter(
      ({ label }) => label === 'grand canonical',
    );
    expect(first?.span).toEqual({ start: 9, end: text.length });
  });

  it('offers names, constants and functions in expressions', () => {
    const found = labels(`${FLUID}report x = La`);
    for (const name of ['Lambda', 'a', 'k', 'pi', 'exp', 'sqrt', 'C_V', 'sum']) {
      expect(found).toContain(name);
    }
    expect(labels(`${FLUID}let x = `)).not.toContain('C_V');
  });
});

describe('hovering', () => {
  const at = (text: string, word: string): ReturnType<typeof hoverAt> => {
    const offset = text.indexOf(word);
    return hoverAt(text, offset);
  };

  it('tells of parameters, constants of nature, units and words', () => {
    expect(at(FLUID, 'a [J')?.lines).toEqual([
      'parameter: attraction',
      'a = 3.7e-49 J m^3',
      'in J m^3',
    ]);
    expect(at(FLUID, 'h / sqrt')?.lines[0]).toBe('constant of nature: Planck constant');
    expect(at(FLUID, '[u]')?.lines).toEqual(['1.66053906892e-27 kg']);
    expect(at(FLUID, 'parameter')?.kind).toBe('word');
    expect(at(FLUID, 'sqrt')?.title).toBe('sqrt(x)');
    expect(at(FLUID, 'kappa_T')?.lines).toContain('property: isothermal compressibility');
    expect(at(LATTICE_GAS, 'theta ln')?.lines).toContain('may be typed θ');
    expect(hoverAt(FLUID, -5)).toBeUndefined();
  });
});
