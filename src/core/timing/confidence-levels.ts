import { kolmogorovUpperTail } from "../numeric/kolmogorov.ts";
import { findRoot } from "../numeric/roots.ts";
import { type EffectiveRange, pivot } from "../ranges/pivot.ts";
import { highestLast, informative } from "./common-end.ts";

export interface LevelTest {
  /** Kolmogorov-Smirnov distance of the taxa's levels from the uniform distribution. */
  readonly statistic: number;
  readonly p: number;
}

export interface LargestP extends LevelTest {
  /** Where in the interval p is largest, in effective metres. */
  readonly at: number;
}

/**
 * Did all ranges end at this level? At the true end the levels V_i(theta) = ((M_i - b_i) / (theta - b_i))^m_i are
 * independent and uniform on (0, 1); their exact two-sided Kolmogorov-Smirnov p is returned. Below the highest find of
 * any range the answer is no: p = 0, distance 1.
 *
 * Assumes uniform recovery in the coordinate of the ranges. Undefined without an informative taxon.
 * The idea: M. S. Springer 1990, Paleobiology 16:512-520; the exact statistic is ours.
 */
export function levelTest(ranges: readonly EffectiveRange[], end: number): LevelTest | undefined {
  const kept = informative(ranges);
  if (kept.length === 0) return undefined;
  if (end < highestLast(ranges)) return { statistic: 1, p: 0 };
  const { above, below } = distances(kept, end);
  const statistic = Math.max(above, below);
  return { statistic, p: kolmogorovUpperTail(statistic, kept.length) };
}

/**
 * The largest p of `levelTest` over an interval of levels, and where. Every level V_i falls as theta rises, so the
 * distance upward rises and the one downward falls: the smallest distance is where they cross, or at an end.
 */
export function largestLevelP(
  ranges: readonly EffectiveRange[],
  low: number,
  high: number,
): LargestP | undefined {
  const kept = informative(ranges);
  if (kept.length === 0) return undefined;
  const lowest = Math.max(low, highestLast(ranges));
  if (lowest > high) return { statistic: 1, p: 0, at: high };
  const at = leastDistance(kept, lowest, high);
  const { above, below } = distances(kept, at);
  const statistic = Math.max(above, below);
  return { statistic, p: kolmogorovUpperTail(statistic, kept.length), at };
}

function leastDistance(kept: readonly EffectiveRange[], low: number, high: number): number {
  const difference = (end: number) => {
    const { above, below } = distances(kept, end);
    return above - below;
  };
  if (low === high || difference(low) >= 0) return low;
  if (difference(high) <= 0) return high;
  return low + findRoot((x) => difference(low + x), 0, high - low);
}

/** The largest i/k - V_(i) and the largest V_(i) - (i - 1)/k of the sorted levels. */
function distances(kept: readonly EffectiveRange[], end: number): { above: number; below: number } {
  const levels = Float64Array.from(kept, (range) => pivot(range, end)).toSorted();
  let above = 0;
  let below = 0;
  levels.forEach((level, i) => {
    above = Math.max(above, (i + 1) / levels.length - level);
    below = Math.max(below, level - i / levels.length);
  });
  return { above, below };
}
