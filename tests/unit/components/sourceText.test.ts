import { describe, expect, it } from 'vitest';
import { differenceOf } from '../../../src/components/changedLines.ts';
import { sourceLines, sourceParts } from '../../../src/components/sourceParts.ts';
import { markFaults } from '../../../src/routes/front/markFaults.ts';

const source = '# Title "x"\nparameter b [m^3] = 5e-29 between 0 and 1 "size of it"\n';

describe('the parts of a source', () => {
  it('are the source again when they are put together', () => {
    const texts = [source, '', '"open [unit', '[m', '#', 'q = (V - N b)\r\n', '∑ θ "µ"'];
    for (const text of texts) {
      expect(
        sourceParts(text)
          .map((part) => part.text)
          .join(''),
      ).toBe(text);
    }
  });

  it('tell keywords, units, texts and comments apart', () => {
    const kinds = sourceParts(source).filter(({ kind }) => kind !== 'plain');
    expect(kinds.map(({ kind, text }) => `${kind}: ${text}`)).toEqual([
      'comment: # Title "x"',
      'keyword: parameter',
      'unit: [m^3]',
      'keyword: between',
      'keyword: and',
      'text: "size of it"',
    ]);
  });

  it('carry the marks of faults to the letter', () => {
    const text = 'q = V\nQ = exp(a N / V)';
    const start = text.indexOf('a N / V');
    const lines = markFaults(sourceLines(text), [
      { severity: 'error', span: { start, end: start + 7 } },
    ]);
    expect(lines[0]?.every((part) => part.mark === undefined)).toBe(true);
    expect(lines[1]?.find((part) => part.mark === 'fault')?.text).toBe('a N / V');
  });
});

describe('the difference of two sources', () => {
  it('shows changed lines with two others around and leaves the rest out', () => {
    const lines = Array.from({ length: 12 }, (_, index) => `line ${index}`);
    const changed = lines.with(6, 'line six');
    expect(
      differenceOf(`${lines.join('\n')}\n`, `${changed.join('\n')}\n`).map(
        ({ kind, text }) => `${kind} ${text}`,
      ),
    ).toEqual([
      'gap ',
      'kept line 4',
      'kept line 5',
      'removed line 6',
      'added line six',
      'kept line 7',
      'kept line 8',
      'gap ',
    ]);
  });

  it('is empty for the same source', () => {
    expect(differenceOf('a\nb\n', 'a\nb\n')).toEqual([]);
  });
});
