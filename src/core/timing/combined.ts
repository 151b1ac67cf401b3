import { chiSquareUpperTail } from "../numeric/chi-square.ts";
import type { EffectiveRange } from "../ranges/pivot.ts";
import { endStatistic, highestLast, informative } from "./common-end.ts";

export interface CombinedTest {
  /** X = -2 sum ln V_i, chi-square with 2 k degrees of freedom. */
  readonly statistic: number;
  readonly df: number;
  readonly p: number;
}

export interface LargestCombined extends CombinedTest {
  /** Where in the interval p is largest, in effective metres. */
  readonly at: number;
}

/**
 * Did all ranges end at this level? At the true end the levels V_i(theta) = ((M_i - b_i) / (theta - b_i))^m_i are
 * independent and uniform on (0, 1), so Fisher's X = -2 sum ln V_i is chi-square with 2 k degrees of freedom; large X: the
 * last finds lie too far below the level. Below the highest find of any range the answer is no: p = 0.
 *
 * Assumes uniform recovery in the coordinate of the ranges. Undefined without an informative taxon.
 * The idea of judging all ranges at one level: M. S. Springer 1990, Paleobiology 16:512-520; the statistic is ours.
 */
export function combinedTest(ranges: readonly EffectiveRange[], end: number): CombinedTest | undefined {
  const kept = informative(ranges);
  if (kept.length === 0) return undefined;
  const df = 2 * kept.length;
  if (end < highestLast(ranges)) return { statistic: Number.POSITIVE_INFINITY, df, p: 0 };
  const statistic = endStatistic(kept, end);
  return { statistic, df, p: chiSquareUpperTail(statistic, df) };
}

/** The largest p of `combinedTest` over an interval of levels: p falls upward, so that it is at the lowest one possible. */
export function largestCombinedP(
  ranges: readonly EffectiveRange[],
  low: number,
  high: number,
): LargestCombined | undefined {
  const at = Math.min(high, Math.max(low, highestLast(ranges)));
  const test = combinedTest(ranges, at);
  return test && { ...test, at };
}
