/**
 * Reads what stands between square brackets: `J m^3`, `kJ/mol`, `Pa m^6 mol^-2`, `J/(K mol)`,
 * `N^(1/2)`, `1`. A factor behind a division needs parentheses, as everywhere in the language.
 */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { DIMENSIONLESS, multiplyDimensions, powerDimension, type Dimension } from './dimension.ts';
import { nearest } from './nearest.ts';
import { unitNamed, USUAL_UNITS } from './unit.ts';

export interface UnitValue {
  readonly factor: Rational;
  readonly dimension: Dimension;
}

/** What is wrong with a unit; start and end count characters inside the brackets. */
export interface UnitFault {
  readonly message: string;
  readonly hint: string;
  readonly start: number;
  readonly end: number;
  /** What may stand in its place. */
  readonly replacement?: string;
}

export type UnitResult =
  | { readonly unit: UnitValue; readonly fault?: undefined }
  | { readonly unit?: undefined; readonly fault: UnitFault };

/** Exponents beyond this are no unit of anything. */
const LARGEST_EXPONENT = 30n;
/** Longer than any unit; also bounds the work and the depth of parentheses. */
const LONGEST_UNIT = 120;

const PURE: UnitValue = { factor: Q.ONE, dimension: DIMENSIONLESS };

interface Piece {
  readonly kind: 'name' | 'number' | 'sign';
  readonly text: string;
  readonly start: number;
  readonly end: number;
}

class Refused extends Error {
  readonly fault: UnitFault;
  constructor(fault: UnitFault) {
    super(fault.message);
    this.fault = fault;
  }
}

const PIECE = /\s*(?:([\p{L}°µΩÅ%]+)|(\d+(?:\.\d+)?)|(\S))/uy;

function piecesOf(text: string): Piece[] {
  const pieces: Piece[] = [];
  PIECE.lastIndex = 0;
  for (let match = PIECE.exec(text); match; match = PIECE.exec(text)) {
    const found = match[1] ?? match[2] ?? match[3] ?? '';
    const kind = match[1] !== undefined ? 'name' : match[2] !== undefined ? 'number' : 'sign';
    const end = PIECE.lastIndex;
    pieces.push({ kind, text: found, start: end - found.length, end });
  }
  return pieces;
}

function multiply(a: UnitValue, b: UnitValue): UnitValue {
  return {
    factor: Q.multiply(a.factor, b.factor),
    dimension: multiplyDimensions(a.dimension, b.dimension),
  };
}

function powerOf(unit: UnitValue, exponent: Rational, at: Piece): UnitValue {
  const dimension = powerDimension(unit.dimension, exponent);
  if (Q.isInteger(exponent)) {
    return { factor: Q.power(unit.factor, Number(exponent.numerator)), dimension };
  }
  if (Q.isOne(unit.factor)) return { factor: Q.ONE, dimension };
  throw new Refused({
    message: 'A root is taken of coherent SI units only.',
    hint: 'Write the unit in m, kg, s, J, Pa …, without prefix.',
    start: at.start,
    end: at.end,
  });
}

class Reader {
  private position = 0;
  private readonly pieces: readonly Piece[];
  private readonly length: number;

  constructor(pieces: readonly Piece[], length: number) {
    this.pieces = pieces;
    this.length = length;
  }

  whole(): UnitValue {
    const unit = this.product();
    const left = this.pieces[this.position];
    if (left) this.refuse(left, `${left.text} can't stand here in a unit.`, 'Write J m^3, kJ/mol.');
    return unit;
  }

  private product(): UnitValue {
    let result = this.factor();
    let isDivided = false;
    for (;;) {
      const piece = this.pieces[this.position];
      if (!piece || piece.text === ')') return result;
      if (piece.text === '/') {
        if (isDivided) this.ambiguous(piece);
        this.position++;
        const divisor = this.factor();
        result = multiply(result, powerOf(divisor, Q.MINUS_ONE, piece));
        isDivided = true;
      } else {
        const isExplicit = piece.text === '*' || piece.text === '·' || piece.text === '⋅';
        if (isDivided && !isExplicit) this.ambiguous(piece);
        if (isExplicit) this.position++;
        result = multiply(result, this.factor());
      }
    }
  }

  private ambiguous(piece: Piece): never {
    this.refuse(
      piece,
      'What stands behind the division is ambiguous.',
      'Put the divisor in parentheses: J/(K mol).',
    );
  }

  private factor(): UnitValue {
    const piece = this.pieces[this.position];
    if (!piece) {
      const at = { start: Math.max(0, this.length - 1), end: this.length };
      throw new Refused({
        message: 'A unit is missing here.',
        hint: 'Write [1] for a number.',
        ...at,
      });
    }
    this.position++;
    if (piece.text === '(') {
      const inner = this.product();
      if (this.pieces[this.position]?.text !== ')') {
        this.refuse(piece, 'This parenthesis is not closed.', 'Close it with ).');
      }
      this.position++;
      return this.raised(inner, piece);
    }
    if (piece.text === '1') return PURE;
    if (piece.kind === 'name') {
      const unit = unitNamed(piece.text);
      if (unit) return this.raised(unit, piece);
      this.unknown(piece);
    }
    this.refuse(piece, `${piece.text} is no unit.`, 'Write units as SI symbols, such as J m^3.');
  }

  private unknown(piece: Piece): never {
    if (/^°C$|^degC$|^°F$/.test(piece.text)) {
      this.refuse(piece, `${piece.text} is a unit of data only.`, 'Write temperatures in K.', 'K');
    }
    const meant = takenApart(piece.text) ?? nearest(piece.text, USUAL_UNITS);
    const hint = meant
      ? `Did you mean ${meant}?`
      : 'Units are SI symbols with their prefixes, and u, eV, Å, bar, atm, cal, L, D, min, h.';
    this.refuse(piece, `${piece.text} is no known unit.`, hint, meant);
  }

  private raised(unit: UnitValue, piece: Piece): UnitValue {
    if (this.pieces[this.position]?.text !== '^') return unit;
    const caret = this.pieces[this.position] ?? piece;
    this.position++;
    return powerOf(unit, this.exponent(caret), piece);
  }

  private exponent(caret: Piece): Rational {
    const isGroup = this.accept('(');
    const isNegative = this.accept('-') || this.accept('−');
    let value = this.number(caret);
    if (isGroup && this.accept('/')) {
      const divisor = this.number(caret);
      if (Q.isZero(divisor)) this.refuse(caret, 'This exponent divides by zero.', '');
      value = Q.divide(value, divisor);
    }
    if (isGroup && !this.accept(')')) {
      this.refuse(caret, 'The parenthesis of this exponent is not closed.', 'Close it with ).');
    }
    const limit = Q.rational(LARGEST_EXPONENT);
    if (Q.compare(value, limit) > 0 || value.denominator > LARGEST_EXPONENT) {
      this.refuse(caret, `An exponent of a unit is at most ${LARGEST_EXPONENT}.`, '');
    }
    return isNegative ? Q.negate(value) : value;
  }

  private accept(text: string): boolean {
    if (this.pieces[this.position]?.text !== text) return false;
    this.position++;
    return true;
  }

  private number(caret: Piece): Rational {
    const piece = this.pieces[this.position];
    if (piece?.kind !== 'number') {
      this.refuse(caret, 'An exponent is missing behind ^.', 'Write m^3, s^-1 or N^(1/2).');
    }
    this.position++;
    return Q.fromDecimal(piece.text);
  }

  private refuse(at: Piece, message: string, hint: string, replacement?: string): never {
    throw new Refused({
      message,
      hint,
      start: at.start,
      end: at.end,
      ...(replacement === undefined ? {} : { replacement }),
    });
  }
}

/** `Jm` as `J m`. */
function takenApart(name: string): string | undefined {
  for (let i = 1; i < name.length && name.length <= 12; i++) {
    const [head, rest] = [name.slice(0, i), name.slice(i)];
    if (unitNamed(head) && unitNamed(rest)) return `${head} ${rest}`;
  }
  return undefined;
}

const known = new Map<string, UnitResult>();

/** The unit written by a text without its brackets. Faults are values; it never throws. */
export function parseUnit(text: string): UnitResult {
  const remembered = known.get(text);
  if (remembered) return remembered;
  const result = read(text);
  if (known.size < 1000) known.set(text, result);
  return result;
}

function read(text: string): UnitResult {
  if (text.length > LONGEST_UNIT) {
    return {
      fault: {
        message: `A unit has at most ${LONGEST_UNIT} characters.`,
        hint: '',
        start: 0,
        end: text.length,
      },
    };
  }
  try {
    return { unit: new Reader(piecesOf(text), text.length).whole() };
  } catch (error) {
    if (error instanceof Refused) return { fault: error.fault };
    throw error;
  }
}
