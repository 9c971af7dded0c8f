import { describe, expect, it } from 'vitest';
import { answerDerivative } from '../../../src/workers/anyDerivative.ts';
import { HARD_CORE_FLUID } from '../../api/support/formulations.ts';

const ask = (of: string, by: string, ...held: string[]) =>
  answerDerivative(HARD_CORE_FLUID, { of, by, held });

describe('the calculator of derivatives', () => {
  it('takes the pressure by the temperature at constant volume', () => {
    expect(ask('p', 'T', 'V', 'N')).toMatchObject({
      kind: 'found',
      text: 'N k/(V - N b)',
      unit: 'Pa/K',
    });
  });

  it('holds properties constant: cooling by throttling', () => {
    const found = ask('T', 'p', 'H', 'N');
    expect(found).toMatchObject({ kind: 'found', unit: 'K/Pa' });
  });

  it('finds Maxwell’s relation on both sides', () => {
    const left = ask('S', 'V', 'T', 'N');
    const right = ask('p', 'T', 'V', 'N');
    expect(left.kind).toBe('found');
    expect(left.kind === 'found' && left.text).toBe(right.kind === 'found' && right.text);
  });

  it('says in a sentence why there is none', () => {
    const none = ask('p', 'T', 'V');
    expect(none).toMatchObject({ kind: 'none' });
    expect(none.kind === 'none' && none.why).toMatch(/constant/);
    expect(ask('p', 'nothing', 'V', 'N').kind).toBe('none');
    expect(ask('p', 'N', 'N', 'N').kind).toBe('none');
    expect(answerDerivative('q = ', { of: 'p', by: 'T', held: ['V', 'N'] }).kind).toBe('none');
  });
});
