/** What may be typed at a place. */
import { FUNCTIONS } from '../algebra/functions.ts';
import { NATURAL_CONSTANTS } from '../units/constants.ts';
import { unitNamed, USUAL_UNITS } from '../units/unit.ts';
import { formatDimension } from '../units/formatDimension.ts';
import { describeName } from './describeName.ts';
import type { Span } from './diagnostic.ts';
import { NAME_PART } from './greek.ts';
import { isBuiltInFunction } from './parseExpression.ts';
import { study } from './study.ts';
import { PARTITION_FUNCTIONS } from './syntax.ts';
import { EXPRESSION_FACTS, STATEMENT_FACTS } from './words.ts';

export interface Completion {
  readonly label: string;
  /** What takes the place of `span`. */
  readonly text: string;
  readonly span: Span;
  readonly kind: 'statement' | 'keyword' | 'unit' | 'function' | 'name';
  /** One line beside the label: its unit or its usage. */
  readonly detail: string;
  readonly description: string;
}

/** The completions at an offset, the ones nearest to the author first. Never throws. */
export function completionsAt(source: string, offset: number): Completion[] {
  const at = Math.min(Math.max(0, Math.trunc(offset) || 0), source.length);
  let start = at;
  while (start > 0 && NAME_PART.test(source[start - 1] ?? '')) start--;
  const span = { start, end: at };
  const lineStart = source.lastIndexOf('\n', at - 1) + 1;
  const before = source.slice(lineStart, at);
  const code = before.replace(/"[^"]*"/g, '');
  if (code.includes('"') || code.includes('#')) return [];
  if (code.lastIndexOf('[') > code.lastIndexOf(']')) return units(source, at);
  if (/^\s*ensemble\s/.test(before)) return ensembles(source, lineStart, at);
  if (source.slice(lineStart, start).trim() === '') return statements(span);
  return [...names(source, span), ...words(span)];
}

function units(source: string, at: number): Completion[] {
  let start = at;
  while (start > 0 && /[\p{L}°µ]/u.test(source[start - 1] ?? '')) start--;
  return USUAL_UNITS.map((unit) => {
    const facts = unitNamed(unit);
    return {
      label: unit,
      text: unit,
      span: { start, end: at },
      kind: 'unit',
      detail: facts ? formatDimension(facts.dimension) : '',
      description: facts?.title ?? '',
    };
  });
}

function ensembles(source: string, lineStart: number, at: number): Completion[] {
  const start = lineStart + (/^\s*ensemble\s+/.exec(source.slice(lineStart, at))?.[0].length ?? 0);
  return Object.entries(PARTITION_FUNCTIONS).map(([ensemble, name]) => ({
    label: ensemble,
    text: ensemble,
    span: { start, end: at },
    kind: 'keyword',
    detail: name,
    description: `The ensemble of ${name}.`,
  }));
}

function statements(span: Span): Completion[] {
  const own = Object.entries(STATEMENT_FACTS).map(([word, { usage, description }]): Completion => ({
    label: word,
    text: `${word} `,
    span,
    kind: 'statement',
    detail: usage,
    description,
  }));
  const functions = ['q = ', 'Q = ', 'ln Q = ', 'ln Xi = ', 'ln Delta = ', 'ln W = '].map(
    (text): Completion => ({
      label: text.replace(' = ', ''),
      text,
      span,
      kind: 'statement',
      detail: `${text}…`,
      description: 'States the partition function.',
    }),
  );
  return [...own, ...functions];
}

function names(source: string, span: Span): Completion[] {
  const known = study(source);
  const isStatement = /^\s*(claim|report)\b/.test(
    source.slice(source.lastIndexOf('\n', span.start - 1) + 1, span.start),
  );
  const found = new Set([
    ...known.scope.entities.keys(),
    ...(isStatement ? known.scope.properties.keys() : []),
    'pi',
    ...NATURAL_CONSTANTS.map(({ name }) => name),
    ...Object.keys(FUNCTIONS).filter(isBuiltInFunction),
    'sqrt',
  ]);
  return [...found].flatMap((name): Completion[] => {
    const facts = describeName(name, known);
    if (!facts) return [];
    const isFunction = facts.kind === 'function';
    return [
      {
        label: name,
        text: isFunction ? `${name}(` : name,
        span,
        kind: isFunction ? 'function' : 'name',
        detail: isFunction
          ? facts.usage
          : facts.unit === '1'
            ? facts.kind
            : `${facts.kind}, ${facts.unit}`,
        description: facts.description,
      },
    ];
  });
}

function words(span: Span): Completion[] {
  return Object.entries(EXPRESSION_FACTS).map(([word, { usage, description }]) => ({
    label: word,
    text: word === 'partial' ? 'partial(' : word,
    span,
    kind: 'keyword',
    detail: usage,
    description,
  }));
}
