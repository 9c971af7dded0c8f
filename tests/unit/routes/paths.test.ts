import { describe, expect, it } from 'vitest';
import { paths, safeNext, signInPath } from '../../../src/routes/paths.ts';

describe('the way back after signing in', () => {
  it('leads to the page that was asked for', () => {
    expect(signInPath('/models/7?x=1')).toBe('/sign-in?next=%2Fmodels%2F7%3Fx%3D1');
    expect(safeNext('/models/7?x=1')).toBe('/models/7?x=1');
  });

  it('never leads out of the application', () => {
    for (const next of [
      'https://example.org',
      '//example.org',
      '/\\example.org',
      'javascript:x',
      '/a\\b',
    ]) {
      expect(safeNext(next)).toBe(paths.desk);
    }
  });

  it('leads to the desk where no page or the sign-in itself was asked for', () => {
    expect(safeNext(null)).toBe(paths.desk);
    expect(safeNext('/sign-in/register')).toBe(paths.desk);
  });
});
