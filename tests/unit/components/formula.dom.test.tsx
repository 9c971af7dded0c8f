import { afterEach, describe, expect, it } from 'vitest';
import { cleanup, render, screen } from '@testing-library/react';
import { DisplayFormula, Formula, loadTypesetting } from '../../../src/components/Formula.tsx';
import { LONGEST_TEX, typeset } from '../../../src/components/typeset.ts';

afterEach(cleanup);

describe('a formula', () => {
  it('is typeset with its MathML for screen readers', async () => {
    await loadTypesetting();
    const { container } = render(<Formula tex="p = \frac{N k T}{V}" />);
    expect(container.querySelector('.katex')).not.toBeNull();
    expect(container.querySelector('math')).not.toBeNull();
  });

  it('stands as plain text where it is no TeX', async () => {
    await loadTypesetting();
    render(<DisplayFormula tex="\frac{" text="p = ?" />);
    expect(screen.getByText('p = ?')).toBeTruthy();
  });

  it('cannot bring in links, pictures, classes or markup', () => {
    for (const tex of [
      String.raw`\href{javascript:alert(1)}{x}`,
      String.raw`\includegraphics{https://example.org/x.png}`,
      String.raw`\htmlClass{a}{x}`,
      '<img src=x onerror=alert(1)>',
    ]) {
      const element = document.createElement('div');
      element.innerHTML = typeset(tex, false) ?? '';
      expect(element.querySelector('a, img, script, [onerror], .a')).toBeNull();
    }
  });

  it('is refused when it is too long, too deep, or expands without end', () => {
    expect(typeset('x+'.repeat(LONGEST_TEX), true)).toBeNull();
    expect(typeset(`${'{'.repeat(4000)}x${'}'.repeat(4000)}`, true)).toBeNull();
    expect(typeset(String.raw`\def\a{\a\a}\a`, true)).toBeNull();
  });
});
