/** Expressions in TeX, as a careful author would set them. */
import type { Expression, FunctionName, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { arrange, arrangeRelation } from './arrange.ts';
import { isOpenEnded, isShort, type Arranged } from './arranged.ts';
import type { NameStyle } from './nameStyle.ts';
import { asDecimal } from './numerals.ts';
import { fitsOnLine, isBareArgument, isRaised, levels, nesting } from './texShape.ts';

/** `\frac{N k T}{V - N b} - \frac{a N^{2}}{V^{2}}` */
export function toTex(e: Expression, style: NameStyle): string {
  return new TexPrinter(style).tex(arrange(e, style));
}

/** `V > N b` */
export function relationToTex(relation: Relation, style: NameStyle): string {
  const { left, sign, right } = arrangeRelation(relation, style);
  const printer = new TexPrinter(style);
  return `${printer.tex(left)} ${RELATIONS[sign]} ${printer.tex(right)}`;
}

const RELATIONS: Readonly<Record<Relation['sign'], string>> = {
  '<': '<',
  '<=': '\\le',
  '=': '=',
  '>=': '\\ge',
  '>': '>',
};

/** Signs of functions after ISO 80000-2; functions with subscripts or bars are set by `call`. */
const SIGNS: Partial<Record<FunctionName, string>> = {
  exp: '\\exp',
  ln: '\\ln',
  log10: '\\log_{10}',
  sinh: '\\sinh',
  cosh: '\\cosh',
  tanh: '\\tanh',
  coth: '\\coth',
  sin: '\\sin',
  cos: '\\cos',
  tan: '\\tan',
  arcsinh: '\\operatorname{arsinh}',
  arctanh: '\\operatorname{artanh}',
  erf: '\\operatorname{erf}',
  heaviside: '\\operatorname{H}',
  Gamma: '\\Gamma',
  lnGamma: '\\ln\\Gamma',
  digamma: '\\psi',
  min: '\\min',
  max: '\\max',
};

/** Functions whose powers are written at their sign: sinh² x. */
const RAISED_AT_SIGN: ReadonlySet<string> = new Set([
  'sinh',
  'cosh',
  'tanh',
  'coth',
  'sin',
  'cos',
  'tan',
]);

/** Delimiters from inside out. */
const DELIMITERS = [
  ['(', ')'],
  ['[', ']'],
  ['\\{', '\\}'],
] as const;

class TexPrinter {
  private readonly style: NameStyle;

  constructor(style: NameStyle) {
    this.style = style;
  }

  tex(a: Arranged): string {
    switch (a.kind) {
      case 'number':
        return numberTex(a.value);
      case 'name':
        return this.style.texOf(a.name);
      case 'infinity':
        return '\\infty';
      case 'negative':
        return `-${this.term(a.inside, true)}`;
      case 'sum':
        return this.sum(a);
      case 'product':
        return this.product(a.factors);
      case 'fraction':
        return `\\frac{${this.tex(a.above)}}{${this.tex(a.below)}}`;
      case 'power':
        return this.power(a.base, a.exponent);
      case 'root':
        return `\\sqrt{${this.tex(a.inside)}}`;
      case 'call':
        return this.call(a);
      case 'summation':
      case 'productOver': {
        const sign = a.kind === 'summation' ? '\\sum' : '\\prod';
        const from = `${this.style.texOf(a.variable)}=${this.tex(a.from)}`;
        return `${sign}_{${from}}^{${this.tex(a.to)}} ${this.factor(a.body, true)}`;
      }
      case 'integral': {
        const variable = this.style.texOf(a.variable);
        const body = this.factor(a.body, true);
        return `\\int_{${this.tex(a.from)}}^{${this.tex(a.to)}} ${body} \\,\\mathrm{d}${variable}`;
      }
      case 'cases': {
        const rows = a.branches.map(
          ({ condition: { left, sign, right }, value }) =>
            `${this.tex(value)} & ${this.tex(left)} ${RELATIONS[sign]} ${this.tex(right)}`,
        );
        rows.push(`${this.tex(a.otherwise)} & \\text{otherwise}`);
        return `\\begin{cases} ${rows.join(' \\\\ ')} \\end{cases}`;
      }
      case 'element':
        return this.element(a);
    }
  }

  private sum({ terms }: Extract<Arranged, { kind: 'sum' }>): string {
    return terms
      .map(({ minus, term }, i) => {
        const sign = i === 0 ? (minus ? '-' : '') : minus ? ' - ' : ' + ';
        return sign + this.term(term, i === terms.length - 1);
      })
      .join('');
  }

  private term(a: Arranged, isLast: boolean): string {
    const needs = a.kind === 'sum' || a.kind === 'negative' || (!isLast && isOpenEnded(a));
    return needs ? this.delimited(a) : this.tex(a);
  }

  private product(factors: readonly Arranged[]): string {
    return factors
      .map((factor, i) => {
        const text = this.factor(factor, i === factors.length - 1);
        // Two numbers side by side would read as one.
        return i > 0 && /^(?:\d|\\tfrac)/.test(text) ? `\\cdot ${text}` : text;
      })
      .join(' ');
  }

  private factor(a: Arranged, isLast: boolean): string {
    const needs =
      a.kind === 'sum' ||
      a.kind === 'negative' ||
      (!isLast && (isOpenEnded(a) || a.kind === 'cases'));
    return needs ? this.delimited(a) : this.tex(a);
  }

  private power(base: Arranged, exponent: Arranged): string {
    const raised = `^{${this.onLine(exponent) ?? this.tex(exponent)}}`;
    if (base.kind === 'call' && RAISED_AT_SIGN.has(base.name) && isShort(exponent)) {
      const [x] = base.arguments;
      return `${SIGNS[base.name] ?? ''}${raised}${x ? this.argument(base.name, x) : ''}`;
    }
    return (isShort(base) && !asPowerOfTen(base) ? this.tex(base) : this.delimited(base)) + raised;
  }

  private call(a: Extract<Arranged, { kind: 'call' }>): string {
    const [x, second, ...held] = a.arguments;
    if (!x) return '';
    const at = second ? this.delimited(second) : '';
    switch (a.name) {
      case 'exp': {
        const exponent = isRaised(a) ? this.onLine(x) : undefined;
        return exponent === undefined ? `\\exp${this.delimited(x)}` : `\\mathrm{e}^{${exponent}}`;
      }
      case 'factorial':
        return `${isShort(x) ? this.tex(x) : this.delimited(x)}!`;
      case 'abs':
        return `\\left|${this.tex(x)}\\right|`;
      case 'binomial':
        return `\\binom{${this.tex(x)}}{${second ? this.tex(second) : ''}}`;
      case 'polygamma':
        return `\\psi^{(${this.tex(x)})}${at}`;
      case 'polylog':
        return `\\mathrm{Li}_{${this.onLine(x) ?? this.tex(x)}}${at}`;
      case 'besselI':
        return `I_{${this.onLine(x) ?? this.tex(x)}}${at}`;
      case 'debye':
        return `D_{${this.tex(x)}}${at}`;
      case 'partial': {
        const constant = held.map((z) => this.tex(z)).join(',');
        const quotient = `\\frac{\\partial ${this.factor(x, true)}}{\\partial ${second ? this.factor(second, true) : ''}}`;
        return `\\left(${quotient}\\right)_{${constant}}`;
      }
      default: {
        const sign = SIGNS[a.name] ?? `\\operatorname{${a.name}}`;
        if (a.arguments.length === 1) return sign + this.argument(a.name, x);
        const inside = a.arguments.map((argument) => this.tex(argument)).join(', ');
        return sign + this.enclosed(inside, { kind: 'product', factors: a.arguments });
      }
    }
  }

  /** ln V and ln (V/N) as a fraction without parentheses; anything else within them. */
  private argument(name: FunctionName, x: Arranged): string {
    if (!isBareArgument(name, x)) return this.delimited(x);
    return x.kind === 'fraction' ? this.tex(x) : ` ${this.tex(x)}`;
  }

  /** A fraction in an exponent is set with a slash, where its parts are flat. */
  private onLine(a: Arranged): string | undefined {
    if (!fitsOnLine(a)) return undefined;
    switch (a.kind) {
      case 'negative': {
        const inside = this.onLine(a.inside) ?? '';
        return a.inside.kind === 'sum' ? `-(${inside})` : `-${inside}`;
      }
      case 'number':
        return Q.isInteger(a.value) || asDecimal(a.value) ? numberTex(a.value) : Q.toText(a.value);
      case 'sum':
        return a.terms
          .map(({ minus, term }, i) => {
            const sign = i === 0 ? (minus ? '-' : '') : minus ? ' - ' : ' + ';
            return sign + (this.onLine(term) ?? '');
          })
          .join('');
      case 'fraction': {
        const isUnit = isShort(a.below) || (a.below.kind === 'power' && isShort(a.below.base));
        const above = this.tex(a.above);
        const below = this.tex(a.below);
        return `${a.above.kind === 'sum' ? `(${above})` : above}/${isUnit ? below : `(${below})`}`;
      }
      default:
        return this.tex(a);
    }
  }

  /** E_{v,i}: TeX takes one subscript only. */
  private element({ list, index }: Extract<Arranged, { kind: 'element' }>): string {
    const at = this.onLine(index) ?? this.tex(index);
    const name = this.style.texOf(list);
    const subscripted = /^(.*)_\{(.*)\}$/.exec(name);
    return subscripted ? `${subscripted[1]}_{${subscripted[2]},${at}}` : `${name}_{${at}}`;
  }

  private delimited(a: Arranged): string {
    return this.enclosed(this.tex(a), a);
  }

  /** Round, square and curly delimiters from inside out; as tall as what they hold. */
  private enclosed(inside: string, a: Arranged): string {
    const [open, close] = DELIMITERS[nesting(a) % DELIMITERS.length] ?? DELIMITERS[0];
    return levels(a) === 0 ? `${open}${inside}${close}` : `\\left${open}${inside}\\right${close}`;
  }
}

function asPowerOfTen(a: Arranged): boolean {
  return a.kind === 'number' && asDecimal(a.value) !== undefined;
}

function numberTex(r: Q.Rational): string {
  const decimal = asDecimal(r);
  if (decimal) {
    const { mantissa, exponent } = decimal;
    if (exponent === 0) return mantissa;
    return mantissa === '1' ? `10^{${exponent}}` : `${mantissa} \\times 10^{${exponent}}`;
  }
  return Q.isInteger(r) ? String(r.numerator) : `\\tfrac{${r.numerator}}{${r.denominator}}`;
}
