/** Takes a source text apart into tokens. */
import { fromDecimal, power, multiply, rational } from '../algebra/rational.ts';
import type { Findings } from './findings.ts';
import { asciiName, NAME_PART, NAME_START } from './greek.ts';
import { LARGEST_DECIMAL_EXPONENT, MOST_DIGITS } from './limits.ts';
import type { Token, TokenKind } from './token.ts';

/** Digits, an uncertainty of the last digits in parentheses, a power of ten. */
const NUMBER = /(\d+(?:\.(?!\.)\d*)?|\.\d+)(?:\((\d+)\))?([eE][+-]?\d+)?/y;
const NAME = new RegExp(`${NAME_PART.source}+`, 'y');
const OPERATOR = /->|\.\.|<=|>=|[-+*/^!=<>(){},;:]/y;

/** Other characters that mean an operator. */
const SPELLINGS: Readonly<Record<string, string>> = {
  '−': '-',
  '–': '-',
  '·': '*',
  '⋅': '*',
  '×': '*',
  '→': '->',
  '≤': '<=',
  '≥': '>=',
  '…': '..',
};

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Every character of the source is in one of the tokens or is a space; the last token is `end`. */
export function lex(source: string, findings: Findings): Token[] {
  const tokens: Token[] = [];
  let at = 0;
  const push = (
    kind: TokenKind,
    end: number,
    value?: string,
    numbers: Pick<Token, 'number' | 'uncertainty'> = {},
  ): void => {
    const text = source.slice(at, end);
    tokens.push({ kind, span: { start: at, end }, text, value: value ?? text, ...numbers });
    at = end;
  };
  while (at < source.length) {
    const character = source[at] ?? '';
    if (character === ' ') {
      at++;
    } else if (character === '\n') {
      push('newline', at + 1);
    } else if (/\s|\ufeff/.test(character)) {
      at++;
    } else if (character === '#') {
      push('comment', endOfLine(source, at));
    } else if (NAME_START.test(character)) {
      NAME.lastIndex = at;
      NAME.test(source);
      const end = NAME.lastIndex;
      push('name', end, asciiName(source.slice(at, end)));
    } else if (/[\d.]/.test(character) && matches(NUMBER, source, at)) {
      const match = matches(NUMBER, source, at);
      if (match) pushNumber(match);
    } else if (character === '"') {
      pushDelimited('text', '"', 'unclosed-text');
    } else if (character === '[') {
      pushDelimited('unit', ']', 'unclosed-unit');
    } else if (character === '∞') {
      push('name', at + 1, 'inf');
    } else if (Object.hasOwn(SPELLINGS, character)) {
      push('operator', at + 1, SPELLINGS[character]);
    } else {
      const match = matches(OPERATOR, source, at);
      if (match) push('operator', at + match[0].length);
      else refuse();
    }
  }
  push('end', at);
  return tokens;

  function pushNumber(match: RegExpExecArray): void {
    const [whole, digits = '', uncertain, exponent = ''] = match;
    const end = at + whole.length;
    const decimals = digits.includes('.') ? digits.length - digits.indexOf('.') - 1 : 0;
    const scale = Number(exponent.slice(1) === '' ? 0 : exponent.slice(1));
    if (
      digits.length > MOST_DIGITS ||
      (uncertain?.length ?? 0) > MOST_DIGITS ||
      Math.abs(scale) > LARGEST_DECIMAL_EXPONENT
    ) {
      findings.add('number-too-large', { start: at, end });
      push('number', end, '1', { number: rational(1) });
      return;
    }
    const number = fromDecimal(digits + exponent);
    if (uncertain === undefined) {
      push('number', end, undefined, { number });
    } else {
      const uncertainty = multiply(
        fromDecimal(uncertain + exponent),
        power(rational(10), -decimals),
      );
      push('number', end, undefined, { number, uncertainty });
    }
  }

  function pushDelimited(
    kind: 'text' | 'unit',
    closing: string,
    fault: 'unclosed-text' | 'unclosed-unit',
  ): void {
    const lineEnd = endOfLine(source, at);
    const found = source.slice(at + 1, lineEnd).indexOf(closing);
    if (found < 0) {
      findings.add(fault, { start: at, end: lineEnd }, {}, [
        {
          title: `close with ${closing}`,
          edits: [{ span: { start: lineEnd, end: lineEnd }, text: closing }],
        },
      ]);
      push(kind, lineEnd, source.slice(at + 1, lineEnd));
    } else {
      push(kind, at + found + 2, source.slice(at + 1, at + 1 + found));
    }
  }

  function refuse(): void {
    const character = String.fromCodePoint(source.codePointAt(at) ?? 0);
    const end = at + character.length;
    const digit = SUPERSCRIPTS.indexOf(character);
    const isInvisible = /[\p{C}\p{Z}]/u.test(character);
    findings.add(
      'unexpected-character',
      { start: at, end },
      {
        character: isInvisible ? 'An invisible character' : character,
        hint: digit >= 0 ? `Write ^${digit}.` : 'Take it out.',
      },
      digit >= 0
        ? [{ title: `write ^${digit}`, edits: [{ span: { start: at, end }, text: `^${digit}` }] }]
        : [{ title: 'take it out', edits: [{ span: { start: at, end }, text: '' }] }],
    );
    at = end;
  }
}

function endOfLine(source: string, from: number): number {
  const end = source.indexOf('\n', from);
  const stop = end < 0 ? source.length : end;
  return source[stop - 1] === '\r' && stop > from ? stop - 1 : stop;
}

function matches(pattern: RegExp, source: string, at: number): RegExpExecArray | null {
  pattern.lastIndex = at;
  return pattern.exec(source);
}
