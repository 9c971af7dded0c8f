/** Expressions in TeX, as a careful author would set them. */
import type { Expression, FunctionName, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { arrange, arrangeRelation, type Arranged } from './arrange.ts';
import type { NameStyle } from './nameStyle.ts';

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

/** Functions that TeX has a command for; the others are set upright. */
const COMMANDS: Partial<Record<FunctionName, string>> = {
  ln: '\\ln',
  sinh: '\\sinh',
  cosh: '\\cosh',
  tanh: '\\tanh',
  coth: '\\coth',
  sin: '\\sin',
  cos: '\\cos',
  tan: '\\tan',
  min: '\\min',
  max: '\\max',
  exp: '\\exp',
  Gamma: '\\Gamma',
  digamma: '\\psi',
  lnGamma: '\\ln\\Gamma',
  log10: '\\log_{10}',
};

/** An exponent that is longer than this is set as exp(…). */
const LONGEST_EXPONENT = 60;

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
        return `-${a.inside.kind === 'sum' ? this.delimited(a.inside) : this.tex(a.inside)}`;
      case 'sum':
        return a.terms
          .map(({ minus, term }, i) => {
            const sign = i === 0 ? (minus ? '-' : '') : minus ? ' - ' : ' + ';
            const needs = term.kind === 'sum' || term.kind === 'negative';
            return sign + (needs ? this.delimited(term) : this.tex(term));
          })
          .join('');
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
        return `${sign}_{${from}}^{${this.tex(a.to)}} ${this.factor(a.body)}`;
      }
      case 'integral': {
        const variable = this.style.texOf(a.variable);
        return `\\int_{${this.tex(a.from)}}^{${this.tex(a.to)}} ${this.factor(a.body)} \\,\\mathrm{d}${variable}`;
      }
      case 'cases': {
        const rows = a.branches.map(
          ({ condition, value }) =>
            `${this.tex(value)} & ${this.tex(condition.left)} ${RELATIONS[condition.sign]} ${this.tex(condition.right)}`,
        );
        return `\\begin{cases} ${[...rows, `${this.tex(a.otherwise)} & \\text{otherwise}`].join(' \\\\ ')} \\end{cases}`;
      }
      case 'element':
        return `${this.style.texOf(a.list)}_{${this.tex(a.index)}}`;
    }
  }

  private product(factors: readonly Arranged[]): string {
    return factors
      .map((factor, i) => {
        const text = this.factor(factor);
        const previous = factors[i - 1];
        // Two numbers side by side would read as one.
        return previous && factor.kind === 'number' ? `\\cdot ${text}` : text;
      })
      .join(' ');
  }

  private factor(a: Arranged): string {
    return a.kind === 'sum' || a.kind === 'negative' ? this.delimited(a) : this.tex(a);
  }

  private power(base: Arranged, exponent: Arranged): string {
    const raised = `^{${this.inExponent(exponent)}}`;
    if (base.kind === 'call' && base.arguments.length === 1 && base.name !== 'exp') {
      const command = COMMANDS[base.name];
      if (command && base.name !== 'ln' && base.name !== 'Gamma' && base.name !== 'log10') {
        return `${command}${raised}${this.argument(base.arguments[0])}`;
      }
      return this.delimited(base) + raised;
    }
    const isSimple =
      base.kind === 'name' ||
      base.kind === 'element' ||
      (base.kind === 'number' && Q.isInteger(base.value));
    return (isSimple ? this.tex(base) : this.delimited(base)) + raised;
  }

  private call(a: Extract<Arranged, { kind: 'call' }>): string {
    const [x, second] = a.arguments;
    if (!x) return '';
    switch (a.name) {
      case 'exp': {
        const exponent = this.inExponent(x);
        return exponent.length <= LONGEST_EXPONENT && levels(x) <= 2
          ? `\\mathrm{e}^{${exponent}}`
          : `\\exp${this.delimited(x)}`;
      }
      case 'factorial':
        return `${isShort(x) ? this.tex(x) : this.delimited(x)}!`;
      case 'abs':
        return `\\left|${this.tex(x)}\\right|`;
      case 'binomial':
        return `\\binom{${this.tex(x)}}{${second ? this.tex(second) : ''}}`;
      case 'polygamma':
        return `\\psi^{(${this.tex(x)})}${second ? this.delimited(second) : ''}`;
      case 'polylog':
        return `\\mathrm{Li}_{${this.tex(x)}}${second ? this.delimited(second) : ''}`;
      case 'besselI':
        return `I_{${this.tex(x)}}${second ? this.delimited(second) : ''}`;
      case 'debye':
        return `D_{${this.tex(x)}}${second ? this.delimited(second) : ''}`;
      case 'partial': {
        const [, , ...fixed] = a.arguments;
        const constant = fixed.map((z) => this.tex(z)).join(',');
        return `\\left(\\frac{\\partial ${this.factor(x)}}{\\partial ${second ? this.factor(second) : ''}}\\right)_{${constant}}`;
      }
      default: {
        const command = COMMANDS[a.name] ?? `\\operatorname{${a.name}}`;
        if (a.arguments.length === 1) return command + this.argument(x);
        const inside = a.arguments.map((argument) => this.tex(argument)).join(', ');
        return `${command}\\left(${inside}\\right)`;
      }
    }
  }

  /** ln V and ln (V/N) as a fraction without parentheses; anything else within them. */
  private argument(x: Arranged | undefined): string {
    if (!x) return '';
    if (isShort(x)) return ` ${this.tex(x)}`;
    return x.kind === 'fraction' ? this.tex(x) : this.delimited(x);
  }

  /** A fraction in an exponent is set with a slash, where its parts are simple. */
  private inExponent(a: Arranged): string {
    if (a.kind === 'negative') return `-${this.inExponent(a.inside)}`;
    if (a.kind === 'number' && !Q.isInteger(a.value)) {
      return `${a.value.numerator}/${a.value.denominator}`;
    }
    if (a.kind !== 'fraction') return this.tex(a);
    const above = levels(a.above) === 0 && a.above.kind !== 'sum' ? this.tex(a.above) : undefined;
    const below = levels(a.below) === 0 ? this.tex(a.below) : undefined;
    if (above === undefined || below === undefined) return this.tex(a);
    const isGrouped = a.below.kind === 'product' || a.below.kind === 'sum';
    return `${above}/${isGrouped ? `(${below})` : below}`;
  }

  /** Round, square and curly delimiters by depth; as tall as what they hold. */
  private delimited(a: Arranged): string {
    const depth = nesting(a) % 3;
    const [open, close] = (
      [
        ['(', ')'],
        ['[', ']'],
        ['\\{', '\\}'],
      ] as const
    )[depth] ?? ['(', ')'];
    const inside = this.tex(a);
    return levels(a) === 0 ? `${open}${inside}${close}` : `\\left${open}${inside}\\right${close}`;
  }
}

function numberTex(r: Q.Rational): string {
  return Q.isInteger(r) ? String(r.numerator) : `\\tfrac{${r.numerator}}{${r.denominator}}`;
}

function isShort(a: Arranged): boolean {
  return a.kind === 'name' || a.kind === 'element' || (a.kind === 'number' && Q.isInteger(a.value));
}

function partsOf(a: Arranged): readonly Arranged[] {
  switch (a.kind) {
    case 'number':
    case 'name':
    case 'infinity':
      return [];
    case 'negative':
    case 'root':
      return [a.inside];
    case 'sum':
      return a.terms.map(({ term }) => term);
    case 'product':
      return a.factors;
    case 'fraction':
      return [a.above, a.below];
    case 'power':
      return [a.base];
    case 'call':
      return a.name === 'exp' ? [] : a.arguments;
    case 'summation':
    case 'productOver':
    case 'integral':
      return [a.body];
    case 'cases':
      return [...a.branches.map(({ value }) => value), a.otherwise];
    case 'element':
      return [a.index];
  }
}

/** How many fraction bars and big signs stand above each other: 0 for a flat line. */
function levels(a: Arranged): number {
  const inner = Math.max(0, ...partsOf(a).map(levels));
  switch (a.kind) {
    case 'fraction':
    case 'summation':
    case 'productOver':
    case 'integral':
    case 'cases':
      return inner + 1;
    case 'number':
      return Q.isInteger(a.value) ? 0 : 1;
    default:
      return inner;
  }
}

/** How many pairs of delimiters will stand inside. */
function nesting(a: Arranged): number {
  const inner = Math.max(0, ...partsOf(a).map(nesting));
  switch (a.kind) {
    case 'product':
      return Math.max(inner, ...a.factors.map((f) => (f.kind === 'sum' ? nesting(f) + 1 : 0)));
    case 'power':
      return a.base.kind === 'sum' || a.base.kind === 'fraction' ? inner + 1 : inner;
    case 'call': {
      const [x] = a.arguments;
      const isBare = a.name === 'exp' || (x !== undefined && (isShort(x) || x.kind === 'fraction'));
      return isBare ? inner : inner + 1;
    }
    default:
      return inner;
  }
}
