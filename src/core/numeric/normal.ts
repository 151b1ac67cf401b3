import { headOf } from "./double-bits.ts";
import { exp, log, log1p } from "./elementary.ts";
import { erfc, logScaledTail } from "./error-function.ts";
import { rational } from "./polynomial.ts";

export { erfc } from "./error-function.ts";

const INVERSE_SQRT_TWO_PI = 0.3989422804014327;
const LOG_SQRT_TWO_PI = 0.9189385332046728;
/** From here the tail is summed as an asymptotic series; its error is below 1e-18 there. */
const FAR_TAIL = 30;

/** e^(−x²/2) without losing digits to the rounding of x². */
function expOfHalfSquare(x: number): number {
  const head = headOf(x);
  return exp(-0.5 * head * head) * exp(-0.5 * (x - head) * (x + head));
}

/** log of x e^(x²/2) √(2π) Q(x), for x ≥ 1.8. */
function logScaledSurvival(x: number): number {
  if (x < FAR_TAIL) return LOG_SQRT_TWO_PI - 0.34657359027997264 + logScaledTail(x * Math.SQRT1_2);
  const w = 1 / (x * x);
  return log1p(-w * (1 - 3 * w * (1 - 5 * w * (1 - 7 * w * (1 - 9 * w * (1 - 11 * w))))));
}

/**
 * Upper tail of the standard normal, P(Z > x), with full relative precision in the tail (1e-14 down to 1e-300).
 * Any double; result in [0, 1].
 */
export function normalSurvival(x: number): number {
  if (x < 1.8) return 0.5 * erfc(x * Math.SQRT1_2);
  if (x > 39) return 0;
  return (INVERSE_SQRT_TWO_PI * expOfHalfSquare(x) * exp(logScaledSurvival(x))) / x;
}

/** Distribution function of the standard normal, P(Z ≤ x), with full relative precision in the lower tail. */
export function normalCdf(x: number): number {
  return normalSurvival(-x);
}

/**
 * log P(Z ≤ x), finite for every finite x: in the lower tail −x²/2 − log(−x√(2π)) + log(1 − 1/x² + 3/x⁴ − …).
 * Source of the series: Abramowitz & Stegun 1964, 26.2.12.
 */
export function logNormalCdf(x: number): number {
  if (x > 0) return log1p(-normalSurvival(x));
  if (x > -1.8) return log(normalCdf(x));
  if (x === Number.NEGATIVE_INFINITY) return x;
  return -0.5 * x * x - log(-x) - LOG_SQRT_TWO_PI + logScaledSurvival(-x);
}

const CENTRE = [
  [
    3.3871328727963665, 1.3314166789178438e2, 1.9715909503065513e3, 1.373169376550946e4, 4.592195393154987e4,
    6.72657709270087e4, 3.343057558358813e4, 2.5090809287301227e3,
  ],
  [
    1, 4.231333070160091e1, 6.871870074920579e2, 5.394196021424751e3, 2.1213794301586597e4,
    3.930789580009271e4, 2.8729085735721943e4, 5.226495278852854e3,
  ],
] as const;
const MIDDLE = [
  [
    1.4234371107496835, 4.630337846156546, 5.769497221460691, 3.6478483247632045, 1.2704582524523684,
    2.417807251774506e-1, 2.2723844989269184e-2, 7.745450142783414e-4,
  ],
  [
    1, 2.053191626637759, 1.6763848301838038, 6.897673349851e-1, 1.4810397642748008e-1, 1.5198666563616457e-2,
    5.475938084995345e-4, 1.0507500716444169e-9,
  ],
] as const;
const TAIL = [
  [
    6.657904643501103, 5.463784911164114, 1.7848265399172913, 2.9656057182850487e-1, 2.6532189526576124e-2,
    1.2426609473880784e-3, 2.7115555687434876e-5, 2.0103343992922881e-7,
  ],
  [
    1, 5.99832206555888e-1, 1.369298809227358e-1, 1.4875361290850615e-2, 7.868691311456133e-4,
    1.8463183175100548e-5, 1.421511758316446e-7, 2.0442631033899397e-15,
  ],
] as const;

/** z with P(Z > z) = q for a tail probability q ≤ 0.075. */
function tailQuantile(q: number): number {
  const r = Math.sqrt(-log(q));
  return r <= 5 ? rational(r - 1.6, ...MIDDLE) : rational(r - 5, ...TAIL);
}

/**
 * Quantile of the standard normal: z with P(Z ≤ z) = p. Relative error about 1e-15 for p from 1e-316 to 1 − 1e-16;
 * −Infinity at 0 and Infinity at 1.
 * @throws RangeError unless 0 ≤ p ≤ 1.
 * Source: Wichura 1988, algorithm AS 241 (PPND16), Applied Statistics 37:477–484, doi 10.2307/2347330.
 */
export function normalQuantile(p: number): number {
  if (!(p >= 0 && p <= 1)) throw new RangeError(`normalQuantile: expected 0 ≤ p ≤ 1, got ${p}`);
  if (p === 0) return Number.NEGATIVE_INFINITY;
  if (p === 1) return Number.POSITIVE_INFINITY;
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) return q * rational(0.180625 - q * q, ...CENTRE);
  return q < 0 ? -tailQuantile(p) : tailQuantile(1 - p);
}
