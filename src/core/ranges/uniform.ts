import { expm1, log1p } from "../numeric/elementary.ts";
import { findRoot } from "../numeric/roots.ts";
import { type EffectiveRange, isUninformative } from "./pivot.ts";

/**
 * One-ended range extension as a multiple of the range: (1 - C)^(-1/m) - 1.
 *
 * Assumes finds uniform over the true range. m = n - 1 with the first find as working base (the multiple is of the
 * observed range R), m = n with a base known independently (the multiple is of M - b).
 *
 * @param confidence C, in (0, 1).
 * @param exponent m, 1 or more; throws below.
 * @example extensionFactor(0.95, 1) is 19: two finds, base unknown.
 * Strauss & Sadler 1989, Mathematical Geology 21:411-427, doi 10.1007/BF00897326.
 */
export function extensionFactor(confidence: number, exponent: number): number {
  requireLevel("extensionFactor", confidence);
  if (!(exponent >= 1))
    throw new RangeError(`extensionFactor: expected 1 or more, got ${exponent} (exponent)`);
  return expm1(-log1p(-confidence) / exponent);
}

/**
 * Joint level of extending both ends of an observed range R by aR: C = 1 - 2 (1 + a)^-(n-1) + (1 + 2a)^-(n-1).
 * n horizons, 2 or more; a is 0 or more. Strauss & Sadler 1989, doi 10.1007/BF00897326.
 */
export function twoEndedLevel(factor: number, horizons: number): number {
  return 1 - twoEndedMiss(factor, horizons);
}

/** The extension a of `twoEndedLevel` that has joint level C, by bisection of the monotone miss probability. */
export function twoEndedFactor(confidence: number, horizons: number): number {
  requireLevel("twoEndedFactor", confidence);
  if (!(horizons >= 2))
    throw new RangeError(`twoEndedFactor: expected 2 or more, got ${horizons} (horizons)`);
  const miss = 1 - confidence;
  const high = expm1((Math.LN2 - log1p(-confidence)) / (horizons - 1));
  return findRoot((a) => miss - twoEndedMiss(a, horizons), 0, high);
}

function twoEndedMiss(factor: number, horizons: number): number {
  const power = (x: number) => 1 + expm1(-(horizons - 1) * log1p(x));
  return 2 * power(factor) - power(2 * factor);
}

/**
 * Upper bound of the true end at level C, in the coordinate of the range: M + (M - b) ((1 - C)^(-1/m) - 1).
 * Undefined with no informative find or no length. Strauss & Sadler 1989, doi 10.1007/BF00897326.
 */
export function uniformBound(range: EffectiveRange, confidence: number): number | undefined {
  if (isUninformative(range)) return undefined;
  return range.last + (range.last - range.base) * extensionFactor(confidence, range.exponent);
}

/**
 * Unbiased point estimate of the true end: the last find plus the mean gap, M + (M - b) / m.
 * Undefined with no informative find or no length. Strauss & Sadler 1989, doi 10.1007/BF00897326.
 */
export function uniformPoint(range: EffectiveRange): number | undefined {
  if (isUninformative(range)) return undefined;
  return range.last + (range.last - range.base) / range.exponent;
}

function requireLevel(name: string, confidence: number): void {
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError(`${name}: expected a level between 0 and 1, got ${confidence} (confidence)`);
}
