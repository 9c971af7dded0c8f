/**
 * Prose with mathematics: paragraphs, headings (`## …`), lists (`- …`), *emphasis*, `code`,
 * $inline$ and $$display$$ formulas. It is built of elements, never of markup of the author.
 */
import type { ReactNode } from 'react';
import { DisplayFormula, Formula } from './Formula.tsx';

const INLINE = /\$([^$\n]+)\$|`([^`\n]+)`|\*\*([^*\n]+)\*\*|\*([^*\n]+)\*/g;

function inline(text: string): ReactNode[] {
  const parts: ReactNode[] = [];
  let end = 0;
  for (const match of text.matchAll(INLINE)) {
    const [whole, tex, code, strong, emphasis] = match;
    if (match.index > end) parts.push(text.slice(end, match.index));
    const key = match.index;
    if (tex !== undefined) parts.push(<Formula key={key} tex={tex} />);
    else if (code !== undefined) parts.push(<code key={key}>{code}</code>);
    else if (strong !== undefined) parts.push(<strong key={key}>{strong}</strong>);
    else parts.push(<em key={key}>{emphasis}</em>);
    end = match.index + whole.length;
  }
  if (end < text.length) parts.push(text.slice(end));
  return parts;
}

function block(text: string, key: number): ReactNode {
  const display = /^\$\$([\s\S]+)\$\$$/.exec(text);
  if (display?.[1] !== undefined) return <DisplayFormula key={key} tex={display[1].trim()} />;
  const heading = /^#{1,4}\s+(.+)$/.exec(text);
  if (heading?.[1] !== undefined) {
    return (
      <h3 key={key} className="text-lede text-ink mt-22 mb-8 font-[520]">
        {inline(heading[1])}
      </h3>
    );
  }
  const lines = text.split('\n');
  if (lines.every((line) => /^[-*]\s+/.test(line))) {
    return (
      <ul key={key} className="my-8 list-disc pl-22">
        {lines.map((line, index) => (
          <li key={index}>{inline(line.replace(/^[-*]\s+/, ''))}</li>
        ))}
      </ul>
    );
  }
  return (
    <p key={key} className="my-8">
      {inline(lines.join(' '))}
    </p>
  );
}

export function Prose({ children }: { readonly children: string }) {
  const blocks = children
    .replaceAll('\r\n', '\n')
    .replace(/\$\$([\s\S]+?)\$\$/g, (display) => `\n\n${display.replace(/\n\s*\n/g, '\n')}\n\n`)
    .split(/\n\s*\n/)
    .map((text) => text.trim())
    .filter(Boolean);
  return <div className="max-w-text text-body text-ink-2">{blocks.map(block)}</div>;
}
