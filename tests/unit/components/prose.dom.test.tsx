import { afterEach, beforeAll, describe, expect, it } from 'vitest';
import { cleanup, render, screen } from '@testing-library/react';
import { loadTypesetting } from '../../../src/components/Formula.tsx';
import { Prose } from '../../../src/components/Prose.tsx';

beforeAll(loadTypesetting);
afterEach(cleanup);

describe('prose', () => {
  it('has paragraphs, lists, headings and emphasis', () => {
    render(<Prose>{'## Question\n\nHow *far* does\nit go?\n\n- one\n- two'}</Prose>);
    expect(screen.getByRole('heading', { name: 'Question' })).toBeTruthy();
    expect(screen.getByText('far').tagName).toBe('EM');
    expect(screen.getAllByRole('listitem')).toHaveLength(2);
  });

  it('typesets mathematics within the line and on lines of its own', () => {
    const { container } = render(<Prose>{'with $N$ in\n$$\np V\n= N k T\n$$\nfor all'}</Prose>);
    expect(container.querySelectorAll('.katex')).toHaveLength(2);
    expect(container.querySelectorAll('.katex-display')).toHaveLength(1);
  });

  it('shows markup of the author as text', () => {
    const { container } = render(
      <Prose>
        {'<script>alert(1)</script> <img src=x onerror=alert(1)> [x](javascript:alert(1))'}
      </Prose>,
    );
    expect(container.querySelector('script, img, a')).toBeNull();
    expect(container.textContent).toContain('<script>');
  });
});
