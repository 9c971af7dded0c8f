/** Adaptive quadrature on a finite interval, for integrands that are smooth in pieces only. */
import type { Quadrature } from './quadrature.ts';

/**
 * Abscissae and weights of the 15-point rule of A. S. Kronrod (1965) with the 7-point rule of Gauss
 * inside, as tabulated by R. Piessens et al., QUADPACK (1983), routine QK15; from memory, and proven
 * by the exactness for polynomials up to degree 22 in the tests.
 */
const NODES = [
  0.991455371120812639206854697526329, 0.949107912342758524526189684047851,
  0.864864423359769072789712788640926, 0.741531185599394439863864773280788,
  0.58608723546769113029414469169, 0.405845151377397166906606412076961,
  0.207784955007898467600689403773245, 0,
];
const KRONROD_WEIGHTS = [
  0.02293532201052922496373200805897, 0.063092092629978553290700663189204,
  0.104790010322250183839876322541518, 0.140653259715525918745189590510238,
  0.16900472663926790282658342659855, 0.190350578064785409913256402421014,
  0.204432940075298892414161999234649, 0.209482141084727828012999174891714,
];
/** Weights of Gauss at the second, fourth, sixth and last abscissa. */
const GAUSS_WEIGHTS = [
  0.129484966168869693270611432679082, 0.27970539148927666790146777142378,
  0.381830050505118944950369775488975, 0.417959183673469387755102040816327,
];

interface Piece {
  readonly a: number;
  readonly b: number;
  readonly value: number;
  readonly error: number;
  readonly magnitude: number;
}

const MOST_PIECES = 2000;
/** Where a piece is split: not in the middle, where kinks of symmetric integrands like to be. */
const SPLIT = 0.46;

function rule(f: (x: number) => number, a: number, b: number): Piece {
  const middle = (a + b) / 2;
  const half = (b - a) / 2;
  let kronrod = 0;
  let gauss = 0;
  let magnitude = 0;
  for (let i = 0; i < NODES.length; i++) {
    const node = NODES[i] ?? 0;
    const weight = KRONROD_WEIGHTS[i] ?? 0;
    const right = f(middle + half * node);
    const left = node === 0 ? 0 : f(middle - half * node);
    kronrod += weight * (left + right);
    magnitude += weight * (Math.abs(left) + Math.abs(right));
    if (i % 2 === 1) gauss += (GAUSS_WEIGHTS[(i - 1) / 2] ?? 0) * (left + right);
  }
  const error = Math.abs((kronrod - gauss) * half);
  return { a, b, value: kronrod * half, magnitude: magnitude * Math.abs(half), error };
}

/**
 * ∫ f from a to b, both finite, splitting the piece with the largest error until the sum of errors
 * is below `tolerance` times ∫ |f|, or until splitting no longer helps.
 */
export function integrateAdaptively(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance: number,
): Quadrature {
  const pieces: Piece[] = [];
  const count = 8;
  for (let i = 0; i < count; i++) {
    pieces.push(rule(f, a + ((b - a) * i) / count, a + ((b - a) * (i + 1)) / count));
  }
  for (;;) {
    let value = 0;
    let error = 0;
    let magnitude = 0;
    let worst = 0;
    pieces.forEach((piece, i) => {
      value += piece.value;
      error += piece.error;
      magnitude += piece.magnitude;
      if (piece.error > (pieces[worst]?.error ?? 0)) worst = i;
    });
    const piece = pieces[worst];
    const isDone = !(error > tolerance * magnitude) || pieces.length >= MOST_PIECES || !piece;
    const between = piece ? piece.a + SPLIT * (piece.b - piece.a) : NaN;
    if (isDone || between === piece.a || between === piece.b) {
      return { value, error: Number.isNaN(value) ? Infinity : error, magnitude };
    }
    pieces.splice(worst, 1, rule(f, piece.a, between), rule(f, between, piece.b));
  }
}
