import { scaleByPowerOfTwo } from "./double-bits.ts";

// Constants and scheme: fdlibm 5.3, e_exp.c and s_expm1.c, Sun Microsystems 1993 (freely distributable).
const LN2_HIGH = 6.931471803691238e-1;
const LN2_LOW = 1.9082149292705877e-10;
const INVERSE_LN2 = Math.LOG2E;
const OVERFLOW_AT = 709.782712893384;
const UNDERFLOW_AT = -745.1332191019411;
/** 56 ln 2: below its negative, e^x − 1 rounds to −1. */
const EXPM1_SATURATES = 38.816242111356935;

/** x = k ln 2 + head − tail with |head − tail| ≤ ½ ln 2. */
function reduce(x: number): { k: number; head: number; tail: number } {
  const k = Math.abs(x) <= 0.34657359027997264 ? 0 : Math.trunc(INVERSE_LN2 * x + (x < 0 ? -0.5 : 0.5));
  return { k, head: x - k * LN2_HIGH, tail: k * LN2_LOW };
}

/** The even part of r coth(r/2) by a Remez polynomial: r − r²(P1 + r²(P2 + …)). */
export function expCore(r: number): number {
  const t = r * r;
  return (
    r -
    t *
      (1.6666666666666602e-1 +
        t *
          (-2.7777777777015593e-3 +
            t * (6.613756321437934e-5 + t * (-1.6533902205465252e-6 + t * 4.1381367970572385e-8))))
  );
}

/**
 * e^x from exactly rounded operations only, so that every engine gives the same bits; within 1 ulp of the
 * correctly rounded value. Any double; infinite from x > 709.78, zero from x < −745.13.
 * Source: fdlibm 5.3, e_exp.c (Sun Microsystems 1993).
 */
export function exp(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x > OVERFLOW_AT) return Number.POSITIVE_INFINITY;
  if (x < UNDERFLOW_AT) return 0;
  const { k, head, tail } = reduce(x);
  const r = head - tail;
  const c = expCore(r);
  if (k === 0) return 1 - ((r * c) / (c - 2) - r);
  return scaleByPowerOfTwo(1 - (tail - (r * c) / (2 - c) - head), k);
}

/**
 * e^x − 1 without cancellation near 0; same bits on every engine, within 1 ulp of the correctly rounded value.
 * Source: fdlibm 5.3, s_expm1.c (Sun Microsystems 1993).
 */
export function expm1(x: number): number {
  if (Number.isNaN(x) || Math.abs(x) < 5.551115123125783e-17) return x;
  if (x > OVERFLOW_AT) return Number.POSITIVE_INFINITY;
  if (x < -EXPM1_SATURATES) return -1;
  const { k, head, tail } = reduce(x);
  const r = head - tail;
  const rounding = head - r - tail;
  const halfR = 0.5 * r;
  const halfSquare = r * halfR;
  const r1 =
    1 +
    halfSquare *
      (-3.333333333333313e-2 +
        halfSquare *
          (1.5873015872548146e-3 +
            halfSquare *
              (-7.93650757867488e-5 +
                halfSquare * (4.008217827329362e-6 + halfSquare * -2.0109921818362437e-7))));
  const t = 3 - r1 * halfR;
  const e = halfSquare * ((r1 - t) / (6 - r * t));
  if (k === 0) return r - (r * e - halfSquare);
  return rebuildExpm1(r, r * (e - rounding) - rounding - halfSquare, k);
}

/** 2^k (1 + r − e) − 1, ordered by the size of k so that nothing cancels. */
function rebuildExpm1(r: number, e: number, k: number): number {
  if (k === -1) return 0.5 * (r - e) - 0.5;
  if (k === 1) return r < -0.25 ? -2 * (e - (r + 0.5)) : 1 + 2 * (r - e);
  if (k <= -2 || k > 56) return scaleByPowerOfTwo(1 - (e - r), k) - 1;
  const small = scaleByPowerOfTwo(1, -k);
  return scaleByPowerOfTwo(k < 20 ? 1 - small - (e - r) : r - (e + small) + 1, k);
}
