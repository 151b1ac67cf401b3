import { exp, expm1, log1p } from "../numeric/elementary.ts";

/** A taxon's range in the recovery-weighted coordinate: all that its finds tell about its true end. */
export interface EffectiveRange {
  /** Working base b, in effective metres. */
  readonly base: number;
  /** Highest find M, in effective metres. */
  readonly last: number;
  /** m: finds that carry information on the end (n - 1 with the first find as base, n with a known base). */
  readonly exponent: number;
}

/** True where the range tells nothing about its end: no informative find, or no length. */
export function isUninformative({ base, last, exponent }: EffectiveRange): boolean {
  return exponent < 1 || !(last > base);
}

/**
 * ln V, with V = ((U(M) - U(b)) / (U(theta) - U(b)))^m: uniform on (0, 1) at the true end theta where finds are a
 * Poisson process of intensity proportional to recovery. V is the chance that the last find lies this low.
 *
 * @param end theta in effective metres, at or above the last find.
 */
export function logPivot({ base, last, exponent }: EffectiveRange, end: number): number {
  return end <= last ? 0 : -exponent * log1p((end - last) / (last - base));
}

/** V of `logPivot`; 1 at the last find, 0 below it (the taxon was found higher than that end). */
export function pivot(range: EffectiveRange, end: number): number {
  return end < range.last ? 0 : exp(logPivot(range, end));
}

/** 1 - V: the confidence at which the one-sided interval of the end just reaches a level. */
export function confidenceToReach(range: EffectiveRange, level: number): number {
  return level <= range.last ? 0 : -expm1(logPivot(range, level));
}
