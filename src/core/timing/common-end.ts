import { chiSquareQuantile, chiSquareUpperTail } from "../numeric/chi-square.ts";
import { expm1, log1p } from "../numeric/elementary.ts";
import { findRoot } from "../numeric/roots.ts";
import { compensatedSum } from "../numeric/sums.ts";
import { type EffectiveRange, isUninformative, logPivot } from "../ranges/pivot.ts";

export interface CommonEndTest {
  /** T = 2 sum m_i ln((M* - b_i) / (M_i - b_i)). */
  readonly statistic: number;
  /** 2 (k - 1). */
  readonly df: number;
  readonly p: number;
  /** Taxa that entered: those with an informative find. */
  readonly taxa: number;
  /** Taxa that share the highest last find: they add nothing to T but keep their degrees of freedom. */
  readonly tied: number;
}

/** Levels in effective metres that a common end may have; `empty` is evidence against any common end. */
export type EndSet =
  | { readonly kind: "interval"; readonly low: number; readonly high: number }
  | { readonly kind: "empty" }
  | { readonly kind: "undefined" };

/** The taxa that say something about their end; the others still bound the common end from below. */
export function informative(ranges: readonly EffectiveRange[]): readonly EffectiveRange[] {
  return ranges.filter((range) => !isUninformative(range));
}

/** The highest of the last finds, in effective metres. */
export function highestLast(ranges: readonly EffectiveRange[]): number {
  return Math.max(...ranges.map((range) => range.last));
}

/** -2 sum ln V_i at a common end: T at the highest last find. */
export function endStatistic(ranges: readonly EffectiveRange[], end: number): number {
  return 2 * compensatedSum(ranges.map((range) => -logPivot(range, end)));
}

/**
 * Exact test that all ranges end at one level: T is chi-square with 2 (k - 1) degrees of freedom for any numbers of
 * finds and any bases. A small p speaks against one level, a p very near 1 for ends aligned too well.
 *
 * Assumes uniform recovery in the coordinate of the ranges, and taxa chosen without looking at their last finds.
 * Undefined with fewer than two informative taxa. After A. R. Solow 1996, Paleobiology 22:406-410.
 */
export function commonEndTest(ranges: readonly EffectiveRange[]): CommonEndTest | undefined {
  const kept = informative(ranges);
  if (kept.length < 2) return undefined;
  const highest = highestLast(kept);
  const statistic = endStatistic(kept, highest);
  const df = 2 * (kept.length - 1);
  return {
    statistic,
    df,
    p: chiSquareUpperTail(statistic, df),
    taxa: kept.length,
    tied: kept.filter((range) => range.last === highest).length,
  };
}

/**
 * The common end, given that there is one: every theta from the highest last find M* up to the root of
 * sum m_i ln((M* - b_i) / (theta - b_i)) = ln(1 - C). One-sided, exact; with one common known base it is the interval
 * of the pooled sample. Cut at the highest find of all ranges, the uninformative ones included.
 * After A. R. Solow 1996, Paleobiology 22:406-410; S. C. Wang, D. J. Chudzicki & P. J. Everson 2009, Paleobiology
 * 35:447-459.
 */
export function commonEndGiven(ranges: readonly EffectiveRange[], confidence: number): EndSet {
  const kept = informative(ranges);
  if (kept.length === 0) return { kind: "undefined" };
  const highest = highestLast(kept);
  const atHighest = kept.map((range) => ({ ...range, last: highest }));
  return cut(setAbove(atHighest, -2 * log1p(-confidence), highest), ranges);
}

/**
 * Every theta from the highest last find with -2 sum ln V_i(theta) up to the C quantile of chi-square with 2 k degrees
 * of freedom: exact level C, and empty where no common end fits.
 * After A. R. Solow 1996, Paleobiology 22:406-410.
 */
export function commonEndJoint(ranges: readonly EffectiveRange[], confidence: number): EndSet {
  const kept = informative(ranges);
  if (kept.length === 0) return { kind: "undefined" };
  const limit = chiSquareQuantile(1 - confidence, 2 * kept.length);
  return cut(setAbove(kept, limit, highestLast(kept)), ranges);
}

/** {theta >= lowest: endStatistic(theta) <= limit}; no single term can exceed the limit, which bounds theta above. */
function setAbove(kept: readonly EffectiveRange[], limit: number, lowest: number): EndSet {
  const excess = (end: number) => endStatistic(kept, end) - limit;
  if (excess(lowest) > 0) return { kind: "empty" };
  const alone = kept.map(({ base, last, exponent }) => last + (last - base) * expm1(limit / (2 * exponent)));
  const reach = (Math.min(...alone) - lowest) * (1 + 1e-9);
  if (!(reach > 0)) return { kind: "interval", low: lowest, high: lowest };
  // Beside a very long base the last digits of a height can hide the crossing: the bound of the nearest term stands.
  if (!(excess(lowest + reach) > 0)) return { kind: "interval", low: lowest, high: lowest + reach };
  const above = findRoot((x) => excess(lowest + x), 0, reach, { tolerance: 1e-13 * reach });
  return { kind: "interval", low: lowest, high: lowest + above };
}

function cut(set: EndSet, all: readonly EffectiveRange[]): EndSet {
  if (set.kind !== "interval") return set;
  const low = Math.max(set.low, highestLast(all));
  return low > set.high ? { kind: "empty" } : { kind: "interval", low, high: set.high };
}

/** True where one common level is rejected at a confidence. */
export const rejectsOneLevel = (p: number, confidence: number): boolean => p <= 1 - confidence;

/** Last finds agree better than chance allows beyond this p: the model fails from the other side. */
export const isAlignedTooWell = (p: number): boolean => p > TOO_WELL_ALIGNED;

const TOO_WELL_ALIGNED = 0.975;
