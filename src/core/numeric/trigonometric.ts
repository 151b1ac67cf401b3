import { highWord } from "./double-bits.ts";

// Constants and scheme: fdlibm 5.3, e_rem_pio2.c, k_sin.c and k_cos.c, Sun Microsystems 1993 (freely distributable).
const INVERSE_HALF_PI = 6.366197723675814e-1;
/** π/2 in three pieces of 33 bits, and what is left after each. */
const HALF_PI = [1.5707963267341256, 6.077100506303966e-11, 2.0222662487111665e-21] as const;
const HALF_PI_REST = [6.077100506506192e-11, 2.0222662487959506e-21, 8.4784276603689e-32] as const;
/** Up to here a quarter-turn count times a piece of π/2 is exact. */
const EXACT_UP_TO = 1647099;
/** The first 1216 binary places of 2/π, from mpmath 1.3.0 at 1400 bits. */
const TWO_OVER_PI_PLACES = 1216n;
const TWO_OVER_PI = BigInt(
  "0x" +
    "a2f9836e4e441529fc2757d1f534ddc0db6295993c439041fe5163abdebbc561b7246e3a424d" +
    "d2e006492eea09d1921cfe1deb1cb129a73ee88235f52ebb4484e99c7026b45f7e413991d639" +
    "835339f49c845f8bbdf9283b1ff897ffde05980fef2f118b5a0a6d1f6d367ecf27cb09b74f46" +
    "3f669e5fea2d7527bac7ebe5f17b3d0739f78a5292ea6bfb5fb11f8d5d0856033046fc7b6bab",
);
const FRACTION_BITS = 160n;

/** x = (quadrant + 4j) π/2 + head + tail with |head| ≤ π/4. */
interface Reduced {
  readonly quadrant: number;
  readonly head: number;
  readonly tail: number;
}

function exponentOf(x: number): number {
  return (highWord(x) >> 20) & 0x7ff;
}

function reduceModerate(x: number): Reduced {
  const turns = Math.round(x * INVERSE_HALF_PI);
  let rest = x - turns * HALF_PI[0];
  let small = turns * HALF_PI_REST[0];
  // Each further piece is taken when the last subtraction cancelled more bits than it carries to spare.
  for (const piece of [1, 2] as const) {
    if (exponentOf(x) - exponentOf(rest - small) <= (piece === 1 ? 16 : 49)) break;
    const before = rest;
    const step = turns * HALF_PI[piece];
    rest = before - step;
    small = turns * HALF_PI_REST[piece] - (before - rest - step);
  }
  const head = rest - small;
  return { quadrant: turns & 3, head, tail: rest - head - small };
}

/** Payne and Hanek's reduction in exact integers: the binary places of 2/π times the integer significand of x. */
function reduceHuge(x: number): Reduced {
  const exponent = exponentOf(x) - 1075;
  const significand = BigInt(Math.abs(x) / 2 ** exponent);
  const quarters = significand * TWO_OVER_PI;
  const places = TWO_OVER_PI_PLACES - BigInt(exponent);
  const shifted = quarters >> (places - FRACTION_BITS);
  const one = 1n << FRACTION_BITS;
  const nearest = (shifted + one / 2n) >> FRACTION_BITS;
  const fraction = shifted - (nearest << FRACTION_BITS);
  const unit = 2 ** -Number(FRACTION_BITS);
  const high = Number(fraction);
  const low = Number(fraction - BigInt(high)) * unit;
  const { head, tail } = timesHalfPi(high * unit, low);
  const sign = x < 0 ? -1 : 1;
  return { quadrant: (Number(nearest & 3n) * sign) & 3, head: sign * head, tail: sign * tail };
}

/** (high + low) π/2 as head and tail, by Dekker's exact product. */
function timesHalfPi(high: number, low: number): { head: number; tail: number } {
  const factor = 1.5707963267948966;
  const factorTail = 6.123233995736766e-17;
  const splitter = 134217729;
  const highHead = high * splitter - (high * splitter - high);
  const factorHead = factor * splitter - (factor * splitter - factor);
  const product = high * factor;
  const error =
    highHead * factorHead -
    product +
    highHead * (factor - factorHead) +
    (high - highHead) * factorHead +
    (high - highHead) * (factor - factorHead);
  const small = error + high * factorTail + low * factor;
  const head = product + small;
  return { head, tail: small - (head - product) };
}

function reduce(x: number): Reduced {
  if (Math.abs(x) <= 0.7853981633974483) return { quadrant: 0, head: x, tail: 0 };
  return Math.abs(x) < EXACT_UP_TO ? reduceModerate(x) : reduceHuge(x);
}

function sineNearZero(head: number, tail: number): number {
  const z = head * head;
  const r =
    8.33333333332249e-3 +
    z * (-1.984126982985795e-4 + z * 2.7557313707070068e-6) +
    z * z * z * (-2.5050760253406863e-8 + z * 1.58969099521155e-10);
  const cube = z * head;
  return head - (z * (0.5 * tail - cube * r) - tail - cube * -1.6666666666666632e-1);
}

function cosineNearZero(head: number, tail: number): number {
  const z = head * head;
  const w = z * z;
  const r =
    z * (4.16666666666666e-2 + z * (-1.388888888887411e-3 + z * 2.480158728947673e-5)) +
    w * w * (-2.7557314351390663e-7 + z * (2.087572321298175e-9 + z * -1.1359647557788195e-11));
  const half = 0.5 * z;
  const base = 1 - half;
  return base + (1 - base - half + (z * r - head * tail));
}

function sineInQuadrant({ head, tail }: Reduced, quadrant: number): number {
  const size = quadrant & 1 ? cosineNearZero(head, tail) : sineNearZero(head, tail);
  return quadrant & 2 ? -size : size;
}

/**
 * Sine of an angle in radians from exactly rounded operations only: same bits on every engine, within 1 ulp of
 * the correctly rounded value for every finite x. NaN for an infinite x.
 * Source: fdlibm 5.3, s_sin.c (Sun Microsystems 1993); for |x| > 1.6e6 the reduction of Payne & Hanek 1983,
 * ACM SIGNUM Newsletter 18(1):19–24, doi 10.1145/1057600.1057602.
 */
export function sin(x: number): number {
  if (!Number.isFinite(x)) return Number.NaN;
  if (Math.abs(x) < 1.4901161193847656e-8) return x;
  const reduced = reduce(x);
  return sineInQuadrant(reduced, reduced.quadrant);
}

/** Cosine of an angle in radians; accuracy, domain and source as for {@link sin}. */
export function cos(x: number): number {
  if (!Number.isFinite(x)) return Number.NaN;
  const reduced = reduce(x);
  return sineInQuadrant(reduced, (reduced.quadrant + 1) & 3);
}
