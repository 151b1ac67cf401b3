import { headOf, highWord, scaleByPowerOfTwo, withHighWord } from "./double-bits.ts";
import { expCore } from "./exponential.ts";

// Constants and scheme: fdlibm 5.3, e_pow.c, Sun Microsystems 1993 (freely distributable).
const TWO_53 = 9007199254740992;
const LN2 = Math.LN2;
const LN2_HIGH = 6.931471824645996e-1;
const LN2_LOW = -1.904654299957768e-9;
/** 2 / (3 ln 2) and its head and tail. */
const SCALE = 9.617966939259756e-1;
const SCALE_HIGH = 9.617967009544373e-1;
const SCALE_LOW = -7.028461650952758e-9;
/** log2(1.5), head and tail. */
const LOG2_1_5_HIGH = 5.849624872207642e-1;
const LOG2_1_5_LOW = 1.350039202129749e-8;

interface HeadAndTail {
  readonly head: number;
  readonly tail: number;
}

/** x = 2^n · m with m near its centre c = 1 or 1.5. */
function centre(x: number): { n: number; m: number; isUpper: boolean } {
  const isSubnormal = x < 2.2250738585072014e-308;
  const normal = isSubnormal ? x * TWO_53 : x;
  const high = highWord(normal);
  const n = (high >> 20) - 1023 - (isSubnormal ? 53 : 0);
  const fraction = high & 0xfffff;
  const one = fraction | 0x3ff00000;
  if (fraction <= 0x3988e) return { n, m: withHighWord(normal, one), isUpper: false };
  if (fraction < 0xbb67a) return { n, m: withHighWord(normal, one), isUpper: true };
  return { n: n + 1, m: withHighWord(normal, one - 0x100000), isUpper: false };
}

/** s = (m − c)/(m + c) as head and tail, and log(m/c)·3/2 from it as head and tail. */
function logOfRatio(m: number, c: number): HeadAndTail {
  const difference = m - c;
  const inverse = 1 / (m + c);
  const s = difference * inverse;
  const sHead = headOf(s);
  const sumHead = headOf(m + c);
  const sumTail = m - (sumHead - c);
  const sTail = inverse * (difference - sHead * sumHead - sHead * sumTail);
  const s2 = s * s;
  const series =
    5.999999999999946e-1 +
    s2 *
      (4.285714285785502e-1 +
        s2 *
          (3.3333332981837743e-1 +
            s2 * (2.72728123808534e-1 + s2 * (2.3066074577556175e-1 + s2 * 2.0697501780033842e-1))));
  const rest = s2 * s2 * series + sTail * (sHead + s);
  const square = sHead * sHead;
  const factorHead = headOf(3 + square + rest);
  const factorTail = rest - (factorHead - 3 - square);
  const product = sHead * factorHead;
  const small = sTail * factorHead + factorTail * s;
  const head = headOf(product + small);
  return { head, tail: small - (head - product) };
}

function log2Of(x: number): HeadAndTail {
  const { n, m, isUpper } = centre(x);
  const ratio = logOfRatio(m, isUpper ? 1.5 : 1);
  const centreHigh = isUpper ? LOG2_1_5_HIGH : 0;
  const high = SCALE_HIGH * ratio.head;
  const low = SCALE_LOW * ratio.head + ratio.tail * SCALE + (isUpper ? LOG2_1_5_LOW : 0);
  const head = headOf(high + low + centreHigh + n);
  return { head, tail: low - (head - n - centreHigh - high) };
}

/** 2^(head + tail). */
function powerOfTwoOf({ head, tail }: HeadAndTail): number {
  const exponent = head + tail;
  if (exponent > 1024.5) return Number.POSITIVE_INFINITY;
  if (exponent < -1076) return 0;
  const n = Math.round(exponent);
  const rest = head - n;
  const t = headOf(tail + rest);
  const u = t * LN2_HIGH;
  const v = (tail - (t - rest)) * LN2 + t * LN2_LOW;
  const z = u + v;
  const w = v - (z - u);
  const c = expCore(z);
  const r = (z * c) / (c - 2) - (w + z * w);
  return scaleByPowerOfTwo(1 - (r - z), n);
}

function powerOfPositive(x: number, y: number): number {
  if (x === 1) return 1;
  const logarithm = log2Of(x);
  // From here on the power overflows or underflows for every x other than 1.
  if (Math.abs(y) > 1.9e19) {
    return logarithm.head + logarithm.tail > 0 === y > 0 ? Number.POSITIVE_INFINITY : 0;
  }
  const yHead = headOf(y);
  return powerOfTwoOf({
    head: yHead * logarithm.head,
    tail: (y - yHead) * logarithm.head + y * logarithm.tail,
  });
}

function isOddInteger(y: number): boolean {
  return Number.isInteger(y) && Math.abs(y) < TWO_53 && y % 2 !== 0;
}

/** x^y where x is 0 or infinite, or y is infinite. */
function powerAtEdge(x: number, y: number): number {
  const size = Math.abs(x);
  if (Math.abs(y) === Number.POSITIVE_INFINITY) {
    if (size === 1) return Number.NaN;
    return size > 1 === y > 0 ? Number.POSITIVE_INFINITY : 0;
  }
  const magnitude = (size === 0) === y > 0 ? 0 : Number.POSITIVE_INFINITY;
  const isNegative = x < 0 || Object.is(x, -0);
  return isNegative && isOddInteger(y) ? -magnitude : magnitude;
}

/**
 * x^y from exactly rounded operations only: same bits on every engine, within 1 ulp of the correctly rounded
 * value. Special values are those of the language's `**`: anything to the 0 is 1, (±1)^±Infinity is NaN, a
 * negative x to a power that is not an integer is NaN.
 * Source: fdlibm 5.3, e_pow.c (Sun Microsystems 1993).
 */
export function pow(x: number, y: number): number {
  if (y === 0) return 1;
  if (Number.isNaN(x) || Number.isNaN(y)) return Number.NaN;
  if (y === 1) return x;
  if (x === 0 || !Number.isFinite(x) || !Number.isFinite(y)) return powerAtEdge(x, y);
  if (x > 0) return powerOfPositive(x, y);
  if (!Number.isInteger(y)) return Number.NaN;
  const size = powerOfPositive(-x, y);
  return isOddInteger(y) ? -size : size;
}
