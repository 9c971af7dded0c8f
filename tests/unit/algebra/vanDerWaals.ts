/** The hard-core fluid with mean-field attraction, built by hand: the algebra knows no language. */
import * as C from '../../../shared/algebra/construct.ts';
import { expandLn } from '../../../shared/algebra/logarithm.ts';

export function positive(name: string): ReturnType<typeof C.symbol> {
  return C.symbol(name, { positive: true });
}

export const N = positive('N');
export const V = positive('V');
export const T = positive('T');
export const k = positive('k');
export const h = positive('h');
export const m = positive('m');
export const a = positive('a');
export const b = positive('b');

export const Lambda = C.abbreviation(
  'Lambda',
  C.divide(h, C.sqrt(C.product([C.two, C.pi, m, k, T]))),
);
export const free = C.subtract(V, C.multiply(N, b));

/** N ln(V − N b) − 3 N ln Λ + a N²/(V k T) − N ln N + N */
export const lnQ = C.sum([
  expandLn(
    C.power(
      C.product([
        free,
        C.power(Lambda, C.integer(-3)),
        C.exp(C.divide(C.multiply(a, N), C.product([V, k, T]))),
      ]),
      N,
    ),
  ),
  C.negate(C.multiply(N, C.ln(N))),
  N,
]);
