import { headOf, highWord, withHighWord } from "./double-bits.ts";

// Constants and scheme: fdlibm 5.3, e_log.c and s_log1p.c, Sun Microsystems 1993 (freely distributable);
// the head and tail of log10 after FreeBSD msun, e_log10.c.
const LN2_HIGH = 6.931471803691238e-1;
const LN2_LOW = 1.9082149292705877e-10;
const INVERSE_LN10_HIGH = 4.342944818781689e-1;
const INVERSE_LN10_LOW = 2.5082946711645275e-11;
const LOG10_2_HIGH = 3.0102999566361177e-1;
const LOG10_2_LOW = 3.694239077158931e-13;
const TWO_54 = 18014398509481984;
const SMALLEST_NORMAL = 2.2250738585072014e-308;
/** High words of √½ and of 1: adding their difference moves the fraction to [√½, √2). */
const HIGH_OF_SQRT_HALF = 0x3fe6a09e;
const HIGH_OF_ONE = 0x3ff00000;

/** x = 2^k (1 + f) with √½ ≤ 1 + f < √2, for finite x > 0. */
function split(x: number): { k: number; f: number } {
  const isSubnormal = x < SMALLEST_NORMAL;
  const normal = isSubnormal ? x * TWO_54 : x;
  const shifted = highWord(normal) + (HIGH_OF_ONE - HIGH_OF_SQRT_HALF);
  const k = (shifted >> 20) - 1023 - (isSubnormal ? 54 : 0);
  return { k, f: withHighWord(normal, (shifted & 0xfffff) + HIGH_OF_SQRT_HALF) - 1 };
}

/** With s = f/(2 + f): log(1 + f) = f − f²/2 + s(f²/2 + R(s²)); returns s(f²/2 + R). */
function correction(f: number, halfSquare: number): number {
  const s = f / (2 + f);
  const z = s * s;
  const w = z * z;
  const even = w * (3.999999999940942e-1 + w * (2.2222198432149784e-1 + w * 1.5313837699209373e-1));
  const odd =
    z *
    (6.666666666666735e-1 +
      w * (2.857142874366239e-1 + w * (1.818357216161805e-1 + w * 1.4798198605116586e-1)));
  return s * (halfSquare + (odd + even));
}

/** log at the points where no series is wanted, otherwise undefined. */
function logAtEdge(x: number): number | undefined {
  if (Number.isNaN(x) || x < 0) return Number.NaN;
  if (x === 0) return Number.NEGATIVE_INFINITY;
  return x === Number.POSITIVE_INFINITY ? x : undefined;
}

/**
 * Natural logarithm from exactly rounded operations only: same bits on every engine, within 1 ulp of the
 * correctly rounded value. −Infinity at 0, NaN below 0.
 * Source: fdlibm 5.3, e_log.c (Sun Microsystems 1993).
 */
export function log(x: number): number {
  const edge = logAtEdge(x);
  if (edge !== undefined) return edge;
  const { k, f } = split(x);
  const halfSquare = 0.5 * f * f;
  return k * LN2_HIGH - (halfSquare - (correction(f, halfSquare) + k * LN2_LOW) - f);
}

/**
 * log(1 + x) without losing the digits of a small x; within 1 ulp. −Infinity at −1, NaN below.
 * Source: fdlibm 5.3, s_log1p.c (Sun Microsystems 1993).
 */
export function log1p(x: number): number {
  if (x === 0 || Math.abs(x) < 1.1102230246251565e-16) return x;
  const edge = logAtEdge(1 + x);
  if (edge !== undefined) return edge;
  if (x > -0.2928932 && x < 0.4142135) {
    const halfSquare = 0.5 * x * x;
    return x - (halfSquare - correction(x, halfSquare));
  }
  const sum = 1 + x;
  const { k, f } = split(sum);
  const lost = (k >= 2 ? 1 - (sum - x) : x - (sum - 1)) / sum;
  const halfSquare = 0.5 * f * f;
  return k * LN2_HIGH - (halfSquare - (correction(f, halfSquare) + (k * LN2_LOW + lost)) - f);
}

/**
 * Logarithm to base 10; exact at every power of ten that is a double, within 1 ulp elsewhere.
 * Source: scheme of fdlibm 5.3 with a head and tail product after FreeBSD msun, e_log10.c.
 */
export function log10(x: number): number {
  const edge = logAtEdge(x);
  if (edge !== undefined) return edge;
  const { k, f } = split(x);
  const halfSquare = 0.5 * f * f;
  const head = headOf(f - halfSquare);
  const tail = f - head - halfSquare + correction(f, halfSquare);
  const headProduct = head * INVERSE_LN10_HIGH;
  const tailProduct = k * LOG10_2_LOW + (tail + head) * INVERSE_LN10_LOW + tail * INVERSE_LN10_HIGH;
  const exponentPart = k * LOG10_2_HIGH;
  const sum = exponentPart + headProduct;
  return tailProduct + (exponentPart - sum + headProduct) + sum;
}
