import { describe, expect, it } from 'vitest';
import { parse } from '../../../shared/language/parser.ts';
import { Findings } from '../../../shared/language/findings.ts';
import { analyse } from '../../../shared/language/index.ts';
import { CHAPTERS } from '../../../src/routes/language/reference.ts';
import { SPECIMEN } from '../../../src/routes/front/specimenSource.ts';

describe('the reference of the language', () => {
  const examples = CHAPTERS.flatMap(({ entries }) =>
    entries.flatMap(({ name, example }) =>
      example === undefined ? [] : [[name, example] as const],
    ),
  );

  it.each(examples)('shows for %s a text that the language reads', (_, example) => {
    const findings = new Findings(example);
    parse(example, findings);
    expect(findings.all().filter(({ severity }) => severity === 'error')).toEqual([]);
  });
});

describe('the specimen of the front door', () => {
  it('is sound', () => {
    const errors = analyse(SPECIMEN).diagnostics.filter(({ severity }) => severity === 'error');
    expect(errors).toEqual([]);
  });
});
