/** What is to be said of the word at a place. */
import { parseUnit } from '../units/parseUnit.ts';
import { formatDimension } from '../units/formatDimension.ts';
import { toNumber } from '../algebra/rational.ts';
import { describeName, greekSpelling, type NameKind } from './describeName.ts';
import type { Span } from './diagnostic.ts';
import { study } from './study.ts';
import { EXPRESSION_FACTS, STATEMENT_FACTS } from './words.ts';

export interface Hover {
  readonly span: Span;
  /** `a`, `exp(x)`, `[kJ/mol]`, `parameter a [J m^3] = … `. */
  readonly title: string;
  readonly kind: NameKind | 'word' | 'unit' | 'text';
  /** Whole sentences or short phrases, one a line. */
  readonly lines: readonly string[];
}

/** The facts of the word at an offset; undefined where there is nothing to say. Never throws. */
export function hoverAt(source: string, offset: number): Hover | undefined {
  const known = study(source);
  const token = known.tokens.find(({ span }) => span.start <= offset && offset < span.end);
  if (!token) return undefined;
  if (token.kind === 'unit') return hoverUnit(token.value, token.span);
  if (token.kind !== 'name') return undefined;
  const { value, span } = token;
  const word = Object.hasOwn(STATEMENT_FACTS, value)
    ? STATEMENT_FACTS[value]
    : Object.hasOwn(EXPRESSION_FACTS, value)
      ? EXPRESSION_FACTS[value]
      : undefined;
  if (word) return { span, title: word.usage, kind: 'word', lines: [word.description] };
  const facts = describeName(value, known);
  if (!facts) return undefined;
  const greek = greekSpelling(value);
  const lines = [
    facts.description === '' ? facts.kind : `${facts.kind}: ${facts.description}`,
    ...(facts.value === '' ? [] : [`${value} = ${facts.value}`]),
    ...(facts.unit === '' ? [] : [facts.unit === '1' ? 'a number' : `in ${facts.unit}`]),
    ...(greek === undefined || greek === token.text ? [] : [`may be typed ${greek}`]),
  ];
  return { span, title: facts.usage, kind: facts.kind, lines };
}

function hoverUnit(text: string, span: Span): Hover {
  const { unit, fault } = parseUnit(text);
  if (!unit) return { span, title: `[${text}]`, kind: 'unit', lines: [fault.message] };
  const coherent = formatDimension(unit.dimension);
  return {
    span,
    title: `[${text}]`,
    kind: 'unit',
    lines: [`${toNumber(unit.factor)} ${coherent === '1' ? '' : coherent}`.trim()],
  };
}
